// planted: no-restricted-imports
import { formatTemp } from '@steepfall/shared/dist/units/format.js';

export const found = formatTemp;
