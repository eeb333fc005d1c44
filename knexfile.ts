import type { Knex } from 'knex';

/** For the knex command line and for db/migrate.ts; the app's own pools are made in db/connection.ts. */
const config: Knex.Config = {
  client: 'pg',
  connection: process.env.DATABASE_URL,
  migrations: { directory: './db/migrations', extension: 'ts', loadExtensions: ['.ts'] },
};

export default config;
