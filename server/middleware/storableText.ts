/** Text that PostgreSQL cannot hold is refused at the door. */
import type { RequestHandler } from 'express';
import { Fault } from '../fault.ts';

/** The null character, and halves of surrogate pairs, which UTF-8 has no bytes for. */
const UNSTORABLE = /[\0\p{Surrogate}]/u;

function holdsUnstorable(value: unknown): boolean {
  if (typeof value === 'string') return UNSTORABLE.test(value);
  if (typeof value !== 'object' || value === null) return false;
  return Object.values(value).some(holdsUnstorable);
}

export const storableText: RequestHandler = (request, _response, next) => {
  next(
    holdsUnstorable(request.body)
      ? new Fault('validation', 'The text holds a character that no text can hold. Remove it.')
      : undefined,
  );
};
