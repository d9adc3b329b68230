// planted: no-restricted-imports
import { tempC } from '../../../shared/src/units/temperature.js';

export const found = tempC;
