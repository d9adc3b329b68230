export const cost = 1;
