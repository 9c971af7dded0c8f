/**
 * Measures one model in a process of its own, so that the first derivation meets cold code: prints
 * the times and sizes as one line of JSON. The number of the model is the only parameter.
 */
import { derive } from '../../shared/thermodynamics/index.ts';
import { median } from './median.ts';
import { MODELS } from './models.ts';
import { distinctNodes } from './treeSize.ts';

const WARM_RUNS = 9;
const LONGEST_MS = 20_000;

const model = MODELS[Number(process.argv[2])];
if (model === undefined) throw new Error('The number of a model is wanted.');

function timed(source: string) {
  const start = performance.now();
  const outcome = derive(source);
  return { ms: performance.now() - start, outcome };
}

const first = timed(model.source(''));
const { derivation } = first.outcome;
if (derivation === undefined) {
  const words = first.outcome.diagnostics.map(
    ({ line, column, message }) => `${line}:${column} ${message}`,
  );
  process.stdout.write(JSON.stringify({ refused: words.slice(0, 3) }));
} else {
  const begin = performance.now();
  const warm: number[] = [];
  for (let run = 1; run <= WARM_RUNS; run += 1) {
    if (run > 5 && performance.now() - begin > LONGEST_MS) break;
    warm.push(timed(model.source(`_${run}`)).ms);
  }
  const again = Array.from({ length: 5 }, () => timed(model.source('')).ms);
  process.stdout.write(
    JSON.stringify({
      coldMs: first.ms,
      warmMs: median(warm),
      againMs: median(again),
      properties: derivation.properties.length,
      nodes: distinctNodes(derivation.properties.map(({ tree }) => tree)),
      characters: derivation.properties.reduce((sum, { text }) => sum + text.length, 0),
      megabytes: Math.round(process.memoryUsage().rss / 1e6),
    }),
  );
}
