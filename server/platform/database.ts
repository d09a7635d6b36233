import { types } from 'node:util';
import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import pg from 'pg';

// Calendar dates stay text: a Date would move them by the server's zone.
pg.types.setTypeParser(pg.types.builtins.DATE, (text) => text);

/** A transaction under one organisation's policies. `client` is for the queue and for COPY. */
export type Tx = NodePgDatabase & { readonly client: pg.PoolClient; readonly organisationId: string };

export interface Database {
  /** The only way to an organisation's rows: sets the scope for this transaction and nothing else. */
  inOrganisation<T>(organisationId: string, work: (tx: Tx) => Promise<T>): Promise<T>;
  /** For the door_* functions, before an organisation is known. */
  atTheDoor<Row extends pg.QueryResultRow>(text: string, values: readonly unknown[]): Promise<Row[]>;
  readonly pool: pg.Pool;
  close(): Promise<void>;
}

export function createDatabase(url: string, options: { max?: number; onError?: (error: Error) => void } = {}): Database {
  const pool = new pg.Pool({ connectionString: url, max: options.max ?? 20, connectionTimeoutMillis: 5_000, application_name: 'kneeboard' });
  // Without listeners a dropped connection would end the process: the pool's is for idle ones, the client's for one that is between two statements.
  pool.on('error', (error) => options.onError?.(error));
  pool.on('connect', (client) => client.on('error', (error) => options.onError?.(error)));
  return {
    pool,
    async inOrganisation(organisationId, work) {
      const client = await pool.connect();
      let broken: Error | undefined;
      try {
        await client.query('BEGIN');
        await client.query("SELECT set_config('app.organisation', $1, true)", [organisationId]);
        const tx = Object.assign(drizzle(client, { casing: 'snake_case' }), { client, organisationId }) as unknown as Tx;
        const result = await work(tx);
        await client.query('COMMIT');
        return result;
      } catch (error) {
        await client.query('ROLLBACK').catch((failure: Error) => (broken = failure));
        throw error;
      } finally {
        client.release(broken);
      }
    },
    async atTheDoor<Row extends pg.QueryResultRow>(text: string, values: readonly unknown[]) {
      return (await pool.query<Row>(text, [...values])).rows;
    },
    close: () => pool.end(),
  };
}

/** The service must not be able to lift the policies it runs under. Throws when its role could. */
export async function refuseTooMuchPower(database: Database): Promise<void> {
  const [row] = await database.atTheDoor<{ name: string; isSuper: boolean; bypasses: boolean; owned: number }>(
    `SELECT current_user AS name, r.rolsuper AS "isSuper", r.rolbypassrls AS bypasses,
       (SELECT count(*)::int FROM pg_class c JOIN pg_namespace n ON n.oid = c.relnamespace WHERE n.nspname = 'public' AND pg_has_role(r.oid, c.relowner, 'MEMBER')) AS owned
     FROM pg_roles r WHERE r.rolname = current_user`,
    [],
  );
  if (!row || row.isSuper || row.bypasses || row.owned > 0) {
    throw new Error(`The service refuses to start as database role "${row?.name ?? '?'}": it could lift the policies that keep organisations apart. Use a role that owns no tables and has neither SUPERUSER nor BYPASSRLS.`);
  }
}

/** PostgreSQL's error code behind a Drizzle error, for example 23505. */
export function databaseErrorCode(error: unknown): string | undefined {
  for (let at: unknown = error; at instanceof Error; at = at.cause) if ('code' in at && typeof at.code === 'string' && /^[0-9A-Z]{5}$/.test(at.code)) return at.code;
  return undefined;
}

/** Whether the database is away for now or has no room, and the same request may succeed later; undefined for every other error. */
export function databaseTrouble(error: unknown): 'away' | 'full' | undefined {
  const code = databaseErrorCode(error);
  if (code === '53100') return 'full';
  // Connection exceptions, shutting down, starting up, too many connections (PostgreSQL's manual, appendix A).
  if (code !== undefined) return /^(?:08|57P0|53300)/.test(code) ? 'away' : undefined;
  for (let at: unknown = error; types.isNativeError(at); at = at.cause) if (isLostConnection(at)) return 'away';
  return undefined;
}
/** The driver's own errors carry no code of PostgreSQL's. */
function isLostConnection(error: Error): boolean {
  const isOfNetwork = 'code' in error && 'syscall' in error && /^E(?:CONNREFUSED|CONNRESET|PIPE|HOSTUNREACH|TIMEDOUT)$/.test(String(error.code));
  return isOfNetwork || /^(?:Connection terminated|timeout exceeded when trying to connect|Client has encountered a connection error|Client was closed)/.test(error.message);
}
