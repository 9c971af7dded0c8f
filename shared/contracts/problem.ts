/** The one error format of the API: RFC 9457 problem details. */
import { z } from 'zod';

export const PROBLEM_TYPES = [
  'validation',
  'not-signed-in',
  'forbidden',
  'not-found',
  'conflict',
  'draft-conflict',
  'formulation-at-fault',
  'csrf',
  'too-many-requests',
  'payload-too-large',
  'wrong-credentials',
  'email-not-confirmed',
  'expired-link',
  'unavailable',
  'internal',
] as const;
export type ProblemType = (typeof PROBLEM_TYPES)[number];

export const problemSchema = z.looseObject({
  /** `urn:massieu:problem:` and one of `PROBLEM_TYPES`. */
  type: z.string(),
  title: z.string(),
  status: z.number(),
  /** What went wrong this time, and the way out. */
  detail: z.string(),
  instance: z.string().optional(),
  /** Faults by field of the request, for forms. */
  fields: z.record(z.string(), z.string()).optional(),
});
export type Problem = z.infer<typeof problemSchema>;
