/** People, their identities, one-time links and sessions. */
import type { Migration } from './migration.ts';

export const people: Migration = {
  name: '0001-people',
  up: `
    CREATE TABLE people (
      id uuid PRIMARY KEY,
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
      email text UNIQUE CHECK (email = lower(email)),
      email_confirmed_at timestamptz,
      password_hash text,
      is_site_administrator boolean NOT NULL DEFAULT false,
      created_at timestamptz NOT NULL,
      updated_at timestamptz NOT NULL
    );
    CREATE TABLE identities (
      provider text NOT NULL,
      subject text NOT NULL,
      person_id uuid NOT NULL REFERENCES people ON DELETE CASCADE,
      created_at timestamptz NOT NULL,
      PRIMARY KEY (provider, subject)
    );
    CREATE INDEX identities_person ON identities (person_id);
    CREATE TABLE email_tokens (
      token_hash text PRIMARY KEY,
      person_id uuid NOT NULL REFERENCES people ON DELETE CASCADE,
      purpose text NOT NULL CHECK (purpose IN ('confirm', 'reset')),
      expires_at timestamptz NOT NULL,
      created_at timestamptz NOT NULL
    );
    CREATE INDEX email_tokens_person ON email_tokens (person_id);
    CREATE TABLE sessions (
      sid text PRIMARY KEY,
      sess json NOT NULL,
      expire timestamp(6) NOT NULL
    );
    CREATE INDEX sessions_expire ON sessions (expire);
  `,
  down: `
    DROP TABLE sessions;
    DROP TABLE email_tokens;
    DROP TABLE identities;
    DROP TABLE people;
  `,
};
