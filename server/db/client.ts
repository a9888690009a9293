import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import { Pool } from 'pg';
import type { Log } from '../platform/log';
import * as schema from './schema';

/** The database as repositories see it: the pool itself, or a transaction on one of its connections. */
export type Db = NodePgDatabase<typeof schema>;
export type Tx = Parameters<Parameters<Db['transaction']>[0]>[0];
export type Executor = Db | Tx;

export interface ConnectOptions {
  readonly url: string;
  readonly log: Log;
  /** Largest number of connections. */
  readonly connections?: number;
  /** Shown in the server's list of connections. */
  readonly name?: string;
}

export interface Database {
  readonly db: Db;
  readonly pool: Pool;
  readonly url: string;
  close(): Promise<void>;
}

const CONNECTIONS = 10;
const CONNECT_PATIENCE_MS = 5_000;
/** No statement of a request takes nearly as long; one that hangs must not hold its connection for ever. */
const STATEMENT_LIMIT_MS = 30_000;

/** Settings that every part of the server must agree on: names in the database are the code's in snake case. */
export const CASING = 'snake_case';

/** Opens a pool; connections are made when they are needed, so an unreachable server shows at the first query. */
export function connectDatabase({
  url,
  log,
  connections = CONNECTIONS,
  name = 'tareline',
}: ConnectOptions): Database {
  const pool = new Pool({
    connectionString: url,
    max: connections,
    application_name: name,
    connectionTimeoutMillis: CONNECT_PATIENCE_MS,
    statement_timeout: STATEMENT_LIMIT_MS,
    idle_in_transaction_session_timeout: STATEMENT_LIMIT_MS,
  });
  // A connection that breaks while idle is replaced by the pool; without a listener it would end the process.
  pool.on('error', (error) => log.warn({ error }, 'an idle connection to the database broke'));
  // So would one that breaks while it is lent out and no statement is under way.
  pool.on('connect', (client) => {
    client.on('error', (error) => log.debug({ error }, 'a connection to the database broke'));
  });
  return { db: drizzle(pool, { schema, casing: CASING }), pool, url, close: () => pool.end() };
}
