import { randomBytes } from 'node:crypto';
import pg from 'pg';
import { testEnvironment } from './environment';

export interface FreshDatabase {
  readonly ownerUrl: string;
  readonly appUrl: string;
  drop(): Promise<void>;
}

/**
 * An empty database of its own in the test cluster, without tables. A test that runs a worker needs one: workers take
 * whatever is queued and sign checkpoints for every organisation they find, those of other specs too.
 */
export async function freshDatabase(tablespace?: string): Promise<FreshDatabase> {
  const name = `kneeboard_own_${randomBytes(6).toString('hex')}`;
  await asSuperuser([`CREATE DATABASE ${name} OWNER kneeboard_owner${tablespace ? ` TABLESPACE ${tablespace}` : ''}`, `REVOKE ALL ON DATABASE ${name} FROM PUBLIC`, `GRANT CONNECT ON DATABASE ${name} TO kneeboard_app`]);
  const named = (url: string): string => Object.assign(new URL(url), { pathname: `/${name}` }).toString();
  return {
    ownerUrl: named(testEnvironment('TEST_OWNER_DATABASE_URL')),
    appUrl: named(testEnvironment('TEST_APP_DATABASE_URL')),
    drop: () => asSuperuser([`DROP DATABASE IF EXISTS ${name} WITH (FORCE)`]),
  };
}

async function asSuperuser(statements: readonly string[]): Promise<void> {
  const client = new pg.Client({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL') });
  await client.connect();
  try {
    for (const statement of statements) await client.query(statement);
  } finally {
    await client.end();
  }
}
