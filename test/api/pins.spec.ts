import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { call, expectProblem, ok } from '#test/support/call';
import { makeOrganisation, type Organisation, type PublishedDay } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';
import { type TestTablet } from '#test/support/tablet';
import { entriesOf, verifyExport } from '#test/support/verify-log';

/** Who vouches for a PIN: a lead or officer with an own proven one, or the office with a start PIN. Source: practice.md and architecture.md, "PIN". */
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
}
async function scene(): Promise<Scene> {
  const organisation = await makeOrganisation(service);
  const crew = (await organisation.person('Marisol Tena')).id;
  return { organisation, crew, lead: organisation.lead.personId, day: await organisation.publishedDay({ crew: [crew] }), tablet: await organisation.tablet() };
}
const person = ({ organisation }: Scene, personId: string) => ok(organisation.auditor.agent, 'readPerson', { params: { personId } });
const events = async ({ organisation }: Scene, personId?: string) => (await ok(organisation.auditor.agent, 'listPinEvents', { query: personId ? { personId } : {} })).items;
const onTablet = async ({ tablet }: Scene, personId: string) => (await ok(tablet.agent, 'readTabletDay')).jobs[0]?.people.find(({ id }) => id === personId);
const startPin = async ({ organisation }: Scene, personId: string) => (await ok(organisation.officer.agent, 'giveStartPin', { params: { personId } })).pin;
const records = async ({ organisation }: Scene) => {
  const bytes = await ok(organisation.auditor.agent, 'exportRecord');
  expect(await verifyExport(bytes)).toMatchObject({ code: 0 });
  return { text: bytes.toString(), records: entriesOf(bytes).flatMap(({ leaf, record }) => ((JSON.parse(leaf) as { kind: string }).kind === 'pin' ? [record] : [])) };
};

