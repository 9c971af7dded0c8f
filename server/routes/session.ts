/** Signing in and out, registering, passwords. */
import { Router, type Request, type Response } from 'express';
import type { Redis } from 'ioredis';
import type { PassportStatic } from 'passport';
import {
  emailConfirmationSchema,
  passwordResetRequestSchema,
  passwordResetSchema,
  registrationSchema,
  signInSchema,
  type Session,
} from '../../shared/contracts/people.ts';
import type { Config } from '../config.ts';
import type { Database } from '../database.ts';
import { Fault } from '../fault.ts';
import type { Mailer } from '../mail/mailer.ts';
import { csrfToken } from '../middleware/csrf.ts';
import { createRateLimits } from '../middleware/rateLimits.ts';
import type { PersonRow } from '../models/person.ts';
import { requestReset, resetPassword } from '../services/accounts.ts';
import { listGroups } from '../services/groups.ts';
import { confirmEmail, register } from '../services/registrations.ts';

export interface SessionDependencies {
  readonly config: Config;
  readonly database: Database;
  readonly redis: Redis;
  readonly mailer: Mailer;
  readonly passport: PassportStatic;
}

async function describe(
  request: Request,
  { config, database }: SessionDependencies,
): Promise<Session> {
  const { user } = request;
  return {
    person: user ? { id: user.id, name: user.name, email: user.email } : null,
    csrfToken: csrfToken(request),
    groups: user ? await listGroups(database, user.id) : [],
    identityProviderIsLocal: config.IDENTITY_PROVIDER_IS_LOCAL,
  };
}

/** passport hands on whatever was thrown. */
function asError(thrown: unknown): Error {
  return thrown instanceof Error ? thrown : new Error('signing in failed', { cause: thrown });
}

/** passport gives the session a new id, so that one set by somebody else before is of no use. */
function signIn(request: Request, person: PersonRow): Promise<void> {
  return new Promise((resolve, reject) => {
    request.logIn(person, (error: unknown) => {
      if (error) reject(asError(error));
      else resolve();
    });
  });
}

export function sessionRoutes(dependencies: SessionDependencies): Router {
  const { config, database, redis, mailer, passport } = dependencies;
  const router = Router();
  const limits = createRateLimits(config, redis);

  router.get('/session', async (request, response) => {
    response.json(await describe(request, dependencies));
  });

  router.post('/session', ...limits.signIn, async (request: Request, response: Response) => {
    request.body = signInSchema.parse(request.body);
    const person = await new Promise<PersonRow>((resolve, reject) => {
      const verify = passport.authenticate(
        'local',
        (error: unknown, found: PersonRow | false | undefined) => {
          if (error) reject(asError(error));
          else if (found) resolve(found);
          else reject(new Fault('wrong-credentials', 'Write both the address and the password.'));
        },
      ) as (request: Request, response: Response, next: (error?: unknown) => void) => void;
      verify(request, response, reject);
    });
    await signIn(request, person);
    response.json(await describe(request, dependencies));
  });

  router.delete('/session', (request, response, next) => {
    request.session.destroy((error: unknown) => {
      if (error) {
        next(error);
        return;
      }
      response.clearCookie('massieu').status(204).end();
    });
  });

  router.post('/registrations', ...limits.letters, async (request, response) => {
    const registration = registrationSchema.parse(request.body);
    mailer.requireMail();
    mailer.post(await register(database, config.publicUrl, registration));
    response.status(202).json({});
  });

  router.post('/email-confirmations', ...limits.links, async (request, response) => {
    const { token } = emailConfirmationSchema.parse(request.body);
    await confirmEmail(database, token);
    response.status(204).end();
  });

  router.post('/password-resets', ...limits.letters, async (request, response) => {
    const { email } = passwordResetRequestSchema.parse(request.body);
    mailer.requireMail();
    const letter = await requestReset(database, config.publicUrl, email);
    if (letter) mailer.post(letter);
    response.status(202).json({});
  });

  router.put('/password-resets/:token', ...limits.links, async (request, response) => {
    const { password } = passwordResetSchema.parse(request.body);
    await resetPassword(database, String(request.params['token']), password);
    response.status(204).end();
  });

  return router;
}
