/**
 * One line to each step. On a terminal the line shows its progress in place; elsewhere a long step
 * repeats itself now and then, so that a log shows that it still moves.
 */
const onTerminal = process.stdout.isTTY === true;
const REPEAT_MS = onTerminal ? 500 : 15_000;

export function say(line) {
  process.stdout.write(`${line}\n`);
}

/** Seconds since `start`, as `0.4 s` or `38 s`. */
export function since(start) {
  const seconds = (performance.now() - start) / 1000;
  return `${seconds < 10 ? seconds.toFixed(1) : seconds.toFixed(0)} s`;
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
  const start = performance.now();
  let words = '';
  let shown = false;
  const show = () => {
    const line = `  ${title} … ${words === '' ? '' : `${words}, `}${since(start)}`;
    if (onTerminal)
      process.stdout.write(`\r\x1b[2K${line.slice(0, (process.stdout.columns ?? 80) - 1)}`);
    else say(line);
    shown = true;
  };
  const timer = setInterval(show, REPEAT_MS);
  if (onTerminal) show();
  try {
    const result = await work((text) => {
      words = text;
    });
    if (onTerminal && shown) process.stdout.write('\r\x1b[2K');
    const addition = outcome?.(result) ?? '';
    say(`  ${title}${addition === '' ? '' : `: ${addition}`} (${since(start)})`);
    return result;
  } catch (error) {
    if (onTerminal && shown) process.stdout.write('\r\x1b[2K');
    say(`  ${title}: failed (${since(start)})`);
    throw error;
  } finally {
    clearInterval(timer);
  }
}
