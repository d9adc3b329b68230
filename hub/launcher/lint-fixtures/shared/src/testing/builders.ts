export const built = 1;
