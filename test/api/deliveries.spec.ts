import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { v7 as newId } from 'uuid';
import { type ChecklistText } from '#compliance';
import { call, expectProblem, ok } from '#test/support/call';
import { makeOrganisation, type Organisation, type PublishedDay } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';
import { pinSetHash, type TestTablet } from '#test/support/tablet';
import { entriesOf, verifyExport } from '#test/support/verify-log';

/** From a tablet's outbox to the history: what is stored, what it becomes, what is asked of whom. Names of faults: quality.md. */
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
  const crew = (await organisation.person('Marisol Tena', { language: 'es' })).id;
  return { organisation, crew, lead: organisation.lead.personId, day: await organisation.publishedDay({ crew: [crew] }), tablet: await organisation.tablet() };
}
const history = async ({ organisation }: Scene) => (await ok(organisation.auditor.agent, 'listHistory')).items;
const keptAside = async ({ organisation }: Scene) => (await ok(organisation.officer.agent, 'listKeptAside')).items;
const actions = async ({ organisation }: Scene) => (await ok(organisation.officer.agent, 'listActions')).items;
const textOf = async ({ organisation, day }: Scene, language = 'en'): Promise<ChecklistText> => JSON.parse((await ok(organisation.auditor.agent, 'readText', { params: { versionId: day.version.id, language } })).toString()) as ChecklistText;
const allYes = (lines: readonly { id: string }[], noTo: readonly string[] = []) => lines.map(({ id }) => ({ lineId: id, answer: noTo.includes(id) ? ('no' as const) : ('yes' as const), note: null }));
const logOf = async ({ organisation }: Scene) => {
  const bytes = await ok(organisation.auditor.agent, 'exportRecord');
  expect(await verifyExport(bytes)).toMatchObject({ code: 0 });
  return entriesOf(bytes);
};

