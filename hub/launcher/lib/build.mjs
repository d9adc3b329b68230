import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { LauncherError } from './launcher-error.mjs';
import { packageBin, root, tabletDist } from './paths.mjs';
import { run } from './processes.mjs';

const compiledWorkspaces = ['shared', 'probe-sim', 'hub'];
const stampFile = join(root, 'hub/dist/.built-from');
const inputs = [
  'package-lock.json',
  'tsconfig.base.json',
  'tsconfig.json',
  ...compiledWorkspaces.flatMap((workspace) => [
    `${workspace}/src`,
    `${workspace}/package.json`,
    `${workspace}/tsconfig.json`,
  ]),
  ...['src', 'public', 'index.html', 'package.json', 'vite.config.ts'].map((path) => `tablet/${path}`),
];

/**
 * Builds shared, probe-sim, hub and tablet when a source is not what the last build was made from.
 * @param {(line: string) => void} log
 * @param {AbortSignal} [signal]
 */
export async function ensureBuilt(log, signal) {
  const stamp = stampOfSources();
  if (stamp === lastStamp()) return;
  log('Building.');
  rmSync(stampFile, { force: true });
  await compile(signal);
  await buildTablet(signal);
  if (signal?.aborted) return;
  writeFileSync(stampFile, stamp);
}

/** @param {AbortSignal} [signal] */
async function compile(signal) {
  removeOrphans();
  await build('hub', [packageBin('typescript/bin/tsc'), '-b', root], signal);
}

/** @param {AbortSignal} [signal] */
async function buildTablet(signal) {
  const vite = packageBin('vite/bin/vite.js');
  await build('tablet', [vite, 'build', join(root, 'tablet'), '--logLevel', 'warn'], signal);
}

/**
 * @param {string} what
 * @param {string[]} args
 * @param {AbortSignal} [signal]
 */
async function build(what, args, signal) {
  const { code, output } = await run(process.execPath, args, { isQuiet: true, signal });
  if (code === 0 || signal?.aborted) return;
  process.stderr.write(output);
  throw new LauncherError(`The ${what} could not be built; put right what is reported above and start again.`);
}

function lastStamp() {
  const isComplete = [join(root, 'hub/dist/main.js'), join(tabletDist, 'index.html')].every((file) => existsSync(file));
  return isComplete && existsSync(stampFile) ? readFileSync(stampFile, 'utf8') : null;
}

/** The names and contents of everything that the build reads; specs are not built. */
function stampOfSources() {
  const hash = createHash('sha256');
  for (const input of inputs)
    for (const file of filesBelow(join(root, input))) {
      if (/\.spec\.tsx?$/.test(file)) continue;
      hash.update(`${relative(root, file)}\n`).update(readFileSync(file));
    }
  return hash.digest('hex');
}

/**
 * @param {string} path a file or a folder; may be missing
 * @returns {string[]}
 */
function filesBelow(path) {
  if (!existsSync(path)) return [];
  if (!statSync(path).isDirectory()) return [path];
  return readdirSync(path)
    .sort()
    .flatMap((name) => filesBelow(join(path, name)));
}

/** The compiler leaves the output of deleted sources behind, and a deleted migration must not run any more. */
function removeOrphans() {
  for (const workspace of compiledWorkspaces) {
    const dist = join(root, workspace, 'dist');
    for (const file of filesBelow(dist)) {
      const [, name] = /^(.*?)\.(?:d\.ts|js)(?:\.map)?$/.exec(relative(dist, file)) ?? [];
      if (name && !existsSync(join(root, workspace, 'src', `${name}.ts`))) rmSync(file);
    }
  }
}
