import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { LauncherError } from './launcher-error.mjs';
import { root } from './paths.mjs';
import { run } from './processes.mjs';

/** @typedef {{ version?: string, resolved?: string, link?: boolean, optional?: boolean, devOptional?: boolean }} Entry */

/**
 * Installs the npm packages when they are missing or not those of the lock file.
 * @param {(line: string) => void} log
 * @param {AbortSignal} [signal]
 */
export async function ensurePackages(log, signal) {
  if (arePackagesInstalled()) return;
  const isFirst = !existsSync(join(root, 'node_modules'));
  log(isFirst ? 'Installing npm packages; this takes a minute or two.' : 'Bringing the npm packages up to date.');
  // `npm start` tells where the npm that runs it lives; that one is there for certain.
  const npm = process.env['npm_execpath'];
  const [command, ...before] = npm?.endsWith('.js') ? [process.execPath, npm] : ['npm'];
  const { code, output } = await run(
    command ?? 'npm',
    [...before, isFirst ? 'ci' : 'install', '--no-audit', '--no-fund'],
    {
      isQuiet: true,
      signal,
    },
  );
  if (code === 0 || signal?.aborted) return;
  const errors = output.split('\n').filter((line) => /^npm (error|ERR!)/.test(line));
  const reason = (errors.length > 0 ? errors : [output.trim()])
    .slice(0, 4)
    .map((line) => line.replace(/^npm (error|ERR!) ?/, ''))
    .join(' ');
  throw new LauncherError(
    `The npm packages could not be installed (${reason}); check the connection and the disk, then start again.`,
  );
}

/** Compares what npm wrote down as installed with the lock file, whatever the times of the two files are. */
function arePackagesInstalled() {
  const installedFile = join(root, 'node_modules/.package-lock.json');
  if (!existsSync(installedFile)) return false;
  const installed = readEntries(installedFile);
  const wanted = readEntries(join(root, 'package-lock.json'));
  return Object.entries(wanted).every(([path, entry]) => {
    if (!path.startsWith('node_modules/') && !path.includes('/node_modules/')) return true;
    const found = installed[path];
    // Packages for other systems are in the lock and rightly missing here.
    if (!found) return Boolean(entry.optional || entry.devOptional);
    return found.version === entry.version && found.link === entry.link;
  });
}

/**
 * @param {string} file
 * @returns {Record<string, Entry>}
 */
function readEntries(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8')).packages ?? {};
  } catch {
    return {};
  }
}
