import type { RunAccount } from '@steepfall/shared/runs';
import { ShapeGlyph } from '#components/shapes.tsx';
import { useRunState, useRunStore } from '#lib/run-store/run-context.tsx';
import { useUnits } from '#lib/units.ts';
import { useAccount } from './live-figures-follow.ts';
import { figuresOfStep, type LiveFigure } from './live-figures-words.ts';
import './live-figures.css';

/** The one or two figures of the present step, beside its title: nothing moves when they come. */
export function LiveFigures() {
  const account = useAccount();
  const figures = useFigures(account);
  if (figures.length === 0) return null;
  return (
    <dl className="figures" aria-label="Figures so far">
      {figures.map((figure) => (
        <Figure key={figure.id} figure={figure} />
      ))}
    </dl>
  );
}

function useFigures(account: RunAccount | null): LiveFigure[] {
  const state = useRunState();
  const store = useRunStore();
  const units = useUnits();
  return account?.kind === 'account' ? figuresOfStep(account, state, store.nowMs(), units) : [];
}

function Figure({ figure: { label, number, unit, word, shape, isDue } }: { figure: LiveFigure }) {
  return (
    <div className="figure" data-due={isDue || undefined}>
      <dt className="figure-label">{label}</dt>
      <dd>
        <span className="figure-number">
          {number}
          {unit ? <span className="figure-unit"> {unit}</span> : null}
        </span>
        {word ? (
          <span className="figure-word">
            {shape ? <ShapeGlyph shape={shape} className="size-[0.75em] shrink-0" /> : null}
            {word}
          </span>
        ) : null}
      </dd>
    </div>
  );
}
