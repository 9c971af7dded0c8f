/** The npm packages: are they those of the lock file, and if not, install them. */
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { Fault } from './fault.mjs';
import { ROOT } from './folder.mjs';
import { run } from './process.mjs';
import { step } from './say.mjs';

const OLDEST_NODE = [20, 19];

/** Refuse a Node that is too old before anything else fails in a stranger way. */
export function requireNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major < OLDEST_NODE[0] || (major === OLDEST_NODE[0] && minor < OLDEST_NODE[1])) {
    throw new Fault(
      `Massieu needs Node ${OLDEST_NODE.join('.')} or later; this is ${process.versions.node}.`,
      'Install a newer Node and start again.',
    );
  }
}

function lockedPackages(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8')).packages ?? {};
  } catch {
    return {};
  }
}

/** Names of the packages that the lock file wants and node_modules lacks, or has in another version. */
export function missingPackages() {
  const wanted = lockedPackages(join(ROOT, 'package-lock.json'));
  const present = lockedPackages(join(ROOT, 'node_modules', '.package-lock.json'));
  return Object.entries(wanted)
    .filter(([path, { version, optional, devOptional }]) => {
      if (path === '') return false;
      const installed = present[path];
      if (installed === undefined) return optional !== true && devOptional !== true;
      return installed.version !== version;
    })
    .map(([path]) => path);
}

/** Install with `npm ci` unless everything is there. */
export async function ensurePackages() {
  if (missingPackages().length === 0) return;
  const wanted = Object.keys(lockedPackages(join(ROOT, 'package-lock.json'))).filter(
    (path) => path !== '',
  );
  await step(
    'Installing the npm packages',
    async (progress) => {
      const timer = setInterval(() => {
        const arrived = wanted.filter((path) => existsSync(join(ROOT, path, 'package.json')));
        progress(`${arrived.length} of ${wanted.length}`);
      }, 2000);
      try {
        await run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'], {
          cwd: ROOT,
          env: { ...process.env, NODE_ENV: 'development' },
          fails: (tail) =>
            new Fault(
              'npm could not install the packages.',
              `It said:\n${tail}\nCheck the connection to the package registry, then start again.`,
            ),
        });
      } finally {
        clearInterval(timer);
      }
    },
    () => `${wanted.length} in the lock file`,
  );
}
