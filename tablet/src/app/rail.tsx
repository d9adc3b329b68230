import type { ReactNode } from 'react';
import { NavLink } from 'react-router-dom';
import type { Permission } from '@steepfall/shared/contracts';
import { classNames } from '#components/class-names.ts';
import { Mark } from '#components/mark.tsx';
import { useMay } from '#lib/session.ts';

interface Place {
  to: string;
  word: string;
  permission: Permission;
  drawing: ReactNode;
}

/** Drawn from the same two things as the mark: a level, and what happens at it. */
const places: Place[] = [
  {
    to: '/',
    word: 'Today',
    permission: 'house:read',
    drawing: <path d="M3 14h6M19 14h10M7 4c2 8 8 16 18 22" />,
  },
  {
    to: '/recipes',
    word: 'Recipes',
    permission: 'recipes:read',
    drawing: <path d="M4 7h4m5 0h15M4 16h11m5 0h8M4 25h17m5 0h2M10.500 4.500v5M17.500 13.500v5M23.500 22.500v5" />,
  },
  {
    to: '/stores',
    word: 'Stores',
    permission: 'stores:read',
    drawing: <path d="M3 14h26M3 27h26M7 14V5h6v9M18 14V8h7v6M9 27v-7h12v7" />,
  },
  {
    to: '/batches',
    word: 'Book',
    permission: 'batches:read',
    drawing: <path d="M4 24l8-15 7 9 9 8M12 9V3h6l-2 2 2 2h-6" />,
  },
  {
    to: '/house',
    word: 'House',
    permission: 'equipment:read',
    drawing: <path d="M3 15L16 4l13 11M7 12v16h18V12M12 21h8" />,
  },
];

/** Left rail on a tablet, bar at the foot on a phone. The places are levels on a scale; where you are is the notch. */
export function Rail() {
  const may = useMay();
  return (
    <nav
      aria-label="Places"
      className="fixed inset-x-0 bottom-0 z-30 border-t-2 border-edge bg-ground pb-[env(safe-area-inset-bottom)] md:sticky md:top-0 md:h-dvh md:border-r-2 md:border-t-0 md:pb-0"
    >
      <div className="flex h-full md:flex-col">
        <NavLink to="/" aria-label="Steepfall, today" className="hidden justify-center pb-8 pt-8 md:flex">
          <Mark className="size-12" />
        </NavLink>
        <ul className="flex flex-1 md:flex-col md:gap-2">
          {places
            .filter(({ permission }) => may(permission))
            .map(({ to, word, drawing }) => (
              <li key={to} className="flex-1 md:flex-none">
                <RailLink to={to} word={word} drawing={drawing} />
              </li>
            ))}
          <li className="flex-1 md:mt-auto md:flex-none md:pb-5">
            <RailLink to="/about" word="Station" drawing={<path d="M4 26h24M16 12v9M16 5v2.500" />} />
          </li>
        </ul>
      </div>
    </nav>
  );
}

function RailLink({ to, word, drawing }: Omit<Place, 'permission'>) {
  return (
    <NavLink
      to={to}
      end={to === '/'}
      className={({ isActive }) =>
        classNames(
          'group relative flex min-h-18 flex-col items-center justify-center gap-1 text-note md:min-h-22',
          isActive ? 'font-semibold text-text' : 'text-soft hover:text-text',
        )
      }
    >
      {({ isActive }) => (
        <>
          <svg
            viewBox="0 0 32 32"
            className="size-7 md:size-8"
            fill="none"
            stroke="currentColor"
            strokeWidth={isActive ? 3 : 2.25}
            aria-hidden="true"
          >
            {drawing}
          </svg>
          {word}
          <span
            aria-hidden="true"
            className={classNames(
              'absolute top-0 h-1.5 bg-text md:right-0 md:top-1/2 md:h-1',
              isActive ? 'w-10 md:w-5' : 'hidden w-2 bg-edge md:block',
            )}
          />
        </>
      )}
    </NavLink>
  );
}
