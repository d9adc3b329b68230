import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { checkPort, stopLeftoverHub } from './hub.mjs';
import { ensurePackages } from './install.mjs';
import { LauncherError } from './launcher-error.mjs';
import { hubEntry, packageBin, root } from './paths.mjs';
import { endChild, endingWithParent, run } from './processes.mjs';
import { hubPidFile, startDatabaseOfProduct, takeDataFolder } from './product.mjs';
import { ensureMariadbInstalled } from './mariadb.mjs';
import { Session } from './session.mjs';

const hubPort = 4680;
const tabletPort = 4681;
const tsc = packageBin('typescript/bin/tsc');

/** `npm run dev`: the product on its own data, with every change compiled, restarted or shown at once. */
export async function startDevelopment() {
  const session = new Session();
  await session.run(async () => {
    const { log, signal } = session;
    session.keep(takeDataFolder(), (release) => release());
    await stopLeftoverHub(hubPidFile, log);
    await checkPort(hubPort);
    await checkPort(tabletPort);
    await ensurePackages(log, signal);
    signal.throwIfAborted();
    await ensureMariadbInstalled(log, signal);
    signal.throwIfAborted();
    log('Compiling.');
    const { output } = await run(process.execPath, [tsc, '-b', root], { isQuiet: true, signal });
    signal.throwIfAborted();
    // Mistakes are for the watching compiler to tell, as long as there is something to start.
    if (!existsSync(hubEntry)) {
      process.stderr.write(output);
      throw new LauncherError('The hub could not be compiled; put right what is reported above and start again.');
    }
    const database = await startDatabaseOfProduct(session);
    signal.throwIfAborted();
    watch(session, 'compiler', [tsc, '-b', root, '--watch', '--preserveWatchOutput', '--pretty']);
    watch(session, 'hub', ['--enable-source-maps', '--watch', '--watch-preserve-output', hubEntry], {
      ...database,
      HOST: '127.0.0.1',
      PORT: String(hubPort),
      DEMO: 'on',
      NODE_ENV: 'development',
      LOG_LEVEL: 'debug',
    });
    watch(session, 'tablet', [packageBin('vite/bin/vite.js'), join(root, 'tablet'), '--port', String(tabletPort)], {
      STEEPFALL_HUB_URL: `http://127.0.0.1:${hubPort}`,
    });
    log(
      [
        '',
        `Tablet with hot reload: http://localhost:${tabletPort}`,
        `API:                    http://localhost:${hubPort}/api/docs`,
        'A probe:                make one on the house page, then: npm run probe-sim -- kettle --token TOKEN',
        '',
        'Ctrl-C stops everything.',
        '',
      ].join('\n'),
    );
  });
}

/**
 * @param {Session} session
 * @param {string} name begins each line of its output
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} [env]
 */
function watch(session, name, args, env = {}) {
  const child = spawn(...endingWithParent(process.execPath, args), {
    cwd: root,
    env: { ...process.env, ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
    detached: true,
  });
  for (const stream of [child.stdout, child.stderr])
    stream.setEncoding('utf8').on('data', (/** @type {string} */ chunk) => {
      for (const line of chunk.trimEnd().split('\n')) session.log(`${name.padEnd(9)}${line}`);
    });
  child.once('exit', (code, signal) =>
    session.fail(`The ${name} ended by itself (${signal ?? `exit code ${code}`}); the reason is printed above.`),
  );
  session.keep(child, () => endChild(child, 10_000));
}
