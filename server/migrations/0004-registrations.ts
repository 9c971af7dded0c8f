/**
 * Registrations wait in a table of their own until their link is opened. Name and password belong
 * to the link, so that whoever opens it gets the account that he asked for and no other.
 */
import type { Migration } from './migration.ts';

export const registrations: Migration = {
  name: '0004-registrations',
  up: `
    CREATE TABLE registrations (
      token_hash text PRIMARY KEY,
      email text NOT NULL CHECK (email = lower(email)),
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
      password_hash text NOT NULL,
      expires_at timestamptz NOT NULL,
      created_at timestamptz NOT NULL
    );
    CREATE INDEX registrations_email ON registrations (email, created_at DESC);
    DELETE FROM email_tokens WHERE purpose = 'confirm';
    DELETE FROM people p WHERE email_confirmed_at IS NULL
      AND NOT EXISTS (SELECT 1 FROM identities WHERE person_id = p.id);
    ALTER TABLE email_tokens DROP CONSTRAINT email_tokens_purpose_check;
    ALTER TABLE email_tokens ADD CONSTRAINT email_tokens_purpose_check CHECK (purpose = 'reset');
  `,
  down: `
    ALTER TABLE email_tokens DROP CONSTRAINT email_tokens_purpose_check;
    ALTER TABLE email_tokens
      ADD CONSTRAINT email_tokens_purpose_check CHECK (purpose IN ('confirm', 'reset'));
    DROP TABLE registrations;
  `,
};
