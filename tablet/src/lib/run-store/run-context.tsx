import { createContext, useContext, useEffect, useState, type ReactNode } from 'react';
import type { RunState } from '@steepfall/shared/runs';
import { useStored, useStoredPart } from '../value-store.ts';
import { takeRun } from './open-runs.ts';
import type { LiveState, RunSnapshot, RunStore } from './run-store.ts';

const RunContext = createContext<RunStore | null>(null);

/** Opens a run for as long as the component is there; `null` until this tablet's own copy is read. */
export function useOpenRun(runId: string): RunStore | null {
  const [store, setStore] = useState<RunStore | null>(null);
  useEffect(() => {
    let isCurrent = true;
    const taken = takeRun(runId);
    taken.store.then(
      (opened) => {
        if (isCurrent) setStore(opened);
      },
      () => undefined,
    );
    return () => {
      isCurrent = false;
      setStore(null);
      taken.release();
    };
  }, [runId]);
  return store;
}

export function RunProvider({ store, children }: { store: RunStore; children: ReactNode }) {
  return <RunContext value={store}>{children}</RunContext>;
}

export function useRunStore(): RunStore {
  const store = useContext(RunContext);
  if (!store) throw new Error('No run is open around this component.');
  return store;
}

/** Changes with the log, never with a reading or a tick. */
export function useRun(): RunSnapshot {
  return useStored(useRunStore().snapshot);
}

export function useRunState(): RunState {
  return useRun().state;
}

/** A primitive of what changes with readings and time. */
export function useLive<Part extends string | number | boolean | null>(pick: (live: LiveState) => Part): Part {
  return useStoredPart(useRunStore().live, pick);
}
