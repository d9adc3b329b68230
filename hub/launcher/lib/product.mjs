import { accessSync, constants, existsSync, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { explainDiskError, LauncherError } from './launcher-error.mjs';
import { takeLock } from './lock.mjs';
import { startMariadb } from './mariadb.mjs';
import { dataDir, root } from './paths.mjs';
import { keepKeyPair, keepSecret } from './secrets.mjs';

/**
 * What `npm start` and `npm run dev` share: the data folder with its lock, its secret and its database.
 */

export const hubPidFile = join(dataDir, 'hub.pid.json');

/**
 * Makes the data folder and takes it for this launcher alone.
 * @returns {() => void} gives it back
 */
export function takeDataFolder() {
  try {
    // Nothing in it is meant for other users of the machine.
    if (!existsSync(dataDir)) mkdirSync(dataDir, { recursive: true, mode: 0o700 });
    for (const folder of [root, dataDir]) accessSync(folder, constants.W_OK);
    const lock = takeLock(join(dataDir, 'launcher.lock'));
    if (lock.isTaken) return lock.release;
    throw new LauncherError(
      `Steepfall runs from this checkout already (process ${lock.pid}); use that one, or stop it with Ctrl-C in its window.`,
    );
  } catch (error) {
    throw explainDiskError(error, dataDir);
  }
}

/**
 * @param {import('./session.mjs').Session} session
 * @returns {Promise<NodeJS.ProcessEnv>} what the hub needs to know, but for its port and its mode
 */
export async function startDatabaseOfProduct(session) {
  const mariadb = session.keep(await startMariadb({ dataDir: join(dataDir, 'mariadb'), log: session.log }), (started) =>
    started.stop(),
  );
  mariadb.onExit((how) =>
    session.fail(
      `The database ended by itself (${how}), so Steepfall stops; what was confirmed is on disk. Start again, and when it ends again, read ${join(dataDir, 'mariadb.log')}.`,
    ),
  );
  const { publicKey, privateKey } = kept('push-keys.json', keepKeyPair);
  return {
    DATABASE_URL: mariadb.url('steepfall'),
    JWT_SECRET: kept('jwt-secret', keepSecret),
    VAPID_PUBLIC_KEY: publicKey,
    VAPID_PRIVATE_KEY: privateKey,
  };
}

/**
 * @template T
 * @param {string} name
 * @param {(path: string) => T} keep
 */
function kept(name, keep) {
  const path = join(dataDir, name);
  try {
    return keep(path);
  } catch (error) {
    throw explainDiskError(error, path);
  }
}
