import { readFileSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, it } from 'vitest';

const root = resolve(dirname(fileURLToPath(import.meta.url)), '../../..');

/** Every module that is loaded with a file, packages by their names. */
function loadedWith(file: string, seen = new Set<string>()): Set<string> {
  if (seen.has(file)) return seen;
  seen.add(file);
  const text = readFileSync(join(root, file), 'utf8');
  for (const [, clause = '', from = ''] of text.matchAll(
    /^(?:import|export)\s+(type\s)?[^;]*?from\s+'([^']+)';/gms,
  )) {
    if (clause.startsWith('type')) continue;
    if (from.startsWith('.')) loadedWith(join(dirname(file), from), seen);
    else seen.add(from);
  }
  return seen;
}

it('deriving loads no package at all, so that a browser gets it quickly', () => {
  const loaded = loadedWith('shared/thermodynamics/deriveFormulation.ts');
  expect([...loaded].filter((name) => !name.startsWith('shared/'))).toEqual([]);
  expect(loaded).toContain('shared/algebra/simplify.ts');
});

it('verifying loads the independent library', () => {
  expect(loadedWith('shared/thermodynamics/verification/index.ts')).toContain('mathjs');
});
