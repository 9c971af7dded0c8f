/** Waiting for a condition, never for a time. */

const PAUSE_MS = 50;

/**
 * Ask again until `condition` gives something other than false or undefined.
 *
 * @template T
 * @param {() => T | Promise<T>} condition
 * @param {number} patienceMs
 * @returns {Promise<T | undefined>} undefined when the time ran out
 */
export async function until(condition, patienceMs) {
  const end = performance.now() + patienceMs;
  for (;;) {
    const value = await condition();
    if (value !== false && value !== undefined) return value;
    if (performance.now() > end) return undefined;
    await new Promise((resolve) => setTimeout(resolve, PAUSE_MS));
  }
}
