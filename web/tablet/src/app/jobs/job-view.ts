import { type Language } from '#compliance/outcome';
import { type Envelope } from '#shared/envelopes';
import { type ChecklistText, type TextLine, type TextTask } from '#compliance/checklists/text';
import { type DayJob } from '../day/day';
import { type Posted } from '../outbox/outbox';

/** waiting: on this tablet only; sent: the office answered for it; null: the office told us. */
export type Sending = 'waiting' | 'sent' | null;

export interface PersonView {
  readonly id: string;
  readonly name: string;
  readonly language: Language;
  readonly isLead: boolean;
  readonly hasPin: boolean;
  /** Whether a witness or the office vouched for who set it: only such a PIN proves anything. */
  readonly isPinProven: boolean;
  /** sign-again: signed an earlier version, not yet this one. */
  readonly state: 'not-yet' | 'signed' | 'could-not-sign' | 'not-confirmed' | 'sign-again';
  readonly at: string | null;
  /** Why a signature does not count; null where it does, or where there is none. */
  readonly doubt: 'pin-wrong' | 'no-pin' | 'no-witness' | null;
  readonly sending: Sending;
  /** What the office noted: kept for a person to look at; or a second signature beside an earlier one. */
  readonly noted: 'kept-aside' | 'second' | null;
}

/** Who may witness a new PIN: a lead or officer whose own PIN is proven. */
export interface Witness {
  readonly id: string;
  readonly name: string;
}

export interface BriefingView {
  readonly at: string;
  readonly by: string;
  readonly isProven: boolean;
  readonly noLineIds: readonly string[];
  readonly sending: Sending;
}

export interface Stop {
  readonly text: string;
  /** Whether the office has heard of it; a "No" given without signal told nobody. */
  readonly isHeard: boolean;
  readonly by: string;
  readonly at: string | null;
  /** Who is to fix it; null while nobody is named. */
  readonly ownerName: string | null;
}

/** A stop that was closed: the live lines are asked again after it. */
export interface Reopening {
  readonly at: string;
  readonly by: string;
  readonly evidence: string;
}

export interface TaskView {
  readonly task: TextTask;
  readonly people: readonly PersonView[];
  readonly state: 'may-not-start' | 'not-decided' | 'stopped' | 'started' | 'ready';
  readonly stops: readonly Stop[];
  /** The last stop that was closed, while the task waits to start again. */
  readonly reopening: Reopening | null;
  /** Whether its lines were answered by somebody whose PIN proved nothing. */
  readonly isUnproven: boolean;
}

export interface JobView {
  readonly job: DayJob;
  readonly text: ChecklistText;
  readonly people: readonly PersonView[];
  readonly lead: PersonView | null;
  /** The day's lead first. */
  readonly witnesses: readonly Witness[];
  readonly signedCount: number;
  readonly briefing: BriefingView | null;
  readonly tasks: readonly TaskView[];
  /** What this tablet wrote for this version and has not sent. */
  readonly waitingCount: number;
}

/**
 * One job as the crew should see it: what the office knew when last heard, and what this tablet wrote since.
 * Once the office has heard an envelope and told the day again (both on its own clock), its word counts.
 */
export function jobView(job: DayJob, text: ChecklistText, posted: readonly Posted[], serverTime: string, witnesses: readonly Witness[] = []): JobView {
  const ofVersion = posted.filter(({ envelope }) => envelope && 'versionId' in envelope && envelope.versionId === job.version.id);
  const newer = ofVersion.filter((one) => isNewerThan(one, serverTime));
  const people = job.people.map((person) => personView(person, job, posted, serverTime));
  const lines = new Map<string, TextLine>([...text.morning, ...text.tasks.flatMap((task) => task.live)].map((line) => [line.id, line]));
  return {
    job,
    text,
    people,
    lead: people.find((person) => person.isLead) ?? null,
    witnesses: onceEach([...people.filter((person) => person.isLead && person.hasPin && person.isPinProven).map(({ id, name }) => ({ id, name })), ...witnesses]),
    signedCount: people.filter((person) => person.state === 'signed').length,
    briefing: briefingView(job, newer, ofVersion, people),
    tasks: text.tasks.map((task) => taskView(task, job, people, newer, lines)),
    waitingCount: ofVersion.filter(({ row }) => row.state === 'waiting').length,
  };
}

