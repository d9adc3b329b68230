import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { checkPlanted } from './check-planted.mjs';
import { ensurePackages } from './install.mjs';
import { LauncherError } from './launcher-error.mjs';
import { packageBin, root } from './paths.mjs';
import { run } from './processes.mjs';
import { Session } from './session.mjs';

const tsc = packageBin('typescript/bin/tsc');

/** What the build does not compile: specs, the tablet, the launcher. */
const projectsBesideTheBuild = [
  'shared/tsconfig.spec.json',
  'probe-sim/tsconfig.spec.json',
  'hub/tsconfig.spec.json',
  'hub/launcher/tsconfig.json',
  'tablet/tsconfig.json',
  'tablet/tsconfig.node.json',
  'tablet/e2e/tsconfig.json',
];

/** `npm run check`: all that can be said about the code without running it. Every part runs, also after one has failed. */
export async function runChecks() {
  const session = new Session();
  await session.run(async () => {
    const { log, signal } = session;
    await ensurePackages(log, signal);
    /** @type {string[]} */
    const failed = [];
    /**
     * @param {string} name
     * @param {() => Promise<boolean>} part
     */
    const check = async (name, part) => {
      signal.throwIfAborted();
      const startedMs = performance.now();
      const isGood = await part();
      signal.throwIfAborted();
      log(`${isGood ? 'good  ' : 'FAILED'}  ${name} (${((performance.now() - startedMs) / 1000).toFixed(0)} s)`);
      if (!isGood) failed.push(name);
    };
    /** @param {string[]} args */
    const succeeds = async (...args) => (await run(process.execPath, args, { signal })).code === 0;

    await check('types of the build', () => succeeds(tsc, '-b', root));
    for (const project of projectsBesideTheBuild)
      if (existsSync(join(root, project))) await check(`types of ${project}`, () => succeeds(tsc, '-p', project));
    await check('lint', () => succeeds(packageBin('eslint/bin/eslint.js'), '--max-warnings', '0', '.'));
    await check('planted violations', async () => {
      const wrong = await checkPlanted();
      for (const line of wrong) log(line);
      return wrong.length === 0;
    });
    await check('format', () =>
      succeeds(packageBin('prettier/bin/prettier.cjs'), '--check', '--log-level', 'warn', '.'),
    );
    await check('unused code and dependencies', () => succeeds(packageBin('knip/bin/knip.js'), '--no-progress'));
    if (failed.length > 0) throw new LauncherError(`Not good: ${failed.join(', ')}.`);
    log('All good.');
    session.end(0);
  });
}
