// planted: boundaries/dependencies
import { cost } from '../desk/cost.js';

export const found = cost;
