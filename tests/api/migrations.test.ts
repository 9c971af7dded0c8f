import { QueryTypes } from 'sequelize';
import { describe, expect, it } from 'vitest';
import { openDatabase } from '../../server/database.ts';
import { migrate, MIGRATIONS, migrator } from '../../server/migrations/index.ts';
import { createTestDatabase } from './support/databases.ts';

const NAMES = MIGRATIONS.map(({ name }) => name);

async function withEmptyDatabase(
  work: (database: ReturnType<typeof openDatabase>) => Promise<void>,
): Promise<void> {
  const own = await createTestDatabase({ isEmpty: true });
  const database = openDatabase(own.url, 4);
  try {
    await work(database);
  } finally {
    await database.close();
    await own.drop();
  }
}

/** Everything that a schema is made of, as lines in order. */
async function schemaOf({ sequelize }: ReturnType<typeof openDatabase>): Promise<string[]> {
  const rows = await sequelize.query<{ line: string }>(
    `SELECT format('column %s.%s %s %s %s', table_name, column_name, data_type, is_nullable,
                   column_default) AS line
       FROM information_schema.columns WHERE table_schema = 'public'
     UNION ALL SELECT format('index %s', indexdef) FROM pg_indexes WHERE schemaname = 'public'
     UNION ALL SELECT format('constraint %s %s', conname, pg_get_constraintdef(oid))
       FROM pg_constraint WHERE connamespace = 'public'::regnamespace
     UNION ALL SELECT format('function %s %s', proname, prosrc)
       FROM pg_proc WHERE pronamespace = 'public'::regnamespace
     UNION ALL SELECT format('trigger %s', pg_get_triggerdef(oid))
       FROM pg_trigger WHERE NOT tgisinternal
     ORDER BY 1`,
    { type: QueryTypes.SELECT },
  );
  return rows.map(({ line }) => line);
}

describe('the migrations', () => {
  it('go all the way up, down to nothing, and up again to the same schema', async () => {
    await withEmptyDatabase(async (database) => {
      expect(await migrate(database.sequelize)).toEqual(NAMES);
      const up = await schemaOf(database);
      expect(await migrate(database.sequelize)).toEqual([]);
      await migrator(database.sequelize).down({ to: 0 });
      const left = (await schemaOf(database)).filter((line) => !/migrations/.test(line));
      expect(left).toEqual([]);
      await migrate(database.sequelize);
      expect(await schemaOf(database)).toEqual(up);
    });
  });

  it('each lead back to exactly the schema before it', async () => {
    await withEmptyDatabase(async (database) => {
      const runner = migrator(database.sequelize);
      let before = await schemaOf(database);
      for (const name of NAMES) {
        await runner.up({ to: name });
        const after = await schemaOf(database);
        if (name !== NAMES[0]) {
          await runner.down({ step: 1 });
          expect(await schemaOf(database)).toEqual(before);
          await runner.up({ to: name });
        }
        before = after;
      }
    });
  });

  it('are run once by two processes that start together', async () => {
    await withEmptyDatabase(async (database) => {
      const done = await Promise.all([migrate(database.sequelize), migrate(database.sequelize)]);
      expect(done.flat().sort()).toEqual([...NAMES].sort());
    });
  });

  it('carry over what an older schema holds', async () => {
    await withEmptyDatabase(async (database) => {
      const { sequelize } = database;
      await migrator(sequelize).up({ to: '0003-versions' });
      await sequelize.query(`
        INSERT INTO people VALUES
          ('00000000-0000-4000-8000-000000000001', 'Ada', 'ada@example.org', now(), 'x', false, now(), now()),
          ('00000000-0000-4000-8000-000000000002', 'Never', 'never@example.org', NULL, 'x', false, now(), now());
        INSERT INTO groups VALUES ('00000000-0000-4000-8000-000000000003', 'G', '', now(), now());
        INSERT INTO notebooks VALUES ('00000000-0000-4000-8000-000000000004',
          '00000000-0000-4000-8000-000000000003', 'N', '', now(), now());
        INSERT INTO models VALUES ('00000000-0000-4000-8000-000000000005',
          '00000000-0000-4000-8000-000000000004', 'M', '00000000-0000-4000-8000-000000000001', now(), now());
        INSERT INTO drafts VALUES ('00000000-0000-4000-8000-000000000005', 'text', 3,
          '00000000-0000-4000-8000-000000000001', now());
        INSERT INTO versions VALUES ('00000000-0000-4000-8000-000000000006',
          '00000000-0000-4000-8000-000000000005', 1, 'text', 'text',
          encode(sha256('text'), 'hex'), '', '00000000-0000-4000-8000-000000000001', now());
        INSERT INTO derivations VALUES ('00000000-0000-4000-8000-000000000007',
          '00000000-0000-4000-8000-000000000006', 'complete', 1, '', NULL, '{}',
          encode(sha256('{}'), 'hex'), '{}', 'passed', 1, false, now());
      `);
      await migrate(sequelize);
      const { models } = database;
      expect((await models.Person.findAll()).map(({ name }) => name)).toEqual(['Ada']);
      expect((await models.KeptText.findAll()).map(({ revision }) => revision)).toEqual([3]);
      const derivation = await models.Derivation.findOne();
      expect(derivation?.result).toBe('{}');
      await expect(derivation?.update({ verification: '{"a":1}' })).rejects.toThrow();
    });
  });
});
