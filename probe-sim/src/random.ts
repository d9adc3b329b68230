/** State of a generator of random numbers: one unsigned 32-bit number, so that it can live inside plain data. */
export type RandomState = number;

export function seedRandom(seed: number): RandomState {
  return Math.imul((seed >>> 0) + 1, 0x9e3779b1) >>> 0;
}

/** A uniform number in (0, 1) and the state that follows: a Weyl counter behind a 32-bit mixing function. */
export function nextUniform(state: RandomState): { value: number; next: RandomState } {
  const next = (state + 0x6d2b79f5) >>> 0;
  let z = next;
  z = Math.imul(z ^ (z >>> 15), z | 1);
  z ^= z + Math.imul(z ^ (z >>> 7), z | 61);
  return { value: (((z ^ (z >>> 14)) >>> 0) + 0.5) / 4294967296, next };
}

/** A number from the standard normal distribution (Box and Muller 1958) and the state that follows. */
export function nextNormal(state: RandomState): { value: number; next: RandomState } {
  const radius = nextUniform(state);
  const angle = nextUniform(radius.next);
  return {
    value: Math.sqrt(-2 * Math.log(radius.value)) * Math.cos(2 * Math.PI * angle.value),
    next: angle.next,
  };
}
