// planted: boundaries/dependencies
import { alpha } from '#features/alpha/alpha.ts';

export const found = alpha;
