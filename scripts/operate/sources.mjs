/** What was built from which sources: a stamp beside the output holds the hash of its sources. */
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join, relative } from 'node:path';
import { ROOT } from './folder.mjs';

/** All files below the given files and folders of the checkout, in a stable order. */
export function filesBelow(paths) {
  const found = [];
  const visit = (path) => {
    if (!existsSync(path)) return;
    if (!statSync(path).isDirectory()) {
      found.push(path);
      return;
    }
    for (const name of readdirSync(path).sort()) visit(join(path, name));
  };
  for (const path of paths) visit(join(ROOT, path));
  return found;
}

function hashOf(paths) {
  const hash = createHash('sha256');
  for (const file of filesBelow(paths)) {
    const content = readFileSync(file);
    hash.update(`${relative(ROOT, file)}\0${content.length}\0`).update(content);
  }
  return hash.digest('hex');
}

/**
 * Build unless the output stands and comes from exactly these sources.
 *
 * @param {string} output folder in the checkout
 * @param {readonly string[]} sources files and folders in the checkout
 * @param {() => Promise<void>} build
 * @returns {Promise<boolean>} whether it was built
 */
export async function whenChanged(output, sources, build) {
  const stamp = join(ROOT, `${output}.stamp`);
  const hash = hashOf(sources);
  if (
    existsSync(join(ROOT, output)) &&
    existsSync(stamp) &&
    readFileSync(stamp, 'utf8').trim() === hash
  ) {
    return false;
  }
  await build();
  mkdirSync(dirname(stamp), { recursive: true });
  writeFileSync(stamp, `${hash}\n`);
  return true;
}
