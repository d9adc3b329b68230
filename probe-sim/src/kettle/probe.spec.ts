import { describe, expect, it } from 'vitest';
import { followLiquid, shownC, startProbe, wander } from './probe.js';
import { nextUniform, seedRandom } from '../random.js';
import { defaultKettle } from './setup.js';

const setup = { ...defaultKettle().probe, noiseC: 0 };

describe('a probe', () => {
  it('of 10 s reads 1 K high on a fall of 0.1 K/s, and 0.2 K more with 2 s of dead time', () => {
    const error = (deadTimeS: number) => {
      const slow = { ...setup, tauS: 10, deadTimeS };
      let probe = startProbe(slow, 80, 1);
      for (let i = 1; i <= 600; i += 1) probe = followLiquid(slow, probe, 80 - 0.025 * i, i / 4, 0.25);
      return probe.tipC - 65;
    };
    expect(error(0)).toBeCloseTo(1, 1);
    expect(error(2) - error(0)).toBeCloseTo(0.2, 2);
  });

  it('has done half of a step after its dead time and 0.69 time constants', () => {
    const told = { ...setup, tauS: 7.95, deadTimeS: 4.89 };
    let probe = startProbe(told, 20, 1);
    let halfAtS = 0;
    let ninetyAtS = 0;
    for (let i = 1; i <= 400; i += 1) {
      probe = followLiquid(told, probe, 0, i / 10, 0.1);
      if (!halfAtS && probe.tipC <= 10) halfAtS = i / 10;
      if (!ninetyAtS && probe.tipC <= 2) ninetyAtS = i / 10;
    }
    // Mineral-insulated 6 mm Pt100 in water at 0.2 m/s: 10.4 s and 23.2 s (SAB Broeckskes).
    expect(Math.abs(halfAtS - 10.4)).toBeLessThan(0.2);
    expect(Math.abs(ninetyAtS - 23.2)).toBeLessThan(0.2);
  });

  it('without lag shows the liquid', () => {
    const quick = { ...setup, tauS: 0, deadTimeS: 0, resolutionC: 0 };
    expect(shownC(quick, followLiquid(quick, startProbe(quick, 20, 1), 55.5, 1, 1))).toBe(55.5);
  });

  it('shows whole steps of its resolution, and its bias', () => {
    const shown = (tempC: number) => shownC({ ...setup, biasC: 0.5 }, startProbe(setup, tempC, 1));
    expect(shown(24.57)).toBe(25.0625);
    expect(shown(24.53)).toBe(25);
  });

  it('wanders by its noise, with a memory', () => {
    const noisy = { ...setup, noiseC: 0.2, noiseMemoryS: 4 };
    let probe = startProbe(noisy, 70, 7);
    const deviations = Array.from({ length: 20_000 }, () => (probe = wander(noisy, probe, 1)).deviationC);
    const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
    const variance = mean(deviations.map((value) => value ** 2));
    expect(Math.abs(mean(deviations))).toBeLessThan(0.02);
    expect(Math.sqrt(variance)).toBeCloseTo(0.2, 1);
    const lagOne = mean(deviations.slice(1).map((value, i) => value * deviations[i]!)) / variance;
    expect(lagOne).toBeCloseTo(Math.exp(-1 / 4), 1);
  });
});

describe('random numbers', () => {
  it('are uniform, and the same for the same seed', () => {
    const draw = (seed: number) => {
      let state = seedRandom(seed);
      return Array.from({ length: 5000 }, () => {
        const { value, next } = nextUniform(state);
        state = next;
        return value;
      });
    };
    const values = draw(3);
    expect(values).toEqual(draw(3));
    expect(values).not.toEqual(draw(4));
    const bins = Array.from({ length: 10 }, (_, i) => values.filter((v) => Math.floor(v * 10) === i).length);
    expect(Math.min(...bins)).toBeGreaterThan(420);
    expect(Math.max(...bins)).toBeLessThan(580);
  });
});
