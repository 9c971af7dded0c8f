/** The way to the identity provider and back. */
import { Router, type NextFunction, type Request, type Response } from 'express';
import type { PassportStatic } from 'passport';
import type { Config } from '../config.ts';
import { csrfToken } from '../middleware/csrf.ts';

/** A path of our own pages; anything that could lead elsewhere becomes the desk. */
export function localPath(next: unknown, publicUrl: string): string {
  if (typeof next !== 'string' || !isLocal(next)) return '/desk';
  try {
    const url = new URL(next, publicUrl);
    // Dots are resolved by now: `/.//elsewhere.example` has become `//elsewhere.example`.
    const path = url.pathname + url.search + url.hash;
    return url.origin === new URL(publicUrl).origin && isLocal(path) ? path : '/desk';
  } catch {
    return '/desk';
  }
}

/** A path that begins with two strokes names another host; browsers take a backslash for one. */
function isLocal(path: string): boolean {
  return /^\/(?![/\\])/.test(path);
}

export function identityRoutes(config: Config, passport: PassportStatic): Router {
  const router = Router();
  const isConfigured = config.GITHUB_CLIENT_ID !== undefined;

  router.get('/github', (request: Request, response: Response, next: NextFunction) => {
    if (!isConfigured) {
      response.redirect('/sign-in?problem=no-provider');
      return;
    }
    csrfToken(request);
    request.session.next = localPath(request.query['next'], config.publicUrl);
    (passport.authenticate('github') as (...handles: unknown[]) => void)(request, response, next);
  });

  router.get('/github/callback', (request: Request, response: Response, next: NextFunction) => {
    if (!isConfigured) {
      response.redirect('/sign-in?problem=no-provider');
      return;
    }
    const wanted = localPath(request.session.next, config.publicUrl);
    const verify = passport.authenticate(
      'github',
      (error: unknown, person: Express.User | false | undefined) => {
        // A forged or stale state, a refusal at the provider, a provider that is down.
        if (error || !person) {
          if (error) request.log.warn({ err: error }, 'sign-in by the identity provider failed');
          response.redirect('/sign-in?problem=not-confirmed');
          return;
        }
        request.logIn(person, (fault: unknown) => {
          if (fault) next(fault);
          else response.redirect(wanted);
        });
      },
    ) as (...handles: unknown[]) => void;
    verify(request, response, next);
  });

  return router;
}
