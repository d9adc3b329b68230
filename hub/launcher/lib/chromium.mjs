import { existsSync } from 'node:fs';
import { installDebianPackages } from './debian.mjs';
import { findProgram } from './programs.mjs';

/** Without a font of its own a bare machine draws boxes, and the screenshots show nothing. */
const someFont = '/usr/share/fonts/truetype/dejavu/DejaVuSans.ttf';

/**
 * Makes sure that the end-to-end tests have a browser, a font and a way to trust a certificate; installs them as root, else says the command.
 * @param {(line: string) => void} log
 * @param {AbortSignal} [signal]
 */
export async function ensureChromiumInstalled(log, signal) {
  const packages = [
    ...(findProgram(['chromium']) ? [] : ['chromium']),
    ...(existsSync(someFont) ? [] : ['fonts-dejavu-core']),
    // Writes down whom the browser of a test trusts.
    ...(findProgram(['certutil']) ? [] : ['libnss3-tools']),
  ];
  if (packages.length > 0)
    await installDebianPackages({ packages, what: 'Chromium, its font or its certificate tool is', log, signal });
}
