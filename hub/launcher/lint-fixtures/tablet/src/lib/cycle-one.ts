// planted: import-x/no-cycle
import { two } from './cycle-two.ts';

export const one = (): unknown => two;
