/**
 * One line to each step. On a terminal a line in place shows the progress of the steps that run;
 * elsewhere a long step repeats itself now and then, so that a log shows that it still moves.
 */
const onTerminal = process.stdout.isTTY === true;
const REPEAT_MS = onTerminal ? 500 : 15_000;

/** Steps that run now; two may run at once. */
const active = new Set();
let timer;

export function say(line) {
  if (onTerminal && active.size > 0) process.stdout.write('\r\x1b[2K');
  process.stdout.write(`${line}\n`);
}

/** Seconds since `start`, as `0.4 s` or `38 s`. */
export function since(start) {
  const seconds = (performance.now() - start) / 1000;
  return `${seconds < 10 ? seconds.toFixed(1) : seconds.toFixed(0)} s`;
}

function show() {
  const lines = [...active].map(
    ({ title, words, start }) => `${title} … ${words === '' ? '' : `${words}, `}${since(start)}`,
  );
  if (onTerminal) {
    const width = (process.stdout.columns || 80) - 1;
    process.stdout.write(`\r\x1b[2K${`  ${lines.join('; ')}`.slice(0, width)}`);
  } else {
    for (const line of lines) say(`  ${line}`);
  }
}

/**
 * Run one step under its line.
 *
 * @template T
 * @param {string} title what is being done
 * @param {(progress: (words: string) => void) => Promise<T>} work told how to report progress
 * @param {(result: T) => string} [outcome] what to add when it is done
 * @returns {Promise<T>}
 */
export async function step(title, work, outcome) {
  const entry = { title, words: '', start: performance.now() };
  active.add(entry);
  timer ??= setInterval(show, REPEAT_MS);
  if (onTerminal) show();
  let ending = 'failed';
  try {
    const result = await work((words) => {
      entry.words = words;
    });
    ending = outcome?.(result) ?? '';
    return result;
  } finally {
    say(`  ${title}${ending === '' ? '' : `: ${ending}`} (${since(entry.start)})`);
    active.delete(entry);
    if (active.size === 0) {
      clearInterval(timer);
      timer = undefined;
    }
  }
}
