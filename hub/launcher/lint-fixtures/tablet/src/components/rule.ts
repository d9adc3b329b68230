export const rule = 'rule';
