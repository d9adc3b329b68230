/** The value as text, alike for the same value whatever the order of its members; a member that is undefined is not there. */
export function canonical(value: unknown): string {
  return (
    JSON.stringify(value, (_key, inner: unknown) =>
      typeof inner === 'object' && inner !== null && !Array.isArray(inner)
        ? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : 1)))
        : inner,
    ) ?? ''
  );
}

/** Whether two values say the same. */
export function isSame(one: unknown, other: unknown): boolean {
  return one === other || canonical(one) === canonical(other);
}
