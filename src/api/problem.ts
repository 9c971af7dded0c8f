/** Faults that the API answers, as typed errors. */
import { problemSchema, PROBLEM_TYPES } from '../../shared/contracts/problem.ts';
import type { Problem, ProblemType } from '../../shared/contracts/problem.ts';

const PREFIX = 'urn:massieu:problem:';

/** A problem (RFC 9457) that the server answered, or one that was met on the way to it. */
export class ProblemError extends Error {
  readonly problem: Problem;

  constructor(problem: Problem) {
    super(problem.detail || problem.title);
    this.name = 'ProblemError';
    this.problem = problem;
  }

  /** The stable name without its prefix; `internal` where it is none of ours. */
  get kind(): ProblemType {
    const name = this.problem.type.startsWith(PREFIX)
      ? this.problem.type.slice(PREFIX.length)
      : this.problem.type;
    return PROBLEM_TYPES.find((known) => known === name) ?? 'internal';
  }

  get status(): number {
    return this.problem.status;
  }

  /** Faults by field of the request. */
  get fields(): Record<string, string> {
    return this.problem.fields ?? {};
  }
}

/** Whether the fault is a problem of the named kind. */
export function isProblem(fault: unknown, kind: ProblemType): fault is ProblemError {
  return fault instanceof ProblemError && fault.kind === kind;
}

/** A fault in one sentence for the reader. */
export function describeFault(fault: unknown): string {
  if (fault instanceof ProblemError) return fault.message;
  return 'Something went wrong in this page. Reload it; what was saved is safe.';
}

/** Reads the body of a failed answer; an answer of another make becomes a plain problem. */
export async function readProblem(response: Response): Promise<ProblemError> {
  const body: unknown = await response.json().catch(() => undefined);
  const parsed = problemSchema.safeParse(body);
  if (parsed.success) return new ProblemError(parsed.data);
  return new ProblemError({
    type: `${PREFIX}${response.status >= 502 ? 'unavailable' : 'internal'}`,
    title: 'Unexpected answer',
    status: response.status,
    detail: `The server answered ${response.status} without saying why. Try once more.`,
  });
}

/** The problem of an answer that never came. */
export function unreachable(): ProblemError {
  return new ProblemError({
    type: `${PREFIX}unavailable`,
    title: 'No connection',
    status: 0,
    detail: 'The server cannot be reached. Check the connection and try once more.',
  });
}
