import { execFile } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { CreateBucketCommand, GetObjectCommand, ListObjectsV2Command, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { afterAll, beforeAll, expect, it } from '@jest/globals';
import pg from 'pg';
import { migrateDatabase } from '#server/cli/migrate';
import { createStorage } from '#server/platform/storage';
import { ok } from '#test/support/call';
import { testEnvironment } from '#test/support/environment';
import { freshDatabase, type FreshDatabase } from '#test/support/fresh-database';
import { makeOrganisation, pageAgent, testPassword } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';
import { entriesOf, verifyExport } from '#test/support/verify-log';

/** F30: a backup taken under load by the commands of DEVELOPERS.md, restored elsewhere: the same log up to its moment, every object there. */
const run = promisify(execFile);
const folder = mkdtempSync(join(tmpdir(), 'kneeboard-backup-'));
const otherBucket = `restored-${process.pid}`;
const databases: FreshDatabase[] = [];
const services: Service[] = [];
let original: Service;
const s3 = new S3Client({ endpoint: testEnvironment('TEST_S3_ENDPOINT'), region: 'us-east-1', forcePathStyle: true, requestChecksumCalculation: 'WHEN_REQUIRED', responseChecksumValidation: 'WHEN_REQUIRED', credentials: { accessKeyId: 'S3RVER', secretAccessKey: 'S3RVER' } });

beforeAll(async () => {
  databases.push(await freshDatabase());
  await migrateDatabase(databases[0]?.ownerUrl ?? '');
  original = await startService({ DATABASE_URL: databases[0]?.appUrl ?? '' });
  services.push(original);
});
afterAll(async () => {
  for (const service of services) await service.stop();
  for (const database of databases) await database.drop();
  s3.destroy();
  rmSync(folder, { recursive: true, force: true });
});

const superuserUrl = (database: FreshDatabase | undefined): string => Object.assign(new URL(testEnvironment('TEST_SUPERUSER_DATABASE_URL')), { pathname: new URL(database?.appUrl ?? '').pathname }).toString();

/** The database first, then the bucket: objects are only ever added, so every row of the dump finds its own. */
async function backUpAndRestore(): Promise<FreshDatabase> {
  const dump = join(folder, 'kneeboard.dump');
  await run('pg_dump', ['--format=custom', `--file=${dump}`, superuserUrl(databases[0])]);
  await s3.send(new CreateBucketCommand({ Bucket: otherBucket }));
  for (let token: string | undefined; ; ) {
    const page = await s3.send(new ListObjectsV2Command({ Bucket: testEnvironment('TEST_S3_BUCKET'), Prefix: organisationPrefix, ...(token ? { ContinuationToken: token } : {}) }));
    for (const { Key } of page.Contents ?? []) {
      const { Body } = await s3.send(new GetObjectCommand({ Bucket: testEnvironment('TEST_S3_BUCKET'), Key: Key ?? '' }));
      await s3.send(new PutObjectCommand({ Bucket: otherBucket, Key: Key ?? '', Body: (await Body?.transformToByteArray()) ?? new Uint8Array() }));
    }
    token = page.NextContinuationToken;
    if (!page.IsTruncated) break;
  }
  const restored = await freshDatabase();
  databases.push(restored);
  await run('pg_restore', ['--exit-on-error', `--dbname=${superuserUrl(restored)}`, dump]);
  return restored;
}
let organisationPrefix = '';

it('holds a whole, good log that is the beginning of the original, every signature in it, and opens every sheet', async () => {
  const organisation = await makeOrganisation(original);
  organisationPrefix = `${organisation.id}/`;
  for (let sheet = 0; sheet < 3; sheet += 1) await organisation.confirmedSheet();
  const crew = await Promise.all(Array.from({ length: 40 }, async (_, at) => (await organisation.person(`Crew ${at}`)).id));
  const day = await organisation.publishedDay({ crew });
  const tablet = await organisation.tablet();
  await tablet.setPin(organisation.lead.personId);
  await ok(organisation.auditor.agent, 'checkRecord');

  // Under load: signatures and sheets go on arriving until the backup is there.
  let isBackedUp = false;
  let signed = 0;
  const load = (async () => {
    for (const id of crew) {
      if (isBackedUp && signed > 5) break;
      await tablet.deliver(await tablet.signed(day.version, id));
      signed += 1;
      if (signed % 4 === 0) await organisation.sheetToEnter();
    }
  })();
  const restored = await backUpAndRestore();
  isBackedUp = true;
  await load;
  await tablet.deliver(await tablet.briefing(day.version, organisation.lead.personId, [{ lineId: 'after', answer: 'yes', note: null }]));
  await tablet.setPin(crew[0] ?? '');

  const copy = await startService({ DATABASE_URL: restored.appUrl, S3_BUCKET: otherBucket, KNEEBOARD_KEYS: original.environment['KNEEBOARD_KEYS'] ?? '' });
  services.push(copy);
  const auditor = pageAgent(copy);
  await ok(auditor, 'signIn', { body: { email: organisation.auditor.email, password: testPassword } });
  expect(await ok(auditor, 'checkRecord')).toMatchObject({ isGood: true, trouble: null });
  const [theirs, ours] = [await ok(auditor, 'exportRecord'), await ok(organisation.auditor.agent, 'exportRecord')];
  expect(await verifyExport(theirs)).toMatchObject({ code: 0 });
  const leaves = (bytes: Buffer) => entriesOf(bytes).map(({ leaf }) => leaf);
  expect(leaves(theirs).length).toBeGreaterThan(3);
  expect(leaves(ours).length).toBeGreaterThan(leaves(theirs).length);
  // The same leaves in the same order have the same root (RFC 9162, 2.1.1).
  expect(leaves(theirs)).toEqual(leaves(ours).slice(0, leaves(theirs).length));

  const history = (await ok(auditor, 'listHistory', { query: { limit: 100 } })).items;
  const logged = entriesOf(theirs).filter(({ record }) => record?.['kind'] === 'signed').map(({ record }) => record?.['personId']);
  expect(history.map(({ personId }) => personId).sort()).toEqual(logged.sort());

  const client = new pg.Client({ connectionString: superuserUrl(restored) });
  await client.connect();
  const { rows } = await client.query<{ id: string; sha256: string }>('SELECT id, sha256 FROM revisions WHERE organisation_id = $1', [organisation.id]);
  await client.end();
  expect(rows.length).toBeGreaterThanOrEqual(3);
  const storage = createStorage({ endpoint: testEnvironment('TEST_S3_ENDPOINT'), region: 'us-east-1', bucket: otherBucket, accessKeyId: 'S3RVER', secretAccessKey: 'S3RVER' });
  for (const { sha256 } of rows) await storage.getVerified(`${organisation.id}/${sha256}`, sha256);
  expect(copy.faults).toEqual([]);
});
