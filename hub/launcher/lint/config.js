import eslint from '@eslint/js';
import { createTypeScriptImportResolver } from 'eslint-import-resolver-typescript';
import boundaries from 'eslint-plugin-boundaries';
import { flatConfigs as importFlatConfigs, importX } from 'eslint-plugin-import-x';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import jsxA11y from 'eslint-plugin-jsx-a11y';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';
import { elements, files, policies } from './import-rules.js';

const specs = ['**/*.spec.{ts,tsx}', '**/*.bench.ts'];
const code = ['**/*.{ts,tsx}'];

/**
 * @param {object} options
 * @param {string} options.root where the workspaces are: the checkout, or a folder that imitates it
 * @param {boolean} [options.isTyped] ask the compiler as well; every file then has to be in a tsconfig
 */
export function createLintConfig({ root, isTyped = true }) {
  return tseslint.config(
    { ignores: ['**/dist/**', '**/coverage/**', '**/.data/**', '**/.test-data/**', 'hub/launcher/lint-fixtures/**'] },
    { linterOptions: { reportUnusedDisableDirectives: 'error' } },
    eslint.configs.recommended,
    { files: ['**/*.{js,mjs}'], languageOptions: { globals: nodeGlobals } },
    { files: code, extends: [tseslint.configs.recommended, ...(isTyped ? [typedRules(root)] : [])] },
    { files: code, ...importRules(root) },
    {
      files: code,
      rules: {
        '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
        '@typescript-eslint/consistent-type-assertions': ['error', { assertionStyle: 'as' }],
        eqeqeq: ['error', 'always', { null: 'ignore' }],
        'no-console': 'error',
      },
    },
    {
      files: ['shared/src/**/*.ts'],
      ignores: specs,
      rules: {
        'no-restricted-syntax': ['error', currentDate],
        'no-restricted-properties': ['error', ...impureProperties],
      },
    },
    {
      files: ['hub/src/**/*.ts'],
      ignores: [...specs, 'hub/src/config/**'],
      rules: {
        'no-restricted-properties': [
          'error',
          { object: 'process', property: 'env', message: 'Only hub/src/config reads the environment.' },
        ],
      },
    },
    {
      files: ['tablet/src/**/*.{ts,tsx}'],
      extends: [reactHooks.configs.flat.recommended, jsxA11y.flatConfigs.strict],
      rules: {
        // A sheet that opens for typing has the cursor where the person types.
        'jsx-a11y/no-autofocus': 'off',
      },
    },
    {
      // Run as they are by whatever browser there is, before anything else.
      files: ['tablet/public/**/*.js'],
      languageOptions: { globals: browserGlobals },
      rules: { 'no-unused-vars': ['error', { caughtErrors: 'none' }], 'no-useless-assignment': 'off' },
    },
    // They print what they measure.
    { files: ['tablet/e2e/**', '**/bench/**'], rules: { 'no-console': 'off' } },
    // Tools ask for a default export in their own files.
    { files: ['**/*.config.{ts,js}', '**/global-setup.ts'], rules: { 'import-x/no-default-export': 'off' } },
  );
}

const currentDate = {
  selector: "NewExpression[callee.name='Date'][arguments.length=0]",
  message: 'shared has no clock: take nowMs as an argument.',
};
const impureProperties = [
  { object: 'Date', property: 'now', message: 'shared has no clock: take nowMs as an argument.' },
  { object: 'Math', property: 'random', message: 'shared has no chance: take a seed or the number as an argument.' },
];

/** @param {string} names */
const globalsNamed = (names) => Object.fromEntries(names.split(' ').map((name) => [name, 'readonly']));
const nodeGlobals = globalsNamed(
  'process console Buffer URL AbortController AbortSignal performance setTimeout clearTimeout fetch',
);
const browserGlobals = globalsNamed(
  'window document navigator location localStorage matchMedia caches addEventListener',
);

/** @param {string} root */
function typedRules(root) {
  return {
    languageOptions: {
      parserOptions: { project: tsconfigs.filter((path) => existsSync(join(root, path))), tsconfigRootDir: root },
    },
    rules: {
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/only-throw-error': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true, requireDefaultForNonUnion: true },
      ],
      '@typescript-eslint/return-await': ['error', 'error-handling-correctness-only'],
    },
  };
}

/** Those that hold the specs as well as the code: each file is looked up in them one after the other. */
const tsconfigs = [
  'shared/tsconfig.spec.json',
  'probe-sim/tsconfig.spec.json',
  'hub/tsconfig.spec.json',
  'hub/launcher/tsconfig.json',
  'tablet/tsconfig.json',
  'tablet/tsconfig.node.json',
  'tablet/e2e/tsconfig.json',
];

/** @param {string} root */
function importRules(root) {
  return {
    plugins: { ...importFlatConfigs.typescript.plugins, 'import-x': importX, boundaries },
    settings: {
      ...importFlatConfigs.typescript.settings,
      // Without a resolver that knows TypeScript, no-cycle sees no import and says nothing.
      'import-x/resolver-next': [createTypeScriptImportResolver({ alwaysTryTypes: true, project: [] })],
      'import/resolver': { typescript: { alwaysTryTypes: true, project: [] } },
      'boundaries/root-path': root,
      'boundaries/elements': elements,
      'boundaries/elements-single-match': true,
      'boundaries/files': files,
      'boundaries/include': ['{shared,probe-sim,hub,tablet}/**'],
    },
    rules: {
      'boundaries/dependencies': ['error', { default: 'disallow', policies }],
      'import-x/no-cycle': ['error', { ignoreExternal: true }],
      'import-x/no-self-import': 'error',
      'import-x/no-default-export': 'error',
      'import-x/no-duplicates': 'error',
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              regex: '(^@steepfall/[a-z-]+|/(shared|probe-sim|hub|tablet))/(src|dist)(/|$)',
              message:
                'Another workspace is imported by its name and one of its areas, such as @steepfall/shared/units.',
            },
          ],
        },
      ],
    },
  };
}
