/** General-purpose algebra systems that are measured beside, where they are installed. */
import { spawnSync } from 'node:child_process';
import { mkdirSync } from 'node:fs';
import { resolve } from 'node:path';
import type { BenchModel } from './models.ts';

const LIMIT_MS = 180_000;
const SOURCES = resolve(import.meta.dirname, 'peers');

export interface PeerTimes {
  /** ln Q to thirteen properties, as they come out. */
  readonly rawMs: number;
  /** The same, brought to a form for display, with TeX; null when it took too long. */
  readonly displayMs: number | null;
  readonly characters: number | null;
}

export interface Peer {
  readonly name: string;
  /** null when it gave no answer within the limit. */
  readonly measure: (model: BenchModel) => PeerTimes | null;
}

/** Decimals as quotients of whole numbers, so that the peers stay exact as we do. */
function exact(text: string): string {
  return text.replace(
    /(\d+)\.(\d+)/g,
    (_, whole: string, part: string) => `(${BigInt(whole + part)}/1${'0'.repeat(part.length)})`,
  );
}

function answerOf(program: string, parameters: readonly string[], input: string): PeerTimes | null {
  const child = spawnSync(program, parameters, { input, encoding: 'utf8', timeout: LIMIT_MS });
  return child.status === 0 ? (JSON.parse(child.stdout) as PeerTimes) : null;
}

const succeeds = (program: string, ...parameters: string[]): boolean =>
  spawnSync(program, parameters, { stdio: 'ignore', input: '' }).status === 0;

/** The peers found on this machine; GiNaC's runner is compiled into `folder`. */
export function availablePeers(folder: string): Peer[] {
  const peers: Peer[] = [];
  const source = resolve(SOURCES, 'ginac_peer.cpp');
  const program = resolve(folder, 'ginac_peer');
  mkdirSync(folder, { recursive: true });
  if (succeeds('g++', '-O2', '-o', program, source, '-lginac', '-lcln')) {
    peers.push({
      name: 'GiNaC',
      measure: ({ lnQ, parameters }) =>
        answerOf(program, [], `${parameters.join(' ')}\n${exact(lnQ)}\n`),
    });
  }
  if (succeeds('python3', '-c', 'import sympy')) {
    peers.push({
      name: 'SymPy',
      measure: ({ lnQ, parameters }) =>
        answerOf(
          'python3',
          [resolve(SOURCES, 'sympy_peer.py')],
          JSON.stringify({ lnQ: exact(lnQ), parameters }),
        ),
    });
  }
  return peers;
}
