/** Limits on what strangers may try: signing in, registering, asking for mails. */
import type { RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import type { Redis } from 'ioredis';
import type { Config } from '../config.ts';
import { Fault } from '../fault.ts';
import { createRateStore } from './rateStore.ts';

const QUARTER_HOUR = 15 * 60 * 1000;

export interface RateLimits {
  /** Attempts to sign in that fail, by client and by account. */
  readonly signIn: RequestHandler[];
  /** Registrations and requests for a new password, by client and by the address they name. */
  readonly letters: RequestHandler[];
  /** Uses of mailed links, by client. */
  readonly links: RequestHandler[];
}

export function createRateLimits(config: Config, redis: Redis): RateLimits {
  const limit = (
    name: string,
    by: 'client' | 'account',
    { countsSuccess }: { countsSuccess: boolean },
  ): RequestHandler =>
    rateLimit({
      windowMs: QUARTER_HOUR,
      limit: config.SIGN_IN_ATTEMPTS,
      standardHeaders: 'draft-7',
      legacyHeaders: false,
      skipSuccessfulRequests: !countsSuccess,
      store: createRateStore(redis, `${config.QUEUE_NAME}:attempts:${name}:${by}`),
      keyGenerator: (request) => {
        const address = ipKeyGenerator(request.ip ?? '');
        const email: unknown = (request.body as { email?: unknown } | undefined)?.email;
        return by === 'account' && typeof email === 'string' ? email.trim().toLowerCase() : address;
      },
      handler: (_request, _response, next) => {
        next(new Fault('too-many-requests', 'Wait a quarter of an hour, then try again.'));
      },
    });
  const both = (name: string, countsSuccess: boolean): RequestHandler[] => [
    limit(name, 'client', { countsSuccess }),
    limit(name, 'account', { countsSuccess }),
  ];
  return {
    signIn: both('sign-in', false),
    letters: both('letters', true),
    links: [limit('links', 'client', { countsSuccess: true })],
  };
}
