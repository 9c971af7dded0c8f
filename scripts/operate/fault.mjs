/**
 * A failure that the person at the keyboard can do something about: what went wrong in plain
 * words, and the way out. Everything else that is thrown is a mistake of ours and keeps its stack.
 */
export class Fault extends Error {
  /**
   * @param {string} message one sentence on what went wrong
   * @param {string} wayOut what to do about it; may have several lines
   */
  constructor(message, wayOut) {
    super(message);
    this.name = 'Fault';
    this.wayOut = wayOut;
  }
}

/** Print a failure to standard error: a fault in words, anything else with its stack. */
export function report(error, prefix) {
  if (error instanceof Fault) {
    const wayOut = error.wayOut.split('\n').join('\n    ');
    process.stderr.write(`\n${prefix}: ${error.message}\n    ${wayOut}\n`);
  } else {
    process.stderr.write(`\n${prefix}: ${error?.stack ?? error}\n`);
  }
}
