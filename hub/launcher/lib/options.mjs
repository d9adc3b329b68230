import { parseArgs } from 'node:util';
import { LauncherError } from './launcher-error.mjs';

export const startHelp = `npm start [-- OPTIONS]

Sets up what is missing, runs Steepfall on this machine and prints its address. Ctrl-C stops it.

  --port NUMBER   port of the hub (4680)
  --no-demo       do not make the demo house on the first start
  --reset-demo    make the demo house anew; other houses are left alone
  --help          print this and stop`;

const defaultPort = 4680;

/**
 * @param {string[]} args what follows "npm start --"
 * @returns {{ port: number, isDemo: boolean, isResetDemo: boolean, isHelp: boolean }}
 */
export function readStartOptions(args) {
  const values = parse(args);
  const port = values.port === undefined ? defaultPort : Number(values.port);
  if (!/^\d+$/.test(values.port ?? '1') || port < 1 || port > 65_535)
    throw new LauncherError(
      `"${values.port}" is not a port; give a number from 1 to 65535, such as: npm start -- --port 8080`,
    );
  if (values['no-demo'] && values['reset-demo'])
    throw new LauncherError('--no-demo and --reset-demo ask for opposite things; give one of them.');
  return {
    port,
    isDemo: !values['no-demo'],
    isResetDemo: values['reset-demo'] ?? false,
    isHelp: values.help ?? false,
  };
}

/** @param {string[]} args */
function parse(args) {
  try {
    return parseArgs({
      args,
      options: {
        port: { type: 'string' },
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
