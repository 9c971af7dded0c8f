/**
 * The two builds. The client is bundled by Vite into dist/client. The server, the worker and what
 * they share are translated file by file by esbuild into dist/node, which mirrors the checkout, so
 * that a path relative to a file means the same there; only the ending `.ts` becomes `.js`.
 */
import { copyFileSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join, relative } from 'node:path';
import { stripVTControlCharacters } from 'node:util';
import { Fault } from './fault.mjs';
import { ROOT } from './folder.mjs';
import { run } from './process.mjs';
import { filesBelow, whenChanged } from './sources.mjs';

const CLIENT = 'dist/client';
const NODE = 'dist/node';
const NODE_SOURCES = ['server', 'worker', 'shared'];
const CONFIGURATION = ['package-lock.json', 'tsconfig.json', 'scripts/operate/build.mjs'];

/** Relative imports, and URLs of files relative to a module, that name a TypeScript file. */
const RELATIVE_TYPESCRIPT =
  /((?:from|import|import\(|new URL\()\s*["']\.{1,2}\/[^"']*)\.tsx?(["'])/g;

/** What a tool said, up to where it begins to list its own functions. */
function withoutStack(output) {
  const lines = stripVTControlCharacters(output).trim().split('\n');
  const stack = lines.findIndex((line) => /^\s+at /.test(line));
  return lines.slice(0, stack === -1 ? 20 : Math.min(stack, 20)).join('\n');
}

export function buildClient() {
  return whenChanged(
    CLIENT,
    ['src', 'shared', 'index.html', 'vite.config.ts', 'tailwind.config.ts', ...CONFIGURATION],
    async () => {
      await run(
        process.execPath,
        [join(ROOT, 'node_modules/vite/bin/vite.js'), 'build', '--logLevel', 'warn'],
        {
          cwd: ROOT,
          env: { ...process.env, NODE_ENV: 'production' },
          fails: (_, output) =>
            new Fault('The client could not be built.', `Vite said:\n${withoutStack(output)}`),
        },
      );
    },
  );
}

/**
 * Load only what is used of mathjs. Its entry brings hundreds of modules, which cost every process
 * and every derivation about a second; the functions that our sources name come to a small part.
 *
 * @param {string} output folder of the translated files
 * @param {readonly string[]} names of the translated files
 */
async function cutDownMathjs(output, names) {
  const { build } = await import('esbuild');
  const statement = /import\s*\{([^}]*)\}\s*from "mathjs";/g;
  const target = join(output, 'mathjs.js');
  const wanted = new Set();
  for (const name of names) {
    const code = readFileSync(name, 'utf8');
    const changed = code.replace(statement, (_, list) => {
      for (const part of list.split(',')) {
        const imported = part.trim().split(/\s+as\s+/)[0];
        if (imported !== '') wanted.add(imported);
      }
      const path = relative(dirname(name), target);
      return `import {${list}} from "${path.startsWith('.') ? path : `./${path}`}";`;
    });
    if (changed !== code) writeFileSync(name, changed);
  }
  if (wanted.size === 0) return;
  await build({
    stdin: { contents: `export { ${[...wanted].join(', ')} } from 'mathjs';`, resolveDir: ROOT },
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    outfile: target,
    logLevel: 'silent',
  });
}

export function buildNode() {
  return whenChanged(NODE, [...NODE_SOURCES, ...CONFIGURATION], async () => {
    const { transform } = await import('esbuild');
    const output = join(ROOT, NODE);
    rmSync(output, { recursive: true, force: true });
    const written = [];
    for (const file of filesBelow(NODE_SOURCES)) {
      const target = join(output, relative(ROOT, file));
      mkdirSync(dirname(target), { recursive: true });
      if (!/\.tsx?$/.test(file)) {
        copyFileSync(file, target);
        continue;
      }
      try {
        const { code, map } = await transform(readFileSync(file, 'utf8'), {
          loader: file.endsWith('x') ? 'tsx' : 'ts',
          format: 'esm',
          target: 'node20',
          sourcemap: 'external',
          sourcefile: file,
        });
        const name = target.replace(/\.tsx?$/, '.js');
        const url = `${name.split('/').at(-1)}.map`;
        writeFileSync(
          name,
          `${code.replace(RELATIVE_TYPESCRIPT, '$1.js$2')}//# sourceMappingURL=${url}\n`,
        );
        writeFileSync(`${name}.map`, map);
        written.push(name);
      } catch (error) {
        throw new Fault(`The file ${relative(ROOT, file)} could not be translated.`, error.message);
      }
    }
    await cutDownMathjs(output, written);
  });
}
