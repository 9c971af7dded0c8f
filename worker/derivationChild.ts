/**
 * The process in which one derivation runs. A formulation that runs away takes this process with it
 * and nothing else.
 */
import { existsSync } from 'node:fs';
import process from 'node:process';
import { work } from './derivation.ts';
import type { FromChild, ToChild } from './messages.ts';

function tell(message: FromChild): void {
  process.send?.(message);
}

const POLL_MS = 20;

/** Tests hold the work at a stage by a file, to end a worker in the middle of it. */
function waitWhileHeld(stage: string): void {
  const hold = process.env['NODE_ENV'] === 'test' ? process.env['MASSIEU_TEST_HOLD'] : undefined;
  if (hold === undefined) return;
  const still = new Int32Array(new SharedArrayBuffer(4));
  while (existsSync(hold) && stage !== '') Atomics.wait(still, 0, 0, POLL_MS);
}

process.once('message', ({ source }: ToChild) => {
  try {
    const outcome = work(source, (state, stage, fraction) => {
      tell({ kind: 'progress', state, stage, fraction });
      waitWhileHeld(stage);
    });
    tell({ kind: 'outcome', outcome });
  } catch (error) {
    tell({ kind: 'fault', message: error instanceof Error ? error.message : String(error) });
  }
  process.disconnect();
});

// Without its worker nobody would read the result.
process.once('disconnect', () => process.exit(0));
