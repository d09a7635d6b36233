import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { readdirSync } from 'node:fs';
import pg from 'pg';
import { v7 as newId } from 'uuid';
import { call, expectProblem, ok } from '#test/support/call';
import { buildDemoSheet, quarrybondPartA } from '#test/support/demo-sheets';
import { testEnvironment } from '#test/support/environment';
import { makeOrganisation } from '#test/support/organisation';
import { until } from '#test/support/processes';
import { portOf, startService, type Service } from '#test/support/service';
import { stubBucket, type BucketMood } from '#test/support/stub-bucket';
import { entriesOf, verifyExport } from '#test/support/verify-log';

/** What the service leans on goes away under load: nothing is lost, callers are told, and it recovers by itself. */
const superuser = new pg.Pool({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL'), max: 2 });
afterAll(() => superuser.end());

describe('PostgreSQL ends every connection under load (F03)', () => {
  let service: Service;
  beforeAll(async () => {
    service = await startService();
  });
  afterAll(() => service.stop());

  it('requests fail clearly, later ones succeed without a restart, and every signature stands once', async () => {
    const organisation = await makeOrganisation(service);
    const crew = await Promise.all(Array.from({ length: 20 }, async (_, at) => (await organisation.person(`Crew ${at}`)).id));
    const day = await organisation.publishedDay({ crew });
    const tablet = await organisation.tablet();
    const outbox = await Promise.all(crew.map((id) => tablet.signed(day.version, id)));
    const statuses: number[] = [];
    const acknowledged = new Set<string>();
    const unsent = new Map(outbox.map((envelope) => [envelope.id, envelope]));
    const end = setInterval(() => void superuser.query(`SELECT pg_terminate_backend(pid) FROM pg_stat_activity WHERE usename = 'kneeboard_app' AND application_name = 'kneeboard'`), 40);
    try {
      for (let turn = 0; turn < 12; turn += 1)
        await Promise.all(
          [...unsent.values()].slice(0, 6).map(async (envelope) => {
            const answer = await call(tablet.agent, 'deliver', { body: { sentAt: new Date().toISOString(), envelopes: [envelope] } });
            statuses.push(answer.status);
            if (answer.status === 200) {
              acknowledged.add(envelope.id);
              unsent.delete(envelope.id);
            } else expectProblem(answer, answer.status);
          }),
        );
    } finally {
      clearInterval(end);
    }
    // The fault must have been felt, and said as a fault of ours that passes, never as a refusal of the signature.
    expect(statuses.filter((status) => status !== 200).length).toBeGreaterThan(0);
    expect(statuses.filter((status) => status !== 200 && status !== 500 && status !== 503)).toEqual([]);
    await until('the database answering again', async () => (await fetch(`http://127.0.0.1:${portOf(service.server)}/readyz`)).ok, 30_000);
    for (const envelope of unsent.values()) expect(['recorded', 'duplicate']).toContain((await tablet.deliver(envelope)).outcome);
    const rows = (await ok(organisation.auditor.agent, 'listHistory', { query: { limit: 100 } })).items;
    expect(rows.map(({ personId }) => personId).sort()).toEqual([...crew].sort());
    const log = await ok(organisation.auditor.agent, 'exportRecord');
    expect(await verifyExport(log)).toMatchObject({ code: 0 });
    const logged = entriesOf(log).flatMap(({ record }) => (record?.['kind'] === 'signed' ? [String(record['deliveryId'])] : []));
    expect(logged.sort()).toEqual(outbox.map(({ id }) => id).sort());
    expect([...acknowledged].filter((id) => !logged.includes(id))).toEqual([]);
    // The session of before is good after.
    await ok(organisation.lead.agent, 'readSession');
  });
});

describe('the bucket fails (F05)', () => {
  let service: Service;
  let bucket: Awaited<ReturnType<typeof stubBucket>>;
  beforeAll(async () => {
    bucket = await stubBucket();
    service = await startService({ S3_ENDPOINT: bucket.url });
  });
  afterAll(async () => {
    await service.stop();
    await bucket.stop();
  });

  it.each<BucketMood>(['refuses', 'answers 500', 'hangs up'])('it %s at an upload: the person is told, no row is left without its object, and the next try succeeds', async (mood) => {
    const organisation = await makeOrganisation(service);
    const { agent } = organisation.officer;
    const bytes = await buildDemoSheet({ ...quarrybondPartA, productName: `Quarrybond ${newId()}` });
    bucket.mood = mood;
    try {
      expect(expectProblem(await call(agent, 'uploadSheet', { file: { bytes, fileName: 'sheet.pdf' } }), 503).detail).toMatch(/storage does not answer/);
    } finally {
      bucket.mood = 'good';
    }
    expect((await ok(agent, 'listSheets')).items).toEqual([]);
    const { rows } = await superuser.query(`SELECT 1 FROM pgboss.job WHERE data->>'organisationId' = $1`, [organisation.id]);
    expect(rows).toEqual([]);
    expect(readdirSync(service.environment['UPLOAD_FOLDER'] ?? '')).toEqual([]);
    const { revision, isKnown } = await ok(agent, 'uploadSheet', { file: { bytes, fileName: 'sheet.pdf' } });
    expect(isKnown).toBe(false);
    expect((await ok(agent, 'readRevisionFile', { params: { revisionId: revision.id } })).equals(bytes)).toBe(true);
  });

  it.each<BucketMood>(['refuses', 'answers 500', 'hangs up', 'cuts the answer'])('it %s while a stored sheet is asked for or read: nothing half is shown, the sheet goes on waiting and is read later', async (mood) => {
    const organisation = await makeOrganisation(service);
    const { agent } = organisation.officer;
    const bytes = await buildDemoSheet({ ...quarrybondPartA, productName: `Quarrybond ${newId()}` });
    const { revision } = await ok(agent, 'uploadSheet', { file: { bytes, fileName: 'sheet.pdf' } });
    const params = { revisionId: revision.id };
    bucket.mood = mood;
    try {
      expectProblem(await call(agent, 'readRevisionFile', { params }), 503);
      await expect(service.readSheetNow(organisation.id, revision.id)).rejects.toThrow(/storage does not answer/);
    } finally {
      bucket.mood = 'good';
    }
    expect(await ok(agent, 'readRevision', { params })).toMatchObject({ state: 'waiting', readerState: null });
    await service.readSheetNow(organisation.id, revision.id);
    expect(await ok(agent, 'readRevision', { params })).toMatchObject({ state: 'read' });
  });

  it('signing goes on without the bucket', async () => {
    const organisation = await makeOrganisation(service);
    const day = await organisation.publishedDay();
    const tablet = await organisation.tablet();
    bucket.mood = 'refuses';
    try {
      expect(await tablet.deliver(await tablet.signed(day.version, organisation.lead.personId))).toMatchObject({ outcome: 'recorded' });
    } finally {
      bucket.mood = 'good';
    }
    expect((await fetch(`http://127.0.0.1:${portOf(service.server)}/readyz`)).ok).toBe(true);
  });
});
