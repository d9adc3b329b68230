// planted: boundaries/dependencies
// planted: no-restricted-imports
import { AlphaService } from '../../../hub/src/alpha/alpha.service.ts';

export const found = AlphaService;
