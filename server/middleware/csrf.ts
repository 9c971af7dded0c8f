/** Requests that change something must come from our own pages. */
import { randomBytes, timingSafeEqual } from 'node:crypto';
import type { Request, RequestHandler } from 'express';
import { Fault } from '../fault.ts';

declare module 'express-session' {
  interface SessionData {
    csrfToken?: string;
    /** Where to go after signing in. */
    next?: string;
  }
}

const SAFE: ReadonlySet<string> = new Set(['GET', 'HEAD', 'OPTIONS']);

/** The token of the session, made when it is first asked for. */
export function csrfToken(request: Request): string {
  request.session.csrfToken ??= randomBytes(32).toString('base64url');
  return request.session.csrfToken;
}

function isSame(a: string, b: string): boolean {
  const left = Buffer.from(a);
  const right = Buffer.from(b);
  return left.length === right.length && timingSafeEqual(left, right);
}

/** Refuses a change without the session's token, or from another origin. */
export function csrf(publicUrl: string): RequestHandler {
  const ours = new URL(publicUrl).origin;
  return (request, _response, next) => {
    if (SAFE.has(request.method)) {
      next();
      return;
    }
    const origin = request.get('origin');
    const isForeign =
      request.get('sec-fetch-site') === 'cross-site' ||
      (origin !== undefined && origin !== ours && request.get('sec-fetch-site') !== 'same-origin');
    const sent = request.get('x-csrf-token') ?? '';
    const expected = request.session.csrfToken;
    if (isForeign || expected === undefined || !isSame(sent, expected)) {
      next(
        new Fault('csrf', 'Load the page again, then repeat what you did; nothing was changed.'),
      );
      return;
    }
    next();
  };
}