describe('the first PIN on the first day', () => {
  it('is set with a start PIN from the office, then its owner witnesses the next, in one delivery from a tablet without signal', async () => {
    const own = await scene();
    const { organisation, tablet, day, lead, crew } = own;
    expect((await ok(tablet.agent, 'readTabletDay')).witnesses).toEqual([]);
    const given = await ok(organisation.officer.agent, 'giveStartPin', { params: { personId: lead } });
    expect(given).toMatchObject({ pin: expect.stringMatching(/^\d{8}$/), person: { hasPin: false, startPin: { givenBy: 'Ines Halloran' } } });
    const { receipts } = await tablet.deliverAll([
      await tablet.pinSet(lead, '2468', await tablet.started(lead, given.pin)),
      await tablet.pinSet(crew, '1357', await tablet.witnessedBy(lead, '2468', crew)),
      await tablet.signed(day.version, crew, { pin: '1357' }),
    ]);
    expect(receipts).toMatchObject([{ outcome: 'recorded' }, { outcome: 'recorded' }, { outcome: 'recorded', pinState: 'confirmed', isUnwitnessed: false }]);
    expect([await person(own, lead), await person(own, crew)]).toMatchObject([{ pinProof: 'office', startPin: null }, { pinProof: 'lead' }]);
    expect(await onTablet(own, crew)).toMatchObject({ state: 'signed', isPinProven: true, pinState: 'confirmed' });
    expect((await ok(tablet.agent, 'readTabletDay')).witnesses).toEqual([{ id: lead, name: 'Dov Lindqvist' }]);
    expect(await events(own)).toMatchObject([
      { event: 'set', personName: 'Marisol Tena', proof: 'lead', byName: 'Dov Lindqvist', tabletName: 'Tablet 1', capturedAt: expect.any(String) },
      { event: 'set', personName: 'Dov Lindqvist', proof: 'office', byName: 'Ines Halloran' },
      { event: 'start-pin-given', personName: 'Dov Lindqvist', proof: null, byName: 'Ines Halloran', tabletName: null },
    ]);
    const log = await records(own);
    expect(log.records).toMatchObject([
      { event: 'start-pin-given', personId: lead, byPersonId: organisation.officer.personId },
      { event: 'set', personId: lead, proof: 'office', tabletId: tablet.id },
      { event: 'set', personId: crew, proof: 'lead', byPersonId: lead, tabletId: tablet.id, at: expect.any(String) },
    ]);
    // Never the PIN, nor the start PIN.
    expect(JSON.stringify(log.records)).not.toMatch(new RegExp(`"(?:2468|1357|${given.pin})"`));
    expect(await ok(organisation.auditor.agent, 'checkRecord')).toMatchObject({ isGood: true });
  });

  it('is not set by a start PIN that is wrong, used, replaced, another person’s or fifteen days old; what was sent is kept', async () => {
    const own = await scene();
    const { tablet, lead, crew } = own;
    const [first, second] = [await startPin(own, lead), await startPin(own, lead)];
    const set = async (personId: string, start: string) => tablet.deliver(await tablet.pinSet(personId, '2468', await tablet.started(personId, start)));
    expect(await set(lead, first)).toMatchObject({ outcome: 'kept-aside', note: expect.stringContaining('not the one the office gave') });
    expect(await set(crew, second)).toMatchObject({ outcome: 'kept-aside', note: expect.stringContaining('not good any more') });
    service.clock.offsetMs = 15 * 24 * 3600_000;
    try {
      expect(await set(lead, second)).toMatchObject({ outcome: 'kept-aside', note: expect.stringContaining('not good any more') });
    } finally {
      service.clock.offsetMs = 0;
    }
    expect(await set(lead, second)).toMatchObject({ outcome: 'recorded' });
    const third = await ok(own.organisation.officer.agent, 'resetPin', { params: { personId: lead } });
    expect(third).toMatchObject({ hasPin: false });
    expect(await set(lead, second)).toMatchObject({ outcome: 'kept-aside' });
    expect((await events(own, lead)).map(({ event }) => event)).toEqual(['reset', 'set', 'start-pin-given', 'start-pin-given']);
  });

  it('guesses at a start PIN pause over all tablets together (F27)', async () => {
    const own = await scene();
    const { organisation, tablet, lead } = own;
    const right = await startPin(own, lead);
    const wrong = right === '00000000' ? '00000001' : '00000000';
    const tablets = [tablet, await organisation.tablet('Tablet 2')];
    for (let guess = 0; guess < 6; guess += 1) {
      const by = tablets[guess % 2] as TestTablet;
      expect(await by.deliver(await by.pinSet(lead, '2468', await by.started(lead, wrong)))).toMatchObject({ outcome: 'kept-aside' });
    }
    expect(await tablet.deliver(await tablet.pinSet(lead, '2468', await tablet.started(lead, right)))).toMatchObject({ outcome: 'kept-aside' });
    const { startSealedPin, startNonce } = (await tablet.started(lead, right)) as { startSealedPin: string; startNonce: string };
    expectProblem(await call(tablet.agent, 'checkPin', { body: { kind: 'start-pin', personId: lead, textSha256: 'a'.repeat(64), sealedPin: startSealedPin, nonce: startNonce } }), 429);
    expect(await person(own, lead)).toMatchObject({ hasPin: false });
  });

  it('a start PIN is the office’s to give: not by leads or auditors, not for who has a PIN, not for another organisation’s people', async () => {
    const own = await scene();
    const { organisation, tablet, lead, crew } = own;
    for (const { agent } of [organisation.lead, organisation.auditor]) expectProblem(await call(agent, 'giveStartPin', { params: { personId: crew } }), 403);
    await tablet.setPin(lead);
    expectProblem(await call(organisation.owner.agent, 'giveStartPin', { params: { personId: lead } }), 422);
    const stranger = await scene();
    expectProblem(await call(stranger.organisation.owner.agent, 'giveStartPin', { params: { personId: crew } }), 404);
    expect(await events(stranger, crew)).toEqual([]);
  });
});

