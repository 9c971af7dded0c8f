/** Limits on what strangers may try: signing in, registering, asking for mails. */
import type { RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import type { Config } from '../config.ts';
import { Fault } from '../fault.ts';

const QUARTER_HOUR = 15 * 60 * 1000;

function limit(most: number, keyOf?: (email: string) => string): RequestHandler {
  return rateLimit({
    windowMs: QUARTER_HOUR,
    limit: most,
    standardHeaders: 'draft-7',
    legacyHeaders: false,
    keyGenerator: (request) => {
      const address = ipKeyGenerator(request.ip ?? '');
      const email: unknown = (request.body as { email?: unknown } | undefined)?.email;
      return keyOf && typeof email === 'string' ? keyOf(email.trim().toLowerCase()) : address;
    },
    handler: (_request, _response, next) => {
      next(new Fault('too-many-requests', 'Wait a quarter of an hour, then try again.'));
    },
  });
}

/** By address of the client, and by the account that is tried, so that many clients share one limit. */
export function signInLimits(config: Config): RequestHandler[] {
  return [
    limit(config.SIGN_IN_ATTEMPTS),
    limit(config.SIGN_IN_ATTEMPTS, (email) => `account ${email}`),
  ];
}
