import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import pg from 'pg';
import { guessAlarmsService } from '#server/session/guess-alarms';
import { call, expectProblem, ok, type Agent } from '#test/support/call';
import { testEnvironment } from '#test/support/environment';
import { makeOrganisation, pageAgent, testPassword, type Organisation } from '#test/support/organisation';
import { until } from '#test/support/processes';
import { startService, type Service } from '#test/support/service';

/** F27: somebody guesses at one account from many addresses. They are slowed, the owner is told, and the honest get in. */
let service: Service;
const superuser = new pg.Pool({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL'), max: 2 });
beforeAll(async () => {
  service = await startService();
});
afterAll(async () => {
  await superuser.end();
  await service.stop();
});

const signIn = (agent: Agent, email: string, password = testPassword) => call(agent, 'signIn', { body: { email, password } });
/** Wrong tries, each from an address of its own, until the account waits; gives how many that took. */
async function guessUntilSlowed(email: string): Promise<number> {
  for (let tries = 0; tries < 120; tries += 1) if ((await signIn(pageAgent(service), email, `guess number ${tries}`)).status === 429) return tries;
  throw new Error('guessing was never slowed');
}
const alarmsOf = async ({ id }: Organisation) => (await superuser.query<{ id: string; failures: number; addresses: number }>('SELECT id, failures, addresses FROM guess_alarms WHERE organisation_id = $1', [id])).rows;
const guessingOn = async (agent: Agent) => (await ok(agent, 'readToday')).items.filter(({ label }) => label === 'Guessing');

it('slows the guesses, tells the owner once on Today and by mail, and lets the owner in where they signed in before', async () => {
  const organisation = await makeOrganisation(service);
  const { owner, officer, lead } = organisation;
  expect(await guessUntilSlowed(owner.email)).toBeLessThanOrEqual(52);
  // A machine that nobody knows waits, with the right password too; the owner's own machine does not.
  expectProblem(await signIn(pageAgent(service), owner.email), 429);
  expect((await signIn(owner.agent, owner.email)).status).toBe(200);
  expect((await signIn(lead.agent, lead.email)).status).toBe(200);

  await until('the owner being told', async () => (await guessingOn(owner.agent)).length > 0, 30_000);
  const [item, ...more] = await guessingOn(owner.agent);
  expect(more).toEqual([]);
  expect(item).toMatchObject({ level: 'caution', text: expect.stringMatching(/^\d+ wrong sign-ins for Hazel Marrow from \d+ addresses$/), link: `/people/${owner.personId}` });
  // It is the owner's business, not the officer's.
  expect(await guessingOn(officer.agent)).toEqual([]);
  const [alarm, ...others] = await alarmsOf(organisation);
  expect(others).toEqual([]);
  expect(alarm?.addresses).toBeGreaterThanOrEqual(10);
  const { rows: queued } = await superuser.query(`SELECT 1 FROM pgboss.job WHERE name = 'mail-guessing' AND data->>'organisationId' = $1`, [organisation.id]);
  expect(queued).toHaveLength(1);

  const { mailAlarm } = guessAlarmsService(service.deps);
  for (let run = 0; run < 2; run += 1) await mailAlarm({ organisationId: organisation.id, alarmId: alarm?.id ?? '' });
  const folder = testEnvironment('TEST_MAIL_FOLDER');
  const mails = () => readdirSync(folder).filter((name) => name.endsWith('.eml')).map((name) => readFileSync(join(folder, name), 'utf8')).filter((mail) => mail.includes(owner.email));
  await until('the mail', async () => mails().length > 0, 30_000);
  expect(mails()).toHaveLength(1);
  expect(mails()[0]).toMatch(/^Subject: Kneeboard: somebody guesses at the password of Hazel Marrow/m);
  expect(mails()[0]).not.toContain(officer.email);
  expect(service.faults).toEqual([]);
});

it('the owner is told of guesses at somebody else’s account; whose it is sees it too, another organisation nothing', async () => {
  const [organisation, stranger] = [await makeOrganisation(service), await makeOrganisation(service)];
  const { owner, lead } = organisation;
  for (let address = 0; address < 10; address += 1) await signIn(pageAgent(service), lead.email, 'wrong password here');
  await until('both being told', async () => (await guessingOn(owner.agent)).length === 1 && (await guessingOn(lead.agent)).length === 1, 30_000);
  expect(await guessingOn(stranger.owner.agent)).toEqual([]);
});

describe('a machine that is known', () => {
  it('has its own few wrong tries: whoever sits there is slowed like anybody', async () => {
    const { owner } = await makeOrganisation(service);
    for (let tries = 0; tries < 6; tries += 1) expectProblem(await signIn(owner.agent, owner.email, `guess number ${tries}`), 401);
    expectProblem(await signIn(owner.agent, owner.email), 429);
    // And the owner, elsewhere, is not locked out by it.
    expect((await signIn(pageAgent(service), owner.email)).status).toBe(200);
  });

  it('is known for the account that signed in there, not for another; a cookie that was made up knows nobody', async () => {
    const { owner, lead } = await makeOrganisation(service);
    await guessUntilSlowed(owner.email);
    expectProblem(await signIn(lead.agent, owner.email), 429);
    for (const token of ['A'.repeat(65), `${'A'.repeat(65)}.${'B'.repeat(65)}`, 'x', '']) expectProblem(await signIn(pageAgent(service).set('Cookie', `kneeboard_machine=${token}`) as unknown as Agent, owner.email), 429);
    expect((await signIn(owner.agent, owner.email)).status).toBe(200);
  });

  it('remembers several accounts in one cookie that scripts and other sites do not get', async () => {
    const { owner, lead } = await makeOrganisation(service);
    const agent = pageAgent(service);
    const first = await signIn(agent, owner.email);
    expect(String(first.headers['set-cookie'])).toMatch(/kneeboard_machine=[\w-]{65};.*Path=\/api\/session;.*HttpOnly; SameSite=Strict/);
    await signIn(agent, lead.email);
    await guessUntilSlowed(owner.email);
    expect((await signIn(agent, owner.email)).status).toBe(200);
    expect((await signIn(agent, lead.email)).status).toBe(200);
  });
});
