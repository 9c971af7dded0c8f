/** Runs a derivation in a child process that can be ended: by time, by memory, by a person. */
import { fork } from 'node:child_process';
import process from 'node:process';
import { fileURLToPath } from 'node:url';
import type { Outcome } from './derivation.ts';
import type { FromChild, ToChild } from './messages.ts';

export interface Limits {
  readonly seconds: number;
  readonly megabytes: number;
}

export type Ending =
  | { readonly kind: 'outcome'; readonly outcome: Outcome }
  /** The formulation cannot be derived, in words for its author. */
  | { readonly kind: 'fault'; readonly message: string }
  | { readonly kind: 'cancelled' }
  /** The child died for another reason; the job may be tried again. */
  | { readonly kind: 'died'; readonly message: string };

const isSource = import.meta.url.endsWith('.ts');
const CHILD = fileURLToPath(
  new URL(isSource ? './derivationChild.ts' : './derivationChild.js', import.meta.url),
);

/** A child whose worker is gone ends itself so long after its time is up. */
const SELF_END_AFTER_MS = 2_000;

/** Exit codes by which Node and the kernel end a process that is out of memory. */
function ranOutOfMemory(code: number | null, signal: NodeJS.Signals | null): boolean {
  return code === 134 || signal === 'SIGABRT' || signal === 'SIGTRAP';
}

/**
 * Starts the child and settles with how it ended; never rejects. `cancelled` ends it when it is
 * aborted.
 */
export function runChild(
  source: string,
  limits: Limits,
  cancelled: AbortSignal,
  heard: (message: Extract<FromChild, { kind: 'progress' }>) => void,
): Promise<Ending> {
  return new Promise((resolve) => {
    const child = fork(CHILD, [], {
      execArgv: [
        ...(isSource ? ['--import', 'tsx'] : ['--enable-source-maps']),
        `--max-old-space-size=${limits.megabytes}`,
        // Deeply nested formulations recurse deeply.
        '--stack-size=3900',
      ],
      // The child needs no secrets.
      env: {
        PATH: process.env['PATH'],
        NODE_ENV: process.env['NODE_ENV'],
        MASSIEU_TEST_HOLD: process.env['MASSIEU_TEST_HOLD'],
      },
      stdio: ['ignore', 'ignore', 'inherit', 'ipc'],
    });
    let ending: Ending | undefined;
    const kill = (reason: Ending): void => {
      ending ??= reason;
      child.kill('SIGKILL');
    };
    const timer = setTimeout(() => {
      kill({
        kind: 'fault',
        message: `The derivation took longer than ${limits.seconds} s and was ended. Split large expressions into lets, or write the model in fewer terms.`,
      });
    }, limits.seconds * 1000);
    const cancel = (): void => {
      kill({ kind: 'cancelled' });
    };
    cancelled.addEventListener('abort', cancel, { once: true });
    if (cancelled.aborted) cancel();
    child.on('message', (message: FromChild) => {
      if (message.kind === 'progress') heard(message);
      else ending ??= message;
    });
    child.on('error', (error) => {
      ending ??= { kind: 'died', message: error.message };
    });
    child.once('close', (code, signal) => {
      clearTimeout(timer);
      cancelled.removeEventListener('abort', cancel);
      if (!ending && ranOutOfMemory(code, signal)) {
        ending = {
          kind: 'fault',
          message: `The derivation needed more than ${limits.megabytes} MiB of memory and was ended. Split large expressions into lets, or write the model in fewer terms.`,
        };
      }
      resolve(
        ending ?? { kind: 'died', message: `the process ended with ${signal ?? `code ${code}`}` },
      );
    });
    const milliseconds = limits.seconds * 1000 + SELF_END_AFTER_MS;
    child.send({ source, milliseconds } satisfies ToChild);
  });
}
