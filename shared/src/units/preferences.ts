/** What one person reads and types. Inside, everything is °C, g, L and kPa. */
export interface UnitPreferences {
  temperature: 'C' | 'F';
  mass: 'g' | 'oz';
  volume: 'L' | 'gal';
  pressure: 'kPa' | 'bar' | 'psi';
}

/** What a new member starts with. */
export const metricPreferences: UnitPreferences = { temperature: 'C', mass: 'g', volume: 'L', pressure: 'kPa' };
