import { useQuery, useQueryClient } from '@tanstack/react-query';
import type { Lot, LotMove } from '@steepfall/shared/contracts';
import { formatMass, MINUS } from '@steepfall/shared/units';
import { format } from 'date-fns';
import { Link } from 'react-router-dom';
import { Button } from '#components/button.tsx';
import { classNames } from '#components/class-names.ts';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { lotMovesQuery } from '#lib/hub-queries.ts';
import { useUnits } from '#lib/units.ts';
import { failureWords } from '#lib/words.ts';
import { useStoresAct } from './use-stores.ts';

/** Every line that made the stock of a lot what it is, newest first. */
export function LotLedger({ lot, mayManage }: { lot: Lot; mayManage: boolean }) {
  const moves = useQuery(lotMovesQuery(lot.id));
  const client = useQueryClient();
  const takeBack = useStoresAct((moveId: string) => [`stores/moves/${moveId}`, { method: 'DELETE' }]);
  if (!moves.data) {
    return moves.error ? (
      <Failed title="The ledger could not be fetched" onRetry={() => void moves.refetch()}>
        {failureWords(moves.error)}
      </Failed>
    ) : (
      <Waiting>Opening the ledger.</Waiting>
    );
  }
  const again = () => void client.invalidateQueries({ queryKey: lotMovesQuery(lot.id).queryKey });
  return (
    <>
      {takeBack.error ? (
        <p role="alert" className="py-2 font-medium text-ember">
          {failureWords(takeBack.error)}
        </p>
      ) : null}
      <ul aria-label={`Ledger of lot ${lot.code}`}>
        {moves.data.map((move) => (
          <LedgerLine
            key={move.id}
            move={move}
            onTakeBack={mayManage && isByHand(move) ? () => takeBack.mutate(move.id, { onSettled: again }) : null}
          />
        ))}
      </ul>
    </>
  );
}

/** Lines of a run belong to its log; a line that was taken back stays so. */
function isByHand({ kind, batchId, isUndone }: LotMove): boolean {
  return kind !== 'undone' && batchId === null && !isUndone;
}

function LedgerLine({ move, onTakeBack }: { move: LotMove; onTakeBack: (() => void) | null }) {
  const { mass: unit } = useUnits();
  const { massG, reason, atMs, by, isUndone } = move;
  return (
    <li className="grid grid-cols-[1fr_auto] items-center gap-x-5 border-t border-hair py-2 sm:grid-cols-[8.5rem_1fr_7rem_9rem]">
      <span className="text-soft tabular-nums max-sm:order-3">{format(atMs, 'd MMM yyyy')}</span>
      <span className={classNames('max-sm:order-1', isUndone && 'text-soft')}>
        <WhatMoved move={move} />
        {isUndone ? ', taken back' : ''}
        <span className="block text-note text-soft">{[reason, by].filter(Boolean).join(' · ')}</span>
      </span>
      <span
        className={classNames(
          'text-right font-medium tabular-nums max-sm:order-2',
          isUndone && 'text-soft line-through',
        )}
      >
        {massG >= 0 ? '+' : MINUS}
        {formatMass(Math.abs(massG), { unit })}
      </span>
      <span className="text-right max-sm:order-4">
        {onTakeBack ? (
          <Button look="quiet" className="-mr-5 whitespace-nowrap" onClick={onTakeBack}>
            Take back
          </Button>
        ) : null}
      </span>
    </li>
  );
}

const moveWords: Record<LotMove['kind'], string> = {
  received: 'Received',
  used: 'Used',
  adjusted: 'Counted',
  undone: 'Taken back',
};

function WhatMoved({ move: { kind, batchId, batchNumber } }: { move: LotMove }) {
  if (batchId === null || batchNumber === null) return moveWords[kind];
  return (
    <>
      {kind === 'undone' ? 'Taken back from' : 'Used by'}{' '}
      <Link
        to={`/batches/${batchId}`}
        className="font-medium tabular-nums underline decoration-hair decoration-2 underline-offset-4 hover:decoration-text"
      >
        batch {batchNumber}
      </Link>
    </>
  );
}