function isNewerThan({ row }: Posted, serverTime: string): boolean {
  return row.receivedAt === null || Date.parse(row.receivedAt) >= Date.parse(serverTime);
}

function personView(person: DayJob['people'][number], job: DayJob, posted: readonly Posted[], serverTime: string): PersonView {
  const own = posted.filter(({ envelope }) => envelope?.personId === person.id);
  // One the office has judged is in the day it told: it may have been kept aside, or reset since.
  const set = own.filter((one) => one.envelope?.kind === 'pin-set' && isNewerThan(one, serverTime) && one.row.receipt?.outcome !== 'kept-aside').at(-1)?.envelope;
  const isVouched = set?.kind === 'pin-set' && (set.witnessPersonId !== null || set.startSealedPin !== undefined);
  const base = { id: person.id, name: person.name, language: person.language, isLead: person.isLead, hasPin: person.hasPin || set !== undefined, isPinProven: isVouched || (set === undefined && person.isPinProven) || (person.hasPin && person.isPinProven) };
  const last = own.filter(({ envelope }) => (envelope?.kind === 'signed' || envelope?.kind === 'could-not-sign') && envelope.versionId === job.version.id).at(-1);
  const noted = last ? notedOn(last) : null;
  const sending = last ? sendingOf(last) : null;
  if (last?.envelope && isNewerThan(last, serverTime)) {
    const doubt = last.envelope.kind === 'signed' ? doubtOf(last, base.isPinProven) : null;
    const state = last.envelope.kind === 'could-not-sign' ? 'could-not-sign' : doubt ? 'not-confirmed' : 'signed';
    return { ...base, state, at: last.envelope.capturedAt, doubt, sending, noted };
  }
  if (person.state !== 'not-yet') return { ...base, state: person.state, at: person.at, doubt: person.state === 'not-confirmed' ? (person.pinState && doubts[person.pinState]) ?? 'pin-wrong' : null, sending, noted };
  const signedEarlier = own.some(({ envelope }) => envelope?.kind === 'signed' && envelope['shiftId'] === job.shiftId && envelope.versionId !== job.version.id);
  return { ...base, state: signedEarlier ? 'sign-again' : 'not-yet', at: null, doubt: null, sending: null, noted };
}

const doubts = { confirmed: null, 'not-confirmed': 'pin-wrong', 'not-set': 'no-pin', unwitnessed: 'no-witness' } as const;

/** What keeps a signature or an answer of this tablet from counting: as the office said, or as this tablet knows already. */
function doubtOf({ row: { receipt } }: Posted, isPinProven: boolean): PersonView['doubt'] {
  if (!receipt) return isPinProven ? null : 'no-witness';
  return receipt.isUnwitnessed ? 'no-witness' : receipt.pinState ? doubts[receipt.pinState] : null;
}

function onceEach(witnesses: readonly Witness[]): readonly Witness[] {
  return [...new Map(witnesses.map((witness) => [witness.id, witness])).values()];
}

function notedOn({ row }: Posted): PersonView['noted'] {
  const outcome = row.receipt?.outcome;
  return outcome === 'kept-aside' || outcome === 'second' ? outcome : null;
}

function sendingOf({ row }: Posted): Sending {
  return row.state === 'waiting' ? 'waiting' : 'sent';
}

