/** Processes of the project that a test starts, and ends by their ids. */
import { spawn, type ChildProcess } from 'node:child_process';
import { join, resolve } from 'node:path';

const ROOT = resolve(import.meta.dirname, '../../..');

export interface TestProcess {
  readonly pid: number;
  /** Ends it, as the operating system does on shutting down. */
  end(): Promise<void>;
}

/** Starts a program of the project from its source. What it says is kept for the case that it dies. */
export function startProcess(
  program: string,
  environment: Readonly<Record<string, string>>,
): TestProcess & { readonly death: Promise<never> } {
  const child = spawn(process.execPath, ['--import', 'tsx', join(ROOT, program)], {
    cwd: ROOT,
    env: { PATH: process.env['PATH'], ...environment },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  if (child.pid === undefined) throw new Error(`${program} did not start`);
  let said = '';
  for (const stream of [child.stdout, child.stderr]) {
    stream.on('data', (chunk: Buffer) => {
      said = (said + chunk.toString()).slice(-4000);
    });
  }
  const death = new Promise<never>((_, reject) => {
    child.once('exit', (code, signal) =>
      reject(new Error(`${program} ended with ${code ?? signal}:\n${said}`)),
    );
  });
  // A process that is ended on purpose leaves a rejection that nobody waits for.
  death.catch(() => undefined);
  return { pid: child.pid, death, end: () => end(child) };
}

function end(child: ChildProcess): Promise<void> {
  return new Promise((resolve) => {
    if (child.exitCode !== null || child.signalCode !== null) {
      resolve();
      return;
    }
    child.once('exit', () => resolve());
    child.kill('SIGTERM');
  });
}
