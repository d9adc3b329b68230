import { boilingPointAtAltitudeC, plusMinus, sure, withinFactor } from '../figures/index.js';
import { formatTemp } from '../units/index.js';
import { contactMs } from './drink-plan.js';
import { row, type RowContext } from './figure-row.js';
import { BOIL_SLACK_K, isChilled } from './planned-day.js';
import type { FigureRow } from './types.js';
import { altitudeOf } from './usual-kit.js';

/** A planned time before the kettle and the chiller were learned; a judgement. */
const TIME_FACTOR = 1.3;

const seconds = (ms: number) => withinFactor(ms / 1000, TIME_FACTOR, 'judged');

/** How long everything takes. */
export function dayRows({ document, kit, day, units }: RowContext): FigureRow[] {
  const last = day.curve.at(-1);
  const chill = day.marks.find(({ kind }) => kind === 'chill');
  const isHeated = day.marks.some(({ kind }) => kind === 'heat');
  const hottest = day.curve.reduce((best, point) => (point.tempC > best.tempC ? point : best), { atMs: 0, tempC: -1 });
  const temp = (tempC: number) => formatTemp(tempC, { unit: units.temperature, digits: 0 });
  return [
    row({
      id: 'day.total',
      label: 'From start to keg',
      quantity: 'durationS',
      band: seconds(last?.atMs ?? 0),
      isLead: true,
    }),
    ...(isHeated
      ? [
          row({
            id: 'day.heat',
            label: `Heating to ${temp(hottest.tempC)}`,
            quantity: 'durationS',
            band: seconds(hottest.atMs),
          }),
          row({
            id: 'day.boil',
            label: 'Water boils here at',
            quantity: 'tempC',
            band: plusMinus(boilingPointAtAltitudeC(altitudeOf(kit)), BOIL_SLACK_K, 'measured'),
          }),
        ]
      : []),
    ...(chill ? fallRows({ document, kit, day }, chill.atMs, temp) : []),
    ...document.additions.flatMap((addition) => {
      if (!('out' in addition)) return [];
      const { inAtMs, outAtMs } = contactMs(day, addition.id);
      return outAtMs > inAtMs
        ? [
            row({
              id: 'day.contact',
              of: addition.id,
              label: `${addition.name} in the pot`,
              quantity: 'durationS',
              band: addition.out.at === 'timer' ? sure((outAtMs - inAtMs) / 1000) : seconds(outAtMs - inAtMs),
            }),
          ]
        : [];
    }),
  ];
}

function fallRows(
  { document, kit, day }: Pick<RowContext, 'document' | 'kit' | 'day'>,
  fromMs: number,
  temp: (tempC: number) => string,
): FigureRow[] {
  const from = isChilled(document, kit) ? 'Chiller on' : 'Heat off';
  const caught = document.additions.flatMap((addition) => {
    if (addition.in.at !== 'falling') return [];
    return [
      row({
        id: 'day.fall',
        of: addition.id,
        label: `${from} to ${addition.name} in, ${temp(addition.in.tempC)}`,
        quantity: 'durationS',
        band: seconds(contactMs(day, addition.id).inAtMs - fromMs),
      }),
    ];
  });
  const endMs = day.marks.find(({ kind }) => kind === 'transfer')?.atMs ?? fromMs;
  return [
    ...caught,
    row({
      id: 'day.fall-to-keg',
      label: `${from} to keg, ${temp(document.transferC)}`,
      quantity: 'durationS',
      band: seconds(endMs - fromMs),
    }),
  ];
}
