import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { ok } from '#test/support/call';
import { makeOrganisation, pageAgent, type Organisation, type PublishedDay } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';
import { pinSetHash, type TestTablet } from '#test/support/tablet';

/** F27 where guesses come inside deliveries (somebody holds a tablet, or a copy of its cookie), or all at once. */
let service: Service;
beforeAll(async () => {
  service = await startService();
});
afterAll(() => service.stop());

interface Scene {
  organisation: Organisation;
  tablet: TestTablet;
  day: PublishedDay;
  lead: string;
  crew: string;
  second: string;
}
async function scene(): Promise<Scene> {
  const organisation = await makeOrganisation(service);
  const [crew, second] = [(await organisation.person('Marisol Tena')).id, (await organisation.person('Abe Kowalczyk')).id];
  const tablet = await organisation.tablet();
  const lead = organisation.lead.personId;
  await tablet.setPin(lead);
  return { organisation, tablet, crew, second, lead, day: await organisation.publishedDay({ crew: [crew, second] }) };
}
const witnessed = async (tablet: TestTablet, personId: string, witnessPersonId: string, guess: string) => {
  const { sealedPin, nonce } = await tablet.seal(guess, pinSetHash(personId));
  return tablet.pinSet(personId, '8642', { witnessPersonId, witnessSealedPin: sealedPin, witnessNonce: nonce });
};
const stateOf = async ({ tablet }: Scene, personId: string) => (await ok(tablet.agent, 'readTabletDay')).jobs[0]?.people.find(({ id }) => id === personId)?.state;

describe('guesses at a witness’s PIN', () => {
  it('pause after the free ones, within one delivery and over many: the right one then opens nothing', async () => {
    const { tablet, crew, lead } = await scene();
    const guesses = ['0000', '1111', '2222', '3333', '4444', '5555', '2468', '6666'];
    const envelopes = [];
    // One after the other: they are judged in the tablet's order.
    for (const guess of guesses) envelopes.push(await witnessed(tablet, crew, lead, guess));
    const { receipts } = await tablet.deliverAll(envelopes);
    expect(receipts.map(({ outcome }) => outcome)).toEqual(guesses.map(() => 'kept-aside'));
    expect(await tablet.deliver(await witnessed(tablet, crew, lead, '2468'))).toMatchObject({ outcome: 'kept-aside' });
  });

  it('count with those asked online, and the other way round', async () => {
    const { tablet, day, lead } = await scene();
    for (let guess = 0; guess < 6; guess += 1) await tablet.deliver(await tablet.signed(day.version, lead, { pin: '1111' }));
    const textSha256 = day.version.texts[0]?.sha256 ?? '';
    const asked = await tablet.agent.post('/api/tablet/pin-checks').send({ personId: lead, textSha256, ...(await tablet.seal('2468', textSha256)) });
    expect(asked.status).toBe(429);
  });

  it('all asked at the same moment are still only the free ones', async () => {
    const { tablet, day, lead } = await scene();
    const textSha256 = day.version.texts[0]?.sha256 ?? '';
    const seals = await Promise.all(Array.from({ length: 40 }, (_, at) => tablet.seal(String(1000 + at), textSha256)));
    const statuses = await Promise.all(seals.map(async (seal) => (await tablet.agent.post('/api/tablet/pin-checks').send({ personId: lead, textSha256, ...seal })).status));
    // Five free ones, and one more that starts the first pause.
    expect(statuses.filter((status) => status === 422).length).toBeLessThanOrEqual(7);
    expect(statuses.filter((status) => status === 429).length).toBeGreaterThanOrEqual(33);
  });

  it('do not hold up the person’s own PIN on another tablet', async () => {
    const { organisation, tablet, day, lead } = await scene();
    for (let guess = 0; guess < 6; guess += 1) await tablet.deliver(await tablet.signed(day.version, lead, { pin: '1111' }));
    expect(await tablet.deliver(await tablet.signed(day.version, lead))).toMatchObject({ outcome: 'second', pinState: 'not-confirmed' });
    const other = await organisation.tablet('Tablet 2');
    expect(await other.deliver(await other.signed(day.version, lead))).toMatchObject({ outcome: 'recorded', pinState: 'confirmed' });
  });
});

