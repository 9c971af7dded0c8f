/** Brings the schema to date; with `--seed` also sets up the demonstration where there is none. */
import process from 'node:process';
import { ConfigFault, readConfig } from './config.ts';
import { openDatabase } from './database.ts';
import { migrate } from './migrations/index.ts';
import { seed } from './seed/index.ts';

async function main(): Promise<void> {
  const config = readConfig();
  const database = openDatabase(config.DATABASE_URL, 4);
  try {
    const done = await migrate(database.sequelize);
    console.log(done.length === 0 ? 'The schema is up to date.' : `Done: ${done.join(', ')}.`);
    if (process.argv.includes('--seed') && (await seed(database))) {
      console.log('The demonstration is set up.');
    }
  } finally {
    await database.close();
  }
}

main().catch((error: unknown) => {
  console.error(error instanceof ConfigFault ? error.message : error);
  process.exit(1);
});
