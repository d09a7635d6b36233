import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { v7 as newId } from 'uuid';
import { type Role } from '#shared/common';
import { call, expectProblem, ok, type Agent } from '#test/support/call';
import { editOf } from '#test/support/edits';
import { makeOrganisation, pageAgent, testPassword, type Organisation, type SignedIn } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';

let service: Service;
beforeAll(async () => {
  service = await startService();
});
afterAll(() => service.stop());

const cookieOf = (agent: Agent): string => agent.jar.getCookie('kneeboard_session', { path: '/', domain: '127.0.0.1', secure: false, script: false })?.value ?? '';
const withCookie = (cookie: string): Agent => pageAgent(service).set('Cookie', `kneeboard_session=${cookie}`) as unknown as Agent;
const signIn = (agent: Agent, email: string, password = testPassword) => call(agent, 'signIn', { body: { email, password } });
const setRole = (organisation: Organisation, person: SignedIn, role: Role) => ok(organisation.owner.agent, 'setLogin', { params: { personId: person.personId }, body: { login: { email: person.email, role } } });

describe('signing in', () => {
  it('says who one is, in a cookie that scripts and other sites do not get', async () => {
    const { lead, id } = await makeOrganisation(service);
    const response = await signIn(pageAgent(service), lead.email.toUpperCase());
    expect(response.body).toEqual({ person: { id: lead.personId, name: 'Dov Lindqvist' }, role: 'crew-lead', organisation: { id, name: 'Marrow & Slate Floors' }, units: {} });
    expect(String(response.headers['set-cookie'])).toMatch(/(?:^|,)kneeboard_session=[^,]*,[^,]*HttpOnly; SameSite=Lax/);
    expect(String(response.headers['set-cookie'])).not.toMatch(/Domain=/);
  });

  it('gives the session a new id: one planted before is worth nothing', async () => {
    const { lead, auditor } = await makeOrganisation(service);
    const agent = pageAgent(service);
    await signIn(agent, lead.email);
    const first = cookieOf(agent);
    await signIn(agent, auditor.email);
    expect(cookieOf(agent)).not.toBe(first);
    expectProblem(await call(withCookie(first), 'readSession'), 401);
    expect(await ok(agent, 'readSession')).toMatchObject({ role: 'auditor' });
  });

  it('tells a wrong password and an address that nobody has by the same words, and no session', async () => {
    const { lead } = await makeOrganisation(service);
    const agent = pageAgent(service);
    const answers = [await signIn(agent, lead.email, 'wrong password here'), await signIn(agent, `${newId()}@marrowslate.example`, 'wrong password here')];
    const [known, unknown] = answers.map((answer) => expectProblem(answer, 401));
    expect(known).toEqual(unknown);
    expectProblem(await call(agent, 'readSession'), 401);
  });

  it('is slowed after five wrong tries from one address; the honest go on from theirs, and guessing elsewhere goes on being counted (F27)', async () => {
    const { lead, auditor } = await makeOrganisation(service);
    const guesser = pageAgent(service);
    for (let tries = 0; tries < 6; tries += 1) expectProblem(await signIn(guesser, lead.email, `guess number ${tries}`), 401);
    const slowed = await signIn(guesser, lead.email);
    expect(expectProblem(slowed, 429)['retryAfterSeconds']).toBe(Number(slowed.headers['retry-after']));
    expect(Number(slowed.headers['retry-after'])).toBeGreaterThan(0);
    // Its owner, elsewhere, is not locked out; another account from the same address is not either, yet.
    expect((await signIn(pageAgent(service), lead.email)).status).toBe(200);
    expect((await signIn(guesser, auditor.email)).status).toBe(200);
  });

  it('of many accounts from one address is slowed as a whole (F27)', async () => {
    const { lead } = await makeOrganisation(service);
    const guesser = pageAgent(service);
    for (let tries = 0; tries < 31; tries += 1) expectProblem(await signIn(guesser, `${newId()}@marrowslate.example`, 'wrong password here'), 401);
    expectProblem(await signIn(guesser, lead.email), 429);
  });
});

describe('the unit a person types in', () => {
  it('is the same on another machine, each quantity for itself; nobody else has it, and the person’s page does not change by it', async () => {
    const { lead, officer, auditor } = await makeOrganisation(service);
    const before = await ok(officer.agent, 'readPerson', { params: { personId: lead.personId } });
    expect((await ok(lead.agent, 'readSession')).units).toEqual({});
    await Promise.all([ok(lead.agent, 'keepUnit', { body: { quantity: 'thickness', unit: 'mm' } }), ok(lead.agent, 'keepUnit', { body: { quantity: 'area', unit: 'm2' } })]);
    await ok(lead.agent, 'keepUnit', { body: { quantity: 'area', unit: 'ft2' } });
    const elsewhere = await signIn(pageAgent(service), lead.email);
    expect(elsewhere.body).toMatchObject({ units: { thickness: 'mm', area: 'ft2' } });
    expect((await ok(auditor.agent, 'readSession')).units).toEqual({});
    expect(await ok(officer.agent, 'readPerson', { params: { personId: lead.personId } })).toEqual(before);
  });

  it('is a word, and there are not endless quantities', async () => {
    const { lead } = await makeOrganisation(service);
    for (const body of [{ quantity: 'area', unit: '<b>' }, { quantity: 'x'.repeat(50), unit: 'm' }, { quantity: 'area' }]) expectProblem(await call(lead.agent, 'keepUnit', { body }), 400);
    for (let at = 0; at < 45; at += 1) await ok(lead.agent, 'keepUnit', { body: { quantity: `quantity-${at}`, unit: 'm' } });
    expect(Object.keys((await ok(lead.agent, 'readSession')).units)).toHaveLength(40);
  });
});