describe('a PIN that nobody witnessed', () => {
  it('is kept (an older app sends such), marked, and proves no signature until it is set again before a witness', async () => {
    const own = await scene();
    const { organisation, tablet, day, lead, crew } = own;
    await tablet.setPin(lead);
    expect(await tablet.deliver(await tablet.pinSet(crew, '1357'))).toMatchObject({ outcome: 'recorded' });
    const first = await tablet.deliver(await tablet.signed(day.version, crew, { pin: '1357' }));
    expect(first).toMatchObject({ outcome: 'recorded', pinState: 'not-confirmed', isUnwitnessed: true });
    expect(await person(own, crew)).toMatchObject({ hasPin: true, pinProof: 'none' });
    expect(await onTablet(own, crew)).toMatchObject({ state: 'not-confirmed', hasPin: true, isPinProven: false, pinState: 'unwitnessed' });
    const shift = await ok(organisation.lead.agent, 'readShift', { params: { shiftId: day.shift.id } });
    expect(shift.versions[0]?.asked.find(({ personId }) => personId === crew)).toMatchObject({ state: 'not-confirmed', pinState: 'unwitnessed' });
    expect((await ok(organisation.officer.agent, 'readToday')).items.find(({ id }) => id === `sign-${day.shift.id}`)?.detail).toMatch('Marisol Tena (PIN set without witness)');
    // It witnesses nothing either, and gives way to no other that nobody vouched for.
    expect(await tablet.deliver(await tablet.pinSet(crew, '8888'))).toMatchObject({ outcome: 'kept-aside' });
    // Whoever set it: the person sets an own one before the lead, and what they sign now counts. Both signatures are kept.
    expect(await tablet.deliver(await tablet.pinSet(crew, '9753', await tablet.witnessedBy(lead, '2468', crew)))).toMatchObject({ outcome: 'recorded' });
    expect(await tablet.deliver(await tablet.signed(day.version, crew, { pin: '1357' }))).toMatchObject({ outcome: 'second', pinState: 'not-confirmed', isUnwitnessed: true });
    const right = await tablet.deliver(await tablet.signed(day.version, crew, { pin: '9753' }));
    expect(right).toMatchObject({ outcome: 'recorded', pinState: 'confirmed' });
    expect(await onTablet(own, crew)).toMatchObject({ state: 'signed' });
    expect((await ok(organisation.auditor.agent, 'listHistory')).items.map(({ pinState }) => pinState)).toEqual(['confirmed', 'unwitnessed']);
    expect((await ok(organisation.auditor.agent, 'exportHistory')).toString()).toMatch(/,unwitnessed,/);
    expect(await tablet.deliver(await tablet.pinSet(crew, '1111', await tablet.witnessedBy(lead, '2468', crew)))).toMatchObject({ outcome: 'kept-aside', note: expect.stringContaining('has a PIN already') });
  });

  it('witnesses only what is marked as well: doubt is handed on, not lost', async () => {
    const own = await scene();
    const { tablet, lead, crew } = own;
    await tablet.deliver(await tablet.pinSet(lead, '2468'));
    expect(await tablet.deliver(await tablet.pinSet(crew, '1357', await tablet.witnessedBy(lead, '2468', crew)))).toMatchObject({ outcome: 'recorded' });
    expect(await person(own, crew)).toMatchObject({ pinProof: 'none' });
    expect(await events(own, crew)).toMatchObject([{ event: 'set', proof: 'none', byName: 'Dov Lindqvist' }]);
  });
});

it('a witness is a lead or an officer: a crew member’s own right PIN witnesses nobody', async () => {
  const own = await scene();
  const { organisation, tablet, crew } = own;
  const other = (await organisation.person('Abe Kowalczyk')).id;
  await tablet.setPin(crew, '1357');
  expect(await tablet.deliver(await tablet.pinSet(other, '2468', await tablet.witnessedBy(crew, '1357', other)))).toMatchObject({ outcome: 'kept-aside', note: expect.stringContaining('neither a lead nor an officer') });
  // The officer on a visit is one, without being asked to sign anything.
  await tablet.setPin(organisation.officer.personId, '8642');
  expect((await ok(tablet.agent, 'readTabletDay')).witnesses).toEqual([{ id: organisation.officer.personId, name: 'Ines Halloran' }]);
  expect(await tablet.deliver(await tablet.pinSet(other, '2468', await tablet.witnessedBy(organisation.officer.personId, '8642', other)))).toMatchObject({ outcome: 'recorded' });
  expect(await person(own, other)).toMatchObject({ pinProof: 'lead' });
});

it('a witness’s seal serves once: copied from the tablet’s storage it vouches for no other PIN of the same person', async () => {
  const own = await scene();
  const { organisation, tablet, lead, crew } = own;
  await tablet.setPin(lead);
  const witnessed = await tablet.witnessedBy(lead, '2468', crew);
  expect(await tablet.deliver(await tablet.pinSet(crew, '1357', witnessed))).toMatchObject({ outcome: 'recorded' });
  await ok(organisation.officer.agent, 'resetPin', { params: { personId: crew } });
  expect(await tablet.deliver(await tablet.pinSet(crew, '6666', witnessed))).toMatchObject({ outcome: 'kept-aside', note: expect.stringContaining('not the witness') });
  expect(await person(own, crew)).toMatchObject({ hasPin: false });
  expect(await tablet.deliver(await tablet.pinSet(crew, '1357', await tablet.witnessedBy(lead, '2468', crew)))).toMatchObject({ outcome: 'recorded' });
});

it('a signature without any PIN is kept, marked "no PIN", and does not count; signing again with a PIN does', async () => {
  const own = await scene();
  const { tablet, day, crew } = own;
  expect(await tablet.deliver(await tablet.signed(day.version, crew))).toMatchObject({ outcome: 'recorded', pinState: 'not-set' });
  expect(await onTablet(own, crew)).toMatchObject({ state: 'not-confirmed', pinState: 'not-set' });
  await tablet.setPin(crew);
  expect(await tablet.deliver(await tablet.signed(day.version, crew))).toMatchObject({ outcome: 'recorded', pinState: 'confirmed' });
  expect(await onTablet(own, crew)).toMatchObject({ state: 'signed' });
});

it('nothing here was a fault of the service', () => expect(service.faults).toEqual([]));
