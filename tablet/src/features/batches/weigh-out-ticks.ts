import { useState } from 'react';

const keyOf = (batchId: string) => `steepfall.weighed.${batchId}`;

function readTicks(batchId: string): ReadonlySet<string> {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(keyOf(batchId)) ?? '[]');
    return new Set(Array.isArray(kept) ? kept.filter((id) => typeof id === 'string') : []);
  } catch {
    return new Set();
  }
}

function keepTicks(batchId: string, ticks: ReadonlySet<string>): void {
  try {
    if (ticks.size > 0) localStorage.setItem(keyOf(batchId), JSON.stringify([...ticks]));
    else localStorage.removeItem(keyOf(batchId));
  } catch {
    // They hold until the page is closed.
  }
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
