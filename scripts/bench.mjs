/** `npm run bench`: see bench.ts. */
import { join } from 'node:path';
import { report } from './operate/fault.mjs';
import { ROOT } from './operate/folder.mjs';
import { ensurePackages, requireNode } from './operate/packages.mjs';
import { endAll, start } from './operate/process.mjs';

async function main() {
  requireNode();
  await ensurePackages();
  const child = start(
    process.execPath,
    ['--import', 'tsx', join(ROOT, 'scripts/bench.ts'), ...process.argv.slice(2)],
    { cwd: ROOT, stdio: ['ignore', 'inherit', 'inherit'] },
  );
  child.once('exit', (code) => process.exit(code ?? 1));
}

for (const signal of ['SIGINT', 'SIGTERM']) {
  process.on(signal, () => void endAll().then(() => process.exit(1)));
}
main().catch((error) => {
  report(error, 'The measurement could not run');
  process.exit(1);
});
