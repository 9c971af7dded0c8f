/** Text that PostgreSQL cannot hold is refused at the door. */
import type { RequestHandler } from 'express';
import { Fault } from '../fault.ts';

/** The null character, and halves of surrogate pairs, which UTF-8 has no bytes for. */
const UNSTORABLE = /[\0\p{Surrogate}]/u;

/** Goes through the body without recursion: it may be nested as deeply as it is long. */
function holdsUnstorable(body: unknown): boolean {
  const waiting: unknown[] = [body];
  while (waiting.length > 0) {
    const value = waiting.pop();
    if (typeof value === 'string' && UNSTORABLE.test(value)) return true;
    if (typeof value !== 'object' || value === null) continue;
    for (const part of Object.values(value)) waiting.push(part);
  }
  return false;
}

export const storableText: RequestHandler = (request, _response, next) => {
  next(
    holdsUnstorable(request.body)
      ? new Fault('validation', 'The text holds a character that no text can hold. Remove it.')
      : undefined,
  );
};
