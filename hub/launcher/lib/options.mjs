import { parseArgs } from 'node:util';
import { LauncherError } from './launcher-error.mjs';

export const startHelp = `npm start [-- OPTIONS]

Sets up what is missing, runs Steepfall on this machine and prints its address. Ctrl-C stops it.

  --port NUMBER         port of the hub (4680, with --lan 4643)
  --lan                 HTTPS for the tablets of this network, and a page that helps them to trust it
  --guide-port NUMBER   port of that page (4644)
  --no-demo             do not make the demo house on the first start
  --reset-demo          make the demo house anew; other houses are left alone
  --help                print this and stop`;

const defaultPort = 4680;
const defaultLanPort = 4643;
const defaultGuidePort = 4644;

/**
 * @param {string[]} args what follows "npm start --"
 * @returns {{ port: number, guidePort: number | null, isDemo: boolean, isResetDemo: boolean, isHelp: boolean }} `guidePort` with --lan only
 */
export function readStartOptions(args) {
  const values = parse(args);
  const isLan = values.lan ?? false;
  const port = readPort(values.port, '--port') ?? (isLan ? defaultLanPort : defaultPort);
  const guidePort = readPort(values['guide-port'], '--guide-port') ?? defaultGuidePort;
  if (values['guide-port'] !== undefined && !isLan)
    throw new LauncherError('--guide-port belongs to --lan; give both: npm start -- --lan --guide-port 8081');
  if (isLan && port === guidePort)
    throw new LauncherError(`--port and --guide-port are both ${port}; the two need a port each.`);
  if (values['no-demo'] && values['reset-demo'])
    throw new LauncherError('--no-demo and --reset-demo ask for opposite things; give one of them.');
  return {
    port,
    guidePort: isLan ? guidePort : null,
    isDemo: !values['no-demo'],
    isResetDemo: values['reset-demo'] ?? false,
    isHelp: values.help ?? false,
  };
}

/**
 * @param {string | undefined} text
 * @param {'--port' | '--guide-port'} option
 */
function readPort(text, option) {
  if (text === undefined) return null;
  const port = Number(text);
  if (/^\d+$/.test(text) && port >= 1 && port <= 65_535) return port;
  const example = option === '--port' ? '--port 8080' : '--lan --guide-port 8081';
  throw new LauncherError(`"${text}" is not a port; give a number from 1 to 65535, such as: npm start -- ${example}`);
}

/** @param {string[]} args */
function parse(args) {
  try {
    return parseArgs({
      args,
      options: {
        port: { type: 'string' },
        lan: { type: 'boolean' },
        'guide-port': { type: 'string' },
        'no-demo': { type: 'boolean' },
        'reset-demo': { type: 'boolean' },
        help: { type: 'boolean' },
      },
    }).values;
  } catch (error) {
    throw new LauncherError(
      `${explain(/** @type {NodeJS.ErrnoException} */ (error), args)}; "npm start -- --help" lists what there is.`,
    );
  }
}

/**
 * @param {NodeJS.ErrnoException} error
 * @param {string[]} args
 */
function explain(error, args) {
  const [named] = /'[^']+'/.exec(error.message) ?? [args.join(' ')];
  switch (error.code) {
    case 'ERR_PARSE_ARGS_UNKNOWN_OPTION':
      return `There is no option ${named}`;
    case 'ERR_PARSE_ARGS_UNEXPECTED_POSITIONAL':
      return `There is nothing to do with ${named}`;
    case 'ERR_PARSE_ARGS_INVALID_OPTION_VALUE':
      return `${named.replace(/'|[ =]<value>/g, '')} ${named.includes('<value>') ? 'needs a value after it' : 'takes no value'}`;
    default:
      return error.message;
  }
}
