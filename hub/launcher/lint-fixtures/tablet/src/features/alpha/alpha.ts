import { rule } from '#components/rule.ts';

export const alpha = rule;
