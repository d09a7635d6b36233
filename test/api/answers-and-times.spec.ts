import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { type ChecklistText } from '#compliance';
import { ok } from '#test/support/call';
import { makeOrganisation, type Organisation, type PublishedDay } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';
import { type SentEnvelope, type TestTablet } from '#test/support/tablet';

/** Who briefed, who checked before a start, what stopped a task and what opened it again; and times that cannot be right. */
let service: Service;
beforeAll(async () => {
  service = await startService();
});
afterAll(() => service.stop());

interface Scene {
  organisation: Organisation;
  tablet: TestTablet;
  day: PublishedDay;
  text: ChecklistText;
  lead: string;
  crew: string;
}
async function scene(): Promise<Scene> {
  const organisation = await makeOrganisation(service);
  const crew = (await organisation.person('Marisol Tena')).id;
  const day = await organisation.publishedDay({ crew: [crew] });
  const text = JSON.parse((await ok(organisation.auditor.agent, 'readText', { params: { versionId: day.version.id, language: 'en' } })).toString()) as ChecklistText;
  const tablet = await organisation.tablet();
  await tablet.setPin(organisation.lead.personId);
  return { organisation, crew, lead: organisation.lead.personId, day, text, tablet };
}
const jobOf = async ({ tablet }: Scene) => (await ok(tablet.agent, 'readTabletDay')).jobs[0];
const allYes = (lines: readonly { id: string }[], noTo: readonly (string | undefined)[] = []) => lines.map(({ id }) => ({ lineId: id, answer: noTo.includes(id) ? ('no' as const) : ('yes' as const), note: null }));
const liveOf = ({ text, day }: Scene) => text.tasks.find(({ taskId }) => taskId === day.grindingTaskId)?.live ?? [];
const answersIn = async ({ organisation, day }: Scene) => (await ok(organisation.officer.agent, 'readShift', { params: { shiftId: day.shift.id } })).versions[0]?.answers;
const check = (own: Scene, personId: string, more: { pin?: string; noTo?: (string | undefined)[]; content?: Record<string, unknown> } = {}): Promise<SentEnvelope> =>
  own.tablet.startCheck(own.day.version, personId, own.day.grindingTaskId, allYes(liveOf(own), more.noTo), { ...(more.pin ? { pin: more.pin } : {}), ...more.content });

describe('a start check', () => {
  it('opens its task when the PIN of who answered proves it', async () => {
    const own = await scene();
    expect(await own.tablet.deliver(await check(own, own.lead))).toMatchObject({ outcome: 'recorded', pinState: 'confirmed' });
    expect(await jobOf(own)).toMatchObject({ startedTaskIds: [own.day.grindingTaskId], unprovenTaskIds: [] });
    expect(await answersIn(own)).toMatchObject([{ kind: 'start-check', taskId: own.day.grindingTaskId, personName: 'Dov Lindqvist', noCount: 0, pinState: 'confirmed', timeDoubt: null }]);
  });

  it.each<[string, string, (own: Scene) => Promise<SentEnvelope>]>([
    ['a wrong PIN', 'not-confirmed', (own) => check(own, own.lead, { pin: '1111' })],
    ['no PIN, as an older app sends it', 'not-set', (own) => check(own, own.lead, { content: { sealedPin: undefined, nonce: undefined } })],
    ['a person without a PIN', 'not-set', (own) => check(own, own.crew)],
    // The seal stands for these answers: taken from another check it proves nothing.
    ['the seal of other answers', 'not-confirmed', async (own) => {
      const { sealedPin, nonce } = JSON.parse((await check(own, own.lead, { noTo: [liveOf(own)[0]?.id] })).bytes) as Record<string, string>;
      return check(own, own.lead, { content: { sealedPin, nonce } });
    }],
  ])('with %s is kept and marked, and opens nothing until somebody proves it', async (_, pinState, send) => {
    const own = await scene();
    expect(await own.tablet.deliver(await send(own))).toMatchObject({ outcome: 'recorded', pinState });
    expect(await jobOf(own)).toMatchObject({ startedTaskIds: [], unprovenTaskIds: [own.day.grindingTaskId] });
    expect(await answersIn(own)).toMatchObject([{ pinState }]);
    await own.tablet.deliver(await check(own, own.lead));
    expect(await jobOf(own)).toMatchObject({ startedTaskIds: [own.day.grindingTaskId], unprovenTaskIds: [] });
    expect(await ok(own.organisation.auditor.agent, 'checkRecord')).toMatchObject({ isGood: true });
  });

  it('stops its task with a critical "No", whatever its PIN: nobody needs leave to stop', async () => {
    const own = await scene();
    const critical = liveOf(own).find(({ isCritical }) => isCritical);
    await own.tablet.deliver(await check(own, own.crew, { noTo: [critical?.id], content: { sealedPin: undefined, nonce: undefined } }));
    expect((await jobOf(own))?.stopped).toMatchObject([{ taskId: own.day.grindingTaskId, openedBy: 'Marisol Tena', ownerName: null }]);
  });
});