describe('a signature', () => {
  it('[REC-03] is recorded once, with its PIN, its text, its times, one log entry, and is seen by nobody else', async () => {
    const own = await scene();
    const { tablet, day, crew, organisation } = own;
    await tablet.setPin(crew);
    const before = (await logOf(own)).length;
    const envelope = await tablet.signed(day.version, crew);
    const receipt = await tablet.deliver(envelope);
    expect(receipt).toMatchObject({ id: envelope.id, outcome: 'recorded', pinState: 'confirmed', isSuperseded: false, entryIndex: before });

    const [row, ...more] = await history(own);
    expect(more).toEqual([]);
    expect(row).toMatchObject({ id: receipt.acknowledgementId, personId: crew, personName: 'Marisol Tena', jobName: day.job.name, shiftDate: day.shift.date, versionNumber: 1, language: 'es', kind: 'signed', pinState: 'confirmed', wasSuperseded: false, tabletName: 'Tablet 1' });
    const full = await ok(organisation.auditor.agent, 'readAcknowledgement', { params: { acknowledgementId: row?.id ?? '' } });
    expect(full).toMatchObject({ textSha256: day.version.texts.find(({ language }) => language === 'es')?.sha256, sentence: (await textOf(own, 'es')).sentence, strokes: JSON.parse(envelope.bytes).strokes });
    const log = await logOf(own);
    expect(log.slice(before).map(({ record }) => record)).toMatchObject([{ deliveryId: envelope.id, personId: crew, kind: 'signed', textSha256: full.textSha256 }]);
    const shift = await ok(organisation.lead.agent, 'readShift', { params: { shiftId: day.shift.id } });
    expect(shift.versions[0]?.asked.find(({ personId }) => personId === crew)).toMatchObject({ state: 'signed', at: row?.capturedAt });
    const today = await ok(tablet.agent, 'readTabletDay');
    expect(today.jobs[0]?.people.find(({ id }) => id === crew)).toMatchObject({ state: 'signed', hasPin: true });

    const stranger = await scene();
    expect(await history(stranger)).toEqual([]);
    expectProblem(await call(stranger.organisation.auditor.agent, 'readAcknowledgement', { params: { acknowledgementId: row?.id ?? '' } }), 404);
    // A foreign tablet that sends the very same bytes makes nothing of them.
    expect(await stranger.tablet.deliver(envelope)).toMatchObject({ outcome: 'kept-aside', acknowledgementId: null });
    expect(await history(own)).toHaveLength(1);
  });

  it('sent again is a duplicate of the first, however often and in whatever company (F09)', async () => {
    const own = await scene();
    const { tablet, day, lead, crew } = own;
    const [first, second] = [await tablet.signed(day.version, lead), await tablet.signed(day.version, crew)];
    const recorded = await tablet.deliver(first);
    const again = await Promise.all([tablet.deliver(first), tablet.deliverAll([first, second, first]), tablet.deliver(first)]);
    expect([again[0], again[2]]).toEqual([{ ...recorded, outcome: 'duplicate' }, { ...recorded, outcome: 'duplicate' }]);
    expect(again[1].receipts.map(({ id, outcome }) => [id, outcome])).toEqual([[first.id, 'duplicate'], [second.id, 'recorded']]);
    expect(await history(own)).toHaveLength(2);
  });

  it('sent by several connections at once stands once (F09)', async () => {
    const own = await scene();
    const envelope = await own.tablet.signed(own.day.version, own.lead);
    const receipts = await Promise.all(Array.from({ length: 8 }, () => own.tablet.deliver(envelope)));
    expect(receipts.filter(({ outcome }) => outcome === 'recorded')).toHaveLength(1);
    expect(new Set(receipts.map(({ acknowledgementId }) => acknowledgementId)).size).toBe(1);
    expect(await history(own)).toHaveLength(1);
    expect((await logOf(own)).filter(({ record }) => record?.['deliveryId'] === envelope.id)).toHaveLength(1);
  });

  it('keeps the order of the tablet within what arrives together, and both times of what arrives late (F09)', async () => {
    const own = await scene();
    const { tablet, day, lead, crew } = own;
    const captured = new Date(Date.now() - 3 * 3600_000).toISOString();
    const [first, second] = [await tablet.signed(day.version, lead, { capturedAt: captured }), await tablet.signed(day.version, crew, { capturedAt: captured })];
    const { receivedAt } = await tablet.deliverAll([second, first]);
    const rows = (await history(own)).reverse();
    expect(rows.map(({ personId }) => personId)).toEqual([lead, crew]);
    for (const row of rows) expect(row).toMatchObject({ capturedAt: captured, receivedAt });
  });

  it.each([['two days ahead', 2], ['two days behind', -2]])('from a tablet whose clock is %s is kept with the difference; the log keeps its own order (F10)', async (_, days) => {
    const own = await scene();
    const { tablet, day, lead, crew, organisation } = own;
    const wrong = new Date(Date.now() + days * 24 * 3600_000);
    const receipt = (await tablet.deliverAll([await tablet.signed(day.version, lead, { capturedAt: wrong.toISOString() })], wrong)).receipts[0];
    await tablet.deliver(await tablet.signed(day.version, crew));
    expect((await history(own)).map(({ personId }) => personId)).toEqual([crew, lead]);
    const { clockOffsetSeconds, capturedAt } = await ok(organisation.auditor.agent, 'readAcknowledgement', { params: { acknowledgementId: receipt?.acknowledgementId ?? '' } });
    expect(Math.abs((clockOffsetSeconds ?? 0) - days * 86_400)).toBeLessThan(60);
    expect(capturedAt).toBe(wrong.toISOString());
    const times = (await logOf(own)).map(({ leaf }) => (JSON.parse(leaf) as { recordedAt: string }).recordedAt);
    expect(times).toEqual([...times].sort());
  });

  it('made on two tablets stands once; the second is kept beside it and says so (F11)', async () => {
    const own = await scene();
    const { organisation, tablet, day, lead } = own;
    const second = await organisation.tablet('Tablet 2');
    const [a, b] = await Promise.all([tablet.signed(day.version, lead).then((envelope) => tablet.deliver(envelope)), second.signed(day.version, lead).then((envelope) => second.deliver(envelope))]);
    expect([a.outcome, b.outcome].sort()).toEqual(['recorded', 'second']);
    expect(a.acknowledgementId).toBe(b.acknowledgementId);
    const [kept] = [a, b].filter(({ outcome }) => outcome === 'second');
    expect(kept?.note).toMatch(/Dov Lindqvist had signed this version already/);
    expect(await history(own)).toHaveLength(1);
  });

  it('of a version that was replaced meanwhile is kept as what was signed, marked, and a new one is asked (F12)', async () => {
    const own = await scene();
    const { organisation, tablet, day, lead } = own;
    const offline = await tablet.signed(day.version, lead);
    const next = await organisation.publishAgain(day, 'Ammonia drill today: muster at the flag pole.');
    expect(next.number).toBe(2);
    expect(await tablet.deliver(offline)).toMatchObject({ outcome: 'recorded', isSuperseded: true });
    expect(await history(own)).toMatchObject([{ versionNumber: 1, wasSuperseded: true }]);
    expect((await ok(tablet.agent, 'readTabletDay')).jobs[0]).toMatchObject({ version: { number: 2 }, people: expect.arrayContaining([expect.objectContaining({ id: lead, state: 'not-yet' })]) });
    expect(await tablet.deliver(await tablet.signed(next, lead))).toMatchObject({ outcome: 'recorded', isSuperseded: false });
    expect((await history(own)).map(({ versionNumber }) => versionNumber)).toEqual([2, 1]);
  });
});