function briefingView(job: DayJob, newer: readonly Posted[], all: readonly Posted[], people: readonly PersonView[]): BriefingView | null {
  const last = newer.filter(({ envelope }) => envelope?.kind === 'briefing').at(-1);
  if (last?.envelope?.kind === 'briefing') return { at: last.envelope.capturedAt, by: nameIn(people, last.envelope.personId), isProven: isProvenAnswer(last, people), noLineIds: noLineIds(last.envelope), sending: sendingOf(last) };
  if (!job.briefing) return null;
  const isOwn = all.some(({ envelope }) => envelope?.kind === 'briefing');
  return { at: job.briefing.at, by: job.briefing.by, isProven: job.briefing.isProven, noLineIds: job.briefing.noLineIds, sending: isOwn ? 'sent' : null };
}

function nameIn(people: readonly PersonView[], personId: string): string {
  return people.find(({ id }) => id === personId)?.name ?? '';
}

/** Whether the PIN beside answers of this tablet proves who gave them, as far as this tablet can know. */
function isProvenAnswer(one: Posted, people: readonly PersonView[]): boolean {
  const { envelope } = one;
  if (envelope?.kind !== 'briefing' && envelope?.kind !== 'start-check') return false;
  return envelope.sealedPin !== undefined && doubtOf(one, people.find(({ id }) => id === envelope.personId)?.isPinProven ?? false) === null;
}

function noLineIds(envelope: Envelope): readonly string[] {
  if (envelope.kind !== 'briefing' && envelope.kind !== 'start-check') return [];
  return envelope.answers.filter(({ answer }) => answer === 'no').map(({ lineId }) => lineId);
}

function taskView(task: TextTask, job: DayJob, people: readonly PersonView[], newer: readonly Posted[], lines: ReadonlyMap<string, TextLine>): TaskView {
  const base = { task, people: people.filter((person) => task.personIds.includes(person.id)) };
  if (task.state !== 'ready') return { ...base, state: task.state, stops: [], reopening: null, isUnproven: false };
  const heard = job.stopped
    .filter((stop) => stop.taskId === task.taskId)
    .map((stop): Stop => ({ text: (stop.lineId && lines.get(stop.lineId)?.text) || stop.text, isHeard: true, by: stop.openedBy, at: stop.openedAt, ownerName: stop.ownerName }));
  const own = newer.flatMap((one) => stopsOf(one, task.taskId, lines, people)).filter((stop) => !heard.some(({ text }) => text === stop.text));
  const stops = [...heard, ...own];
  if (stops.length > 0) return { ...base, state: 'stopped', stops, reopening: null, isUnproven: false };
  const checks = newer.filter(({ envelope }) => envelope?.kind === 'start-check' && envelope.taskId === task.taskId);
  const isStarted = job.startedTaskIds.includes(task.taskId) || checks.some((one) => isProvenAnswer(one, people));
  const reopened = job.reopened.filter((each) => each.taskId === task.taskId).at(-1);
  const reopening = reopened && !isStarted ? { at: reopened.resolvedAt, by: reopened.resolvedBy, evidence: reopened.evidence } : null;
  return { ...base, state: isStarted ? 'started' : 'ready', stops, reopening, isUnproven: !isStarted && (checks.length > 0 || job.unprovenTaskIds.includes(task.taskId)) };
}

/** "No" on a critical line holds its task; a line about the whole shift holds every task. */
function stopsOf({ row, envelope }: Posted, taskId: string, lines: ReadonlyMap<string, TextLine>, people: readonly PersonView[]): readonly Stop[] {
  if (!envelope || (envelope.kind !== 'briefing' && envelope.kind !== 'start-check')) return [];
  return noLineIds(envelope).flatMap((lineId) => {
    const line = lines.get(lineId);
    const about = envelope.kind === 'start-check' ? envelope.taskId : (line?.taskId ?? null);
    if (!line?.isCritical || (about !== null && about !== taskId)) return [];
    return [{ text: line.text, isHeard: row.state === 'done', by: nameIn(people, envelope.personId), at: envelope.capturedAt, ownerName: null }];
  });
}
