/**
 * Child processes that never outlive us. Each runs in a session of its own, so that Ctrl-C at the
 * terminal reaches this process alone and the order of ending is ours; and each has a parent-death
 * signal, so that even SIGKILL of this process leaves nothing behind.
 */
import { execFileSync, spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { Fault } from './fault.mjs';

const SETPRIV = ['/usr/bin/setpriv', '/bin/setpriv'].find((path) => existsSync(path));
const TAIL_LINES = 12;

/** Children that still run, in the order of their start. */
const living = new Set();

let ending = false;

/** True once `endAll` was called; no child may be started any more. */
export function isEnding() {
  return ending;
}

/**
 * The account of an unprivileged user, or null when there is none or when we are not root and so
 * cannot become it.
 *
 * @returns {{ name: string, uid: number, gid: number } | null}
 */
export function account(name) {
  if (process.getuid?.() !== 0) return null;
  try {
    const number = (flag) =>
      Number(execFileSync('id', [flag, name], { stdio: ['ignore', 'pipe', 'ignore'] }));
    return { name, uid: number('-u'), gid: number('-g') };
  } catch {
    return null;
  }
}

/**
 * Start a child bound to this process.
 *
 * @param {string} command
 * @param {string[]} parameters
 * @param {object} [options]
 * @param {{ uid: number, gid: number } | null} [options.user] run as this user
 * @param {NodeJS.ProcessEnv} [options.env] the whole environment
 * @param {string} [options.cwd]
 * @param {import('node:child_process').StdioOptions} [options.stdio]
 * @param {string} [options.deathSignal] sent to the child when this process dies
 * @param {boolean} [options.foreground] stay in the terminal's session (a program that asks)
 * @param {boolean} [options.letFinish] never interrupt it: we wait for it before we end, and it
 *   goes on should we be killed (an installation, which must not stop halfway)
 */
export function start(command, parameters, options = {}) {
  if (ending) throw new Error('Nothing is started while ending.');
  const { user = null, deathSignal = 'TERM', foreground = false, letFinish = false } = options;
  const prefix =
    SETPRIV === undefined || foreground || letFinish
      ? []
      : [
          SETPRIV,
          `--pdeathsig=${deathSignal}`,
          ...(user === null
            ? []
            : [`--reuid=${user.uid}`, `--regid=${user.gid}`, '--clear-groups']),
          '--',
        ];
  if (user !== null && prefix.length === 0) {
    throw new Fault(
      'The program setpriv is missing, which starts the services as an unprivileged user.',
      'Install the Debian package util-linux, or start as an ordinary user.',
    );
  }
  const [program, ...rest] = [...prefix, command, ...parameters];
  const child = spawn(program, rest, {
    cwd: options.cwd ?? process.cwd(),
    env: options.env ?? process.env,
    stdio: options.stdio ?? ['ignore', 'pipe', 'pipe'],
    detached: !foreground,
  });
  const entry = { child, foreground, letFinish, signal: `SIG${deathSignal}` };
  living.add(entry);
  child.once('exit', () => living.delete(entry));
  child.once('error', () => living.delete(entry));
  return child;
}

/**
 * Run a program to its end and return what it printed.
 *
 * @param {string} command
 * @param {string[]} parameters
 * @param {Parameters<typeof start>[2] & {
 *   onLine?: (line: string) => void, fails?: (tail: string, output: string) => Fault }} [options]
 * @returns {Promise<string>}
 */
export function run(command, parameters, options = {}) {
  return new Promise((resolve, reject) => {
    const child = start(command, parameters, options);
    let output = '';
    const take = (chunk) => {
      output += chunk;
      for (const line of String(chunk).split('\n')) {
        if (line.trim() !== '') options.onLine?.(line.trim());
      }
    };
    child.stdout?.setEncoding('utf8').on('data', take);
    child.stderr?.setEncoding('utf8').on('data', take);
    child.once('error', (error) => reject(options.fails?.(String(error.message)) ?? error));
    child.once('close', (code, signal) => {
      if (code === 0) return resolve(output);
      const tail = output.trimEnd().split('\n').slice(-TAIL_LINES).join('\n');
      reject(
        options.fails?.(tail, output) ??
          new Fault(`${command} ended with ${signal ?? `status ${code}`}.`, tail),
      );
    });
  });
}

/** Whether a process with this number exists. */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}

/**
 * End one child: first politely, after `patienceMs` by force, with whatever it left in its session.
 *
 * @param {import('node:child_process').ChildProcess} child
 */
export async function end(child, signal = 'SIGTERM', patienceMs = 8000) {
  const pid = child.pid;
  if (pid === undefined) return;
  if (child.exitCode === null && child.signalCode === null) {
    const gone = new Promise((resolve) => child.once('exit', resolve));
    child.kill(signal);
    const timer = setTimeout(() => child.kill('SIGKILL'), patienceMs);
    await gone;
    clearTimeout(timer);
  }
  sweep(pid);
}

/** End what a child left behind in the process group that it led. */
export function sweep(pid) {
  try {
    process.kill(-pid, 'SIGKILL');
  } catch {
    // Nothing was left.
  }
}

/** End every child, the youngest first. */
export async function endAll() {
  ending = true;
  for (const { child, foreground, letFinish, signal } of [...living].reverse()) {
    if (letFinish) await new Promise((resolve) => child.once('exit', resolve));
    else if (!foreground) await end(child, signal);
  }
}
