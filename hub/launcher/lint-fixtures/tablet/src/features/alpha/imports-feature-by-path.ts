// planted: boundaries/dependencies
import { beta } from '../beta/beta.ts';

export const found = beta;
