/**
 * What the linter keeps: types without `any`, accessible markup, the rules of hooks, and above all
 * the directions in which the parts of the code may know each other (see DEVELOPERS.md). Each
 * boundary is proved by a test in tests/unit/architecture.test.ts.
 */
import { basename } from 'node:path';
import importX from 'eslint-plugin-import-x';
import jsxA11y from 'eslint-plugin-jsx-a11y';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

/** Each folder of shared/ and those of its siblings that it may import. */
const MAY_IMPORT = {
  units: [],
  algebra: ['units'],
  print: ['units', 'algebra'],
  numerics: ['units', 'algebra'],
  language: ['units', 'algebra', 'print', 'numerics'],
  thermodynamics: ['units', 'algebra', 'print', 'numerics', 'language'],
  contracts: ['units', 'algebra', 'print', 'numerics', 'language', 'thermodynamics'],
};

const EXCEPTIONS = {
  // The exponents of a dimension are exact rationals, which are the algebra's.
  units: ['./algebra/rational.ts'],
  // The shape of its outcome, which is fixed by those who store and show it.
  thermodynamics: ['./contracts/derivation.ts'],
};

const directionsInShared = Object.entries(MAY_IMPORT).map(([folder, siblings]) => ({
  target: `./shared/${folder}`,
  from: './shared',
  except: [
    `./${folder}`,
    ...siblings.map((sibling) => `./${sibling}`),
    ...(EXCEPTIONS[folder] ?? []),
  ],
  message: `shared/${folder} may import ${siblings.length === 0 ? 'nothing else of shared/' : `only ${siblings.join(', ')} of shared/`}.`,
}));

const onlyOthers = (target, folders, message) =>
  folders.map((folder) => ({ target: `./${target}`, from: `./${folder}`, message }));

const directions = [
  ...directionsInShared,
  ...onlyOthers(
    'shared',
    ['src', 'server', 'worker', 'scripts', 'tests'],
    'shared/ is pure and knows nothing outside itself.',
  ),
  ...onlyOthers(
    'src',
    ['server', 'worker', 'scripts', 'tests'],
    'The client talks to the server over HTTP only, by the contracts of shared/.',
  ),
  ...onlyOthers(
    'worker',
    [
      'src',
      'scripts',
      'tests',
      'server/routes',
      'server/middleware',
      'server/policies',
      'server/fakes',
    ],
    'The worker knows shared/ and what stores and carries, never what answers HTTP.',
  ),
  ...onlyOthers(
    'server',
    ['src', 'worker', 'scripts', 'tests'],
    'The server reaches the worker through the queue and the client through HTTP.',
  ),
];

/** Names that say nothing about what is in a file. */
const EMPTY_NAMES = /^(utils?|helpers?|common|misc|types)(\.|$)/i;

const tellingNames = {
  meta: {
    type: 'problem',
    schema: [],
    messages: { empty: "Name the file after what it holds; '{{name}}' says nothing." },
  },
  create: (context) => ({
    Program: (node) => {
      const name = basename(context.filename);
      if (EMPTY_NAMES.test(name)) context.report({ node, messageId: 'empty', data: { name } });
    },
  }),
};

const NODE_GLOBALS = [
  'AbortController',
  'AbortSignal',
  'Buffer',
  'URL',
  'clearInterval',
  'clearTimeout',
  'console',
  'fetch',
  'performance',
  'process',
  'setInterval',
  'setTimeout',
];
const BROWSER_GLOBALS = ['document', 'localStorage', 'matchMedia', 'window'];
const readonly = (names) => Object.fromEntries(names.map((name) => [name, 'readonly']));

/** What would tie shared/ to a browser, to Node, to a clock or to chance. */
const IMPURE_GLOBALS = [
  'Buffer',
  'Date',
  'EventSource',
  'WebSocket',
  'Worker',
  'XMLHttpRequest',
  'document',
  'fetch',
  'global',
  'localStorage',
  'navigator',
  'performance',
  'postMessage',
  'process',
  'require',
  'self',
  'sessionStorage',
  'setImmediate',
  'setInterval',
  'setTimeout',
  'window',
];

export default tseslint.config(
  { ignores: ['dist/', 'node_modules/', '.massieu/', 'coverage/'] },
  {
    files: ['**/*.{js,mjs,ts,tsx}'],
    plugins: { 'import-x': importX, massieu: { rules: { 'telling-names': tellingNames } } },
    settings: {
      'import-x/resolver-next': [
        importX.createNodeResolver({ extensions: ['.ts', '.tsx', '.js', '.mjs'] }),
      ],
    },
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    rules: {
      eqeqeq: 'error',
      'max-lines': ['warn', { max: 400 }],
      'import-x/no-restricted-paths': [
        'error',
        { basePath: import.meta.dirname, zones: directions },
      ],
      'massieu/telling-names': 'error',
    },
  },
  {
    files: ['**/*.{js,mjs}'],
    languageOptions: { globals: readonly(NODE_GLOBALS) },
    rules: {
      'no-undef': 'error',
      'no-unused-vars': 'error',
      'no-var': 'error',
      'prefer-const': 'error',
    },
  },
  {
    // Runs as it is in the browser, before anything is bundled.
    files: ['src/public/*.js'],
    languageOptions: { sourceType: 'script', globals: readonly(BROWSER_GLOBALS) },
    rules: { 'no-var': 'off', 'no-unused-vars': ['error', { caughtErrors: 'none' }] },
  },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.recommendedTypeChecked],
    languageOptions: {
      parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname },
    },
    rules: {
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: false }],
      '@typescript-eslint/require-await': 'off',
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
    },
  },
  {
    files: ['shared/**/*.ts'],
    rules: {
      'no-restricted-globals': [
        'error',
        ...IMPURE_GLOBALS.map((name) => ({
          name,
          message:
            'shared/ runs in browser, worker and Node alike, and its results are repeatable.',
        })),
      ],
      'no-restricted-properties': [
        'error',
        {
          object: 'Math',
          property: 'random',
          message: 'shared/ draws random numbers from a given seed only.',
        },
      ],
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              regex: '^(?!\\.{1,2}/|(zod|mathjs|nerdamer)($|/))',
              message: 'shared/ imports itself, zod, mathjs and nerdamer, and nothing else.',
            },
          ],
        },
      ],
      'no-restricted-syntax': [
        'error',
        {
          selector: 'ImportExpression > Literal[value=/^(?!\\.|zod|mathjs|nerdamer)/]',
          message: 'shared/ imports itself, zod, mathjs and nerdamer, and nothing else.',
        },
      ],
    },
  },
  {
    files: ['src/**/*.{ts,tsx}'],
    extends: [jsxA11y.flatConfigs.recommended, reactHooks.configs.flat.recommended],
    rules: {
      // What scrolls must be reachable by the keyboard: a box with a name may take the focus.
      'jsx-a11y/no-noninteractive-tabindex': ['error', { roles: ['region', 'group', 'tabpanel'] }],
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              regex: '^(node:|express|sequelize|bullmq|ioredis|pg$|passport)',
              message: 'The client runs in the browser.',
            },
          ],
        },
      ],
    },
  },
  {
    // Bodies of answers are untyped there, and are looked at by assertion.
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
      'max-lines': 'off',
    },
  },
);