it('a stopped task tells the tablet who stopped it, who fixes it and, once resolved, what was done; the live lines are then asked again', async () => {
  const own = await scene();
  const { organisation, day, lead, crew } = own;
  const critical = liveOf(own).find(({ isCritical }) => isCritical);
  await own.tablet.deliver(await check(own, lead));
  await own.tablet.deliver(await check(own, crew, { noTo: [critical?.id] }));
  const [action] = (await ok(organisation.officer.agent, 'listActions')).items;
  const assigned = await ok(organisation.officer.agent, 'assignAction', { params: { actionId: action?.id ?? '' }, version: action?.version, body: { ownerPersonId: lead } });
  expect(await jobOf(own)).toMatchObject({ stopped: [{ actionId: action?.id, lineId: critical?.id, openedBy: 'Marisol Tena', openedAt: action?.openedAt, ownerName: 'Dov Lindqvist' }], reopened: [] });
  const resolved = await ok(organisation.officer.agent, 'resolveAction', { params: { actionId: assigned.id }, version: assigned.version, body: { evidence: 'Hose clamped again; gauge above its mark.' } });
  // The check of before the stop opens nothing after it.
  expect(await jobOf(own)).toMatchObject({
    stopped: [],
    startedTaskIds: [],
    reopened: [{ taskId: day.grindingTaskId, actionId: action?.id, resolvedBy: 'Ines Halloran', resolvedAt: resolved.resolvedAt, evidence: 'Hose clamped again; gauge above its mark.' }],
  });
  await own.tablet.deliver(await check(own, lead));
  expect(await jobOf(own)).toMatchObject({ startedTaskIds: [day.grindingTaskId] });
});

describe('after a stop was closed, its task stays shut (practice.md: restart after a stop)', () => {
  async function stoppedAndClosed(own: Scene) {
    const critical = liveOf(own).find(({ isCritical }) => isCritical);
    await own.tablet.deliver(await check(own, own.crew, { noTo: [critical?.id] }));
    const [action] = (await ok(own.organisation.officer.agent, 'listActions')).items;
    await ok(own.organisation.officer.agent, 'resolveAction', { params: { actionId: action?.id ?? '' }, version: action?.version, body: { evidence: 'Hose clamped again.' } });
  }

  it('to a check that was answered before the stop and arrives after it, from a tablet without signal', async () => {
    const own = await scene();
    const early = await check(own, own.lead);
    await stoppedAndClosed(own);
    expect(await own.tablet.deliver(early)).toMatchObject({ outcome: 'recorded', pinState: 'confirmed' });
    expect(await jobOf(own)).toMatchObject({ startedTaskIds: [], unprovenTaskIds: [] });
    await own.tablet.deliver(await check(own, own.lead));
    expect(await jobOf(own)).toMatchObject({ startedTaskIds: [own.day.grindingTaskId] });
  });

  it('but not to a new check of a tablet whose clock is an hour slow', async () => {
    const own = await scene();
    await stoppedAndClosed(own);
    const slow = new Date(Date.now() - 3600_000);
    await own.tablet.deliverAll([await check(own, own.lead, { content: { capturedAt: slow.toISOString() } })], slow);
    expect(await jobOf(own)).toMatchObject({ startedTaskIds: [own.day.grindingTaskId] });
  });

  it('to the seal of an earlier check under a new number: a seal proves one delivery', async () => {
    const own = await scene();
    const first = await check(own, own.lead);
    await own.tablet.deliver(first);
    await stoppedAndClosed(own);
    const { sealedPin, nonce } = JSON.parse(first.bytes) as Record<string, string>;
    expect(await own.tablet.deliver(await check(own, own.lead, { content: { sealedPin, nonce } }))).toMatchObject({ outcome: 'recorded', pinState: 'not-confirmed' });
    expect(await jobOf(own)).toMatchObject({ startedTaskIds: [], unprovenTaskIds: [own.day.grindingTaskId] });
    // The very same bytes again are the same delivery, and still proven.
    expect(await own.tablet.deliver(first)).toMatchObject({ outcome: 'duplicate', pinState: 'confirmed' });
  });
});

