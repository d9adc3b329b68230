import { ensureBuilt } from './build.mjs';
import { checkPort, everywhere, startHub, stopLeftoverHub } from './hub.mjs';
import { ensurePackages } from './install.mjs';
import { LauncherError } from './launcher-error.mjs';
import { lanWords } from './lan-words.mjs';
import { ensureMariadbInstalled } from './mariadb.mjs';
import { readStartOptions, startHelp } from './options.mjs';
import { hubCli, hubEntry, isHubBuilt, tabletDist, tlsFolder } from './paths.mjs';
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
async function start(session, { port, guidePort, isDemo, isResetDemo }) {
  const { log, signal } = session;
  const isLan = guidePort !== null;
  const host = isLan ? everywhere() : undefined;
  session.keep(takeDataFolder(), (release) => release());
  await stopLeftoverHub(hubPidFile, log);
  await checkPort(port, host);
  if (isLan) await checkPort(guidePort, host, '--guide-port');
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
    ...(isLan ? { TLS_FOLDER: tlsFolder, GUIDE_PORT: String(guidePort) } : {}),
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
  const hub = session.keep(await startHub({ entry: hubEntry, pidFile: hubPidFile, env, port, host }), (started) =>
    started.stop(),
  );
  hub.onExit((how) =>
    session.fail(
      `The hub ended by itself (${how}), so Steepfall stops; what was confirmed is on disk. Start again; the reason is printed above.`,
    ),
  );
  const printed = (await signIns) + (isLan && isDemo ? '\n' + demoOnLan : '');
  signal.throwIfAborted();
  const address = process.env['PUBLIC_ORIGIN'] || `http://localhost:${port}`;
  const place = hub.lan
    ? await lanWords(hub.lan, port, tlsFolder)
    : `Steepfall is ready: ${address}\nFor tablets in the kitchen: npm start -- --lan`;
  log(`\n${place}\n${printed}\nCtrl-C stops it.`);
}

const demoOnLan =
  'Everyone in this network can sign in with these. Where strangers use it too, add your own people under House and take access away from these.\n';

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
