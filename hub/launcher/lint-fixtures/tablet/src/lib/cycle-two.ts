// planted: import-x/no-cycle
import { one } from './cycle-one.ts';

export const two = (): unknown => one;
