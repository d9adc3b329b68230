import { showBand } from '@steepfall/shared/figures';
import type { AccountSoFar, CoolingClock, RunState, TeaSoFar } from '@steepfall/shared/runs';
import { currentStep } from '@steepfall/shared/runs';
import { formatDuration, formatVolume, type UnitPreferences } from '@steepfall/shared/units';
import type { Shape } from '#components/shapes.tsx';
import { formatLevel } from '#lib/units.ts';
import { spanWords } from '#lib/words.ts';

/** A figure to be read from two metres: its name, its number, and one word on it. */
export interface LiveFigure {
  id: string;
  label: string;
  number: string;
  unit: string;
  word: string;
  shape: Shape | null;
  /** It asks for something: said by shape, word and weight, not by an alarm of its own. */
  isDue: boolean;
}

/** From here on the seconds count. */
const SOON_S = 60;
const MOST_FIGURES = 2;

/** The one or two figures that matter at this point of the run. */
export function figuresOfStep(
  account: AccountSoFar,
  state: RunState,
  nowMs: number,
  units: UnitPreferences,
): LiveFigure[] {
  const step = currentStep(state)?.step;
  if (!step || account.day.marks.some(({ kind }) => kind === 'transfer')) return [];
  const steeping = account.teas.filter(({ isIn }) => isIn);
  if (steeping.length > 0) {
    const dueMs = ({ pullAtMs }: TeaSoFar) => pullAtMs ?? Infinity;
    return [...steeping]
      .sort((a, b) => dueMs(a) - dueMs(b))
      .slice(0, MOST_FIGURES)
      .map((tea) => teaFigure(account, tea, nowMs));
  }
  if (account.hops.some(({ isIn }) => isIn)) return hopFigures(account);
  const cooling = coolingFigure(account.cooling, units);
  if (cooling) return [cooling];
  const isLeafIn = account.teas.length + account.hops.length > 0;
  return isLeafIn || !isWaterIn(state) ? [] : waterFigures(account, state, units);
}

function isWaterIn({ steps }: RunState): boolean {
  return steps.some(({ step, status }) => step.kind === 'fill' && status === 'done');
}

export function teaFigure({ isLineKnown }: AccountSoFar, tea: TeaSoFar, nowMs: number): LiveFigure {
  const { additionId, name, doseMin, window } = tea;
  const label = `steep of ${name}`;
  const common = { id: `tea.${additionId}`, label };
  if (!isLineKnown) {
    const inS = (nowMs - tea.inAtMs) / 1000;
    return {
      ...common,
      number: formatDuration(inS),
      unit: '',
      word: 'no temperature known',
      shape: 'ring',
      isDue: false,
    };
  }
  return {
    ...common,
    number: doseText(doseMin),
    unit: window ? `of ${window.from}–${window.to}` : 'min',
    ...pullWord(tea, nowMs),
  };
}

export function doseText(doseMin: number): string {
  return doseMin.toFixed(doseMin < 9.95 ? 1 : 0);
}

function pullWord(
  { tea, window, verdict, pullAtMs }: TeaSoFar,
  nowMs: number,
): Pick<LiveFigure, 'word' | 'shape' | 'isDue'> {
  const calm = (word: string, shape: Shape | null = null) => ({ word, shape, isDue: false });
  if (tea === 'herbal') return calm('herbs have no window');
  if (!window) return calm('cold steep: go by taste');
  if (pullAtMs === null) return calm(verdictWords[verdict]);
  const leftS = (pullAtMs - nowMs) / 1000;
  if (leftS <= 0) return { word: 'pull now', shape: 'diamond', isDue: true };
  if (leftS <= SOON_S) return { word: `pull in ${formatDuration(Math.ceil(leftS))}`, shape: 'diamond', isDue: true };
  return calm(`${verdictWords[verdict]}, pull within ${aboutTime(leftS)}`, verdict === 'good' ? 'dot' : 'ring');
}

/** A forecast at the temperature of now: no seconds where it cannot know them. */
function aboutTime(leftS: number): string {
  return leftS < 600 ? formatDuration(Math.round(leftS / 10) * 10) : spanWords(leftS);
}

