import type { Ingredient } from '@steepfall/shared/contracts';
import { alphaNowPercent } from '@steepfall/shared/figures';
import type { Addition } from '@steepfall/shared/sheets';
import type { LotFacts } from '@steepfall/shared/stores';
import { formatMass, type UnitPreferences } from '@steepfall/shared/units';
import { localDate } from '#lib/words.ts';

/** The addition as the stores know it: substance, form and strength of the ingredient, alpha of the lot to use first. */
export function fromStores(addition: Addition, { id, facts, lots }: Ingredient, nowMs: number): Addition {
  const common = { ...addition, name: facts.name, ingredientId: id };
  if (common.kind === 'salt' && facts.kind === 'salt') {
    return {
      ...common,
      salt: facts.salt,
      ...(facts.assayPercent < 100 ? { assayPercent: facts.assayPercent } : { assayPercent: undefined }),
    };
  }
  if (common.kind === 'acid' && facts.kind === 'acid') {
    return {
      ...common,
      acid: facts.acid,
      ...(facts.strengthPercent < 100 ? { strengthPercent: facts.strengthPercent } : { strengthPercent: undefined }),
    };
  }
  if (common.kind === 'tea' && facts.kind === 'tea') {
    return { ...common, tea: facts.tea, form: facts.form, caffeineMgPerG: facts.caffeineMgPerG ?? undefined };
  }
  if (common.kind === 'hops' && facts.kind === 'hops') {
    const lab = lots.find(({ hops }) => hops !== null)?.hops;
    if (!lab) return { ...common, form: facts.form };
    return {
      ...common,
      form: facts.form,
      alphaPercent: alphaToday(lab, nowMs),
      storageIndex: lab.storageIndex ?? undefined,
    };
  }
  return common;
}

const DAY_MS = 24 * 3_600_000;

/** What the laboratory found at harvest, less what is lost since; one decimal, as it is printed on the packet. */
function alphaToday({ alphaPercent, storageIndex, harvestedOn }: NonNullable<LotFacts['hops']>, nowMs: number): number {
  const lot = { harvestPercent: alphaPercent };
  if (storageIndex !== null) return round(alphaNowPercent({ ...lot, storageIndex }).value);
  if (harvestedOn === null) return alphaPercent;
  const ageDays = Math.max(0, (nowMs - localDate(harvestedOn).getTime()) / DAY_MS);
  return round(alphaNowPercent({ ...lot, ageDays }).value);
}

const round = (percent: number) => Math.round(percent * 10) / 10;

/** "340 g in stores". */
export function stockWords({ stockG, reservedG }: Ingredient, units: UnitPreferences): string {
  const freeG = stockG - reservedG;
  return freeG > 0 ? `${formatMass(freeG, { unit: units.mass })} in stores` : 'none left';
}
