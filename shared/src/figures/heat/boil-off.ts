import { notNegative } from '../numeric/guard.js';
import { latentHeatJPerKg } from './latent-heat.js';

/**
 * Water boiled away, kg per hour; 0 when the losses eat the power.
 *
 * @param boil power that reaches the vessel and losses through walls and air, W; boiling point 0 to 100 °C.
 * @throws RangeError outside these ranges.
 * @see energy balance over the latent heat (latent-heat.ts).
 * @example boilOffKgPerH({ usefulPowerW: 1800, sensibleLossW: 500, boilingC: 100 }) // 2.07
 */
export function boilOffKgPerH(boil: { usefulPowerW: number; sensibleLossW: number; boilingC: number }): number {
  const spareW = notNegative(boil.usefulPowerW, 'A power', 'W') - notNegative(boil.sensibleLossW, 'A heat loss', 'W');
  return (Math.max(0, spareW) / latentHeatJPerKg(boil.boilingC)) * 3600;
}
