import { describe, expect, it } from 'vitest';
import { lagCorrectedDifferenceGain, lagCorrectedLineGain, lineCrossingSdS, newtonCrossingSdS } from './bounds.js';

const within = (found: number, known: number, share: number) => expect(Math.abs(found / known - 1)).toBeLessThan(share);

describe('lineCrossingSdS', () => {
  it.each([
    [0.1, 0.1, 60, 60, 0.68],
    [0.1, 0.1, 60, 300, 2.46],
    [0.1, 0.02, 60, 60, 3.4],
    [0.1, 0.02, 120, 60, 1.64],
    [0.1, 0.02, 60, 300, 12.3],
    [0.1, 0.012, 120, 120, 4.01],
    [0.1, 0.012, 300, 300, 2.54],
    [0.5, 0.02, 60, 60, 17.0],
  ])('noise %f K, %f K/s, %i readings, %i s ahead: %f s', (noiseC, rateCPerS, count, horizonS, known) => {
    within(lineCrossingSdS({ noiseC, rateCPerS, periodS: 1, count, horizonS }), known, 0.01);
  });
});

describe('newtonCrossingSdS', () => {
  const line = { noiseC: 0.1, periodS: 1 };
  it.each([
    [2.2e-4, 22, 81, 77, 120, 7.63, 95],
    [2.2e-4, 22, 83, 77, 300, 3.03, 24.8],
    [1 / 400, 15, 60, 40, 60, 1.64, 35.2],
    [1 / 400, 15, 60, 21, 180, 0.93, 43.4],
  ])(
    'k %f, surroundings %i: %i to %i °C from %i readings',
    (perS, environmentC, nowC, targetC, count, known, fitted) => {
      const input = { ...line, perS, environmentC, nowC, targetC, count };
      within(newtonCrossingSdS({ ...input, environmentFitted: false }), known, 0.02);
      within(newtonCrossingSdS({ ...input, environmentFitted: true }), fitted, 0.02);
    },
  );
});

describe('gain of taking the lag out', () => {
  it('is far worse from two readings than from a line', () => {
    expect(lagCorrectedDifferenceGain(10, 1)).toBeCloseTo(14.87, 2);
    expect(lagCorrectedLineGain(10, 1, 20)).toBeCloseTo(0.789, 3);
    expect(lagCorrectedLineGain(10, 1, 60)).toBeCloseTo(0.322, 3);
  });
});
