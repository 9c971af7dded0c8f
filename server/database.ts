/** The connection to PostgreSQL, with all models registered on it. */
import { Sequelize } from 'sequelize';
import { defineModels, type Models } from './models/index.ts';

export interface Database {
  readonly sequelize: Sequelize;
  readonly models: Models;
  close(): Promise<void>;
}

/** Opens a pool of connections; the first query tells whether the server answers. */
export function openDatabase(url: string, poolSize = 10): Database {
  const sequelize = new Sequelize(url, {
    dialect: 'postgres',
    logging: false,
    define: { underscored: true },
    pool: { max: poolSize, idle: 10_000 },
  });
  const models = defineModels(sequelize);
  return { sequelize, models, close: () => sequelize.close() };
}
