export const tempC = 62;
