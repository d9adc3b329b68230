// planted: no-restricted-syntax
import type { Celsius } from '@steepfall/shared/units';

export const hopTempC = 62 as Celsius;
