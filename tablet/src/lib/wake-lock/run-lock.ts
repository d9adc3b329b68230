/** Tells every tab of this station that a run is open: no new version is let in meanwhile. Shared, since two tabs may show runs. */
export function holdRunLock(): () => void {
  const locks = (navigator as Partial<Navigator>).locks;
  if (!locks) return () => undefined;
  let release: () => void = () => undefined;
  const held = new Promise<void>((resolve) => {
    release = resolve;
  });
  void locks.request('run-active', { mode: 'shared' }, () => held).catch(() => undefined);
  return release;
}
