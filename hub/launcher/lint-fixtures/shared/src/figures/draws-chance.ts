// planted: no-restricted-properties
export const chance = Math.random();
