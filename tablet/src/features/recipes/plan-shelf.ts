import type { Ingredient, Lot } from '@steepfall/shared/contracts';
import type { CostLine } from '@steepfall/shared/desk';
import type { Addition } from '@steepfall/shared/sheets';

interface ReserveDraft {
  additionId: string;
  lotId: string;
  massG: number | null;
}

/** What the form holds; the contract decides what of it is right. */
export interface PlanDraft {
  revisionId: string;
  plannedOn: string;
  kettleId: string;
  chillerId: string | null;
  kegId: string;
  probeId: string | null;
  reserve: ReserveDraft[];
  mayGoBelowZero: boolean;
}

const CRUMB_G = 0.0005;

/** Every lot of the stores by its id. */
export function shelfOf(stores: readonly Ingredient[]): ReadonlyMap<string, Lot> {
  return new Map(stores.flatMap(({ lots }) => lots.map((lot) => [lot.id, lot] as const)));
}

const setAsideG = (additionId: string, reserve: readonly ReserveDraft[]) =>
  reserve.reduce((sum, line) => sum + (line.additionId === additionId ? line.massG || 0 : 0), 0);

/** What is missing of an addition, g; 0 when enough is set aside. */
export function missingG({ id, massG }: Addition, reserve: readonly ReserveDraft[]): number {
  const missing = massG - setAsideG(id, reserve);
  return missing > CRUMB_G ? missing : 0;
}

/** Names of what is not set aside in full. */
export function shortOf(additions: readonly Addition[], reserve: readonly ReserveDraft[]): string[] {
  return additions.filter((addition) => missingG(addition, reserve) > 0).map(({ name }) => name);
}

/** The lines as they would be weighed, for the cost. */
export function weighedOf(
  additions: readonly Addition[],
  reserve: readonly ReserveDraft[],
  shelf: ReadonlyMap<string, Lot>,
): CostLine[] {
  return additions.map(({ id, name, massG }) => ({
    name,
    massG,
    lots: reserve
      .filter(({ additionId }) => additionId === id)
      .map((line) => ({ massG: line.massG || 0, pricePerKg: shelf.get(line.lotId)?.pricePerKg ?? null })),
  }));
}
