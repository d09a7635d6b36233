import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import pg from 'pg';
import { v7 as newId } from 'uuid';
import { migrateDatabase } from '#server/cli/migrate';
import { startWorker } from '#server/worker';
import { call, expectProblem, ok } from '#test/support/call';
import { testEnvironment } from '#test/support/environment';
import { freshDatabase, type FreshDatabase } from '#test/support/fresh-database';
import { gateTo, through, type Gate } from '#test/support/gate';
import { makeOrganisation, type Organisation } from '#test/support/organisation';
import { until } from '#test/support/processes';
import { portOf, startService, type Service } from '#test/support/service';

/** PostgreSQL (F04) and the mail server (F07) are gone for a while, with the worker at work: what waits is done once when they are back. */
let database: FreshDatabase;
let service: Service;
let stopWorker: () => Promise<void>;
let organisation: Organisation;
let superuser: pg.Pool;
const gates = {} as { database: Gate; mail: Gate };

beforeAll(async () => {
  database = await freshDatabase();
  await migrateDatabase(database.ownerUrl);
  gates.database = await gateTo(Number(new URL(database.appUrl).port));
  gates.mail = await gateTo(Number(testEnvironment('TEST_SMTP_PORT')));
  service = await startService({ DATABASE_URL: through(gates.database, database.appUrl), SMTP_URL: `smtp://127.0.0.1:${gates.mail.port}`, MAIL_RETRY_SECONDS: '1' });
  stopWorker = await startWorker(service.deps);
  organisation = await makeOrganisation(service);
  superuser = new pg.Pool({ connectionString: Object.assign(new URL(testEnvironment('TEST_SUPERUSER_DATABASE_URL')), { pathname: new URL(database.appUrl).pathname }).toString(), max: 2 });
});
afterAll(async () => {
  await stopWorker?.();
  await service?.stop();
  await superuser?.end();
  await Promise.all(Object.values(gates).map((gate) => gate.stop()));
  await database?.drop();
});

/** Asks a supplier for a sheet by a mail to an address of its own. */
async function ask(): Promise<{ email: string; requestId: string }> {
  const sheet = await organisation.confirmedSheet();
  const email = `${newId()}@northlode.example`;
  const { id } = await ok(organisation.officer.agent, 'askSupplier', { body: { productId: sheet.productId ?? '', email, message: 'Please send the current sheet.', language: 'en' } });
  return { email, requestId: id };
}
const mailsTo = (email: string): number => {
  const folder = testEnvironment('TEST_MAIL_FOLDER');
  return readdirSync(folder).filter((name) => name.endsWith('.eml') && readFileSync(join(folder, name), 'utf8').includes(email)).length;
};
const work = async (requestId: string) => (await superuser.query<{ state: string; tries: number; patienceSeconds: number }>(`SELECT state::text, retry_count AS tries, retry_limit * retry_delay AS "patienceSeconds" FROM pgboss.job WHERE name = 'mail-request' AND data->>'requestId' = $1`, [requestId])).rows;
const ready = async () => {
  const answer = await fetch(`http://127.0.0.1:${portOf(service.server)}/readyz`);
  return { status: answer.status, body: (await answer.json()) as { ready: boolean; because?: string } };
};

describe('the mail server is gone (F07)', () => {
  it('a mail waits longer than an hour, is tried again, and goes once when the server is back', async () => {
    gates.mail.close();
    const { email, requestId } = await ask();
    await until('several tries in vain', async () => gates.mail.turnedAway() >= 3, 60_000);
    expect(mailsTo(email)).toBe(0);
    const [waiting, ...more] = await work(requestId);
    expect(more).toEqual([]);
    expect(waiting?.patienceSeconds).toBeGreaterThan(3600);
    // The person asked and was answered: the request stands, whatever the mail server does.
    expect((await ok(organisation.officer.agent, 'listRequests', { query: { state: 'open' } })).items.map(({ id }) => id)).toContain(requestId);
    gates.mail.open();
    await until('the mail', async () => mailsTo(email) > 0, 60_000);
    await until('its work being done', async () => (await work(requestId))[0]?.state === 'completed', 60_000);
    // A further mail that came after it shows that nothing was still under way.
    const after = await ask();
    await until('the next mail', async () => mailsTo(after.email) > 0, 60_000);
    expect([mailsTo(email), mailsTo(after.email)]).toEqual([1, 1]);
  });
});

describe('PostgreSQL is gone (F04)', () => {
  it('/readyz says so, requests fail clearly, and queue, sessions and what waits on a tablet survive without a restart', async () => {
    const day = await organisation.publishedDay();
    const tablet = await organisation.tablet();
    await tablet.setPin(organisation.lead.personId);
    const envelope = await tablet.signed(day.version, organisation.lead.personId);
    gates.mail.close();
    const waiting = await ask();
    expect(await ready()).toEqual({ status: 200, body: { ready: true } });

    gates.database.close();
    try {
      await until('/readyz saying so', async () => (await ready()).status === 503, 60_000);
      expect((await ready()).body).toEqual({ ready: false, because: 'The database does not answer.' });
      expect((await fetch(`http://127.0.0.1:${portOf(service.server)}/healthz`)).status).toBe(200);
      expect(expectProblem(await call(organisation.lead.agent, 'readSession'), 503).detail).toMatch(/database does not answer/);
      const delivered = await call(tablet.agent, 'deliver', { body: { sentAt: new Date().toISOString(), envelopes: [envelope] } });
      // A fault of ours that passes: the tablet keeps it and sends it again.
      expectProblem(delivered, 503);
      await until('the queue looking for it, too', async () => gates.database.turnedAway() >= 5, 60_000);
    } finally {
      gates.database.open();
    }

    await until('/readyz saying that it is back', async () => (await ready()).status === 200, 60_000);
    expect(await ok(organisation.lead.agent, 'readSession')).toMatchObject({ role: 'crew-lead' });
    expect(await tablet.deliver(envelope)).toMatchObject({ outcome: 'recorded', pinState: 'confirmed' });
    gates.mail.open();
    await until('the mail of before', async () => mailsTo(waiting.email) > 0, 90_000);
    const fresh = await ask();
    await until('the mail of after', async () => mailsTo(fresh.email) > 0, 90_000);
    expect([mailsTo(waiting.email), mailsTo(fresh.email)]).toEqual([1, 1]);
    expect(await ok(organisation.auditor.agent, 'checkRecord')).toMatchObject({ isGood: true });
  });
});
