/** The migrations in order, and the runner. They are listed by name: a bundle has no folder to look into. */
import { QueryTypes, type Sequelize } from 'sequelize';
import { Umzug, type UmzugStorage } from 'umzug';
import { people } from './0001-people.ts';
import { notebooks } from './0002-notebooks.ts';
import { versions } from './0003-versions.ts';
import { registrations } from './0004-registrations.ts';
import { orderOfEvents } from './0005-order-of-events.ts';
import { lastEditor } from './0006-last-editor.ts';
import { keptTexts } from './0007-kept-texts.ts';
import { standingResults } from './0008-standing-results.ts';
import { seeds } from './0009-seeds.ts';
import type { Migration } from './migration.ts';

export const MIGRATIONS: readonly Migration[] = [
  people,
  notebooks,
  versions,
  registrations,
  orderOfEvents,
  lastEditor,
  keptTexts,
  standingResults,
  seeds,
];

/** Names of the migrations done, in a table of the database itself. */
function storage(sequelize: Sequelize): UmzugStorage {
  return {
    async executed() {
      await sequelize.query('CREATE TABLE IF NOT EXISTS migrations (name text PRIMARY KEY)');
      const rows = await sequelize.query<{ name: string }>(
        'SELECT name FROM migrations ORDER BY name',
        { type: QueryTypes.SELECT },
      );
      return rows.map(({ name }) => name);
    },
    async logMigration({ name }) {
      await sequelize.query('INSERT INTO migrations (name) VALUES (:name)', {
        replacements: { name },
      });
    },
    async unlogMigration({ name }) {
      await sequelize.query('DELETE FROM migrations WHERE name = :name', {
        replacements: { name },
      });
    },
  };
}

/** The runner: `up()` brings the schema to date, `down({ to: 0 })` takes it all away. */
export function migrator(sequelize: Sequelize) {
  return new Umzug({
    migrations: MIGRATIONS.map(({ name, up, down }) => ({
      name,
      // Each step is one transaction: PostgreSQL undoes half of one by itself.
      up: () => sequelize.transaction((transaction) => sequelize.query(up, { transaction })),
      down: () => sequelize.transaction((transaction) => sequelize.query(down, { transaction })),
    })),
    storage: storage(sequelize),
    logger: undefined,
  });
}

/** Brings the schema to date; two processes that start together wait for each other. */
export async function migrate(sequelize: Sequelize): Promise<readonly string[]> {
  return sequelize.transaction(async (transaction) => {
    // The lock is held by this transaction alone; the steps run on other connections.
    await sequelize.query('SELECT pg_advisory_xact_lock(620187)', { transaction });
    const done = await migrator(sequelize).up();
    return done.map(({ name }) => name);
  });
}
