/**
 * Two pools on one database. Admissions have a small one of their own: each is a single statement that
 * must not queue behind a report, and its quota charge need not wait for the disk (a crash may lose the
 * last half second of charges, never consistency). Everything else, the call log above all, commits durably.
 */
import knex, { type Knex } from 'knex';
import pg from 'pg';

// bigint columns are unit counts and stay far below 2^53 by the schema's own checks.
pg.types.setTypeParser(pg.types.builtins.INT8, Number);

interface Pools {
  database: Knex;
  admission: Knex;
}

/** Kept on globalThis: the framework's bundles and reloads would otherwise open a pool each. */
const holder = globalThis as typeof globalThis & { linewrightPools?: Pools };

function pools(): Pools {
  holder.linewrightPools ??= {
    database: connect(12, '', 5500),
    admission: connect(8, '-c synchronous_commit=off', 2500),
  };
  return holder.linewrightPools;
}

export function database(): Knex {
  return pools().database;
}

export function admissionDatabase(): Knex {
  return pools().admission;
}

export async function closeDatabase(): Promise<void> {
  const open = holder.linewrightPools;
  holder.linewrightPools = undefined;
  await Promise.all([open?.database.destroy(), open?.admission.destroy()]);
}

/**
 * Short timeouts: with the database away a caller should hear 503 within seconds. The server ends a long
 * statement itself; `patience` is for one that has gone silent.
 */
function connect(size: number, options: string, patience: number): Knex {
  const connectionString = process.env.DATABASE_URL;
  if (!connectionString) throw new Error('DATABASE_URL is not set');
  return knex({
    client: 'pg',
    connection: {
      connectionString,
      connectionTimeoutMillis: 1200,
      statement_timeout: 5000,
      query_timeout: patience,
      application_name: 'linewright',
      ...(options && { options }),
    },
    acquireConnectionTimeout: 1500,
    pool: { min: 0, max: size },
  });
}

/** What the driver says without a code, after the statement that was under way. */
const lostConnection =
  /(^| - )(Connection terminated|Client has encountered a connection error|Query read timeout|timeout expired|timeout exceeded when trying to connect)/i;

/**
 * Whether an error means that the database cannot be reached or cannot serve now, as opposed to a fault of
 * ours: connection failures, SQLSTATE classes 08 (connection), 53 (resources) and 57 (operator
 * intervention, statement timeout), and an exhausted pool.
 */
export function isDatabaseAway(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  if (error.name === 'KnexTimeoutError') return true;
  if (error instanceof AggregateError) return error.errors.some(isDatabaseAway);
  const code = 'code' in error ? String(error.code) : '';
  return (
    /^(08|53|57)[0-9A-Z]{3}$/.test(code) ||
    /^(ECONN|EPIPE|ETIMEDOUT|ENOTFOUND|EHOSTUNREACH|EAI_AGAIN)/.test(code) ||
    (code === '' && lostConnection.test(error.message))
  );
}
