import { createHash } from 'node:crypto';
import { and, eq } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import { type Checklist } from '#compliance/answer';
import { type acknowledgements, type correctiveActions } from '#drizzle/schema/acknowledgements';
import { type answerSets, checklistPeople, checklistTexts, checklistVersions } from '#drizzle/schema/checklists';
import { jobs } from '#drizzle/schema/jobs';
import { people } from '#drizzle/schema/people';
import { type pinEvents, type pins } from '#drizzle/schema/pins';
import { type PinState } from '#shared/acknowledgements';
import { type couldNotSignReasons, Envelope } from '#shared/envelopes';
import { answersText, pinSetText } from '#shared/pin-sealing';
import { type Config } from '../config';
import { newestVersion } from '../jobs/shift-store';
import { openSeal, pinJudge, readPins, type KnownPins } from '../people/pin-judging';
import { type Tx } from '../platform/database';
import { type EntryDraft } from '../recordlog/recordlog-store';
import { timeDoubt } from './time-doubt';

/** A stored delivery, as it is interpreted. */
export interface Delivery {
  readonly id: string;
  readonly bytes: Buffer;
  readonly receivedAt: Date;
  readonly sentAt: Date;
  readonly tabletId: string;
  readonly tabletName: string;
}
type Kind<K extends Envelope['kind']> = Extract<Envelope, { kind: K }>;
type ActionRow = typeof correctiveActions.$inferInsert;

/** A delivery and what stands in it; `unread` says why when it is not understood. */
export type ReadDelivery = Delivery & ({ readonly envelope: Envelope; readonly unread?: undefined } | { readonly envelope?: undefined; readonly unread: string });

/** What a delivery will write once the log's head is locked. */
export interface Interpretation {
  readonly delivery: Delivery;
  readonly keptAside?: string;
  readonly acknowledgement?: Omit<typeof acknowledgements.$inferInsert, 'entryIndex'>;
  readonly answers?: typeof answerSets.$inferInsert;
  readonly pin?: { readonly row: typeof pins.$inferInsert; readonly event: Omit<typeof pinEvents.$inferInsert, 'entryIndex'> };
  readonly actions: readonly ActionRow[];
  readonly drafts: readonly EntryDraft[];
}

const reasonWords: Record<(typeof couldNotSignReasons)[number], string> = {
  'do-not-understand': 'does not understand the checklist',
  'missing-gear': 'is missing gear',
  'no-fit-test': 'has no fit test for the mask',
  'feels-unsafe': 'feels unsafe',
  other: 'another reason',
};

/** Reads the bytes once: what is judged later is what was understood here, never another reading of the same bytes. */
export function readEnvelope(delivery: Delivery): ReadDelivery {
  let json: unknown;
  try {
    json = JSON.parse(delivery.bytes.toString('utf8'));
  } catch {
    return { ...delivery, unread: 'It is not readable: perhaps it was cut off on the tablet.' };
  }
  const parsed = Envelope.safeParse(json);
  if (parsed.success) return { ...delivery, envelope: parsed.data };
  return { ...delivery, unread: `This version of the service does not understand it: ${parsed.error.issues.slice(0, 3).map((issue) => issue.path.join('.') || issue.message).join(', ')}.` };
}

