// planted: boundaries/dependencies
import { BetaController } from '../beta/beta.controller.js';

export const found = BetaController;
