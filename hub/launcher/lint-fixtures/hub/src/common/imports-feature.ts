// planted: boundaries/dependencies
import { AlphaService } from '../alpha/alpha.service.js';

export const found = AlphaService;
