import { existsSync } from 'node:fs';
import { installDebianPackages } from './debian.mjs';
import { findProgram } from './programs.mjs';

/** Without a font of its own a bare machine draws boxes, and the screenshots show nothing. */
const someFont = '/usr/share/fonts/truetype/dejavu/DejaVuSans.ttf';

/**
 * Makes sure that the end-to-end tests have a browser and a font; installs them as root, else says the command.
 * @param {(line: string) => void} log
 * @param {AbortSignal} [signal]
 */
export async function ensureChromiumInstalled(log, signal) {
  const packages = [
    ...(findProgram(['chromium']) ? [] : ['chromium']),
    ...(existsSync(someFont) ? [] : ['fonts-dejavu-core']),
  ];
  if (packages.length > 0) await installDebianPackages({ packages, what: 'Chromium or its font is', log, signal });
}
