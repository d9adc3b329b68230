export const beta = 'beta';
