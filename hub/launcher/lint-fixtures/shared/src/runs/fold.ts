import { tempC } from '../units/temperature.js';

export const fold = tempC;
