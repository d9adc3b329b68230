import { join, resolve } from 'node:path';

/** The checkout. */
export const root = resolve(import.meta.dirname, '../../..');

/** Everything that is stored; git-ignored. Tests point it elsewhere. */
export const dataDir = process.env['STEEPFALL_DATA_DIR'] ?? join(root, '.data');

export const hubEntry = join(root, 'hub/dist/main.js');
export const hubCli = join(root, 'hub/dist/cli.js');
export const tabletDist = join(root, 'tablet/dist');
