/**
 * Ends this process when the one that started it is gone or the time is up. It runs in a thread of
 * its own, because a derivation keeps the main thread busy and hears nothing meanwhile.
 */
import process from 'node:process';
import { Worker } from 'node:worker_threads';

const LOOK_EVERY_MS = 500;

/** Plain JavaScript as text: a thread cannot load TypeScript by itself. Nothing is put into it. */
const PROGRAM = `
const { workerData: { parent, milliseconds, every } } = require('node:worker_threads');
const end = Date.now() + milliseconds;
setInterval(() => {
  if (process.ppid !== parent || Date.now() > end) process.kill(process.pid, 'SIGKILL');
}, every);
`;

/** Starts the watch; it does not keep the process alive. */
export function watchOver(milliseconds: number): void {
  const watchdog = new Worker(PROGRAM, {
    eval: true,
    execArgv: [],
    workerData: { parent: process.ppid, milliseconds, every: LOOK_EVERY_MS },
  });
  watchdog.unref();
}
