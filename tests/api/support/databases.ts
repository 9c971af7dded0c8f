/**
 * Databases for tests: one that is migrated once and serves as template, and a fresh copy of it for
 * every file. TEST_DATABASE_URL is a connection that may create databases.
 */
import { createHash, randomBytes } from 'node:crypto';
import pg from 'pg';
import { openDatabase } from '../../../server/database.ts';
import { migrate, MIGRATIONS } from '../../../server/migrations/index.ts';

function environment(name: 'TEST_DATABASE_URL' | 'TEST_REDIS_URL'): string {
  const value = process.env[name];
  if (value === undefined) throw new Error(`${name} is not set; npm test sets it.`);
  return value;
}

export const redisUrl = (): string => environment('TEST_REDIS_URL');

function urlOf(database: string): string {
  const url = new URL(environment('TEST_DATABASE_URL'));
  url.pathname = `/${database}`;
  return url.href;
}

async function asAdministrator<Result>(
  work: (client: pg.Client) => Promise<Result>,
): Promise<Result> {
  const client = new pg.Client({ connectionString: environment('TEST_DATABASE_URL') });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

/** Named after the schema, so that a template of an older schema is never taken. */
const TEMPLATE = `massieu_template_${createHash('sha256')
  .update(JSON.stringify(MIGRATIONS))
  .digest('hex')
  .slice(0, 16)}`;

async function ensureTemplate(client: pg.Client): Promise<void> {
  const { rowCount } = await client.query('SELECT 1 FROM pg_database WHERE datname = $1', [
    TEMPLATE,
  ]);
  if (rowCount !== 0) return;
  // Migrated under another name first: a template that exists is a template that is whole.
  const building = `${TEMPLATE}_${randomBytes(4).toString('hex')}`;
  await client.query(`CREATE DATABASE ${building}`);
  const database = openDatabase(urlOf(building), 2);
  try {
    await migrate(database.sequelize);
  } finally {
    await database.close();
  }
  await client.query(`ALTER DATABASE ${building} RENAME TO ${TEMPLATE}`);
}

export interface TestDatabase {
  readonly name: string;
  readonly url: string;
  drop(): Promise<void>;
}

/** A fresh database: a copy of the migrated template, or an empty one. */
export async function createTestDatabase(
  { isEmpty }: { isEmpty: boolean } = { isEmpty: false },
): Promise<TestDatabase> {
  const name = `massieu_test_${randomBytes(6).toString('hex')}`;
  await asAdministrator(async (client) => {
    // One after the other: PostgreSQL copies no template that somebody else is connected to.
    await client.query('SELECT pg_advisory_lock(740125)');
    if (!isEmpty) await ensureTemplate(client);
    await client.query(`CREATE DATABASE ${name}${isEmpty ? '' : ` TEMPLATE ${TEMPLATE}`}`);
    await client.query('SELECT pg_advisory_unlock(740125)');
  });
  return {
    name,
    url: urlOf(name),
    drop: () =>
      asAdministrator(async (client) => {
        await client.query(`DROP DATABASE IF EXISTS ${name} WITH (FORCE)`);
      }),
  };
}