describe('a delivery that is not understood', () => {
  it('is stored, acknowledged, kept aside and shown to the officer; the others beside it are recorded (F13)', async () => {
    const own = await scene();
    const { tablet, day, lead, crew, organisation } = own;
    const version = day.version;
    const strange = [
      { id: newId(), bytes: '{"format":"kneeboard-envelope/1","id":"' },
      tablet.envelope('dance', {}),
      tablet.envelope('signed', { format: 'kneeboard-envelope/9' }),
      await tablet.signed(version, newId()),
      await tablet.signed({ ...version, id: newId() }, lead),
      await tablet.signed(version, lead, { textSha256: 'a'.repeat(64) }),
      await tablet.signed(version, lead, { strokes: [] }),
      await tablet.signed(version, organisation.officer.personId),
      { ...(await tablet.signed(version, lead)), id: newId() },
      tablet.couldNotSign(version, crew, { note: 'half \u0000 a note' }),
      await tablet.briefing(version, lead, [{ lineId: 'no-such-line', answer: 'yes', note: null }]),
      await tablet.startCheck(version, lead, newId(), [{ lineId: 'x', answer: 'yes', note: null }]),
    ];
    const good = await tablet.signed(version, lead);
    const { receipts } = await tablet.deliverAll([...strange, good]);
    expect(receipts.map(({ id, outcome }) => [id, outcome])).toEqual([...strange.map(({ id }) => [id, 'kept-aside']), [good.id, 'recorded']]);
    for (const { outcome, note, acknowledgementId } of receipts) if (outcome === 'kept-aside') expect([typeof note, acknowledgementId]).toEqual(['string', null]);
    expect((await keptAside(own)).map(({ id }) => id).sort()).toEqual(strange.map(({ id }) => id).sort());
    expect((await history(own)).map(({ personId }) => personId)).toEqual([lead]);
    expect((await ok(organisation.officer.agent, 'readToday')).items.find(({ id }) => id === 'kept-aside')?.text).toMatch(`${strange.length} deliveries`);
    // Sent again, it is known and still nothing else.
    expect((await tablet.deliverAll(strange.slice(0, 2))).receipts.map(({ outcome }) => outcome)).toEqual(['duplicate', 'duplicate']);
    service.faults.splice(0);
  });

  it('keeps what a newer app wrote besides: unknown fields are tolerated (F13)', async () => {
    const own = await scene();
    const envelope = await own.tablet.signed(own.day.version, own.lead, { mood: 'fine', more: { deep: [1] } });
    expect(await own.tablet.deliver(envelope)).toMatchObject({ outcome: 'recorded' });
  });

  it('keeps both when one number comes with two contents', async () => {
    const own = await scene();
    const first = await own.tablet.signed(own.day.version, own.lead);
    await own.tablet.deliver(first);
    expect(await own.tablet.deliver({ ...first, bytes: first.bytes.replace('"sequence":1', '"sequence":99') })).toMatchObject({ id: first.id, outcome: 'kept-aside' });
    expect(await keptAside(own)).toHaveLength(1);
    expect(await history(own)).toHaveLength(1);
  });
});

