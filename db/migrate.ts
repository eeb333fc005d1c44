/** Brings the database of DATABASE_URL to the newest schema; run by the start and test commands. */
import knex from 'knex';
import config from '../knexfile';

const connection = knex(config);
try {
  const [, applied] = (await connection.migrate.latest()) as [number, string[]];
  // Partitions of the call log are made ahead at every start, and on demand when a month has none.
  await connection.raw('select ensure_call_partitions(now()), ensure_call_partitions(now() + interval \'1 month\')');
  console.log(applied.length === 0 ? 'database schema is up to date' : `applied ${applied.length} migrations`);
} finally {
  await connection.destroy();
}