export const verdictWords: Record<TeaSoFar['verdict'], string> = {
  short: 'short yet',
  good: 'good',
  long: 'past the good window',
  amber: 'past the amber line',
  red: 'past the red line',
};

function hopFigures({ hops, figures }: AccountSoFar): LiveFigure[] {
  const inNow = hops.filter(({ isIn }) => isIn);
  const first = inNow.reduce<(typeof inNow)[number] | null>(
    (longest, one) => (longest && longest.contactS >= one.contactS ? longest : one),
    null,
  );
  if (!first) return [];
  const plain = { shape: null, isDue: false } as const;
  const contact = {
    id: `hops.${first.additionId}`,
    label: `${first.name} in for`,
    number: formatDuration(first.contactS),
  };
  const bitter = figures.hops;
  return [
    { ...contact, ...plain, unit: '', word: '' },
    ...(bitter
      ? [
          {
            ...plain,
            id: 'bitterness',
            label: 'bitterness so far',
            ...{
              number: showBand({ ...bitter.bitternessIndex, ...only(bitter.bitternessIndex.value) }),
              unit: '',
              word: bitter.word,
            },
          },
        ]
      : []),
  ];
}

const only = (value: number) => ({ low: value, value, high: value });

export function coolingFigure(cooling: CoolingClock, units: UnitPreferences): LiveFigure | null {
  const to = formatLevel(21, units);
  switch (cooling.kind) {
    case 'not-yet':
      return null;
    case 'there':
      return {
        ...{
          id: 'cooling',
          label: `${formatLevel(57, units)} to ${to} took`,
          number: formatDuration(cooling.tookS),
          unit: '',
        },
        word: cooling.isInTime ? 'within two hours' : 'longer than two hours',
        ...{ shape: cooling.isInTime ? 'dot' : 'diamond', isDue: !cooling.isInTime },
      };
    case 'running': {
      const { leftS, forecast } = cooling;
      const common = { id: 'cooling', label: `left to ${to}`, unit: '' };
      if (leftS < 0)
        return {
          ...common,
          number: formatDuration(leftS),
          word: 'the two hours are over',
          shape: 'diamond',
          isDue: true,
        };
      const words: Record<typeof forecast, Pick<LiveFigure, 'word' | 'shape' | 'isDue'>> = {
        'in-time': { word: 'in time as it falls now', shape: 'down', isDue: false },
        late: { word: 'too slow: stir, more coolant', shape: 'diamond', isDue: true },
        never: { word: 'does not get there so', shape: 'diamond', isDue: true },
        unknown: { word: `of two hours from ${formatLevel(57, units)}`, shape: 'ring', isDue: false },
      };
      return { ...common, number: formatDuration(leftS), ...words[forecast] };
    }
  }
}

function waterFigures({ plan, figures }: AccountSoFar, state: RunState, units: UnitPreferences): LiveFigure[] {
  const measured = state.measurements.findLast(({ quantity }) => quantity === 'pH');
  const computed = figures.acid?.phAfterAcid;
  const { min, max } = state.document?.targets.waterPh ?? { min: 0, max: 14 };
  const ph = measured?.value ?? computed;
  const water: LiveFigure = {
    ...{ id: 'water', label: 'water', word: '', shape: null, isDue: false },
    ...split(formatVolume(plan.waterL, { unit: units.volume })),
  };
  if (ph === undefined) return [water];
  const isIn = ph >= min && ph <= max;
  const wanted = isIn ? `as wanted, ${min} to ${max}` : `wanted: ${min} to ${max}`;
  return [
    {
      ...{
        id: 'ph',
        label: measured ? 'pH, measured' : 'pH, worked out',
        number: ph.toFixed(measured ? 2 : 1),
        unit: '',
      },
      ...{ word: wanted, shape: isIn ? 'dot' : 'ring', isDue: false },
    },
    water,
  ];
}

/** "22 L" as a number and its unit. */
function split(text: string): { number: string; unit: string } {
  const [, number = text, unit = ''] = /^(\S+)\s(.*)$/.exec(text) ?? [];
  return { number, unit };
}
