import type { CreateEquipment, Role } from '@steepfall/shared/contracts';
import { v5 } from 'uuid';

/** Ids of the demo are the same each time it is made: links to it stay good after a reset. */
const NAMESPACE = '5d6f2a0e-6a57-4e0c-8d2b-3f4f0f3f9b61';
export const demoId = (name: string): string => v5(name, NAMESPACE);

export const demoHouse = { id: demoId('house'), name: 'Wrenfold Drinks', altitudeM: 120 } as const;

export interface DemoSignIn {
  role: Role;
  displayName: string;
  email: string;
  password: string;
}

/** Known to everybody who can read, and therefore good for nothing but the demo: with the demo switched off they open no door. */
export const demoSignIns: readonly DemoSignIn[] = (
  [
    ['owner', 'Owner'],
    ['brewer', 'Brewer'],
    ['hand', 'Hand'],
    ['taster', 'Taster'],
    ['pourer', 'Pourer'],
  ] as const
).map(([role, displayName]) => ({
  role,
  displayName,
  email: `${role}@wrenfold.example`,
  password: `wrenfold-${role}`,
}));

export const demoMemberId = (role: Role): string => demoId(`member/${role}`);

export const demoEquipment = {
  kettle: {
    kind: 'kettle',
    name: 'Kettle 30 L',
    facts: {
      volumeL: 30,
      diameterM: 0.36,
      massKg: 4.5,
      heaterPowerW: 3500,
      heaterEfficiency: 0.84,
      heatSource: 'inductionHob',
      metal: 'stainless',
      hasLid: true,
      deadSpaceL: 0.3,
    },
  },
  coil: {
    kind: 'chiller',
    name: 'Stainless coil',
    facts: { metal: 'stainless', lengthM: 7.6, coolantC: 12 },
  },
  kegA: { kind: 'keg', name: 'Keg A, 23 L', facts: { volumeL: 23, tareG: 5200, ratedKPa: 900 } },
  scale: { kind: 'scale', name: 'Counter scale', facts: { resolutionG: 0.1, capacityG: 3000 } },
  kegB: { kind: 'keg', name: 'Keg B, 23 L', facts: { volumeL: 23, tareG: 5180, ratedKPa: 900 } },
} as const satisfies Record<string, CreateEquipment>;

/** A slow waterproof one-wire probe; nothing is connected until somebody makes a token for it. */
export const demoProbe = { name: 'Kettle probe', lagS: 7.5, resolutionC: 0.0625, samplePeriodS: 1 } as const;
