import { useState } from 'react';
import { HubProblemError } from './http.ts';

/**
 * A form saves at the version it was opened with. When somebody else was faster, it says so once with the newest in hand; saving again
 * is then meant.
 */
export function useVersion(openedAt: number): {
  version: number;
  /** For `onError`: fetches the newest version after a refusal for that reason. */
  meet: (error: Error, newest: () => Promise<number | undefined>) => Promise<void>;
} {
  const [version, setVersion] = useState(openedAt);
  const meet = async (error: Error, newest: () => Promise<number | undefined>) => {
    if (!isOvertaken(error)) return;
    setVersion((await newest()) ?? version);
  };
  return { version, meet };
}

export function isOvertaken(error: Error | null): boolean {
  return error instanceof HubProblemError && error.type === 'changed-meanwhile';
}
