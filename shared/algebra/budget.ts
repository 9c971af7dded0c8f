/**
 * A budget of work. Expressions of users may be small to write and endless to expand; whatever
 * loops over terms spends from the budget in force, so that such an expression ends with a sentence
 * instead of filling the memory. Steps are counted, not time: the same source always ends alike.
 */
export class BudgetExceeded extends Error {
  override name = 'BudgetExceeded';

  /** What was being worked on when the budget ran out. */
  readonly what: string;

  constructor(what = '') {
    super(what === '' ? 'the work budget is used up' : `the work budget is used up by ${what}`);
    this.what = what;
  }
}

let remaining = Infinity;

/** Runs the work with at most so many steps; an outer budget that is smaller stays in force. */
export function withBudget<T>(steps: number, work: () => T): T {
  const outer = remaining;
  const allowed = Math.min(steps, outer);
  remaining = allowed;
  try {
    return work();
  } finally {
    remaining = outer - (allowed - Math.max(remaining, 0));
  }
}

/** Takes steps from the budget in force; throws BudgetExceeded when it is used up. */
export function spend(steps: number, what = ''): void {
  remaining -= steps;
  if (remaining < 0) throw new BudgetExceeded(what);
}
