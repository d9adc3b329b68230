// planted: boundaries/dependencies
// planted: no-restricted-imports
import { AlphaService } from '../../../hub/src/alpha/alpha.service.js';

export const found = AlphaService;
