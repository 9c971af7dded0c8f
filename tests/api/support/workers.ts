/** Real worker processes for tests; each is ended by its id. */
import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import type { Site } from './site.ts';

const ROOT = resolve(import.meta.dirname, '../../..');

export interface TestWorker {
  readonly pid: number;
  /** Ends it as a crash of the machine would. */
  kill(): Promise<void>;
  /** Asks it to end, and tells with which status it did. */
  end(): Promise<number | null>;
}

function ended(child: ChildProcess): Promise<number | null> {
  return new Promise((resolve) => {
    if (child.exitCode !== null || child.signalCode !== null) resolve(child.exitCode);
    else child.once('exit', (code) => resolve(code));
  });
}

/** Starts a worker of the site. `settings` are added to its environment. */
export function startWorker(
  site: Pick<Site, 'environment'>,
  settings: Readonly<Record<string, string>> = {},
): TestWorker {
  const child = spawn(process.execPath, ['--import', 'tsx', join(ROOT, 'worker/main.ts')], {
    cwd: ROOT,
    env: {
      PATH: process.env['PATH'],
      ...site.environment,
      LOCK_MILLISECONDS: '1000',
      WORKER_CONCURRENCY: '1',
      ...settings,
    },
    stdio: ['ignore', process.env['TEST_LOG_LEVEL'] ? 'inherit' : 'ignore', 'inherit'],
  });
  if (child.pid === undefined) throw new Error('the worker did not start');
  return {
    pid: child.pid,
    async kill() {
      child.kill('SIGKILL');
      await ended(child);
    },
    end() {
      child.kill('SIGTERM');
      return ended(child);
    },
  };
}

/** A file that holds every derivation at its next step as long as it exists. */
export function createHold(): { path: string; close(): void; release(): void } {
  const folder = mkdtempSync(join(tmpdir(), 'massieu-hold-'));
  const path = join(folder, 'hold');
  writeFileSync(path, '');
  return {
    path,
    release: () => rmSync(path, { force: true }),
    close: () => rmSync(folder, { recursive: true, force: true }),
  };
}
