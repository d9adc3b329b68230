import { finite, notNegative, within } from '../numeric/guard.js';

/**
 * Share of the greatest possible exchange in a counterflow or plate exchanger, 0 to 1.
 *
 * @param transferUnits heat transfer over the smaller capacity flow (UA/C_min), 0 or more.
 * @param flowRatio smaller over larger capacity flow, 0 to 1.
 * @throws RangeError outside these ranges.
 * @see textbook effectiveness of counterflow.
 * @example counterflowEffectiveness(1.5, 0.8) // 0.636
 */
export function counterflowEffectiveness(transferUnits: number, flowRatio: number): number {
  const ntu = notNegative(transferUnits, 'A number of transfer units');
  const c = within(flowRatio, 'A flow ratio', 0, 1);
  if (1 - c < 1e-9) return ntu / (1 + ntu);
  const rest = Math.exp(-ntu * (1 - c));
  return (1 - rest) / (1 - c * rest);
}

/**
 * Temperature of the drink as it leaves such an exchanger, °C: one pass, one temperature.
 *
 * @param pass effectiveness 0 to 1; smaller capacity flow over the drink's own, 0 to 1; temperatures in °C.
 * @throws RangeError outside these ranges.
 */
export function counterflowOutC(pass: {
  hotInC: number;
  coolantInC: number;
  effectiveness: number;
  smallerOverHotFlow: number;
}): number {
  const hotInC = finite(pass.hotInC, 'A hot inlet', '°C');
  const share = within(pass.effectiveness, 'An effectiveness', 0, 1);
  const flow = within(pass.smallerOverHotFlow, 'A flow ratio', 0, 1);
  return hotInC - share * flow * (hotInC - finite(pass.coolantInC, 'A coolant inlet', '°C'));
}