it('passwords tried all at the same moment are still only the free ones', async () => {
  const organisation = await makeOrganisation(service);
  const agent = pageAgent(service);
  const statuses = await Promise.all(Array.from({ length: 24 }, async (_, at) => (await agent.post('/api/session').send({ email: organisation.lead.email, password: `wrong guess number ${at}` })).status));
  expect(statuses.filter((status) => status === 401).length).toBeLessThanOrEqual(7);
  expect(statuses.filter((status) => status === 429).length).toBeGreaterThanOrEqual(17);
});

it('a PIN in an envelope that writes ids or names in another way is judged all the same', async () => {
  const own = await scene();
  const { tablet, day, lead } = own;
  const shouted = await tablet.signed(day.version, lead, { pin: '1111', personId: lead.toUpperCase() });
  expect(await tablet.deliver(shouted)).toMatchObject({ outcome: 'recorded', pinState: 'not-confirmed' });
  const { id, bytes } = await tablet.signed(day.version, lead, { pin: '1111' });
  expect(await tablet.deliver({ id, bytes: bytes.replace('"personId"', '"person\\u0049d"') })).toMatchObject({ outcome: 'second', pinState: 'not-confirmed' });
  expect(await stateOf(own, lead)).toBe('not-confirmed');
});

describe('a witness', () => {
  it('is somebody else, who has a PIN and showed it', async () => {
    const { tablet, crew, second, lead } = await scene();
    expect(await tablet.deliver(await witnessed(tablet, crew, second, '1357'))).toMatchObject({ outcome: 'kept-aside' });
    expect(await tablet.deliver(await witnessed(tablet, crew, crew, '8642'))).toMatchObject({ outcome: 'kept-aside' });
    expect(await tablet.deliver(await witnessed(tablet, crew, lead, '2468'))).toMatchObject({ outcome: 'recorded' });
  });
  it('sealed for one person witnesses nobody else: a seal copied from a tablet’s storage is of no use', async () => {
    const { tablet, crew, second, lead } = await scene();
    const { sealedPin, nonce } = await tablet.seal('2468', pinSetHash(crew));
    const copied = { witnessPersonId: lead, witnessSealedPin: sealedPin, witnessNonce: nonce };
    expect(await tablet.deliver(await tablet.pinSet(second, '1357', copied))).toMatchObject({ outcome: 'kept-aside' });
    expect(await tablet.deliver(await tablet.pinSet(crew, '8642', copied))).toMatchObject({ outcome: 'recorded' });
  });
});

describe('a signature whose PIN was wrong', () => {
  it('does not stand in the way of signing again with the right one; both are kept, the right one counts', async () => {
    const own = await scene();
    const { organisation, tablet, day, lead } = own;
    expect(await tablet.deliver(await tablet.signed(day.version, lead, { pin: '1111' }))).toMatchObject({ outcome: 'recorded', pinState: 'not-confirmed' });
    expect(await tablet.deliver(await tablet.signed(day.version, lead, { pin: '1112' }))).toMatchObject({ outcome: 'second', pinState: 'not-confirmed' });
    expect(await stateOf(own, lead)).toBe('not-confirmed');
    const right = await tablet.deliver(await tablet.signed(day.version, lead));
    expect(right).toMatchObject({ outcome: 'recorded', pinState: 'confirmed' });
    expect(await stateOf(own, lead)).toBe('signed');
    // And from here on one stands, as ever.
    expect(await tablet.deliver(await tablet.signed(day.version, lead))).toMatchObject({ outcome: 'second', acknowledgementId: right.acknowledgementId });
    expect(await tablet.deliver(await tablet.signed(day.version, lead, { pin: '1111' }))).toMatchObject({ outcome: 'second', acknowledgementId: right.acknowledgementId });
    const { items } = await ok(organisation.auditor.agent, 'listHistory');
    expect(items.map(({ pinState }) => pinState)).toEqual(['confirmed', 'not-confirmed']);
    expect(await ok(organisation.auditor.agent, 'checkRecord')).toMatchObject({ isGood: true });
  });
});
