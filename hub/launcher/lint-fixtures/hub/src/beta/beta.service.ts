import { AlphaService } from '../alpha/alpha.service.js';

export class BetaService extends AlphaService {}