describe("a briefing's and a start check's \"No\"", () => {
  it('on a live line of a task stops it until the action is resolved with evidence', async () => {
    const own = await scene();
    const { organisation, tablet, day, lead } = own;
    await tablet.setPin(lead);
    const task = (await textOf(own)).tasks.find(({ taskId }) => taskId === day.grindingTaskId);
    const critical = task?.live.find(({ isCritical }) => isCritical);
    await tablet.deliver(await tablet.startCheck(day.version, lead, day.grindingTaskId, allYes(task?.live ?? [], [critical?.id ?? ''])));
    const [action] = await actions(own);
    expect(action).toMatchObject({ taskId: day.grindingTaskId, taskName: 'Floor grinding', openedBy: 'Dov Lindqvist', resolvedAt: null, text: expect.stringContaining(critical?.text ?? 'no line') });
    const stopped = await ok(organisation.lead.agent, 'readShift', { params: { shiftId: day.shift.id } });
    expect(stopped.context.failedControls).toEqual({ [day.grindingTaskId]: action?.text });
    expect((await ok(tablet.agent, 'readTabletDay')).jobs[0]).toMatchObject({ stopped: [{ taskId: day.grindingTaskId, actionId: action?.id }], startedTaskIds: [] });

    const params = { actionId: action?.id ?? '' };
    expectProblem(await call(organisation.lead.agent, 'resolveAction', { params, version: action?.version, body: { evidence: 'ok' } }), 400);
    const assigned = await ok(organisation.officer.agent, 'assignAction', { params, version: action?.version, body: { ownerPersonId: lead } });
    expect(expectProblem(await call(organisation.lead.agent, 'resolveAction', { params, version: action?.version, body: { evidence: 'Hose clamped again; gauge above its mark.' } }), 412).current).toMatchObject({ ownerName: 'Dov Lindqvist' });
    const resolved = await ok(organisation.lead.agent, 'resolveAction', { params, version: assigned.version, body: { evidence: 'Hose clamped again; gauge above its mark.' } });
    expect(resolved).toMatchObject({ resolvedBy: 'Dov Lindqvist', evidence: 'Hose clamped again; gauge above its mark.' });
    expectProblem(await call(organisation.officer.agent, 'resolveAction', { params, version: resolved.version, body: { evidence: 'Hose clamped once more.' } }), 422);
    expect((await ok(organisation.lead.agent, 'readShift', { params: { shiftId: day.shift.id } })).context.failedControls).toEqual({});
    await tablet.deliver(await tablet.startCheck(day.version, lead, day.grindingTaskId, allYes(task?.live ?? [])));
    expect((await ok(tablet.agent, 'readTabletDay')).jobs[0]).toMatchObject({ stopped: [], startedTaskIds: [day.grindingTaskId] });
    expect((await logOf(own)).map(({ record }) => record?.['event']).filter(Boolean)).toEqual(['start-pin-given', 'set', 'opened', 'resolved']);
    const stranger = await scene();
    expectProblem(await call(stranger.organisation.officer.agent, 'resolveAction', { params, version: resolved.version, body: { evidence: 'From elsewhere.' } }), 404);
  });

  it('on a critical morning line opens an action; one on a plain line is only recorded', async () => {
    const own = await scene();
    const { tablet, day, lead } = own;
    await tablet.setPin(lead);
    const { morning } = await textOf(own);
    const [critical, plain] = [morning.find(({ isCritical }) => isCritical), morning.find(({ isCritical }) => !isCritical)];
    await tablet.deliver(await tablet.briefing(day.version, lead, allYes(morning, [plain?.id ?? ''])));
    expect(await actions(own)).toEqual([]);
    await tablet.deliver(await tablet.briefing(day.version, lead, allYes(morning, [critical?.id ?? ''])));
    expect(await actions(own)).toMatchObject([{ openedBy: 'Dov Lindqvist', text: expect.stringContaining(critical?.text ?? 'no line') }]);
    expect((await ok(tablet.agent, 'readTabletDay')).jobs[0]?.briefing).toMatchObject({ noLineIds: [critical?.id] });
    expect((await logOf(own)).map(({ leaf }) => (JSON.parse(leaf) as { kind: string }).kind)).toEqual(['checklist-version', 'pin', 'pin', 'briefing', 'briefing', 'corrective-action']);
  });
});

