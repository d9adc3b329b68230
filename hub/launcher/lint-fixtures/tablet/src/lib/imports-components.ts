// planted: boundaries/dependencies
import { rule } from '#components/rule.ts';

export const found = rule;
