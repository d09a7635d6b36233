import { afterAll, beforeAll, expect, it } from '@jest/globals';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import pg from 'pg';
import { type Deliveries, Receipts } from '#shared/envelopes';
import { type PublishedVersion } from '#shared/jobs';
import { ok } from '#test/support/call';
import { testEnvironment } from '#test/support/environment';
import { SyncedIds } from '#test/support/log-of-ids';
import { freshAddress, makeOrganisation, type Organisation, type PublishedDay } from '#test/support/organisation';
import { buildServer, freePort, startProcess, untilReady, type BuiltServer, type ServiceProcess } from '#test/support/processes';
import { ownOrigin, startService, type Service } from '#test/support/service';
import { type SentEnvelope, type TestTablet } from '#test/support/tablet';
import { entriesOf, verifyExport } from '#test/support/verify-log';

/** F01: `kill -9` of the web process while tablets sign. 5 rounds in `npm test`, 50 in `npm run test:faults`. */
const rounds = Number(process.env['FAULT_ROUNDS'] ?? '5');
const crewSize = 24;
const senders = 4;

let service: Service;
let built: BuiltServer;
let organisation: Organisation;
let tablet: TestTablet;
let day: PublishedDay;
let crew: string[];
const superuser = new pg.Pool({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL'), max: 2 });
const folder = mkdtempSync(join(tmpdir(), 'kneeboard-kill-'));
const lists = { sent: new SyncedIds(join(folder, 'sent')), acknowledged: new SyncedIds(join(folder, 'acknowledged')) };

beforeAll(async () => {
  built = await buildServer();
  service = await startService();
  organisation = await makeOrganisation(service);
  crew = await Promise.all(Array.from({ length: crewSize }, async (_, at) => (await organisation.person(`Crew ${String(at).padStart(2, '0')}`)).id));
  day = await organisation.publishedDay({ crew });
  tablet = await organisation.tablet();
  for (const id of crew) await tablet.setPin(id);
});
afterAll(async () => {
  built.remove();
  lists.sent.close();
  lists.acknowledged.close();
  rmSync(folder, { recursive: true, force: true });
  await superuser.end();
  await service.stop();
});

/** The tablet's own way of sending, to the process under test, over its device cookie. */
async function send(web: ServiceProcess, envelopes: readonly SentEnvelope[]): Promise<Receipts> {
  const token = tablet.agent.jar.getCookie('kneeboard_tablet', { path: '/api/tablet', domain: '127.0.0.1', secure: false, script: false })?.value ?? '';
  const body: Deliveries = { sentAt: new Date().toISOString(), envelopes: [...envelopes] };
  for (const { id } of envelopes) lists.sent.add(id);
  const headers = { 'Content-Type': 'application/json', Origin: ownOrigin, 'X-Forwarded-For': freshAddress(), Cookie: `kneeboard_tablet=${token}` };
  const response = await fetch(`${web.url}/api/tablet/deliveries`, { method: 'POST', headers, body: JSON.stringify(body) });
  if (!response.ok) throw new Error(`deliveries answered ${response.status}: ${await response.text()}`);
  const receipts = Receipts.parse(await response.json());
  // Only now may the tablet forget them.
  for (const receipt of receipts.receipts) lists.acknowledged.add(receipt.id);
  return receipts;
}

interface StoredState {
  deliveries: { id: string; bytes: string }[];
  signatures: { versionId: string; personId: string; deliveryId: string }[];
  entries: number[];
  head: { size: number; acknowledgements: number };
}
async function stored(): Promise<StoredState> {
  const own = [organisation.id];
  const { rows: deliveries } = await superuser.query<{ id: string; bytes: string }>(`SELECT id, convert_from(bytes, 'UTF8') AS bytes FROM deliveries WHERE organisation_id = $1`, own);
  const { rows: signatures } = await superuser.query<StoredState['signatures'][number]>(`SELECT version_id AS "versionId", person_id AS "personId", delivery_id AS "deliveryId" FROM acknowledgements WHERE organisation_id = $1`, own);
  const { rows: entries } = await superuser.query<{ index: number }>(`SELECT index::int FROM recordlog_entries WHERE organisation_id = $1 ORDER BY index`, own);
  const { rows: heads } = await superuser.query<StoredState['head']>(`SELECT size::int, acknowledgement_count::int AS acknowledgements FROM recordlog_heads WHERE organisation_id = $1`, own);
  return { deliveries, signatures, entries: entries.map(({ index }) => index), head: heads[0] as StoredState['head'] };
}

/** Acknowledged ⊆ stored ⊆ sent; nothing doubled; the log has no gap and no half. */
async function expectWhole(sentBytes: ReadonlyMap<string, string>): Promise<StoredState> {
  const state = await stored();
  const storedIds = new Set(state.deliveries.map(({ id }) => id));
  const sent = new Set(lists.sent.all());
  const signed = new Set(state.signatures.map(({ deliveryId }) => deliveryId));
  expect(lists.acknowledged.all().filter((id) => !storedIds.has(id) || !signed.has(id))).toEqual([]);
  // What came before the rounds (the PINs) is not on the list.
  expect(state.deliveries.filter(({ id, bytes }) => !bytes.includes('"pin-set"') && (!sent.has(id) || sentBytes.get(id) !== bytes))).toEqual([]);
  expect(new Set(state.signatures.map(({ versionId, personId }) => `${versionId} ${personId}`)).size).toBe(state.signatures.length);
  expect(state.entries).toEqual(state.entries.map((_, at) => at));
  expect(state.head).toEqual({ size: state.entries.length, acknowledgements: state.signatures.length });
  return state;
}

it(`loses and doubles no signature when the web process is killed while signing, ${rounds} times`, async () => {
  const port = await freePort();
  const sentBytes = new Map<string, string>();
  let killedInFlight = 0;
  let version: PublishedVersion = day.version;
  for (let round = 0; round < rounds; round += 1) {
    if (round > 0) version = await organisation.publishAgain(day, `Ammonia cooling, drill number ${round}: leave by the north door.`);
    const outbox = await Promise.all(crew.map((personId) => tablet.signed(version, personId)));
    for (const { id, bytes } of outbox) sentBytes.set(id, bytes);
    const web = startProcess(built, 'web', service.environment, port);
    await untilReady(web);

    // Several requests under way, some of them batches, when the process is killed at a random moment.
    const waiting = [...outbox];
    const nextBatch = () => waiting.splice(0, 1 + Math.floor(Math.random() * 2));
    const killAfter = 1 + Math.floor(Math.random() * (crewSize / 2));
    let [isKilled, answered] = [false, 0];
    const sending = Array.from({ length: senders }, async () => {
      for (let batch = nextBatch(); batch.length > 0 && !isKilled; batch = nextBatch()) {
        try {
          await send(web, batch);
          answered += batch.length;
        } catch (error) {
          if (!isKilled) throw error;
          killedInFlight += 1;
        }
        if (answered >= killAfter && !isKilled) {
          isKilled = true;
          setTimeout(() => web.child.kill('SIGKILL'), Math.random() * 8);
        }
      }
    });
    await Promise.all(sending);
    await web.kill();
    expect((await web.ended).signal).toBe('SIGKILL');
    await expectWhole(sentBytes);

    // Another process takes over; the tablet sends everything again that it has no receipt for, and one thing that it has.
    const again = startProcess(built, 'web', service.environment, port);
    await untilReady(again);
    const known = new Set(lists.acknowledged.all());
    const unsure = outbox.filter(({ id }) => !known.has(id));
    if (unsure.length > 0) await send(again, unsure);
    const repeated = await send(again, outbox.filter(({ id }) => known.has(id)).slice(0, 1));
    expect(repeated.receipts.map(({ outcome }) => outcome)).toEqual(['duplicate']);
    const state = await expectWhole(sentBytes);
    expect(state.signatures.filter(({ versionId }) => versionId === version.id)).toHaveLength(crewSize);
    again.child.kill('SIGTERM');
    expect(await again.ended).toEqual({ code: 0, signal: null });
  }
  // The kills must have met requests under way, or nothing was tried.
  expect(killedInFlight).toBeGreaterThan(0);

  const log = await ok(organisation.auditor.agent, 'exportRecord');
  expect(await verifyExport(log)).toMatchObject({ code: 0 });
  const logged = entriesOf(log).flatMap(({ record }) => (record?.['kind'] === 'signed' ? [String(record['deliveryId'])] : []));
  expect(logged.sort()).toEqual([...sentBytes.keys()].sort());
  expect(service.faults).toEqual([]);
}, 120_000 + rounds * 20_000);
