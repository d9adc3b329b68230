import { readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { root } from './paths.mjs';

const fixtures = join(root, 'hub/launcher/lint-fixtures');

/**
 * Lints files with planted mistakes. A rule that is switched on and finds nothing looks exactly like clean code; here it
 * is told apart.
 * @returns {Promise<string[]>} what is not as it should be, a line each
 */
export async function checkPlanted() {
  const { ESLint } = await import('eslint');
  const lint = new ESLint({ cwd: fixtures, overrideConfigFile: join(fixtures, 'eslint.config.js') });
  const results = await lint.lintFiles(['**/*.ts']);
  return results.flatMap(({ filePath, messages }) => {
    const planted = [...readFileSync(filePath, 'utf8').matchAll(/^\/\/ planted: (\S+)$/gm)].map(([, rule]) => rule);
    const found = messages.map(({ ruleId, message }) => ruleId ?? message);
    const name = relative(root, filePath);
    return [
      ...planted.filter((rule) => !found.includes(rule ?? '')).map((rule) => `${name}: ${rule} did not notice`),
      ...found.filter((rule) => !planted.includes(rule)).map((rule) => `${name}: ${rule} is not planted`),
    ];
  });
}
