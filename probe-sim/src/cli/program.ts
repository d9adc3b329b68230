import { Command, CommanderError, InvalidArgumentError, Option } from 'commander';
import { faultFacts, faultFromText, faultKinds, type Fault } from '../faults/index.js';
import type { KettleOverrides } from '../kettle/index.js';
import { scriptFromText } from '../play/act-script.js';
import { durationMsFromText } from '../text/duration-text.js';
import { hubAddress } from '../transport/door.js';
import { asCommandError, type LineOptions } from './connect.js';
import { CommandError, exitCode, type ExitCode } from './exit-code.js';
import type { Host } from './host.js';
import { kettleCommand } from './kettle-command.js';
import { KEYS } from './kettle-keys.js';
import { replayCommand } from './replay-command.js';

const DEFAULT_HUB = 'http://localhost:4680';

const faultHelp = `
Faults: kind@from[+duration][=amount], in simulated time.
${faultKinds.map((kind) => `  ${kind.padEnd(11)}${faultFacts[kind].meaning} (usual: ${usual(kind)})`).join('\n')}

Exit codes: 0 done, 1 unexpected, 2 cannot be used as asked, 3 refused by the hub, 4 hub away and readings lost.`;

/** Runs one command line, without the name of the program, and says how it ended. */
export async function runProgram(args: readonly string[], host: Host): Promise<ExitCode> {
  try {
    await buildProgram(host).parseAsync(args, { from: 'user' });
    return exitCode.done;
  } catch (error) {
    if (error instanceof CommanderError) return error.exitCode === 0 ? exitCode.done : exitCode.usage;
    const told = asCommandError(error);
    if (!(told instanceof CommandError)) throw error;
    host.notice(told.message);
    return told.code;
  }
}

function buildProgram(host: Host): Command {
  const program = new Command('probe-sim')
    .description('A kettle and a probe that do not exist: sends believable readings to a hub.')
    .exitOverride()
    .configureOutput({ writeOut: host.write, writeErr: (text) => host.notice(text.trimEnd()) });

  lineOptions(program.command('kettle'))
    .description('simulate a kettle; act on it with keys or with a script')
    .option('--script <acts>', 'acts in order: heat@0,tea-in@76C,tea-out@+3m,… or "day"', usable(scriptFromText))
    .option('--for <duration>', 'stop after this much simulated time, such as 40m', usable(durationMsFromText))
    .option('--water-kg <kg>', 'water in the kettle (22)', number)
    .option('--start-c <°C>', 'its temperature (18)', number)
    .option('--room-c <°C>', 'the room (21)', number)
    .option('--coolant-c <°C>', 'what runs through the chiller (12)', number)
    .option('--coolant-kg-per-s <kg/s>', 'how much of it (0.1)', number)
    .option('--heater-w <W>', 'power of the heater (3500, of which 84 % arrive)', number)
    .option('--lag-s <s>', 'time constant of the probe (6)', number)
    .option('--period-s <s>', 'time between readings (1)', number)
    .addHelpText('after', `\nKeys, at a terminal:\n  ${KEYS.replace('\n', '\n  ')}\n${faultHelp}`)
    .action((options: ToldOptions) => kettleCommand({ ...options, setup: overridesOf(options) }, host));

  lineOptions(program.command('replay <file>'))
    .description('tell a recorded trace again: a CSV file with the columns seconds,celsius')
    .option(
      '--start-at <when>',
      'stamp of its start: now, a time such as 2026-05-01T10:00Z, or epoch ms',
      usable(instant),
    )
    .addHelpText('after', faultHelp)
    .action((file: string, options: LineOptions & { seed: number; fault: Fault[]; startAt?: number | null }) =>
      replayCommand(file, { ...options, startAt: options.startAt ?? undefined }, host),
    );
  return program;
}

interface ToldOptions extends LineOptions {
  seed: number;
  fault: Fault[];
  waterKg?: number;
  startC?: number;
  roomC?: number;
  coolantC?: number;
  coolantKgPerS?: number;
  heaterW?: number;
  lagS?: number;
  periodS?: number;
}

function lineOptions(command: Command): Command {
  return command
    .exitOverride()
    .option('--hub <url>', 'address of the hub', usable(hubAddress), DEFAULT_HUB)
    .addOption(new Option('--token <token>', 'device token of the probe').env('DEVICE_TOKEN'))
    .addOption(new Option('--door <door>', 'how readings go to the hub').choices(['socket', 'http']).default('socket'))
    .option('--rate <1..60>', 'how many times as fast; stamps are squeezed as well', usable(rate))
    .option('--run-clock', 'stamp on the clock of the run that the probe is attached to, and keep its rate')
    .option('--fault <fault>', 'a fault, such as dropout@120s+20s; may be given again', usable(addFault), [])
    .option('--seed <number>', 'the same seed gives the same readings and faults', usable(seed), 1)
    .option('--stdout', 'print the readings as JSON lines; send nothing')
    .option('--dry-run', 'the same without waiting');
}

function overridesOf(told: ToldOptions): KettleOverrides {
  const named = {
    waterMassKg: told.waterKg,
    waterTempC: told.startC,
    roomC: told.roomC,
    coolantC: told.coolantC,
    coolantKgPerS: told.coolantKgPerS,
    heaterPowerW: told.heaterW,
  };
  const probe = { tauS: told.lagS, samplePeriodS: told.periodS };
  return { ...withoutUndefined(named), probe: withoutUndefined(probe) };
}

function withoutUndefined<Values extends object>(values: Values): { [Key in keyof Values]?: NonNullable<Values[Key]> } {
  return Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined)) as {
    [Key in keyof Values]?: NonNullable<Values[Key]>;
  };
}

/** Lets a parser's own words reach the person. */
function usable<Parsed>(parse: (text: string, before: Parsed) => Parsed): (text: string, before: Parsed) => Parsed {
  return (text, before) => {
    try {
      return parse(text, before);
    } catch (error) {
      if (error instanceof RangeError) throw new InvalidArgumentError(error.message);
      throw error;
    }
  };
}

function number(text: string): number {
  const value = Number(text);
  if (text.trim() === '' || !Number.isFinite(value)) throw new InvalidArgumentError(`"${text}" is no number.`);
  return value;
}

function rate(text: string): number {
  const value = number(text);
  if (value < 1 || value > 60) throw new InvalidArgumentError('A rate is between 1 and 60.');
  return value;
}

function seed(text: string): number {
  const value = number(text);
  if (!Number.isInteger(value) || value < 0 || value > 0xffffffff) {
    throw new InvalidArgumentError('A seed is a whole number from 0 to 4294967295.');
  }
  return value;
}

function addFault(text: string, before: Fault[]): Fault[] {
  return [...before, faultFromText(text)];
}

function instant(text: string): number | null {
  if (text === 'now') return null;
  const atMs = /^\d+$/.test(text) ? Number(text) : Date.parse(text);
  if (Number.isNaN(atMs)) throw new RangeError(`"${text}" is no time. Write now, 2026-05-01T10:00Z or epoch ms.`);
  return atMs;
}

function usual(kind: (typeof faultKinds)[number]): string {
  const { durationMs, amount } = faultFacts[kind];
  const lasts = durationMs > 0 ? `${durationMs / 1000} s` : 'one reading';
  return amount === 0 ? lasts : `${lasts}, ${amount}`;
}