/** Judges one envelope against the organisation's records. Writes nothing but wrong guesses at PINs; what is not understood is kept aside with the reason. */
export async function interpret(tx: Tx, keys: Config['keys'], delivery: ReadDelivery, known: KnownPins): Promise<Interpretation> {
  const aside = (because: string): Interpretation => ({ delivery, keptAside: because, actions: [], drafts: [] });
  if (!delivery.envelope) return aside(delivery.unread);
  const { envelope } = delivery;
  const judge = pinJudge(tx, keys, delivery, known);
  if (envelope.id !== delivery.id) return aside('Its own number differs from the one it was sent under.');
  const [person] = await tx.select().from(people).where(and(eq(people.organisationId, tx.organisationId), eq(people.id, envelope.personId)));
  if (!person) return aside('It names a person who is not known here.');
  if (envelope.kind === 'pin-set') return interpretPin(envelope, person.name);

  const [found] = await tx
    .select({ version: checklistVersions, jobName: jobs.name })
    .from(checklistVersions)
    .innerJoin(jobs, and(eq(jobs.organisationId, checklistVersions.organisationId), eq(jobs.id, checklistVersions.jobId)))
    .where(and(eq(checklistVersions.organisationId, tx.organisationId), eq(checklistVersions.id, envelope.versionId)));
  if (!found) return aside('It names a checklist that was not published here.');
  const { version, jobName } = found;
  const clockOffsetSeconds = Math.round((delivery.sentAt.getTime() - delivery.receivedAt.getTime()) / 1000);
  const times = { capturedAt: new Date(envelope.capturedAt), receivedAt: delivery.receivedAt, timeDoubt: timeDoubt(new Date(envelope.capturedAt), delivery.receivedAt, version.publishedAt) };

  if (envelope.kind === 'briefing' || envelope.kind === 'start-check') return interpretAnswers(envelope);
  return interpretAcknowledgement(envelope);

  async function interpretAcknowledgement(sent: Kind<'signed'> | Kind<'could-not-sign'>): Promise<Interpretation> {
    const [text] = await tx.select({ sha256: checklistTexts.sha256 }).from(checklistTexts).where(and(eq(checklistTexts.organisationId, tx.organisationId), eq(checklistTexts.versionId, version.id), eq(checklistTexts.language, sent.language)));
    if (text?.sha256 !== sent.textSha256) return aside('The text it was signed on is not the published one, byte for byte.');
    const [asked] = await tx.select().from(checklistPeople).where(and(eq(checklistPeople.organisationId, tx.organisationId), eq(checklistPeople.versionId, version.id), eq(checklistPeople.personId, sent.personId)));
    if (!asked) return aside(`${person!.name} was not asked to sign this checklist.`);
    const newest = await newestVersion(tx, version.shiftId);
    const wasSuperseded = newest !== undefined && newest.number > version.number;
    const pinState: PinState = sent.kind === 'signed' ? await judge.judge(sent.personId, sent, sent.textSha256) : 'not-set';
    const id = newId();
    const reason = sent.kind === 'could-not-sign' ? [reasonWords[sent.reason], sent.note].filter(Boolean).join(': ') : null;
    const acknowledgement = {
      organisationId: tx.organisationId,
      id,
      versionId: version.id,
      versionNumber: version.number,
      jobId: version.jobId,
      jobName,
      shiftId: version.shiftId,
      shiftDate: version.date,
      personId: sent.personId,
      personName: asked.name,
      kind: sent.kind,
      language: sent.language,
      textSha256: sent.textSha256,
      reason,
      strokes: JSON.stringify(sent.kind === 'signed' ? sent.strokes : []),
      pinState,
      wasSuperseded,
      ...times,
      clockOffsetSeconds,
      tabletId: delivery.tabletId,
      tabletName: delivery.tabletName,
      deliveryId: delivery.id,
    };
    const { organisationId: _, strokes, ...record } = acknowledgement;
    const draft: EntryDraft = {
      kind: 'acknowledgement',
      subjectId: id,
      record: { ...record, capturedAt: sent.capturedAt, receivedAt: delivery.receivedAt.toISOString(), strokesSha256: sha256(strokes), envelopeSha256: sha256(delivery.bytes) },
    };
    const opened = reason === null ? [] : [openAction(null, null, `${asked.name} could not sign: ${reason}`, asked.name)];
    return { delivery, acknowledgement, actions: opened, drafts: [draft, ...opened.map(actionDraft)] };
  }

  async function interpretAnswers(sent: Kind<'briefing'> | Kind<'start-check'>): Promise<Interpretation> {
    const checklist = JSON.parse(version.checklist.toString('utf8')) as Checklist;
    const taskId = sent.kind === 'start-check' ? sent.taskId : null;
    const lines = taskId === null ? checklist.morning : checklist.tasks.find((task) => task.taskId === taskId)?.live;
    if (!lines) return aside('It answers a task that is not on that checklist.');
    const strange = sent.answers.find((answer) => !lines.some((line) => line.id === answer.lineId));
    if (strange) return aside('It answers a line that is not on that checklist.');
    const id = newId();
    const { sealedPin, nonce } = sent;
    const pinState: PinState = sealedPin && nonce ? await judge.judge(sent.personId, { sealedPin, nonce }, sha256(answersText(sent.kind, sent.versionId, taskId, sent.answers))) : 'not-set';
    const answers = { organisationId: tx.organisationId, id, kind: sent.kind, versionId: version.id, taskId, personId: sent.personId, answers: JSON.stringify(sent.answers), pinState, ...times, deliveryId: delivery.id };
    const noes = sent.answers.filter((answer) => answer.answer === 'no').flatMap((answer) => lines.filter((line) => line.id === answer.lineId && line.isCritical).map((line) => ({ line, note: answer.note })));
    const actions = noes.map(({ line, note }) => openAction(line.taskId ?? taskId, line.id, [`"No" to: ${line.text.en}`, note].filter(Boolean).join(' '), person!.name));
    const draft: EntryDraft = { kind: sent.kind, subjectId: id, record: { id, kind: sent.kind, versionId: version.id, taskId, person: { id: sent.personId, name: person!.name }, answers: sent.answers, pinState, timeDoubt: times.timeDoubt, capturedAt: sent.capturedAt, receivedAt: delivery.receivedAt.toISOString(), envelopeSha256: sha256(delivery.bytes) } };
    return { delivery, answers, actions, drafts: [draft, ...actions.map(actionDraft)] };
  }

  async function interpretPin(sent: Kind<'pin-set'>, name: string): Promise<Interpretation> {
    const textHash = sha256(pinSetText(sent.personId));
    const opened = openSeal(keys, sent, textHash);
    if (opened === undefined) return aside(`The PIN of ${name} could not be opened. Ask them to set it again.`);
    if (!/^\d{4,8}$/.test(opened)) return aside(`The PIN of ${name} is not four to eight digits. Ask them to set it again.`);
    const before = known.pins.get(sent.personId);
    const hasAlready = `${name} has a PIN already. If they forgot it, reset it in the office; they then set a new one.`;
    if (before && before.proof !== 'none') return aside(hasAlready);
    const witness = sent.witnessPersonId === null ? null : { personId: sent.witnessPersonId, sealedPin: sent.witnessSealedPin ?? '', nonce: sent.witnessNonce ?? '' };
    const start = sent.startSealedPin && sent.startNonce ? { sealedPin: sent.startSealedPin, nonce: sent.startNonce } : null;
    const voucher = await judge.vouch(sent.personId, name, textHash, witness, start, delivery.receivedAt);
    if (typeof voucher === 'string') return aside(voucher);
    // A PIN that nobody vouched for gives way to one that somebody did, and to no other.
    if (before && voucher.proof === 'none') return aside(hasAlready);
    const digest = judge.digestOf(sent.personId, opened);
    known.pins.set(sent.personId, { digest, proof: voucher.proof, isPaused: false });
    const { proof, byPersonId, byName } = voucher;
    const { organisationId } = tx;
    const event = { id: newId(), event: 'set', personId: sent.personId, personName: name, proof, byPersonId, byName, tabletId: delivery.tabletId, tabletName: delivery.tabletName, deliveryId: delivery.id, capturedAt: new Date(sent.capturedAt), at: delivery.receivedAt };
    const draft: EntryDraft = { kind: 'pin', subjectId: event.id, record: { ...event, capturedAt: sent.capturedAt, at: event.at.toISOString(), envelopeSha256: sha256(delivery.bytes) } };
    const row = { organisationId, personId: sent.personId, digest, setAt: delivery.receivedAt, witnessPersonId: sent.witnessPersonId, tabletId: delivery.tabletId, proof };
    return { delivery, pin: { row, event: { organisationId, ...event } }, actions: [], drafts: [draft] };
  }

  function openAction(taskId: string | null, lineId: string | null, text: string, openedBy: string): ActionRow {
    return { organisationId: tx.organisationId, id: newId(), jobId: version.jobId, shiftId: version.shiftId, versionId: version.id, taskId, lineId, text, openedAt: times.timeDoubt === null ? times.capturedAt : times.receivedAt, openedBy, deliveryId: delivery.id };
  }
}

const actionDraft = (action: ActionRow): EntryDraft => {
  const { organisationId: _, ...record } = action;
  return { kind: 'corrective-action', subjectId: action.id, record: { ...record, event: 'opened', openedAt: new Date(action.openedAt).toISOString() } };
};
const sha256 = (bytes: string | Uint8Array) => createHash('sha256').update(bytes).digest('hex');

/** The PINs of the people named in these envelopes. All came from one tablet, or each is judged by itself. */
export function readPinsOf(tx: Tx, deliveries: readonly ReadDelivery[], now: Date): Promise<KnownPins> {
  const envelopes = deliveries.flatMap(({ envelope }) => envelope ?? []);
  const setting = envelopes.flatMap((envelope) => (envelope.kind === 'pin-set' ? [envelope] : []));
  const ids = [...envelopes.map(({ personId }) => personId), ...setting.flatMap(({ witnessPersonId }) => witnessPersonId ?? [])];
  return readPins(tx, [...new Set(ids)], deliveries[0]?.tabletId ?? '', setting.map(({ personId }) => personId), now);
}
