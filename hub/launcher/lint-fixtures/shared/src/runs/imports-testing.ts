// planted: boundaries/dependencies
import { built } from '../testing/builders.js';

export const found = built;
