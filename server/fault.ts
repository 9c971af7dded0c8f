/** A request that cannot be granted, as the problem details that tell so. */
import type { Problem, ProblemType } from '../shared/contracts/problem.ts';

const STATUS: Readonly<Record<ProblemType, number>> = {
  validation: 400,
  'not-signed-in': 401,
  'wrong-credentials': 401,
  forbidden: 403,
  csrf: 403,
  'email-not-confirmed': 403,
  'not-found': 404,
  conflict: 409,
  'draft-conflict': 409,
  'expired-link': 410,
  'payload-too-large': 413,
  'formulation-at-fault': 422,
  'too-many-requests': 429,
  internal: 500,
  unavailable: 503,
};

const TITLES: Readonly<Record<ProblemType, string>> = {
  validation: 'The request is not as it should be',
  'not-signed-in': 'Sign in first',
  'wrong-credentials': 'Address or password is wrong',
  forbidden: 'Your role does not allow this',
  csrf: 'The page is out of date',
  'email-not-confirmed': 'The address is not confirmed yet',
  'not-found': 'There is nothing here',
  conflict: 'This conflicts with what is there',
  'draft-conflict': 'The draft has been changed meanwhile',
  'expired-link': 'The link is no longer valid',
  'payload-too-large': 'The text is too long',
  'formulation-at-fault': 'The formulation has faults',
  'too-many-requests': 'Too many attempts',
  internal: 'Something went wrong here',
  unavailable: 'Not available just now',
};

/** Thrown by policies and services; the error handler turns it into the answer. */
export class Fault extends Error {
  override name = 'Fault';
  readonly type: ProblemType;
  readonly more: Readonly<Record<string, unknown>>;

  constructor(type: ProblemType, detail: string, more: Readonly<Record<string, unknown>> = {}) {
    super(detail);
    this.type = type;
    this.more = more;
  }

  toProblem(): Problem {
    return {
      type: `urn:massieu:problem:${this.type}`,
      title: TITLES[this.type],
      status: STATUS[this.type],
      detail: this.message,
      ...this.more,
    };
  }
}

/** Outsiders are not told that something exists which they may not see. */
export function notFound(): Fault {
  return new Fault(
    'not-found',
    'It does not exist, or it is in a group that you do not belong to. Check the address, or ask an editor of the group.',
  );
}
