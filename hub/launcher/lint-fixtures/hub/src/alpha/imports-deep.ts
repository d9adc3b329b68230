// planted: no-restricted-imports
import { celsius } from '@steepfall/shared/dist/units/brands.js';

export const found = celsius(62);
