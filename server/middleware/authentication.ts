/** Who is asking: passport with sessions, the identity provider and passwords. */
import passportModule from 'passport';
import { Strategy as GitHubStrategy, type Profile, type StrategyOptions } from 'passport-github2';
import { Strategy as LocalStrategy } from 'passport-local';
import type { Request } from 'express';
import type { Config } from '../config.ts';
import type { Database } from '../database.ts';
import { Fault } from '../fault.ts';
import { authenticate, personOfIdentity } from '../services/accounts.ts';

declare global {
  // eslint-disable-next-line @typescript-eslint/no-namespace -- Express is extended by merging
  namespace Express {
    interface User {
      id: string;
      name: string;
      email: string | null;
    }
  }
}

type Done = (error: unknown, user?: Express.User | false) => void;

/** A passport of this application's own: the module's shared one would mix several in tests. */
export function createPassport(config: Config, database: Database): passportModule.PassportStatic {
  const passport = new passportModule.Passport() as unknown as passportModule.PassportStatic;
  passport.serializeUser((user, done) => {
    done(null, user.id);
  });
  passport.deserializeUser((id: string, done: Done) => {
    database.models.Person.findByPk(id).then(
      // Somebody who was removed is a visitor again.
      (person) => {
        done(null, person ? { id: person.id, name: person.name, email: person.email } : false);
      },
      (error: unknown) => {
        done(error);
      },
    );
  });
  passport.use(
    new LocalStrategy({ usernameField: 'email' }, (email, password, done) => {
      authenticate(database, email, password).then(
        (person) => {
          done(null, person);
        },
        (error: unknown) => {
          done(error);
        },
      );
    }),
  );
  if (config.GITHUB_CLIENT_ID !== undefined && config.GITHUB_CLIENT_SECRET !== undefined) {
    passport.use(
      identityStrategy(config, config.GITHUB_CLIENT_ID, config.GITHUB_CLIENT_SECRET, database),
    );
  }
  return passport;
}

function identityStrategy(
  config: Config,
  clientID: string,
  clientSecret: string,
  database: Database,
): GitHubStrategy {
  const options = {
    clientID,
    clientSecret,
    callbackURL: `${config.publicUrl}/auth/github/callback`,
    scope: ['user:email'],
    // The types lack it, the strategy has it: a random state is kept in the session and compared.
    state: true,
    allRawEmails: true,
    ...(config.GITHUB_AUTHORIZATION_URL === undefined
      ? {}
      : { authorizationURL: config.GITHUB_AUTHORIZATION_URL }),
    ...(config.GITHUB_TOKEN_URL === undefined ? {} : { tokenURL: config.GITHUB_TOKEN_URL }),
    ...(config.GITHUB_USER_URL === undefined ? {} : { userProfileURL: config.GITHUB_USER_URL }),
    ...(config.GITHUB_EMAILS_URL === undefined ? {} : { userEmailURL: config.GITHUB_EMAILS_URL }),
  };
  return new GitHubStrategy(
    options as unknown as StrategyOptions,
    (_access: string, _refresh: string, profile: Profile, done: Done) => {
      const emails = (profile.emails ?? []) as {
        value: string;
        verified?: boolean;
        primary?: boolean;
      }[];
      personOfIdentity(database, {
        provider: 'github',
        subject: profile.id,
        name: profile.displayName || (profile.username ?? ''),
        verifiedEmails: emails
          .filter(({ verified }) => verified === true)
          .sort((a, b) => Number(b.primary ?? false) - Number(a.primary ?? false))
          .map(({ value }) => value.toLowerCase()),
      }).then(
        (person) => {
          done(null, person);
        },
        (error: unknown) => {
          done(error);
        },
      );
    },
  );
}

/** The person who asks. Throws `not-signed-in` for a visitor. */
export function personOf(request: Request): Express.User {
  if (!request.user) throw new Fault('not-signed-in', 'Sign in, then you come back to this place.');
  return request.user;
}
