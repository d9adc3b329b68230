// planted: boundaries/dependencies
import { fold } from '../runs/fold.js';

export const found = fold;
