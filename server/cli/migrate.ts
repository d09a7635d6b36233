import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { existsSync } from 'node:fs';
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import pg from 'pg';
import PgBoss from 'pg-boss';
import { queueNames } from '../platform/queue';

/** Brings the database to this version: as its owner, one process at a time. */
export async function migrateDatabase(ownerUrl: string): Promise<void> {
  const client = new pg.Client({ connectionString: ownerUrl, application_name: 'kneeboard-migrate' });
  await client.connect();
  try {
    // Two servers starting at once: the second waits here and finds the work done.
    await client.query("SELECT pg_advisory_lock(hashtext('kneeboard-migrate'))");
    await client.query("SET client_min_messages = 'warning'");
    await migrate(drizzle(client), { migrationsFolder: migrationsFolder() });
    await migrateQueue(client, ownerUrl);
  } finally {
    await client.end();
  }
}

async function migrateQueue(client: pg.Client, ownerUrl: string): Promise<void> {
  const boss = new PgBoss({ connectionString: ownerUrl, schema: 'pgboss', supervise: false, schedule: false, max: 2 });
  boss.on('error', (error) => console.error(error.message));
  await boss.start();
  for (const name of queueNames) if (!(await boss.getQueue(name))) await boss.createQueue(name);
  await boss.stop({ graceful: false, wait: true });
  await client.query(`
    GRANT USAGE ON SCHEMA pgboss TO kneeboard_app;
    GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA pgboss TO kneeboard_app;
    GRANT USAGE ON ALL SEQUENCES IN SCHEMA pgboss TO kneeboard_app;
    GRANT EXECUTE ON ALL FUNCTIONS IN SCHEMA pgboss TO kneeboard_app`);
}

/** Beside the sources, or two folders up from the bundle in dist/server. */
function migrationsFolder(): string {
  const here = dirname(fileURLToPath(import.meta.url));
  const found = ['../../drizzle/migrations', '../drizzle/migrations'].map((path) => join(here, path)).find((path) => existsSync(path));
  if (!found) throw new Error('The folder drizzle/migrations is missing: run this from a complete checkout.');
  return found;
}

if (process.argv[1] && /migrate\.(?:ts|mjs)$/.test(process.argv[1])) {
  const ownerUrl = process.env['OWNER_DATABASE_URL'];
  if (!ownerUrl) {
    console.error('Set OWNER_DATABASE_URL to the address of the database with its owner’s name and password.');
    process.exit(2);
  }
  await migrateDatabase(ownerUrl);
}
