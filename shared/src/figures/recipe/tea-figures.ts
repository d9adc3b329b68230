import { band, withinFactor, type Band } from '../bands/band.js';
import { mapBand } from '../bands/band-sums.js';
import { monteCarlo, type Unsure } from '../bands/monte-carlo.js';
import { curveBetween } from '../curve/temperature-curve.js';
import { caffeineContent, servingCaffeineMg, steepedCaffeineMgPerL } from '../tea/caffeine.js';
import { leafExtraction, leafForms } from '../tea/extraction.js';
import { steepDoseMin, steepLinesHold, steepVerdict, type SteepVerdict, type TeaKind } from '../tea/steep-dose.js';
import { EU_CAFFEINE_LABEL_MG_PER_L } from '../safety/caffeine-label.js';
import { positive, within } from '../numeric/guard.js';
import type { DrinkPlan, TeaAddition } from './drink-plan.js';

/** Extraction rates are a judgement with a factor of two. */
const RATE_FACTOR = 2;
const RUNS = 500;
/** A told content is taken to hold within a tenth from lot to lot; a judgement. */
const TOLD_SPREAD = 0.1;

export interface SteepFigures {
  kind: TeaKind;
  steepDoseMin: number;
  verdict: SteepVerdict;
  /** False for a cold steep: the verdict says nothing there. */
  linesHold: boolean;
  polyphenolRatio: Band;
}

export interface TeaFigures {
  steeps: readonly SteepFigures[];
  caffeineMgPerL: Band;
  caffeineServingMg: Band;
  /** Against the 150 mg/L line of labels: `crosses` when only the band reaches over it. */
  caffeineLine: 'below' | 'crosses' | 'above';
}

/** Tea side of a drink: steep dose, caffeine, polyphenols. @param concentration factor by evaporation. */
export function teaFigures(plan: DrinkPlan, concentration: number): TeaFigures {
  const liters = positive(plan.waterL, 'A volume of water', 'L');
  const inputs: Record<string, Unsure> = {};
  const doses: { gPerL: number; turns: number; most: number; value: number }[] = [];
  const steeps = plan.teas.map((tea, index): SteepFigures => {
    const curve = curveBetween(plan.curve, tea.inAtMs, tea.outAtMs);
    const out = leafExtraction(curve, tea.form);
    const content = contentOf(tea);
    inputs[`content${index}`] = { kind: 'peaked', ...content, grade: 'judged' };
    inputs[`rate${index}`] = { kind: 'factor', value: 1, factor: RATE_FACTOR, grade: 'judged' };
    const gPerL = (tea.massG / liters) * concentration;
    const value = steepedCaffeineMgPerL({
      doseGPerL: gPerL,
      contentMgPerG: content.value,
      extractedRatio: out.caffeineRatio,
    });
    doses.push({ gPerL, turns: out.caffeineTurns, most: leafForms[tea.form].mostRatio, value });
    const doseMin = steepDoseMin(curve);
    return {
      kind: tea.kind,
      steepDoseMin: doseMin,
      verdict: steepVerdict(tea.kind, doseMin),
      linesHold: steepLinesHold(curve),
      polyphenolRatio: polyphenolBand(out.polyphenolTurns),
    };
  });
  const point = doses.reduce((sum, { value }) => sum + value, 0);
  const spread = monteCarlo(
    inputs,
    (drawn) =>
      doses.reduce((sum, { gPerL, turns, most }, index) => {
        const out = -most * Math.expm1(-turns * (drawn[`rate${index}`] ?? 1));
        return sum + gPerL * (drawn[`content${index}`] ?? 0) * out;
      }, 0),
    { runs: RUNS },
  );
  const caffeineMgPerL = band(Math.min(spread.low, point), point, Math.max(spread.high, point), spread.grade);
  return {
    steeps,
    caffeineMgPerL,
    caffeineServingMg: mapBand(caffeineMgPerL, (mgPerL) => servingCaffeineMg(mgPerL, plan.servingMl)),
    caffeineLine: caffeineLine(caffeineMgPerL),
  };
}

function contentOf({ kind, caffeineClass, caffeineMgPerG: told }: TeaAddition) {
  if (told === undefined) return caffeineContent(caffeineClass ?? kind);
  const value = within(told, 'A caffeine content', 0, 100, 'mg/g');
  return { low: value * (1 - TOLD_SPREAD), value, high: value * (1 + TOLD_SPREAD) };
}

function polyphenolBand(turns: number): Band {
  if (turns === 0) return band(0, 0, 0, 'judged');
  return mapBand(withinFactor(turns, RATE_FACTOR, 'judged'), (x) => -Math.expm1(-x));
}

function caffeineLine({ low, high }: Band): TeaFigures['caffeineLine'] {
  if (high <= EU_CAFFEINE_LABEL_MG_PER_L) return 'below';
  return low > EU_CAFFEINE_LABEL_MG_PER_L ? 'above' : 'crosses';
}
