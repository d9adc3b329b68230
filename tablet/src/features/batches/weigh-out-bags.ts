import type { WeighOutLine } from '@steepfall/shared/contracts';

interface Bag {
  /** `null`: it goes straight in. */
  bag: string | null;
  lines: WeighOutLine[];
}

/** The lines by the bag they wait in, in the order of the recipe; what waits in none comes last. */
export function bagsOf(lines: readonly WeighOutLine[]): Bag[] {
  const bags = new Map<string | null, WeighOutLine[]>();
  for (const line of lines) bags.set(line.bag, [...(bags.get(line.bag) ?? []), line]);
  const list = [...bags].map(([bag, held]) => ({ bag, lines: held }));
  return [...list.filter(({ bag }) => bag !== null), ...list.filter(({ bag }) => bag === null)];
}

/** A mass as the scale can show it: to the nearest step, and never to nothing. */
export function roundedG(massG: number, resolutionG: number | undefined): number {
  if (resolutionG === undefined) return massG;
  const steps = Math.max(1, Math.round(massG / resolutionG));
  return Number((steps * resolutionG).toFixed(6));
}
