import {
  absoluteFromGaugeKPa,
  band,
  compareWithBeerChart,
  evaporationBand,
  heldLPerG,
  plusMinus,
  sure,
} from '../figures/index.js';
import { graded, row, targetOf, within, type RowContext } from './figure-row.js';
import { acidRows } from './figure-rows-acid.js';
import { dayRows } from './figure-rows-day.js';
import { hopRows } from './figure-rows-hops.js';
import { teaRows } from './figure-rows-tea.js';
import { waterRows } from './figure-rows-water.js';
import type { FigureRow } from './types.js';

/** A volume that misses the wanted one by less is what was wanted. */
export const YIELD_SHARE = 0.02;
/** Published solubilities differ by this. */
const GAS_SHARE = 0.03;
const SEA_LEVEL_KPA = 101.325;

/** Every figure of a recipe as a row: by group, the few that lead it first. */
export function figureRows(context: RowContext): FigureRow[] {
  const groups = [dayRows, waterRows, acidRows, teaRows, hopRows, yieldRows, gasRows];
  return groups.flatMap((rowsOf) => {
    const rows = rowsOf(context);
    return [...rows.filter(({ isLead }) => isLead), ...rows.filter(({ isLead }) => !isLead)];
  });
}

function yieldRows({ document, plan, figures }: RowContext): FigureRow[] {
  const { low, value, high, leafL, hopsL, hopsLowL, hopsHighL } = figures.yield;
  const { leaf } = heldLPerG;
  const wanted = document.volumeL;
  return [
    row({
      id: 'yield.keg',
      label: 'Into the keg',
      quantity: 'volumeL',
      band: graded({ low, value, high }, 'judged'),
      isLead: true,
      target: targetOf(value, wanted * (1 - YIELD_SHARE), Math.max(wanted, wanted * (1 + YIELD_SHARE))),
    }),
    row({
      id: 'yield.leaf',
      label: 'Held by the leaf',
      quantity: 'volumeL',
      band: band((leafL * leaf.low) / leaf.value, leafL, (leafL * leaf.high) / leaf.value, 'judged'),
    }),
    row({
      id: 'yield.hops',
      label: 'Held by the hops',
      quantity: 'volumeL',
      band: band(hopsLowL, hopsL, hopsHighL, 'judged'),
    }),
    row({
      id: 'yield.evaporated',
      label: 'Evaporated',
      quantity: 'volumeL',
      band: band(
        plan.evaporatedL * evaporationBand.low,
        plan.evaporatedL,
        plan.evaporatedL * evaporationBand.high,
        'judged',
      ),
    }),
    row({ id: 'yield.dead-space', label: 'Stays in the kettle', quantity: 'volumeL', band: sure(plan.deadSpaceL) }),
  ];
}

function gasRows({ document, plan, figures: { gas } }: RowContext): FigureRow[] {
  const stationKPa = plan.gas.stationKPa ?? SEA_LEVEL_KPA;
  const gaugeKPa = gas.gaugeKPa ?? 0;
  const absoluteKPa = absoluteFromGaugeKPa(gaugeKPa, stationKPa);
  return [
    row({
      id: 'gas.gauge',
      label: 'Set the regulator to',
      quantity: 'pressureKPa',
      band: band(
        Math.max(0, gaugeKPa - GAS_SHARE * absoluteKPa),
        Math.max(0, gaugeKPa),
        Math.max(0, gaugeKPa + GAS_SHARE * absoluteKPa),
        'measured',
      ),
      isLead: true,
      word: gaugeKPa <= 0 ? 'no pressure needed' : null,
    }),
    row({ id: 'gas.volumes', label: 'Gas, in volumes', quantity: 'volumes', band: sure(document.gas.volumes) }),
    row({ id: 'gas.g-per-l', label: 'Gas', quantity: 'gPerL', band: within(gas.gPerL, GAS_SHARE, 'measured') }),
    ...beerChartRows(document.gas.tempC, gaugeKPa, absoluteKPa),
  ];
}

/** Only where the beer chart has numbers. */
function beerChartRows(tempC: number, gaugeKPa: number, absoluteKPa: number): FigureRow[] {
  if (tempC > 15.6 || absoluteKPa < 100 || absoluteKPa > 600) return [];
  const chartKPa = gaugeKPa + compareWithBeerChart(tempC, absoluteKPa).extraKPa;
  return [
    row({
      id: 'gas.beer-chart',
      label: 'A beer chart would say',
      quantity: 'pressureKPa',
      band: plusMinus(chartKPa, GAS_SHARE * absoluteKPa, 'measured'),
    }),
  ];
}
