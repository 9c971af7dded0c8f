/**
 * `npm run bench`: the time from source text to the full property set with TeX, for ten models of
 * rising size, beside the peers that are installed (SymPy, GiNaC) in the same run, so that the
 * ratios hold on any machine. Prints a table and writes dist/bench.json.
 *
 *     npm run bench                   everything
 *     npm run bench -- --no-peers     without the peers
 */
import { spawnSync } from 'node:child_process';
import { mkdirSync, writeFileSync } from 'node:fs';
import { cpus } from 'node:os';
import { resolve } from 'node:path';
import { median } from './bench/median.ts';
import { MODELS } from './bench/models.ts';
import { availablePeers } from './bench/peers.ts';
import type { PeerTimes } from './bench/peers.ts';

const COLD_RUNS = 5;
/** A process that takes longer is not repeated; its warm runs are a median already. */
const SLOW_MS = 60_000;
const ROOT = resolve(import.meta.dirname, '..');

interface Measurement {
  readonly coldMs: number;
  readonly warmMs: number;
  readonly againMs: number;
  readonly properties: number;
  readonly nodes: number;
  readonly characters: number;
  readonly megabytes: number;
}

type Outcome = Measurement | { readonly refused: readonly string[] };

function measureOnce(index: number): Outcome {
  const child = spawnSync(
    process.execPath,
    ['--import', 'tsx', resolve(ROOT, 'scripts/bench/derivation.ts'), String(index)],
    { cwd: ROOT, encoding: 'utf8', timeout: 300_000 },
  );
  if (child.status !== 0) {
    const words = child.stderr.trim().split('\n');
    return { refused: [words.find((line) => /Error/.test(line)) ?? words.at(-1) ?? 'no answer'] };
  }
  return JSON.parse(child.stdout) as Outcome;
}

/** Cold and warm times over several fresh processes. */
function measure(index: number): Outcome {
  const outcomes: Measurement[] = [];
  for (let run = 0; run < COLD_RUNS; run += 1) {
    const start = performance.now();
    const outcome = measureOnce(index);
    const isSlow = performance.now() - start > SLOW_MS;
    if ('refused' in outcome) return outcome;
    outcomes.push(outcome);
    if (isSlow) break;
  }
  const last = outcomes[outcomes.length - 1] as Measurement;
  return {
    ...last,
    coldMs: median(outcomes.map(({ coldMs }) => coldMs)),
    warmMs: median(outcomes.map(({ warmMs }) => warmMs)),
    againMs: median(outcomes.map(({ againMs }) => againMs)),
  };
}

const shown = (ms: number | null | undefined): string =>
  ms === null || ms === undefined ? '–' : ms < 10 ? ms.toFixed(2) : ms.toFixed(0);

const peers = process.argv.includes('--no-peers')
  ? []
  : availablePeers(resolve(ROOT, 'dist/bench'));
const heads = [
  'model'.padEnd(34),
  ...['cold ms', 'warm ms', 'again ms', 'nodes', 'text'].map((head) => head.padStart(9)),
  ...peers.flatMap(({ name }) => [
    `${name} raw`.padStart(11),
    `${name} shown`.padStart(13),
    `${name} text`.padStart(12),
  ]),
];
process.stdout.write(`${heads.join(' ')}\n`);

const results: unknown[] = [];
for (const [index, model] of MODELS.entries()) {
  const own = measure(index);
  const others: Record<string, PeerTimes | null> = {};
  for (const peer of peers) others[peer.name] = peer.measure(model);
  results.push({
    model: model.name,
    sourceCharacters: model.source('').length,
    own,
    peers: others,
  });
  const cells =
    'refused' in own
      ? [`refused: ${own.refused.join('; ')}`]
      : [
          shown(own.coldMs).padStart(9),
          shown(own.warmMs).padStart(9),
          shown(own.againMs).padStart(9),
          String(own.nodes).padStart(9),
          String(own.characters).padStart(9),
        ];
  const otherCells = peers.flatMap(({ name }) => [
    shown(others[name]?.rawMs).padStart(11),
    shown(others[name]?.displayMs).padStart(13),
    String(others[name]?.characters ?? '–').padStart(12),
  ]);
  process.stdout.write(`${[model.name.padEnd(34), ...cells, ...otherCells].join(' ')}\n`);
}

mkdirSync(resolve(ROOT, 'dist'), { recursive: true });
const machine = { node: process.version, processor: cpus()[0]?.model, cores: cpus().length };
writeFileSync(
  resolve(ROOT, 'dist/bench.json'),
  `${JSON.stringify({ machine, results }, null, 2)}\n`,
);
process.stdout.write(
  '\ncold: first model of a fresh process; warm: a model of the same shape under new names;\n' +
    'again: the same text once more; medians. nodes: different nodes of all property trees.\n' +
    'Written to dist/bench.json.\n',
);
