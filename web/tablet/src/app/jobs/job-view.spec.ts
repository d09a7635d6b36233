import { describe, expect, it } from '@jest/globals';
import { type Envelope, type Receipt } from '#shared/envelopes';
import { checklistText, dayJob, ids } from '../../testing/tablet-data';
import { type Posted } from '../outbox/outbox';
import { jobView, type JobView } from './job-view';

const serverTime = '2026-12-03T12:00:00Z';
type Fields = { readonly kind: Envelope['kind'] } & Readonly<Record<string, unknown>>;

/** An envelope on the tablet; `receivedAt` is when the server answered, by its clock. */
function posted(fields: Fields, receivedAt: string | null = null, receipt: Partial<Receipt> = {}): Posted {
  const stamped = { format: 'kneeboard-envelope/1', id: ids.nobody, sequence: 0, capturedAt: '2026-12-03T06:24:00-06:00', versionId: ids.version, personId: ids.abe, ...fields };
  const envelope = stamped as unknown as Envelope;
  const answer: Receipt | null = receivedAt ? { id: ids.nobody, outcome: 'recorded', acknowledgementId: null, entryIndex: null, pinState: null, isUnwitnessed: false, isSuperseded: false, note: null, ...receipt } : null;
  return { envelope, row: { id: ids.nobody, sequence: 0, bytes: '', state: receivedAt ? 'done' : 'waiting', receipt: answer, receivedAt } };
}
const view = (all: readonly Posted[], job = dayJob()): JobView => jobView(job, checklistText(), all, serverTime);
const abe = (all: readonly Posted[], job = dayJob()) => view(all, job).people.find(({ id }) => id === ids.abe);
const mixing = (all: readonly Posted[], job = dayJob()) => view(all, job).tasks.find(({ task }) => task.taskId === ids.mixing);
const later = '2026-12-03T12:00:05Z';
const earlier = '2026-12-03T11:59:00Z';

describe('a person on the list', () => {
  it('shows a signature of this tablet as waiting until the office answered, then as sent', () => {
    expect(abe([posted({ kind: 'signed' })])).toMatchObject({ state: 'signed', sending: 'waiting', at: '2026-12-03T06:24:00-06:00' });
    expect(abe([posted({ kind: 'signed' }, later)])).toMatchObject({ state: 'signed', sending: 'sent' });
  });

  it('follows the office once it has told the day again', () => {
    const job = dayJob();
    const doubted = { ...job, people: job.people.map((person) => (person.id === ids.abe ? { ...person, state: 'not-confirmed' as const, at: serverTime } : person)) };
    expect(abe([posted({ kind: 'signed' }, earlier)], doubted)).toMatchObject({ state: 'not-confirmed', sending: 'sent' });
    expect(abe([posted({ kind: 'signed' }, earlier, { outcome: 'kept-aside' })])).toMatchObject({ state: 'not-yet', noted: 'kept-aside' });
  });

  it('asks the lead when the PIN was not the person’s', () => {
    expect(abe([posted({ kind: 'signed' }, later, { pinState: 'not-confirmed' })])?.state).toBe('not-confirmed');
  });

  it('signs again when an earlier version of this shift was signed', () => {
    const before = { kind: 'signed', versionId: ids.earlierVersion } as const;
    expect(abe([posted({ ...before, shiftId: ids.shift }, earlier)])?.state).toBe('sign-again');
    expect(abe([posted({ ...before, shiftId: ids.nobody }, earlier)])?.state).toBe('not-yet');
  });

  it('has a PIN from the moment one was set on this tablet', () => {
    const marisol = (all: readonly Posted[]) => view(all).people.find(({ id }) => id === ids.marisol)?.hasPin;
    expect(marisol([])).toBe(false);
    expect(marisol([posted({ kind: 'pin-set', personId: ids.marisol })])).toBe(true);
  });

  it('has a PIN that proves from the moment somebody vouched for it here, and forgets one that the office kept aside or reset', () => {
    const marisol = (all: readonly Posted[]) => view(all).people.find(({ id }) => id === ids.marisol);
    const set = { kind: 'pin-set', personId: ids.marisol, witnessPersonId: null } as const;
    expect(marisol([posted(set)])).toMatchObject({ hasPin: true, isPinProven: false });
    expect(marisol([posted({ ...set, witnessPersonId: ids.dov })])?.isPinProven).toBe(true);
    expect(marisol([posted({ ...set, startSealedPin: 'sealed' })])?.isPinProven).toBe(true);
    expect(marisol([posted(set, later, { outcome: 'kept-aside' })])?.hasPin).toBe(false);
    expect(marisol([posted(set, earlier)])?.hasPin).toBe(false);
  });

  it('whose signature proves nothing is not counted as signed, and the tablet knows why', () => {
    const noWitness = dayJob();
    const job = { ...noWitness, people: noWitness.people.map((person) => ({ ...person, isPinProven: false })) };
    expect(abe([posted({ kind: 'signed' })], job)).toMatchObject({ state: 'not-confirmed', doubt: 'no-witness' });
    expect(abe([posted({ kind: 'signed' }, later, { pinState: 'not-set' })])).toMatchObject({ state: 'not-confirmed', doubt: 'no-pin' });
    expect(abe([posted({ kind: 'signed' }, later, { pinState: 'not-confirmed', isUnwitnessed: true })])).toMatchObject({ state: 'not-confirmed', doubt: 'no-witness' });
    const told = { ...noWitness, people: noWitness.people.map((person) => ({ ...person, state: 'not-confirmed' as const, at: serverTime, pinState: 'unwitnessed' as const })) };
    expect(abe([], told)).toMatchObject({ state: 'not-confirmed', doubt: 'no-witness' });
    expect(view([], told).signedCount).toBe(0);
  });

  it('counts who signed, not who could not', () => {
    expect(view([posted({ kind: 'could-not-sign' })]).signedCount).toBe(0);
    expect(view([posted({ kind: 'signed' })]).signedCount).toBe(1);
  });
});

