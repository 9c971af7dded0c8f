/**
 * The shape of the project: each boundary that the linter keeps is shown to refuse what crosses it,
 * and what the linter cannot see (the top level, addresses, paths) is looked at here.
 */
import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { ESLint } from 'eslint';
import tseslint from 'typescript-eslint';
import { beforeAll, describe, expect, it } from 'vitest';

const ROOT = resolve(import.meta.dirname, '../..');

let eslint: ESLint;

beforeAll(() => {
  eslint = new ESLint({
    cwd: ROOT,
    // Snippets are in no program of TypeScript; the boundaries need none.
    overrideConfig: [tseslint.configs.disableTypeChecked] as ESLint.Options['overrideConfig'],
  });
});

/** Names of the rules that refuse the text, were it the content of the file. */
async function refusals(filePath: string, text: string): Promise<string[]> {
  const [result] = await eslint.lintText(text, { filePath: resolve(ROOT, filePath) });
  return (result?.messages ?? []).map(({ ruleId, message }) => ruleId ?? message);
}

const PATHS = 'import-x/no-restricted-paths';

describe('the directions of the code', () => {
  // What is imported must exist, since the rule looks at resolved files.
  const refused: readonly (readonly [string, string])[] = [
    ['shared/units/probe.ts', '../algebra/expression.ts'],
    ['shared/units/probe.ts', '../contracts/models.ts'],
    ['shared/algebra/probe.ts', '../language/formulation.ts'],
    ['shared/algebra/probe.ts', '../contracts/models.ts'],
    ['shared/print/probe.ts', '../language/formulation.ts'],
    ['shared/print/probe.ts', '../contracts/derivation.ts'],
    ['shared/numerics/probe.ts', '../language/formulation.ts'],
    ['shared/language/probe.ts', '../contracts/models.ts'],
    ['shared/thermodynamics/probe.ts', '../contracts/models.ts'],
    ['shared/contracts/probe.ts', '../../server/main.ts'],
    ['shared/algebra/probe.ts', '../../src/main.tsx'],
    ['shared/algebra/probe.ts', '../../worker/main.ts'],
    ['src/probe.ts', '../server/main.ts'],
    ['src/probe.ts', '../worker/main.ts'],
    ['worker/probe.ts', '../src/main.tsx'],
    ['worker/probe.ts', '../server/fakes/main.ts'],
    ['server/probe.ts', '../worker/main.ts'],
    ['server/probe.ts', '../src/main.tsx'],
  ];
  it.each(refused)('%s may not import %s', async (file, target) => {
    expect(await refusals(file, `import '${target}';`)).toEqual([PATHS]);
  });

  it('holds for a dynamic import too', async () => {
    const text = "export const load = () => import('../server/main.ts');";
    expect(await refusals('src/probe.ts', text)).toEqual([PATHS]);
  });

  const allowed: readonly (readonly [string, string])[] = [
    ['shared/units/probe.ts', '../algebra/rational.ts'],
    ['shared/algebra/probe.ts', '../units/dimension.ts'],
    ['shared/language/probe.ts', '../algebra/expression.ts'],
    ['shared/thermodynamics/probe.ts', '../language/formulation.ts'],
    ['shared/thermodynamics/probe.ts', '../contracts/derivation.ts'],
    ['shared/contracts/probe.ts', '../language/formulation.ts'],
    ['src/probe.ts', '../shared/contracts/models.ts'],
    ['server/probe.ts', '../shared/contracts/models.ts'],
    ['worker/probe.ts', '../shared/contracts/derivation.ts'],
  ];
  it.each(allowed)('%s may import %s', async (file, target) => {
    expect(await refusals(file, `import '${target}';`)).toEqual([]);
  });
});

