import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import pg from 'pg';
import { v7 as newId } from 'uuid';
import { migrateDatabase } from '#server/cli/migrate';
import { call, expectProblem, ok } from '#test/support/call';
import { testEnvironment } from '#test/support/environment';
import { freshDatabase, type FreshDatabase } from '#test/support/fresh-database';
import { makeOrganisation } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';
import { strokes } from '#test/support/tablet';

/** F08: the disk of the upload folder, or of the database, is full: a clean refusal, nothing half kept, and recovery once there is room. */
const megabyte = 1024 * 1024;
const folder = mkdtempSync(join(tmpdir(), 'kneeboard-full-'));
const mounted: string[] = [];

/** A disk of its own, this small; null where this user may not mount. */
function smallDisk(name: string, megabytes: number, options = ''): string | null {
  const path = join(folder, name);
  mkdirSync(path, { recursive: true });
  try {
    execFileSync('mount', ['-t', 'tmpfs', '-o', `size=${megabytes}m${options}`, 'tmpfs', path], { stdio: 'ignore' });
  } catch {
    return null;
  }
  mounted.push(path);
  return path;
}
/** Writes until nothing more goes in; what is returned makes room again. */
function fill(path: string): () => void {
  const names: string[] = [];
  for (const bytes of [megabyte, 4096]) {
    for (;;) {
      const name = join(path, `filler-${names.length}`);
      names.push(name);
      try {
        writeFileSync(name, Buffer.alloc(bytes, 1));
      } catch {
        break;
      }
    }
  }
  return () => names.forEach((name) => rmSync(name, { force: true }));
}
/** The account that PostgreSQL runs as, by the files of its cluster. */
async function clusterOwner(): Promise<{ uid: number; gid: number }> {
  const client = new pg.Client({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL') });
  await client.connect();
  const { rows } = await client.query<{ folder: string }>(`SELECT current_setting('data_directory') AS folder`);
  await client.end();
  return statSync(rows[0]?.folder ?? '/');
}
async function asSuperuser(statement: string): Promise<void> {
  const client = new pg.Client({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL') });
  await client.connect();
  await client.query(statement).finally(() => client.end());
}

const uploads = smallDisk('uploads', 3);
const why = uploads === null ? ' (not run: mounting a small disk needs root)' : '';
if (uploads === null) console.warn(`F08${why}: run the faults as root to try them.`);

afterAll(() => {
  for (const path of mounted) execFileSync('umount', ['-l', path], { stdio: 'ignore' });
  rmSync(folder, { recursive: true, force: true });
});

describe(`the upload folder is full${why}`, () => {
  let service: Service;
  beforeAll(async () => {
    if (uploads) service = await startService({ UPLOAD_FOLDER: uploads });
  });
  afterAll(() => service?.stop());

  it('the person is told, no part of the file or row is left, signing goes on, and the next try succeeds', async () => {
    if (!uploads) return;
    const organisation = await makeOrganisation(service);
    const { agent } = organisation.officer;
    const bytes = Buffer.concat([Buffer.from(`%PDF-1.4 ${newId()}`), Buffer.alloc(megabyte, 32)]);
    const makeRoom = fill(uploads);
    const before = readdirSync(uploads).sort();
    try {
      expect(expectProblem(await call(agent, 'uploadSheet', { file: { bytes, fileName: 'sheet.pdf' } }), 503).detail).toMatch(/no room left for files/);
      expect(readdirSync(uploads).sort()).toEqual(before);
      expect((await ok(agent, 'listSheets')).items).toEqual([]);
      const day = await organisation.publishedDay();
      const tablet = await organisation.tablet();
      expect(await tablet.deliver(await tablet.signed(day.version, organisation.lead.personId))).toMatchObject({ outcome: 'recorded' });
    } finally {
      makeRoom();
    }
    const { revision } = await ok(agent, 'uploadSheet', { file: { bytes, fileName: 'sheet.pdf' } });
    expect((await ok(agent, 'readRevisionFile', { params: { revisionId: revision.id } })).equals(bytes)).toBe(true);
    expect(readdirSync(uploads)).toEqual([]);
    expect(service.faults).toEqual([]);
  });
});

describe(`the database's disk is full${why}`, () => {
  const space = `kneeboard_small_${process.pid}`;
  let database: FreshDatabase | undefined;
  let service: Service | undefined;
  let disk: string | null = null;
  beforeAll(async () => {
    if (!uploads) return;
    const { uid, gid } = await clusterOwner();
    // PostgreSQL's account must pass through the folder above.
    execFileSync('chmod', ['711', folder]);
    disk = smallDisk('database', 128, `,uid=${uid},gid=${gid},mode=700`);
    await asSuperuser(`CREATE TABLESPACE ${space} LOCATION '${disk}'`);
    database = await freshDatabase(space);
    await migrateDatabase(database.ownerUrl);
    service = await startService({ DATABASE_URL: database.appUrl });
  });
  afterAll(async () => {
    await service?.stop();
    await database?.drop();
    if (disk) await asSuperuser(`DROP TABLESPACE ${space}`);
  });

  it('what is not stored is not acknowledged, what was is still there, and the same deliveries are recorded once there is room', async () => {
    if (!service || !disk) return;
    const organisation = await makeOrganisation(service);
    const crew = await Promise.all(Array.from({ length: 24 }, async (_, at) => (await organisation.person(`Crew ${at}`)).id));
    const day = await organisation.publishedDay({ crew });
    const tablet = await organisation.tablet();
    await tablet.setPin(organisation.lead.personId);
    // Strokes that do not press together: they need pages of their own.
    const long = () => strokes.map(() => ({ points: Array.from({ length: 2500 }, (_, at) => ({ x: Math.random() * 900, y: Math.random() * 300, time: at })) }));
    const outbox = await Promise.all(crew.map((id) => tablet.signed(day.version, id, { strokes: long() })));
    const send = (at: number) => call(tablet.agent, 'deliver', { body: { sentAt: new Date().toISOString(), envelopes: [outbox[at]] } });
    const makeRoom = fill(disk);
    const acknowledged = new Set<number>();
    const refused: number[] = [];
    try {
      for (let at = 0; at < outbox.length; at += 1) {
        const answer = await send(at);
        if (answer.status === 200) acknowledged.add(at);
        else {
          expect(expectProblem(answer, 503).detail).toMatch(/no room left/);
          refused.push(at);
        }
      }
      // The fault must have been felt; reading goes on.
      expect(refused.length).toBeGreaterThan(0);
      await ok(organisation.auditor.agent, 'listHistory');
    } finally {
      makeRoom();
    }
    for (const at of refused) expect((await send(at)).body).toMatchObject({ receipts: [{ outcome: expect.stringMatching(/^(?:recorded|duplicate)$/) }] });
    const { items } = await ok(organisation.auditor.agent, 'listHistory', { query: { limit: 100 } });
    expect(items.map(({ personId }) => personId).sort()).toEqual([...crew].sort());
    expect(await ok(organisation.auditor.agent, 'checkRecord')).toMatchObject({ isGood: true });
    expect(service.faults).toEqual([]);
  });
});
