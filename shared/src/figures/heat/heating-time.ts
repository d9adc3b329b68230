import { finite, notNegative, positive, within } from '../numeric/guard.js';

export interface Heating {
  heatCapacityJPerK: number;
  fromC: number;
  toC: number;
  /** Power that is paid for, W. */
  powerW: number;
  /** Share of it that reaches the vessel, above 0 to 1. */
  efficiency: number;
  /** Loss to the room, W/K; 0 when it is left out. */
  lossWPerK?: number;
  /** Needed with a loss, °C. */
  roomC?: number;
}

/** `limitC` is where it settles when the loss eats all the power. */
export type HeatingTime = { kind: 'reaches'; durationS: number } | { kind: 'never'; limitC: number };

/**
 * How long heating takes, s; or that it never gets there, and where it would stop.
 *
 * @param heating heat capacity and power above 0, efficiency above 0 to 1, loss 0 or more, temperatures in °C.
 * @returns 0 s when it is already there.
 * @throws RangeError outside these ranges.
 * @see energy balance C dT/dt = eta P - UA (T - T_room), solved exactly.
 * @example heatingTime({ heatCapacityJPerK: 43_110, fromC: 20, toC: 82, powerW: 2000, efficiency: 0.9 }) // 1485 s
 */
export function heatingTime(heating: Heating): HeatingTime {
  const capacity = positive(heating.heatCapacityJPerK, 'A heat capacity', 'J/K');
  const fromC = finite(heating.fromC, 'A start temperature', '°C');
  const toC = finite(heating.toC, 'A target temperature', '°C');
  const lossWPerK = notNegative(heating.lossWPerK ?? 0, 'A heat loss', 'W/K');
  const usefulW =
    notNegative(heating.powerW, 'A heating power', 'W') * within(heating.efficiency, 'A heating efficiency', 0, 1);
  if (fromC >= toC) return { kind: 'reaches', durationS: 0 };
  if (lossWPerK === 0) {
    return usefulW === 0
      ? { kind: 'never', limitC: fromC }
      : { kind: 'reaches', durationS: (capacity * (toC - fromC)) / usefulW };
  }
  const limitC =
    finite(heating.roomC ?? Number.NaN, 'A room temperature, needed with a heat loss,', '°C') + usefulW / lossWPerK;
  if (limitC <= toC) return { kind: 'never', limitC };
  return { kind: 'reaches', durationS: (capacity / lossWPerK) * Math.log((limitC - fromC) / (limitC - toC)) };
}
