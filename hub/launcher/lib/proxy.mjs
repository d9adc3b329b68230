import { installDebianPackages } from './debian.mjs';
import { findProgram } from './programs.mjs';

/**
 * Makes sure that the tests of the hub have a reverse proxy to stand behind; installs it as root, else says the command. The package holds
 * the program and no service: nothing listens on the machine because of it.
 * @param {(line: string) => void} log
 * @param {AbortSignal} [signal]
 */
export async function ensureProxyInstalled(log, signal) {
  if (findProgram(['apache2'])) return;
  await installDebianPackages({ packages: ['apache2-bin'], what: 'A reverse proxy is', log, signal });
}
