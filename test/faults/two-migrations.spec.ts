import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, it } from '@jest/globals';
import pg from 'pg';
import { migrateDatabase } from '#server/cli/migrate';
import { ok } from '#test/support/call';
import { testEnvironment } from '#test/support/environment';
import { freshDatabase, type FreshDatabase } from '#test/support/fresh-database';
import { makeOrganisation } from '#test/support/organisation';
import { projectRoot, until } from '#test/support/processes';
import { startService } from '#test/support/service';

/** F17: two servers start at once and both bring the database up to date: one does, the other waits and finds it done. */
let database: FreshDatabase;
let superuser: pg.Pool;
beforeAll(async () => {
  database = await freshDatabase();
  superuser = new pg.Pool({ connectionString: Object.assign(new URL(testEnvironment('TEST_SUPERUSER_DATABASE_URL')), { pathname: new URL(database.appUrl).pathname }).toString(), max: 3 });
});
afterAll(async () => {
  await superuser.end();
  await database.drop();
});

const steps = (JSON.parse(readFileSync(join(projectRoot, 'drizzle/migrations/meta/_journal.json'), 'utf8')) as { entries: unknown[] }).entries.length;
const taken = async (): Promise<number> => {
  const { rows } = await superuser.query<{ there: boolean }>(`SELECT to_regclass('drizzle.__drizzle_migrations') IS NOT NULL AS there`);
  return rows[0]?.there ? Number((await superuser.query('SELECT count(*) AS found FROM drizzle.__drizzle_migrations')).rows[0].found) : 0;
};
/** How many migrations wait for the one that is at work. */
const waiting = async (): Promise<number> =>
  Number((await superuser.query(`SELECT count(*) AS found FROM pg_locks l JOIN pg_stat_activity a ON a.pid = l.pid WHERE l.locktype = 'advisory' AND NOT l.granted AND a.application_name = 'kneeboard-migrate' AND a.datname = current_database()`)).rows[0].found);

/** Starts two while a third holds the lock, looks on, and lets go. */
async function twoAtOnce(meanwhile: () => Promise<void>): Promise<void> {
  const holder = await superuser.connect();
  await holder.query(`SELECT pg_advisory_lock(hashtext('kneeboard-migrate'))`);
  const both = Promise.all([migrateDatabase(database.ownerUrl), migrateDatabase(database.ownerUrl)]);
  try {
    await until('both waiting', async () => (await waiting()) === 2, 60_000);
    await meanwhile();
  } finally {
    await holder.query(`SELECT pg_advisory_unlock(hashtext('kneeboard-migrate'))`);
    holder.release();
  }
  await both;
}

it('on an empty database every step is taken once', async () => {
  await twoAtOnce(async () => expect(await taken()).toBe(0));
  expect(await taken()).toBe(steps);
});

it('on a live one nothing is taken again, and signing goes on meanwhile', async () => {
  const service = await startService({ DATABASE_URL: database.appUrl });
  try {
    const organisation = await makeOrganisation(service);
    const crew = await Promise.all(Array.from({ length: 12 }, async (_, at) => (await organisation.person(`Crew ${at}`)).id));
    const day = await organisation.publishedDay({ crew });
    const tablet = await organisation.tablet();
    const sign = async (ids: readonly string[]) => {
      for (const id of ids) expect(await tablet.deliver(await tablet.signed(day.version, id))).toMatchObject({ outcome: 'recorded' });
    };
    // Some while both wait, some while they look through what there is to do.
    let others: Promise<void> | undefined;
    await twoAtOnce(async () => {
      await sign(crew.slice(0, 6));
      others = sign(crew.slice(6));
    });
    await others;
    expect(await taken()).toBe(steps);
    expect((await ok(organisation.auditor.agent, 'listHistory')).items).toHaveLength(crew.length);
    expect(await ok(organisation.auditor.agent, 'checkRecord')).toMatchObject({ isGood: true });
    expect(service.faults).toEqual([]);
  } finally {
    await service.stop();
  }
});
