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
  /** sign-again: signed an earlier version, not yet this one. */
  readonly state: 'not-yet' | 'signed' | 'could-not-sign' | 'not-confirmed' | 'sign-again';
  readonly at: string | null;
  readonly sending: Sending;
  /** What the office noted: kept for a person to look at; or a second signature beside an earlier one. */
  readonly noted: 'kept-aside' | 'second' | null;
}

export interface BriefingView {
  readonly at: string;
  readonly noLineIds: readonly string[];
  readonly sending: Sending;
}

export interface Stop {
  readonly text: string;
  /** Whether the office has heard of it; a "No" given without signal told nobody. */
  readonly isHeard: boolean;
}

export interface TaskView {
  readonly task: TextTask;
  readonly people: readonly PersonView[];
  readonly state: 'may-not-start' | 'not-decided' | 'stopped' | 'started' | 'ready';
  readonly stops: readonly Stop[];
}

export interface JobView {
  readonly job: DayJob;
  readonly text: ChecklistText;
  readonly people: readonly PersonView[];
  readonly lead: PersonView | null;
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
export function jobView(job: DayJob, text: ChecklistText, posted: readonly Posted[], serverTime: string): JobView {
  const ofVersion = posted.filter(({ envelope }) => envelope && 'versionId' in envelope && envelope.versionId === job.version.id);
  const newer = ofVersion.filter((one) => isNewerThan(one, serverTime));
  const people = job.people.map((person) => personView(person, job, posted, serverTime));
  const lines = new Map<string, TextLine>([...text.morning, ...text.tasks.flatMap((task) => task.live)].map((line) => [line.id, line]));
  return {
    job,
    text,
    people,
    lead: people.find((person) => person.isLead) ?? null,
    signedCount: people.filter((person) => person.state === 'signed').length,
    briefing: briefingView(job, newer, ofVersion),
    tasks: text.tasks.map((task) => taskView(task, job, people, newer, lines)),
    waitingCount: ofVersion.filter(({ row }) => row.state === 'waiting').length,
  };
}

function isNewerThan({ row }: Posted, serverTime: string): boolean {
  return row.receivedAt === null || Date.parse(row.receivedAt) >= Date.parse(serverTime);
}

function personView(person: DayJob['people'][number], job: DayJob, posted: readonly Posted[], serverTime: string): PersonView {
  const own = posted.filter(({ envelope }) => envelope?.personId === person.id);
  const hasPin = person.hasPin || own.some(({ envelope }) => envelope?.kind === 'pin-set');
  const base = { id: person.id, name: person.name, language: person.language, isLead: person.isLead, hasPin };
  const last = own.filter(({ envelope }) => (envelope?.kind === 'signed' || envelope?.kind === 'could-not-sign') && envelope.versionId === job.version.id).at(-1);
  const noted = last ? notedOn(last) : null;
  const sending = last ? sendingOf(last) : null;
  if (last?.envelope && isNewerThan(last, serverTime)) {
    const isDoubted = last.row.receipt?.pinState === 'not-confirmed';
    const state = last.envelope.kind === 'could-not-sign' ? 'could-not-sign' : isDoubted ? 'not-confirmed' : 'signed';
    return { ...base, state, at: last.envelope.capturedAt, sending, noted };
  }
  if (person.state !== 'not-yet') return { ...base, state: person.state, at: person.at, sending, noted };
  const signedEarlier = own.some(({ envelope }) => envelope?.kind === 'signed' && envelope['shiftId'] === job.shiftId && envelope.versionId !== job.version.id);
  return { ...base, state: signedEarlier ? 'sign-again' : 'not-yet', at: null, sending: null, noted };
}

function notedOn({ row }: Posted): PersonView['noted'] {
  const outcome = row.receipt?.outcome;
  return outcome === 'kept-aside' || outcome === 'second' ? outcome : null;
}

function sendingOf({ row }: Posted): Sending {
  return row.state === 'waiting' ? 'waiting' : 'sent';
}

function briefingView(job: DayJob, newer: readonly Posted[], all: readonly Posted[]): BriefingView | null {
  const last = newer.filter(({ envelope }) => envelope?.kind === 'briefing').at(-1);
  if (last?.envelope?.kind === 'briefing') return { at: last.envelope.capturedAt, noLineIds: noLineIds(last.envelope), sending: sendingOf(last) };
  if (!job.briefing) return null;
  const isOwn = all.some(({ envelope }) => envelope?.kind === 'briefing');
  return { at: job.briefing.at, noLineIds: job.briefing.noLineIds, sending: isOwn ? 'sent' : null };
}

function noLineIds(envelope: Envelope): readonly string[] {
  if (envelope.kind !== 'briefing' && envelope.kind !== 'start-check') return [];
  return envelope.answers.filter(({ answer }) => answer === 'no').map(({ lineId }) => lineId);
}

function taskView(task: TextTask, job: DayJob, people: readonly PersonView[], newer: readonly Posted[], lines: ReadonlyMap<string, TextLine>): TaskView {
  const base = { task, people: people.filter((person) => task.personIds.includes(person.id)) };
  if (task.state !== 'ready') return { ...base, state: task.state, stops: [] };
  const heard = job.stopped
    .filter((stop) => stop.taskId === task.taskId)
    .map((stop): Stop => ({ text: (stop.lineId && lines.get(stop.lineId)?.text) || stop.text, isHeard: true }));
  const own = newer.flatMap((one) => stopsOf(one, task.taskId, lines)).filter((stop) => !heard.some(({ text }) => text === stop.text));
  const stops = [...heard, ...own];
  if (stops.length > 0) return { ...base, state: 'stopped', stops };
  const isStarted = job.startedTaskIds.includes(task.taskId) || newer.some(({ envelope }) => envelope?.kind === 'start-check' && envelope.taskId === task.taskId);
  return { ...base, state: isStarted ? 'started' : 'ready', stops };
}

/** "No" on a critical line holds its task; a line about the whole shift holds every task. */
function stopsOf({ row, envelope }: Posted, taskId: string, lines: ReadonlyMap<string, TextLine>): readonly Stop[] {
  if (!envelope || (envelope.kind !== 'briefing' && envelope.kind !== 'start-check')) return [];
  return noLineIds(envelope).flatMap((lineId) => {
    const line = lines.get(lineId);
    const about = envelope.kind === 'start-check' ? envelope.taskId : (line?.taskId ?? null);
    if (!line?.isCritical || (about !== null && about !== taskId)) return [];
    return [{ text: line.text, isHeard: row.state === 'done' }];
  });
}
