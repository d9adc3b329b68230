import { useState } from 'react';
import {
  alertPriority,
  alertWords,
  isShelved,
  QUIET_REASON,
  QUIET_S,
  USUAL_SHELF_S,
  type Alert,
} from '@steepfall/shared/runs';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { Segmented } from '#components/segmented.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { useLive, useRun, useRunStore } from '#lib/run-store/run-context.tsx';
import { useUnits } from '#lib/units.ts';
import { faultCount, faultStanding, faultWords } from './fault-words.ts';

/** Nobody types on a brew day. */
const reasons = ['Watched by hand', 'Known, and being mended', 'Not needed now'] as const;
const minutes = [USUAL_SHELF_S / 60, 30, 60];

/** Everything that does not work, by itself: what calls, what was heard, what was put aside and until when. */
export function FaultList({
  faults,
  isOpen,
  onClose,
}: {
  faults: readonly Alert[];
  isOpen: boolean;
  onClose: () => void;
}) {
  const count = useLive(({ nowMs }) => faultCount(faults, nowMs));
  return (
    <Dialog
      isOpen={isOpen}
      onClose={onClose}
      title={faults.length === 0 ? 'No faults' : count}
      size="wide"
      actions={
        <Button size="sheet" onClick={onClose}>
          Close
        </Button>
      }
    >
      <ul className="grid gap-6">
        {faults.map((fault) => (
          <Fault key={`${fault.key}/${fault.crossing}`} fault={fault} />
        ))}
      </ul>
    </Dialog>
  );
}

function Fault({ fault }: { fault: Alert }) {
  const { state, entries } = useRun();
  const store = useRunStore();
  const { temperature } = useUnits();
  const [isPuttingAside, setPuttingAside] = useState(false);
  const { key, crossing } = fault;
  const { verb, why } = alertWords(state, fault, temperature);
  const standing = useLive(({ nowMs }) => faultStanding(fault, nowMs));
  const isAside = useLive(({ nowMs }) => isShelved(fault, nowMs));
  const shelve = (forS: number, reason: string) => store.act({ type: 'shelveAlert', key, crossing, forS, reason });
  const bringBack = () => {
    const undone = new Set(state.undoneEventIds);
    const shelved = entries.findLast(
      ({ id, type, payload }) =>
        type === 'alert.shelved' && !undone.has(id) && (payload as { key: string }).key === key,
    );
    if (shelved) void store.act({ type: 'undoEvent', eventId: shelved.id, eventType: 'alert.shelved' });
  };
  return (
    <li className="grid gap-3 border-l-6 border-text pl-4">
      <p className="flex flex-wrap items-center gap-x-3 text-body text-soft">
        <ShapeGlyph shape="broken" className="size-5 shrink-0 text-text" />
        <strong className="text-text">{faultWords[alertPriority(fault)]}</strong>
        <span className="tabular-nums">{standing}</span>
      </p>
      <p className="text-lead">
        <strong>{verb}.</strong> {why}
      </p>
      {isPuttingAside ? (
        <PutAside
          onPut={(forS, reason) => {
            setPuttingAside(false);
            void shelve(forS, reason);
          }}
        />
      ) : (
        <p className="flex flex-wrap gap-3">
          {isAside ? (
            <Button size="sheet" onClick={bringBack}>
              Bring it back
            </Button>
          ) : (
            <>
              {fault.acknowledgedAtMs === null ? (
                <Button
                  size="sheet"
                  look="primary"
                  onClick={() => void store.act({ type: 'acknowledgeAlert', key, crossing })}
                >
                  Heard it
                </Button>
              ) : null}
              <Button size="sheet" onClick={() => void shelve(QUIET_S, QUIET_REASON)}>
                Quiet for 2 min
              </Button>
              <Button size="sheet" onClick={() => setPuttingAside(true)}>
                Put aside
              </Button>
            </>
          )}
        </p>
      )}
    </li>
  );
}

/** With a reason and an end: it comes back by itself. */
function PutAside({ onPut }: { onPut: (forS: number, reason: string) => void }) {
  const [forMin, setForMin] = useState(String(minutes[0]));
  return (
    <div className="grid justify-items-start gap-3">
      <Segmented
        label="Put aside for"
        value={forMin}
        onChange={setForMin}
        segments={minutes.map((count) => ({ value: String(count), label: `${count} min` }))}
      />
      <p className="text-body">Why? It calls again by itself after that.</p>
      <p className="flex flex-wrap gap-3">
        {reasons.map((reason) => (
          <Button key={reason} size="sheet" onClick={() => onPut(Number(forMin) * 60, reason)}>
            {reason}
          </Button>
        ))}
      </p>
    </div>
  );
}
