import { LauncherError } from './launcher-error.mjs';
import { run } from './processes.mjs';
import { findProgram } from './programs.mjs';

/**
 * Installs Debian packages as root, or says the one command that a person has to run.
 * @param {object} request
 * @param {readonly string[]} request.packages
 * @param {string} request.what begins the sentence "… missing"
 * @param {(line: string) => void} request.log
 * @param {AbortSignal} [request.signal]
 */
export async function installDebianPackages({ packages, what, log, signal }) {
  const names = packages.join(' ');
  const command = `apt-get update && apt-get install -y --no-install-recommends ${names}`;
  if (!findProgram(['apt-get']))
    throw new LauncherError(
      `${what} missing and this is not a Debian system; install what the Debian packages ${names} hold and start again.`,
    );
  if (process.getuid?.() !== 0) {
    const asRoot = findProgram(['sudo']) ? `sudo sh -c '${command}'` : `su -c '${command}'`;
    throw new LauncherError(`${what} missing; run this one command and start again: ${asRoot}`);
  }
  log(`Installing ${names} from Debian's packages; this takes a minute.`);
  for (const args of [
    ['update'],
    ['install', '-y', '--no-install-recommends', '-o', 'DPkg::Lock::Timeout=120', ...packages],
  ]) {
    const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
    const { code, output } = await run('apt-get', args, { isQuiet: true, env, signal });
    if (signal?.aborted) return;
    if (code === 0) continue;
    const lines = output.trim().split('\n');
    const reason = lines.find((line) => line.startsWith('E:')) ?? lines.at(-1);
    throw new LauncherError(`apt-get could not install ${names} (${reason}); run it by hand: ${command}`);
  }
}
