import { useState } from 'react';
import { z } from 'zod';
import { keepValue, readKeptAs } from '#lib/kept.ts';

const keyOf = (batchId: string) => `steepfall.weighed.${batchId}`;

function readTicks(batchId: string): ReadonlySet<string> {
  return new Set(readKeptAs(z.array(z.string()), keyOf(batchId)));
}

function keepTicks(batchId: string, ticks: ReadonlySet<string>): void {
  keepValue(keyOf(batchId), ticks.size > 0 ? [...ticks] : null);
}

/** What was weighed so far, kept on this device only: whoever stands at the scale needs nobody to agree. */
export function useTicks(batchId: string): [ReadonlySet<string>, (id: string, isTicked: boolean) => void] {
  const [ticks, setTicks] = useState(() => readTicks(batchId));
  const tick = (id: string, isTicked: boolean) => {
    const next = new Set(ticks);
    if (isTicked) next.add(id);
    else next.delete(id);
    keepTicks(batchId, next);
    setTicks(next);
  };
  return [ticks, tick];
}
