import { mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { ensureBuilt } from './build.mjs';
import { ensureChromiumInstalled } from './chromium.mjs';
import { ensurePackages } from './install.mjs';
import { LauncherError } from './launcher-error.mjs';
import { ensureMariadbInstalled } from './mariadb.mjs';
import { packageBin, testDataDir } from './paths.mjs';
import { run } from './processes.mjs';
import { ensureProxyInstalled } from './proxy.mjs';
import { Session } from './session.mjs';
import { countTests } from './test-report.mjs';

/**
 * `npm test`: sets up what the specs need and runs them. The last line is `N passed, N failed`, whatever happens.
 * @param {string[]} args handed on to Vitest: `npm test -- --project shared units`
 */
export async function runTests(args) {
  const session = new Session();
  let counts = { passed: 0, failed: 1, skipped: 0 };
  await session.run(async () => {
    await prepare(session, args);
    counts = await runVitest(session, args);
    session.end(0);
  });
  if (counts.failed > 0) process.exitCode = 1;
  const skipped = counts.skipped > 0 ? `, ${counts.skipped} skipped` : '';
  session.log(`\n${counts.passed} passed, ${counts.failed} failed${skipped}`);
}

/**
 * @param {Session} session
 * @param {string[]} args
 */
async function prepare({ log, signal }, args) {
  const steps = [
    () => ensurePackages(log, signal),
    () => ensureMariadbInstalled(log, signal),
    () => (mayRun('hub', args) ? ensureProxyInstalled(log, signal) : undefined),
    () => (mayRun('e2e', args) ? ensureChromiumInstalled(log, signal) : undefined),
    () => ensureBuilt(log, signal),
  ];
  for (const step of steps) {
    await step();
    signal.throwIfAborted();
  }
}

/**
 * Whether the arguments leave a project in; what it alone needs is not installed for the others.
 * @param {string} project
 * @param {string[]} args
 */
function mayRun(project, args) {
  const chosen = args.flatMap((arg, index) => {
    if (arg === '--project') return [args[index + 1] ?? ''];
    return arg.startsWith('--project=') ? [arg.slice('--project='.length)] : [];
  });
  return chosen.length === 0 || chosen.some((name) => name === project || /[*!]/.test(name));
}

/**
 * @param {Session} session
 * @param {string[]} args
 */
async function runVitest({ signal }, args) {
  mkdirSync(testDataDir, { recursive: true });
  const report = join(testDataDir, `report-${process.pid}.json`);
  try {
    const { code } = await run(
      process.execPath,
      [
        packageBin('vitest/vitest.mjs'),
        'run',
        '--reporter=default',
        '--reporter=json',
        `--outputFile.json=${report}`,
        ...args,
      ],
      { signal },
    );
    return countTests(readReport(report), code);
  } finally {
    rmSync(report, { force: true });
  }
}

/**
 * @param {string} file
 * @returns {import('./test-report.mjs').Report}
 */
function readReport(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    throw new LauncherError('Vitest ended without a report; the reason is printed above.');
  }
}
