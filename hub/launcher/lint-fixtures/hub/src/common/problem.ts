export const problem = 'problem';
