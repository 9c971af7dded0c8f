/** `npm run build`: what `npm start` would build, when it has changed. */
import { buildClient, buildNode } from './operate/build.mjs';
import { report } from './operate/fault.mjs';
import { ensurePackages, requireNode } from './operate/packages.mjs';
import { endAll } from './operate/process.mjs';
import { step } from './operate/say.mjs';

const outcome = (wasBuilt) => (wasBuilt ? '' : 'nothing has changed');

async function main() {
  requireNode();
  await ensurePackages();
  await step('Building the server and the worker', buildNode, outcome);
  await step('Building the client', buildClient, outcome);
}

for (const signal of ['SIGINT', 'SIGTERM']) {
  process.on(signal, () => void endAll().then(() => process.exit(1)));
}
main().catch((error) => {
  report(error, 'Massieu could not be built');
  process.exit(1);
});
