import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { recipeDocumentSchema, type KettleFacts } from '../sheets/index.js';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { recipeDocuments } from '../testing/recipe-arbitraries.js';
import { hotVolumeL, KETTLE_HEADROOM_RATIO, scaleToKettle, scaleToVolume } from './scale.js';

const document = buildDocument({
  additions: [
    {
      id: 'acid',
      kind: 'acid',
      name: 'citric acid',
      massG: 4,
      keeps: 'g-per-l',
      acid: 'citricAnhydrous',
      in: { at: 'fill' },
    },
    buildTea(),
    buildHops({ keeps: 'mass' }),
  ],
});
const massesOf = ({ additions }: typeof document) => additions.map(({ massG }) => massG);
const kettle = (volumeL: number): KettleFacts => ({
  ...{ volumeL, diameterM: 0.36, massKg: 4, heaterPowerW: 3000, heaterEfficiency: 0.8 },
});

describe(scaleToVolume, () => {
  it('keeps grams per litre, or grams where the brewer says so, and never touches a time', () => {
    const half = scaleToVolume(document, 10, { resolutionG: 1 });
    expect(half).toMatchObject({ volumeL: 10, waterL: 11, steepC: document.steepC });
    expect(massesOf(half)).toEqual([2, 50, 60]);
    expect(half.additions.map((addition) => [addition.in, 'out' in addition && addition.out])).toEqual(
      document.additions.map((addition) => [addition.in, 'out' in addition && addition.out]),
    );
  });

  it('rounds the water to what is measured and masses to the scale, never to nothing', () => {
    const some = scaleToVolume(document, 12.4, { resolutionG: 0.5 });
    expect(some.waterL).toBe(13.6);
    expect(massesOf(some)).toEqual([2.5, 62, 60]);
    expect(massesOf(scaleToVolume(document, 0.1, { resolutionG: 1 }))).toEqual([1, 1, 60]);
  });

  it('refuses volumes and amounts that no recipe holds', () => {
    for (const volumeL of [0, -3, 501, 1e9, Number.NaN])
      expect(() => scaleToVolume(document, volumeL)).toThrow(RangeError);
    const strong = buildDocument({ volumeL: 1, waterL: 1, additions: [buildTea({ massG: 90_000 })] });
    expect(() => scaleToVolume(strong, 2)).toThrow('more than 100 kg of sencha');
    expect(() => scaleToVolume(buildDocument({ volumeL: 1, waterL: 2 }), 400)).toThrow('more than 600 L of water');
  });

  it('is a recipe again, or refuses', () => {
    fc.assert(
      fc.property(recipeDocuments, fc.double({ min: 0.01, max: 500, noNaN: true }), (any, volumeL) => {
        try {
          const scaled = scaleToVolume(any, volumeL, { resolutionG: 0.1 });
          expect(recipeDocumentSchema.safeParse(scaled).error).toBeUndefined();
        } catch (error) {
          expect(error).toBeInstanceOf(RangeError);
        }
      }),
    );
  }, 30_000);
});

describe(scaleToKettle, () => {
  it('counts what the water swells, and the leaf in it', () => {
    // 22 L at 20 °C are 22.5 L at 76 °C; 160 g of leaf and hops push 0.16 L aside.
    expect(hotVolumeL(document)).toBeCloseTo(22.54 + 0.16, 1);
  });

  it.each([
    [10, 'shrunk'],
    [25.4, 'fits'],
    [60, 'grown'],
  ] as const)('fills a kettle of %d L under its headroom: %s', (volumeL, kind) => {
    const answer = scaleToKettle(document, kettle(volumeL), { resolutionG: 1 });
    const roomL = volumeL * (1 - KETTLE_HEADROOM_RATIO);
    expect(answer.kind).toBe(kind);
    expect(hotVolumeL(answer.document)).toBeLessThanOrEqual(roomL);
    expect(hotVolumeL(answer.document)).toBeGreaterThan(roomL * 0.95);
  });

  it('refuses a kettle that is full of what keeps its grams', () => {
    expect(() => scaleToKettle(document, kettle(0.06))).toThrow(RangeError);
  });
});
