import { startKettle } from '@steepfall/probe-sim/kettle';
import { describe, expect, it } from 'vitest';
import { usualDocument, usualEquipmentOf } from '../../test/builders.js';
import { kettleSetupOf } from './kettle-setup.js';

const kit = {
  kettle: usualEquipmentOf('kettle'),
  chiller: usualEquipmentOf('chiller'),
  document: usualDocument,
  altitudeM: 0,
  seed: 3,
};

describe(kettleSetupOf, () => {
  it('takes water, metal, power and leaf from the house', () => {
    const setup = kettleSetupOf(kit);
    expect(setup).toMatchObject({
      waterMassKg: 22,
      kettleMassKg: 4,
      heaterPowerW: 3000,
      coolantC: 13,
      teaMassKg: 0.1,
      hopsMassKg: 0.06,
      seed: 3,
    });
    expect(startKettle(setup).boilingC).toBeCloseTo(100, 0);
  });

  it('boils earlier up a mountain', () => {
    expect(startKettle(kettleSetupOf({ ...kit, altitudeM: 3000 })).boilingC).toBeCloseTo(90, 0);
  });

  it('lets a longer coil take more, and a copper one weigh less', () => {
    const short = kettleSetupOf(kit);
    const chiller = { facts: { metal: 'copper' as const, lengthM: 15.2, coolantC: 13 } };
    const long = kettleSetupOf({ ...kit, chiller });
    expect(long.coilUAWPerK / short.coilUAWPerK).toBeCloseTo(2);
    expect(long.coilMassKg).toBeLessThan(2 * short.coilMassKg);
    expect(kettleSetupOf({ ...kit, chiller: null }).coilUAWPerK).toBeCloseTo(short.coilUAWPerK);
  });
});
