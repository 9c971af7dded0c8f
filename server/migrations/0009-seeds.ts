/** Which demonstrations have been set up whole, so that one cut short is taken up again. */
import type { Migration } from './migration.ts';

export const seeds: Migration = {
  name: '0009-seeds',
  up: `CREATE TABLE seeds (name text PRIMARY KEY, done_at timestamptz NOT NULL DEFAULT now())`,
  down: `DROP TABLE seeds`,
};
