import { showBand, showPhBand, type Band } from '@steepfall/shared/figures';
import type { AccountSoFar, RunState } from '@steepfall/shared/runs';
import { formatDuration, formatTemp, formatVolume, type UnitPreferences } from '@steepfall/shared/units';
import { useRunState, useRunStore } from '#lib/run-store/run-context.tsx';
import { useUnits } from '#lib/units.ts';
import { clockTime, listWords } from '#lib/words.ts';
import { useAccount } from './live-figures-follow.ts';
import { coolingFigure, doseText, teaFigure, verdictWords } from './live-figures-words.ts';

interface PanelRow {
  id: string;
  label: string;
  value: string;
  word: string;
}

/** Every figure so far with its band and its word, and what the account rests on. */
export function FiguresPanel() {
  const account = useAccount();
  const state = useRunState();
  const store = useRunStore();
  const units = useUnits();
  if (account === null) return <p className="text-lead text-soft">Adding it up.</p>;
  if (account.kind === 'none') {
    return (
      <p className="text-lead">
        {account.why === 'older-build'
          ? 'This run was started by an older build: it does not know its recipe, so there are no figures.'
          : 'The run has not begun.'}
      </p>
    );
  }
  if (account.kind === 'impossible') {
    return <p className="text-lead">The figures cannot be worked out: {account.what}</p>;
  }
  const rests = restsOn(account, state);
  return (
    <div className="grid gap-6">
      <dl className="grid">
        {rowsOf(account, units, store.nowMs()).map(({ id, label, value, word }) => (
          <div
            key={id}
            className="grid min-h-16 grid-cols-[minmax(0,1fr)_auto] items-baseline gap-x-4 border-b-2 border-dashed border-hair py-2"
          >
            <dt className="text-lead">{label}</dt>
            <dd className="text-right text-title font-semibold tabular-nums">{value}</dd>
            {word ? <dd className="col-span-2 text-body text-soft">{word}</dd> : null}
          </div>
        ))}
      </dl>
      {rests.length > 0 ? (
        <ul className="grid gap-2 text-body">
          {rests.map((words) => (
            <li key={words}>{words}</li>
          ))}
        </ul>
      ) : null}
      <p className="text-body text-soft">
        Worked out from the recorded temperature and the times of the taps, by the same sums as at the desk. In
        brackets: what the models leave open.
      </p>
    </div>
  );
}

function rowsOf(account: AccountSoFar, units: UnitPreferences, nowMs: number): PanelRow[] {
  const { figures, teas, hops, isLineKnown } = account;
  const cooling = coolingFigure(account.cooling, units);
  const banded = (id: string, label: string, value: Band, unit: string, word = ''): PanelRow => ({
    ...{ id, label, value: unit ? `${showBand(value)} ${unit}` : showBand(value), word },
  });
  return [
    ...teas.map((tea): PanelRow => {
      const { number, word } = teaFigure(account, tea, nowMs);
      const { window } = tea;
      const good = window ? `Good from ${window.from} to ${window.to}, amber from ${window.amber}.` : '';
      return {
        id: tea.additionId,
        label: `Steep, ${tea.name}`,
        value: isLineKnown
          ? `${doseText(tea.doseMin)} min at ${formatTemp(80, { unit: units.temperature, digits: 0 })}`
          : number,
        word: `${tea.isIn ? word : `Out, ${verdictWords[tea.verdict]}`}. ${good}`,
      };
    }),
    ...(teas.length > 0 && isLineKnown
      ? [
          banded('caffeine', 'Caffeine', figures.tea.caffeineMgPerL, 'mg/L', caffeineWords[figures.tea.caffeineLine]),
          banded('serving', 'Caffeine of a serving', figures.tea.caffeineServingMg, 'mg'),
        ]
      : []),
    ...hops.map((one): PanelRow => ({
      id: one.additionId,
      label: `${one.name} in for`,
      value: formatDuration(one.contactS),
      word: [
        one.isIn ? 'Still in.' : 'Out.',
        one.meanC === null ? '' : `At ${formatTemp(one.meanC, { unit: units.temperature })} on average.`,
      ].join(' '),
    })),
    ...(figures.hops && hops.length > 0
      ? [banded('bitterness', 'Bitterness index', figures.hops.bitternessIndex, '', `${figures.hops.word}.`)]
      : []),
    ...(cooling
      ? [
          {
            id: 'cooling',
            label: `Cooling rule, ${cooling.label}`,
            value: cooling.number,
            word: `${cooling.word}. Local codes come first.`,
          },
        ]
      : []),
    ...(figures.acid
      ? [
          {
            id: 'ph-water',
            label: 'pH of the water, worked out',
            value: figures.acid.phAfterAcid.toFixed(2),
            word: '',
          },
          ...(teas.length + hops.length > 0 && isLineKnown
            ? [
                {
                  id: 'ph-still',
                  label: 'pH with what is in it, worked out',
                  value: showPhBand(figures.acid.phStill),
                  word: '',
                },
              ]
            : []),
        ]
      : []),
    {
      id: 'volume',
      label: 'In the pot',
      value: formatVolume(account.volumeL, { unit: units.volume }),
      word: 'Without what leaf and hops took out with them, and steam.',
    },
  ];
}

const caffeineWords: Record<AccountSoFar['figures']['tea']['caffeineLine'], string> = {
  below: 'Below the 150 mg/L line of labels.',
  crosses: 'The band reaches over the 150 mg/L line of labels.',
  above: 'Above the 150 mg/L line of labels.',
};

/** What the account could not see, in words. */
function restsOn({ day, isLineKnown }: AccountSoFar, { document }: RunState): string[] {
  const nameOf = (id: string) => document?.additions.find((one) => one.id === id)?.name ?? id;
  return [
    ...(isLineKnown ? [] : ['No temperature is known: a steep has no figure then. Type temperatures with “Measure”.']),
    ...(day.heldFromMs === null
      ? []
      : [`No reading since ${clockTime(day.heldFromMs)}: the temperature is taken as it was then.`]),
    ...day.gaps.map(
      ({ fromMs, toMs }) =>
        `No reading from ${clockTime(fromMs)} to ${clockTime(toMs)}: a straight line is drawn over it.`,
    ),
    ...(day.untold.length > 0
      ? [`Not counted, since the sheet has no step for it: ${listWords(day.untold.map(nameOf))}.`]
      : []),
  ];
}
