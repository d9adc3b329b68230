// planted: boundaries/dependencies
import { beta } from '#features/beta/beta.ts';

export const found = beta;
