import { spawn, spawnSync } from 'node:child_process';
import { accessSync, constants, existsSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { LauncherError } from './launcher-error.mjs';

/** Where servers live on Debian; the path of an ordinary user leaves these out. */
const systemFolders = ['/usr/sbin', '/usr/local/sbin', '/sbin'];

/**
 * The full path of a program, or null.
 * @param {readonly string[]} names the first one found wins
 */
export function findProgram(names) {
  const folders = [...(process.env['PATH'] ?? '').split(delimiter).filter(Boolean), ...systemFolders];
  for (const name of names)
    for (const folder of folders) {
      const path = join(folder, name);
      try {
        accessSync(path, constants.X_OK);
        return path;
      } catch {
        // Not here; the next folder may have it.
      }
    }
  return null;
}

/**
 * Installs Debian packages as root, or says the one command that a person has to run.
 * @param {{ packages: readonly string[], what: string, log: (line: string) => void }} request `what` begins a sentence
 */
export async function installDebianPackages({ packages, what, log }) {
  const command = `apt-get update && apt-get install -y --no-install-recommends ${packages.join(' ')}`;
  if (!existsSync('/usr/bin/apt-get'))
    throw new LauncherError(
      `${what} missing and this is not a Debian system; install the counterparts of the Debian packages ${packages.join(', ')} and start again.`,
    );
  if (process.getuid?.() !== 0)
    throw new LauncherError(
      `${what} missing; run this once and start again: ${findProgram(['sudo']) ? `sudo sh -c '${command}'` : `su -c '${command}'`}`,
    );
  log(`Installing ${packages.join(', ')} from Debian's packages; this takes a minute.`);
  const output = await new Promise((/** @type {(output: string | null) => void} */ done) => {
    const apt = spawn('sh', ['-c', command], {
      stdio: ['ignore', 'pipe', 'pipe'],
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    });
    let printed = '';
    apt.stdout.on('data', (chunk) => (printed += chunk));
    apt.stderr.on('data', (chunk) => (printed += chunk));
    apt.once('error', (error) => done(error.message));
    apt.once('close', (code) => done(code === 0 ? null : printed));
  });
  if (output === null) return;
  const reason = output.split('\n').find((line) => /^(E|Err):/.test(line)) ?? output.trim().split('\n').at(-1);
  throw new LauncherError(`apt-get could not install ${packages.join(', ')} (${reason}); run it by hand: ${command}`);
}

/**
 * Whether a Debian package is installed.
 * @param {string} name
 */
export function isDebianPackageInstalled(name) {
  const query = spawnSync('dpkg-query', ['-W', '-f=${db:Status-Status}', name], { encoding: 'utf8' });
  return query.status === 0 && query.stdout === 'installed';
}