it('"I can\'t sign yet" is recorded with its reason, opens an action, and does not stand in the way of signing later', async () => {
  const own = await scene();
  const { tablet, day, crew } = own;
  await tablet.deliver(tablet.couldNotSign(day.version, crew, { note: 'No gloves in my size' }));
  expect(await history(own)).toMatchObject([{ kind: 'could-not-sign', pinState: 'not-set' }]);
  expect(await actions(own)).toMatchObject([{ text: 'Marisol Tena could not sign: is missing gear: No gloves in my size', taskId: null }]);
  expect((await ok(tablet.agent, 'readTabletDay')).jobs[0]?.people.find(({ id }) => id === crew)?.state).toBe('could-not-sign');
  await tablet.setPin(crew);
  expect(await tablet.deliver(await tablet.signed(day.version, crew))).toMatchObject({ outcome: 'recorded' });
  expect((await ok(tablet.agent, 'readTabletDay')).jobs[0]?.people.find(({ id }) => id === crew)?.state).toBe('signed');
});

describe('a PIN', () => {
  it('confirms a signature; a wrong one leaves it unconfirmed and asks the lead; none leaves it "not set"', async () => {
    const own = await scene();
    const { tablet, day, lead, crew } = own;
    await tablet.setPin(lead);
    expect(await tablet.deliver(await tablet.signed(day.version, lead, { pin: '1111' }))).toMatchObject({ outcome: 'recorded', pinState: 'not-confirmed' });
    expect(await tablet.deliver(await tablet.signed(day.version, crew))).toMatchObject({ outcome: 'recorded', pinState: 'not-set' });
    expect((await ok(tablet.agent, 'readTabletDay')).jobs[0]?.people.find(({ id }) => id === lead)?.state).toBe('not-confirmed');
    // Signing again with the right PIN settles it; only then does a further one stand beside it.
    expect(await tablet.deliver(await tablet.signed(day.version, lead, { pin: '1112' }))).toMatchObject({ outcome: 'second', pinState: 'not-confirmed' });
    expect(await tablet.deliver(await tablet.signed(day.version, lead, { pin: '2468' }))).toMatchObject({ outcome: 'recorded', pinState: 'confirmed' });
    expect((await ok(tablet.agent, 'readTabletDay')).jobs[0]?.people.find(({ id }) => id === lead)?.state).toBe('signed');
    expect(await tablet.deliver(await tablet.signed(day.version, lead, { pin: '2468' }))).toMatchObject({ outcome: 'second', pinState: 'confirmed' });
  });

  it('that was wrong does not stand in the way of the right one; a right one stands against any later', async () => {
    const own = await scene();
    const { tablet, day, lead } = own;
    await tablet.setPin(lead);
    const state = async () => (await ok(tablet.agent, 'readTabletDay')).jobs[0]?.people.find(({ id }) => id === lead)?.state;
    expect(await tablet.deliver(await tablet.signed(day.version, lead, { pin: '1111' }))).toMatchObject({ outcome: 'recorded', pinState: 'not-confirmed' });
    expect(await tablet.deliver(await tablet.signed(day.version, lead, { pin: '2222' }))).toMatchObject({ outcome: 'second', pinState: 'not-confirmed' });
    expect(await tablet.deliver(await tablet.signed(day.version, lead))).toMatchObject({ outcome: 'recorded', pinState: 'confirmed' });
    expect(await state()).toBe('signed');
    for (const pin of ['1111', '2468']) expect(await tablet.deliver(await tablet.signed(day.version, lead, { pin }))).toMatchObject({ outcome: 'second', pinState: 'confirmed' });
    expect(await history(own)).toHaveLength(2);
  });

  it.each<[string, (tablet: TestTablet, hash: string) => Promise<Record<string, unknown>>]>([
    ['for another text', (tablet) => tablet.seal('2468', 'b'.repeat(64))],
    ['with another nonce', async (tablet, hash) => ({ ...(await tablet.seal('2468', hash)), nonce: 'f'.repeat(32) })],
    ['for setting a PIN', (tablet) => tablet.seal('2468', pinSetHash('0195d4e0-0000-7000-8000-000000000001'))],
    ['that was changed', async (tablet, hash) => ({ sealedPin: (await tablet.seal('2468', hash)).sealedPin.replace(/.{6}$/, 'AAAAAA'), nonce: 'f'.repeat(32) })],
  ])('sealed %s confirms nothing', async (_, seal) => {
    const { tablet, day, lead } = await scene();
    await tablet.setPin(lead);
    const hash = day.version.texts.find(({ language }) => language === 'en')?.sha256 ?? '';
    expect(await tablet.deliver(await tablet.signed(day.version, lead, await seal(tablet, hash)))).toMatchObject({ outcome: 'recorded', pinState: 'not-confirmed' });
  });

  it('once set is not set again until the office resets it; nobody in the office can choose it', async () => {
    const own = await scene();
    const { organisation, tablet, crew } = own;
    await tablet.setPin(crew);
    expect(await tablet.deliver(await tablet.pinSet(crew, '9999'))).toMatchObject({ outcome: 'kept-aside', note: expect.stringContaining('has a PIN already') });
    for (const pin of ['12', '123456789', 'abcd']) expect(await tablet.deliver(await tablet.pinSet(own.lead, pin))).toMatchObject({ outcome: 'kept-aside' });
    expect(await ok(organisation.officer.agent, 'resetPin', { params: { personId: crew } })).toMatchObject({ hasPin: false, pinProof: null });
    await tablet.setPin(crew, '9999');
  });

  it('witnessed with a PIN that is not the witness\'s own is not set', async () => {
    const { tablet, lead, crew } = await scene();
    await tablet.setPin(lead);
    const witness = async (pin: string) => {
      const { sealedPin, nonce } = await tablet.seal(pin, pinSetHash(crew));
      return { witnessPersonId: lead, witnessSealedPin: sealedPin, witnessNonce: nonce };
    };
    expect(await tablet.deliver(await tablet.pinSet(crew, '8642', await witness('1111')))).toMatchObject({ outcome: 'kept-aside' });
    expect(await tablet.deliver(await tablet.pinSet(crew, '8642', await witness('2468')))).toMatchObject({ outcome: 'recorded' });
  });

  it('is told at once to be right or wrong; five wrong ones on one tablet pause, another person and tablet go on (F27)', async () => {
    const own = await scene();
    const { organisation, tablet, lead, crew, day } = own;
    const textSha256 = day.version.texts[0]?.sha256 ?? '';
    const check = async (on: TestTablet, personId: string, pin: string) => call(on.agent, 'checkPin', { body: { personId, textSha256, ...(await on.seal(pin, textSha256)) } });
    expect(expectProblem(await check(tablet, lead, '2468'), 422)).toMatchObject({ reason: 'pin-not-set' });
    await tablet.setPin(lead);
    await tablet.setPin(crew, '1357');
    expect((await check(tablet, lead, '2468')).status).toBe(204);
    for (const triesLeft of [4, 3, 2, 1, 0]) expect(expectProblem(await check(tablet, lead, '0000'), 422)).toMatchObject({ reason: 'pin-wrong', triesLeft });
    expectProblem(await check(tablet, lead, '0000'), 422);
    const paused = await check(tablet, lead, '2468');
    expectProblem(paused, 429);
    expect(Number(paused.headers['retry-after'])).toBeGreaterThan(0);
    expect((await check(tablet, crew, '1357')).status).toBe(204);
    expect((await check(await organisation.tablet('Tablet 2'), lead, '2468')).status).toBe(204);
  });
});

it('a withdrawn tablet delivers nothing, and is told to keep what it has', async () => {
  const { organisation, tablet, day, lead } = await scene();
  await ok(organisation.owner.agent, 'withdrawTablet', { params: { tabletId: tablet.id } });
  expect(expectProblem(await call(tablet.agent, 'deliver', { body: { sentAt: new Date().toISOString(), envelopes: [await tablet.signed(day.version, lead)] } }), 401).detail).toMatch(/stays on the tablet/);
});

it('nothing here was a fault of the service', () => expect(service.faults).toEqual([]));
