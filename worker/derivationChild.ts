/**
 * The process in which one derivation runs. A formulation that runs away takes this process with it
 * and nothing else.
 */
import { existsSync } from 'node:fs';
import process from 'node:process';
import { CannotDerive, work } from './derivation.ts';
import type { FromChild, ToChild } from './messages.ts';
import { watchOver } from './watchdog.ts';

function tell(message: FromChild): void {
  process.send?.(message);
}

const POLL_MS = 20;

/** Tests hold the work by a file, to end a worker in the middle of it. */
function waitWhileHeld(): void {
  const hold = process.env['NODE_ENV'] === 'test' ? process.env['MASSIEU_TEST_HOLD'] : undefined;
  if (hold === undefined) return;
  const still = new Int32Array(new SharedArrayBuffer(4));
  while (existsSync(hold)) Atomics.wait(still, 0, 0, POLL_MS);
}

/** In words for the author; a fault of ours is also written down for those who mend it. */
function explain(error: unknown): string {
  if (error instanceof CannotDerive) return error.message;
  console.error(error);
  return error instanceof RangeError
    ? 'The formulation is nested too deeply to be derived. Split its expressions into lets.'
    : 'Massieu met a fault of its own while deriving; it has been recorded. Tell the site administrator.';
}

function run({ source, milliseconds }: ToChild): FromChild {
  watchOver(milliseconds);
  try {
    const outcome = work(source, (state, stage, fraction) => {
      tell({ kind: 'progress', state, stage, fraction });
      waitWhileHeld();
    });
    return { kind: 'outcome', outcome };
  } catch (error) {
    return { kind: 'fault', message: explain(error) };
  }
}

process.once('message', (message: ToChild) => {
  // Not within the event itself: Node is not done with the channel before it returns.
  setImmediate(() => {
    process.send?.(run(message), () => process.exit(0));
  });
});

// Without its worker nobody would read the result.
process.once('disconnect', () => process.exit(0));