describe('a session ends on the server', () => {
  it('at sign-out: the same cookie opens nothing afterwards', async () => {
    const { lead } = await makeOrganisation(service);
    const cookie = cookieOf(lead.agent);
    await ok(withCookie(cookie), 'readSession');
    await ok(lead.agent, 'signOut');
    expectProblem(await call(withCookie(cookie), 'readSession'), 401);
  });

  it('at a password change: all others of this person, and the old password; the one that changed it goes on under a new id', async () => {
    const { lead, auditor } = await makeOrganisation(service);
    const elsewhere = pageAgent(service);
    await signIn(elsewhere, lead.email);
    const before = cookieOf(lead.agent);
    await ok(lead.agent, 'changePassword', { body: { current: testPassword, next: 'quarry lantern 40 mortar' } });
    expectProblem(await call(elsewhere, 'readSession'), 401);
    expectProblem(await call(withCookie(before), 'readSession'), 401);
    expect(await ok(lead.agent, 'readSession')).toMatchObject({ role: 'crew-lead' });
    expectProblem(await signIn(pageAgent(service), lead.email), 401);
    expect((await signIn(pageAgent(service), lead.email, 'quarry lantern 40 mortar')).status).toBe(200);
    expect(await ok(auditor.agent, 'readSession')).toMatchObject({ role: 'auditor' });
  });

  it('refuses the change with a wrong present password, a common one, one with the own name, or a short one, and ends nothing', async () => {
    const { lead } = await makeOrganisation(service);
    for (const [current, next, path] of [['not the present one', 'quarry lantern 40 mortar', 'current'], [testPassword, 'password1234', 'next'], [testPassword, 'lindqvist1234', 'next'], [testPassword, 'aaaaaaaaaaaaaaaa', 'next'], [testPassword, 'short', 'next']] as const)
      expect(expectProblem(await call(lead.agent, 'changePassword', { body: { current, next } }), 400).errors).toMatchObject([{ path }]);
    await ok(lead.agent, 'readSession');
    expect((await signIn(pageAgent(service), lead.email)).status).toBe(200);
  });

  it('when the person is no longer active, at the very next request (F24)', async () => {
    const { owner, lead } = await makeOrganisation(service);
    const person = await ok(owner.agent, 'readPerson', { params: { personId: lead.personId } });
    const edited = await ok(owner.agent, 'editPerson', { params: { personId: lead.personId }, version: person.version, body: { ...editOf(person), isActive: false } });
    expect(edited).toMatchObject({ isActive: false, login: null });
    expectProblem(await call(lead.agent, 'readSession'), 401);
    expectProblem(await signIn(pageAgent(service), lead.email), 401);
  });

  it('when the sign-in is taken away or gets a new password (F24)', async () => {
    const { owner, lead, auditor } = await makeOrganisation(service);
    await ok(owner.agent, 'setLogin', { params: { personId: lead.personId }, body: { login: null } });
    expectProblem(await call(lead.agent, 'readSession'), 401);
    await ok(owner.agent, 'setLogin', { params: { personId: auditor.personId }, body: { login: { email: auditor.email, role: 'auditor', password: 'quarry lantern 40 mortar' } } });
    expectProblem(await call(auditor.agent, 'readSession'), 401);
    expectProblem(await signIn(pageAgent(service), auditor.email), 401);
  });
});

it('a role that is lowered holds from the next request on (F24)', async () => {
  const organisation = await makeOrganisation(service);
  const second = await organisation.signIn('Junie Okafor', 'safety-officer');
  await ok(second.agent, 'addProduct', { body: { name: 'Primer', supplier: 'Northlode Resins, Inc.' } });
  await setRole(organisation, second, 'auditor');
  const refused = await call(second.agent, 'addProduct', { body: { name: 'Degreaser', supplier: 'Northlode Resins, Inc.' } });
  expect([401, 403]).toContain(refused.status);
  expect((await ok(organisation.officer.agent, 'listProducts')).items.map(({ name }) => name)).toEqual(['Primer']);
  const again = pageAgent(service);
  await signIn(again, second.email);
  expectProblem(await call(again, 'addProduct', { body: { name: 'Degreaser', supplier: 'Northlode Resins, Inc.' } }), 403);
});

it('an owner cannot lock themselves out, nor give two people one address', async () => {
  const { owner, lead } = await makeOrganisation(service);
  const login = (personId: string, to: unknown) => call(owner.agent, 'setLogin', { params: { personId }, body: { login: to } });
  expectProblem(await login(owner.personId, null), 422);
  expectProblem(await login(owner.personId, { email: owner.email, role: 'auditor' }), 422);
  expect(expectProblem(await login(lead.personId, { email: owner.email, role: 'crew-lead' }), 400).errors).toMatchObject([{ path: 'login.email' }]);
  const other = await makeOrganisation(service);
  expect(expectProblem(await login(lead.personId, { email: other.owner.email, role: 'owner' }), 400).errors).toMatchObject([{ path: 'login.email' }]);
  await ok(other.owner.agent, 'readSession');
});

it('nothing here was a fault of the service', () => expect(service.faults).toEqual([]));
