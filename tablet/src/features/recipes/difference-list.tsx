import type { Difference } from '@steepfall/shared/desk';

/** What is not the same, as a person would say it: the thing, then what it was and what it is. */
export function DifferenceList({ differences }: { differences: readonly Difference[] }) {
  return (
    <ul className="grid">
      {differences.map(({ path, what, from, to }) => (
        <li
          key={`${path}|${what}`}
          className="grid gap-x-4 border-b border-hair py-2 text-body last:border-b-0 sm:grid-cols-[minmax(0,1fr)_minmax(0,1.2fr)]"
        >
          <span className="font-medium break-words">{what}</span>
          <span className="break-words tabular-nums">
            {from === null ? (
              <>
                <span className="text-soft">new: </span>
                {to}
              </>
            ) : to === null ? (
              <>
                <span className="text-soft">taken out: </span>
                <s>{from}</s>
              </>
            ) : (
              <>
                <span className="text-soft">{from}</span>
                <span className="sr-only">, now </span>
                <span aria-hidden="true"> → </span>
                <span className="font-medium">{to}</span>
              </>
            )}
          </span>
        </li>
      ))}
    </ul>
  );
}