describe('shared/', () => {
  it.each(['node:fs', 'fs', 'react', 'express', 'sequelize', 'bullmq', 'katex'])(
    'may not import %s',
    async (name) => {
      expect(await refusals('shared/algebra/probe.ts', `import '${name}';`)).toEqual([
        'no-restricted-imports',
      ]);
      const dynamic = `export const load = () => import('${name}');`;
      expect(await refusals('shared/algebra/probe.ts', dynamic)).toEqual(['no-restricted-syntax']);
    },
  );

  it.each(['zod', 'mathjs', 'nerdamer/all'])('may import %s', async (name) => {
    expect(await refusals('shared/contracts/probe.ts', `import '${name}';`)).toEqual([]);
  });

  it.each(['window', 'document', 'process', 'Buffer', 'fetch', 'Date', 'performance'])(
    'may not use the global %s',
    async (name) => {
      const text = `export const value: unknown = ${name};`;
      expect(await refusals('shared/numerics/probe.ts', text)).toEqual(['no-restricted-globals']);
    },
  );

  it('may not draw random numbers without a seed', async () => {
    const text = 'export const draw = () => Math.random();';
    expect(await refusals('shared/numerics/probe.ts', text)).toEqual(['no-restricted-properties']);
  });
});

describe('every file', () => {
  it('has no any', async () => {
    expect(await refusals('src/probe.ts', 'export const value: any = 1;')).toEqual([
      '@typescript-eslint/no-explicit-any',
    ]);
  });

  it.each(['utils.ts', 'helpers.ts', 'util.test.ts', 'common.ts', 'misc.ts', 'types.ts'])(
    'has a telling name, unlike %s',
    async (name) => {
      const rules = await refusals(`src/${name}`, 'export const value = 1;');
      expect(rules).toEqual(['massieu/telling-names']);
    },
  );

  it('of the client runs in the browser', async () => {
    expect(await refusals('src/probe.ts', "import 'node:fs';")).toEqual(['no-restricted-imports']);
  });
});

/** Files that git knows, and those that it would take up. */
function files(): string[] {
  const list = execFileSync('git', ['ls-files', '--cached', '--others', '--exclude-standard'], {
    cwd: ROOT,
    encoding: 'utf8',
  });
  return list.split('\n').filter((path) => path !== '');
}

describe('the checkout', () => {
  it('has exactly the top level that DEVELOPERS.md describes', () => {
    const allowed = new Set([
      '.ci',
      '.gitignore',
      '.npmrc',
      '.prettierignore',
      '.prettierrc.json',
      'DEVELOPERS.md',
      'README.md',
      'eslint.config.js',
      'index.html',
      'package-lock.json',
      'package.json',
      'scripts',
      'server',
      'shared',
      'src',
      'tailwind.config.ts',
      'tests',
      'tsconfig.json',
      'vite.config.ts',
      'worker',
    ]);
    const present = new Set(files().map((path) => path.split('/')[0] ?? ''));
    expect([...present].filter((entry) => !allowed.has(entry))).toEqual([]);
    expect([...allowed].filter((entry) => !present.has(entry))).toEqual([]);
  });

  it('names no package registry and no path of one machine', () => {
    // Written in parts, so that this file does not find itself.
    const registries = [
      'registry.' + 'npmjs',
      'registry.' + 'yarnpkg',
      'npm.' + 'pkg.',
      'npm' + 'mirror',
    ];
    const paths = ['/' + 'work/', '/' + 'home/', '/' + 'root/', '/' + 'Users/'];
    const offenders: string[] = [];
    for (const path of files()) {
      let text: string;
      try {
        text = readFileSync(resolve(ROOT, path), 'utf8');
      } catch {
        continue; // Deleted, and not yet so in git.
      }
      if (/"resolved":\s*"http/.test(text)) offenders.push(`${path}: resolved`);
      for (const word of registries) if (text.includes(word)) offenders.push(`${path}: ${word}`);
      for (const start of paths) {
        // A path at the beginning of a word, not a part of a URL's path or of an import.
        const pattern = new RegExp(`(^|[\\s'"\`(=:])${start}[A-Za-z0-9_.-]+`, 'm');
        if (pattern.test(text)) offenders.push(`${path}: ${start}`);
      }
    }
    expect(offenders).toEqual([]);
  });
});