describe('a task', () => {
  const no = (lineId: string) => [{ lineId, answer: 'no', note: null }];
  const yes = [{ lineId: 'shroud', answer: 'yes', note: null }];
  const checked = { kind: 'start-check', taskId: ids.mixing, answers: yes, sealedPin: 'sealed', nonce: 'n'.repeat(32) } as const;

  it('stays held when the list holds it, whatever is answered', () => {
    const scraping = view([posted({ kind: 'start-check', taskId: ids.scraping, answers: yes })]).tasks.find(({ task }) => task.taskId === ids.scraping);
    expect(scraping?.state).toBe('may-not-start');
  });

  it('stops at a critical No and does not say the office knows before it does (conduct 11)', () => {
    const stop = { kind: 'start-check', taskId: ids.mixing, answers: no('shroud') } as const;
    expect(mixing([posted(stop)])).toMatchObject({ state: 'stopped', stops: [{ text: 'Text of shroud', isHeard: false }] });
    expect(mixing([posted(stop, later)])).toMatchObject({ state: 'stopped', stops: [{ isHeard: true }] });
  });

  it('stays stopped when somebody answers Yes afterwards', () => {
    const stop = posted({ kind: 'start-check', taskId: ids.mixing, answers: no('shroud') });
    expect(mixing([stop, posted({ kind: 'start-check', taskId: ids.mixing, answers: yes })])?.state).toBe('stopped');
  });

  it('opens when the office, having heard the No, lists no stop any more', () => {
    expect(mixing([posted({ kind: 'start-check', taskId: ids.mixing, answers: no('shroud') }, earlier)])?.state).toBe('ready');
  });

  it('is held by a morning No about itself or about the whole job, not by one that is not critical', () => {
    expect(mixing([posted({ kind: 'briefing', answers: no('masks') })])?.state).toBe('stopped');
    expect(mixing([posted({ kind: 'briefing', answers: no('survey') })])?.state).toBe('stopped');
    expect(mixing([posted({ kind: 'briefing', answers: no('tape') })])?.state).toBe('ready');
  });

  it('is started by its own start check, also without signal', () => {
    expect(mixing([posted(checked)])).toMatchObject({ state: 'started', isUnproven: false });
    expect(mixing([], dayJob({ startedTaskIds: [ids.mixing] }))?.state).toBe('started');
  });

  it('is not started by answers that no proven PIN stands beside: none, one without a witness, or one the office found wrong', () => {
    const unwitnessed = dayJob();
    const job = { ...unwitnessed, people: unwitnessed.people.map((person) => ({ ...person, isPinProven: false })) };
    for (const one of [mixing([posted({ ...checked, sealedPin: undefined })]), mixing([posted(checked)], job), mixing([posted(checked, later, { pinState: 'not-confirmed' })]), mixing([posted(checked, later, { pinState: 'not-confirmed', isUnwitnessed: true })]), mixing([], dayJob({ unprovenTaskIds: [ids.mixing] }))]) expect(one).toMatchObject({ state: 'ready', isUnproven: true });
    expect(mixing([posted(checked, later, { pinState: 'confirmed' })])?.state).toBe('started');
  });

  it('says who stopped it and who fixes it; opened again it says by whom and with what, until its lines are answered anew', () => {
    const stopped = [{ taskId: ids.mixing, lineId: 'shroud', text: 'Shroud', actionId: ids.action, openedAt: serverTime, openedBy: 'Abe Kowalczyk', ownerName: 'Dov Lindqvist' }];
    expect(mixing([], dayJob({ stopped }))?.stops).toEqual([{ text: 'Text of shroud', isHeard: true, by: 'Abe Kowalczyk', at: serverTime, ownerName: 'Dov Lindqvist' }]);
    expect(mixing([posted({ kind: 'start-check', taskId: ids.mixing, answers: no('shroud') })])?.stops).toMatchObject([{ by: 'Abe Kowalczyk', ownerName: null }]);
    const reopened = [{ taskId: ids.mixing, lineId: 'shroud', text: 'Shroud', actionId: ids.action, resolvedAt: serverTime, resolvedBy: 'Ines Halloran', evidence: 'New shroud.' }];
    expect(mixing([], dayJob({ reopened }))).toMatchObject({ state: 'ready', reopening: { at: serverTime, by: 'Ines Halloran', evidence: 'New shroud.' } });
    expect(mixing([], dayJob({ reopened, startedTaskIds: [ids.mixing] }))).toMatchObject({ state: 'started', reopening: null });
  });

  it('says a stop once when both the office and the tablet know it', () => {
    const job = dayJob({ stopped: [{ taskId: ids.mixing, lineId: 'shroud', text: '"No" to: Shroud on.', actionId: ids.action, openedAt: serverTime, openedBy: 'Abe Kowalczyk', ownerName: null }] });
    expect(mixing([posted({ kind: 'start-check', taskId: ids.mixing, answers: no('shroud') }, later)], job)?.stops).toHaveLength(1);
  });
});
