// planted: no-restricted-syntax
import type { Celsius } from '../units/brands.js';

export const hopTempC = 62 as Celsius;