describe('a briefing', () => {
  it('names who gave it and whether their PIN proved it', async () => {
    const own = await scene();
    const brief = (pin: string) => own.tablet.briefing(own.day.version, own.lead, allYes(own.text.morning), { pin });
    await own.tablet.deliver(await brief('1111'));
    expect((await jobOf(own))?.briefing).toMatchObject({ by: 'Dov Lindqvist', isProven: false });
    await own.tablet.deliver(await brief('2468'));
    expect((await jobOf(own))?.briefing).toMatchObject({ by: 'Dov Lindqvist', isProven: true });
    expect((await answersIn(own))?.map(({ kind, pinState }) => [kind, pinState])).toEqual([['briefing', 'not-confirmed'], ['briefing', 'confirmed']]);
  });
});

describe('a time that cannot be right (F10)', () => {
  it.each([
    ['1900', '1900-01-01T06:25:00Z', 'before-publishing'],
    ['3000', '3000-01-01T06:25:00Z', 'after-arrival'],
    ['9999', '9999-12-31T23:59:59Z', 'after-arrival'],
  ] as const)('the year %s: the signature is kept as it was sent, marked in the history and its export, and not set aside', async (_, capturedAt, doubt) => {
    const own = await scene();
    const { organisation, tablet, day, lead } = own;
    const receipt = (await tablet.deliverAll([await tablet.signed(day.version, lead, { capturedAt })], new Date(capturedAt))).receipts[0];
    expect(receipt).toMatchObject({ outcome: 'recorded', pinState: 'confirmed' });
    const [row] = (await ok(organisation.auditor.agent, 'listHistory')).items;
    expect(row).toMatchObject({ timeDoubt: doubt, capturedAt: new Date(capturedAt).toISOString() });
    const { clockOffsetSeconds } = await ok(organisation.auditor.agent, 'readAcknowledgement', { params: { acknowledgementId: receipt?.acknowledgementId ?? '' } });
    expect(Math.abs((clockOffsetSeconds ?? 0) - (Date.parse(capturedAt) - Date.parse(row?.receivedAt ?? '')) / 1000)).toBeLessThan(60);
    expect((await ok(organisation.auditor.agent, 'exportHistory')).toString()).toMatch(/cannot be right/);
    expect(await ok(organisation.auditor.agent, 'checkRecord')).toMatchObject({ isGood: true });
    expect((await ok(organisation.officer.agent, 'listKeptAside')).items).toEqual([]);
  });

  it('in a start check is marked; its "No" opens the action at the time it arrived, and has not the last word', async () => {
    const own = await scene();
    const critical = liveOf(own).find(({ isCritical }) => isCritical);
    await own.tablet.deliver(await check(own, own.lead, { noTo: [critical?.id], content: { capturedAt: '3000-01-01T06:25:00Z' } }));
    const [action] = (await ok(own.organisation.officer.agent, 'listActions')).items;
    expect(Date.parse(action?.openedAt ?? '')).toBeLessThan(Date.now() + 60_000);
    expect(await answersIn(own)).toMatchObject([{ timeDoubt: 'after-arrival' }]);
    const brief = (noTo: string[], content = {}) => own.tablet.briefing(own.day.version, own.lead, allYes(own.text.morning, noTo), content);
    await own.tablet.deliver(await brief([own.text.morning[0]?.id ?? ''], { capturedAt: '3000-01-01T06:25:00Z' }));
    await own.tablet.deliver(await brief([]));
    expect((await jobOf(own))?.briefing).toMatchObject({ noLineIds: [] });
  });

  it('is not marked where it can be: hours before it is sent, or minutes of a clock that drifts', async () => {
    const own = await scene();
    const drifting = new Date(Date.now() + 3 * 60_000).toISOString();
    await own.tablet.deliver(await own.tablet.signed(own.day.version, own.lead, { capturedAt: drifting }));
    expect((await ok(own.organisation.auditor.agent, 'listHistory')).items).toMatchObject([{ timeDoubt: null }]);
  });
});

it('nothing here was a fault of the service', () => expect(service.faults).toEqual([]));
