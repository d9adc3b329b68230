import { Link } from 'react-router-dom';
import { PressButton } from '#components/press-button.tsx';
import { useRun, useRunStore } from '#lib/run-store/run-context.tsx';
import { clockTime } from '#lib/words.ts';

/** The run is over: where to look next, and a way back if it was a slip. */
export function Ended() {
  const { state, pendingCount } = useRun();
  const store = useRunStore();
  const { outcome, endedAtMs, endEventId } = state;
  const time = endedAtMs === null ? '' : clockTime(endedAtMs);
  return (
    <>
      <section className="step" aria-label="Run ended">
        <div className="step-words">
          <h1 tabIndex={-1} id="step-heading" className="step-title">
            {outcome === 'abandoned' ? 'Run given up' : 'Run finished'}
          </h1>
          <p className="step-detail tabular-nums">
            {state.title}
            {state.isRehearsal ? '' : `, ended at ${time}`}.
            {pendingCount > 0 ? ` ${pendingCount} still to be sent: keep this tablet on until it says 0.` : ''}
          </p>
        </div>
      </section>
      <section className="act-bar" aria-label="Act">
        {endEventId ? (
          <PressButton
            className="act-side act-back"
            onPress={() => void store.act({ type: 'undoEvent', eventId: endEventId, eventType: 'run.ended' })}
          >
            Open it again
          </PressButton>
        ) : null}
        <Link to={`/runs/${store.runId}/record`} className="press-button act-main">
          See the record
        </Link>
        <div className="act-extras">
          <Link to="/" className="press-button act-side">
            Home
          </Link>
        </div>
      </section>
    </>
  );
}
