/** Does something while the page is in sight, and stops it while it is not. Returns what ends both. */
export function whileSeen(begin: () => () => void): () => void {
  let stop: (() => void) | null = null;
  const apply = () => {
    if (document.visibilityState === 'visible') stop ??= begin();
    else {
      stop?.();
      stop = null;
    }
  };
  apply();
  document.addEventListener('visibilitychange', apply);
  return () => {
    document.removeEventListener('visibilitychange', apply);
    stop?.();
  };
}
