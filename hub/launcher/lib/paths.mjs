import { join, resolve } from 'node:path';

/** The checkout. */
export const root = resolve(import.meta.dirname, '../../..');

/** Everything that is stored; git-ignored. Tests point it elsewhere. */
export const dataDir = resolve(process.env['STEEPFALL_DATA_DIR'] ?? join(root, '.data'));

/** The certificate authority of this machine, and what it has signed. */
export const tlsFolder = join(dataDir, 'tls');

/** Scratch files of tests; git-ignored. */
export const testDataDir = join(root, '.test-data');

/** Tests of the launcher put a smaller hub in the place of the built one; such a hub is not built. */
const hubFolder = process.env['STEEPFALL_HUB_DIR'];
export const isHubBuilt = hubFolder === undefined;
export const hubEntry = join(hubFolder ?? join(root, 'hub/dist'), 'main.js');
export const hubCli = join(hubFolder ?? join(root, 'hub/dist'), 'cli.js');
export const tabletDist = join(root, 'tablet/dist');

/**
 * The program behind a command of an npm package, to be run by this very Node.
 * @param {string} path below node_modules
 */
export const packageBin = (path) => join(root, 'node_modules', path);
