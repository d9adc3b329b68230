export const shell = 'app';
