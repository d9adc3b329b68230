import { ensureBuilt } from './build.mjs';
import { checkPort, startHub, stopLeftoverHub } from './hub.mjs';
import { ensurePackages } from './install.mjs';
import { LauncherError } from './launcher-error.mjs';
import { ensureMariadbInstalled } from './mariadb.mjs';
import { readStartOptions, startHelp } from './options.mjs';
import { hubCli, hubEntry, isHubBuilt, tabletDist } from './paths.mjs';
import { run } from './processes.mjs';
import { hubPidFile, startDatabaseOfProduct, takeDataFolder } from './product.mjs';
import { Session } from './session.mjs';

/**
 * `npm start`: from a bare machine to the running product.
 * @param {string[]} args
 */
export async function startProduct(args) {
  const session = new Session();
  await session.run(async () => {
    const options = readStartOptions(args);
    if (options.isHelp) {
      session.log(startHelp);
      session.end(0);
      return;
    }
    await start(session, options);
  });
}

/**
 * @param {Session} session
 * @param {ReturnType<typeof readStartOptions>} options
 */
async function start(session, { port, isDemo, isResetDemo }) {
  const { log, signal } = session;
  session.keep(takeDataFolder(), (release) => release());
  await stopLeftoverHub(hubPidFile, log);
  await checkPort(port);
  if (isHubBuilt) await ensurePackages(log, signal);
  signal.throwIfAborted();
  await ensureMariadbInstalled(log, signal);
  signal.throwIfAborted();
  if (isHubBuilt) await ensureBuilt(log, signal);
  signal.throwIfAborted();
  const env = {
    ...(await startDatabaseOfProduct(session)),
    TABLET_DIST: tabletDist,
    DEMO: isDemo ? 'on' : 'off',
    NODE_ENV: 'production',
    LOG_LEVEL: process.env['LOG_LEVEL'] ?? 'warn',
  };
  signal.throwIfAborted();
  if (isResetDemo) {
    log('Making the demo house anew.');
    await askHub('reset-demo', env);
    signal.throwIfAborted();
  }
  // Asked beside the start of the hub, which takes as long.
  const signIns = isDemo ? demoSignIns(env) : Promise.resolve('');
  signIns.catch(() => {});
  const hub = session.keep(await startHub({ entry: hubEntry, pidFile: hubPidFile, env, port }), (started) =>
    started.stop(),
  );
  hub.onExit((how) =>
    session.fail(
      `The hub ended by itself (${how}), so Steepfall stops; what was confirmed is on disk. Start again; the reason is printed above.`,
    ),
  );
  const printed = await signIns;
  signal.throwIfAborted();
  log(`\nSteepfall is ready: http://localhost:${port}\n${printed}\nCtrl-C stops it.`);
}

/**
 * @param {string} command
 * @param {NodeJS.ProcessEnv} env
 */
async function askHub(command, env) {
  const { code, stdout, output } = await run(process.execPath, [hubCli, command], {
    isQuiet: true,
    env: { ...process.env, ...env },
  });
  if (code === 0) return stdout;
  process.stderr.write(output);
  throw new LauncherError(`The hub could not do "${command}"; the reason is printed above.`);
}

/** @param {NodeJS.ProcessEnv} env */
async function demoSignIns(env) {
  /** @type {{ role: string, email: string, password: string }[]} */
  const signIns = JSON.parse(await askHub('demo-sign-ins', env));
  if (signIns.length === 0) return '';
  const width = Math.max(...signIns.map(({ email }) => email.length));
  const lines = signIns.map(({ role, email, password }) => `  ${role.padEnd(8)}${email.padEnd(width + 2)}${password}`);
  return ['', 'Demo sign-ins (house "Wrenfold Drinks"):', ...lines, ''].join('\n');
}
