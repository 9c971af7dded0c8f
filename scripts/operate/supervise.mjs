/**
 * The application's own processes: each writes to a log file, and is started again when it dies,
 * at once the first time and with growing pauses when it keeps dying.
 */
import { closeSync, existsSync, readFileSync } from 'node:fs';
import { Fault } from './fault.mjs';
import { openLog } from './folder.mjs';
import { end, isEnding, start, sweep } from './process.mjs';
import { say } from './say.mjs';

const STEADY_MS = 20_000;
const LONGEST_PAUSE_MS = 15_000;

/** The last lines of a log file. */
export function tailOf(path, lines = 12) {
  if (!existsSync(path)) return '(empty)';
  return readFileSync(path, 'utf8').trimEnd().split('\n').slice(-lines).join('\n');
}

/**
 * Keep one process running.
 *
 * @param {object} options
 * @param {string} options.name as it is called in messages
 * @param {string[]} options.parameters of Node
 * @param {NodeJS.ProcessEnv} options.env
 * @param {string} options.cwd
 * @param {string} options.log path of the log file
 * @param {boolean} [options.echo] also show what it prints
 * @returns {{ stop: () => Promise<void>, hasDied: () => boolean, pid: () => number | undefined }}
 */
export function keepRunning({ name, parameters, env, cwd, log, echo = false }) {
  let child;
  let timer;
  let stopping = false;
  let quickDeaths = 0;
  let deaths = 0;

  const launch = () => {
    const output = openLog(log);
    const startedAt = performance.now();
    child = start(process.execPath, parameters, {
      env,
      cwd,
      stdio: echo ? ['ignore', 'inherit', 'inherit'] : ['ignore', output, output],
    });
    closeSync(output);
    const { pid } = child;
    child.once('error', (error) => say(`  The ${name} could not be started: ${error.message}`));
    child.once('exit', (code, signal) => {
      if (pid !== undefined) sweep(pid);
      if (stopping || isEnding()) return;
      deaths += 1;
      quickDeaths = performance.now() - startedAt < STEADY_MS ? quickDeaths + 1 : 1;
      const pause = quickDeaths <= 1 ? 0 : Math.min(LONGEST_PAUSE_MS, 250 * 2 ** quickDeaths);
      const how = signal === null ? `with status ${code}` : `by ${signal}`;
      const when = pause === 0 ? 'at once' : `in ${(pause / 1000).toFixed(1)} s`;
      say(`  The ${name} ended ${how}; it is started again ${when}. Its log: ${log}`);
      timer = setTimeout(launch, pause);
    });
  };
  launch();

  return {
    pid: () => child?.pid,
    hasDied: () => deaths > 1,
    stop: async () => {
      stopping = true;
      clearTimeout(timer);
      if (child !== undefined) await end(child);
    },
  };
}

/** The fault of a process that does not come up, with the end of its log. */
export function didNotComeUp(name, log) {
  return new Fault(`The ${name} did not come up.`, `The end of its log, ${log}:\n${tailOf(log)}`);
}
