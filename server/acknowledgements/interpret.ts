import { createHash } from 'node:crypto';
import { and, eq, inArray, sql } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import { type Checklist } from '#compliance/answer';
import { type acknowledgements, type correctiveActions } from '#drizzle/schema/acknowledgements';
import { type answerSets, checklistPeople, checklistTexts, checklistVersions } from '#drizzle/schema/checklists';
import { jobs } from '#drizzle/schema/jobs';
import { people, pins } from '#drizzle/schema/people';
import { type couldNotSignReasons, Envelope, type Receipt } from '#shared/envelopes';
import { pinSetText } from '#shared/pin-sealing';
import { type Config } from '../config';
import { newestVersion } from '../jobs/shift-store';
import { pinDigest, isSamePinDigest } from '../people/pin-digest';
import { unsealPin } from '../people/pin-unsealing';
import { type Tx } from '../platform/database';
import { type EntryDraft } from '../recordlog/recordlog-store';

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
type PinState = NonNullable<Receipt['pinState']>;
type ActionRow = typeof correctiveActions.$inferInsert;

/** A delivery and what stands in it; `unread` says why when it is not understood. */
export type ReadDelivery = Delivery & ({ readonly envelope: Envelope; readonly unread?: undefined } | { readonly envelope?: undefined; readonly unread: string });

/** What a delivery will write once the log's head is locked. */
export interface Interpretation {
  readonly delivery: Delivery;
  readonly keptAside?: string;
  readonly acknowledgement?: Omit<typeof acknowledgements.$inferInsert, 'entryIndex'>;
  readonly answers?: typeof answerSets.$inferInsert;
  readonly pin?: typeof pins.$inferInsert;
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
export async function interpret(tx: Tx, keys: Config['keys'], delivery: ReadDelivery, pinsBefore: Map<string, KnownPin>): Promise<Interpretation> {
  const aside = (because: string): Interpretation => ({ delivery, keptAside: because, actions: [], drafts: [] });
  if (!delivery.envelope) return aside(delivery.unread);
  const { envelope } = delivery;
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
  const times = { capturedAt: new Date(envelope.capturedAt), receivedAt: delivery.receivedAt };

  if (envelope.kind === 'briefing' || envelope.kind === 'start-check') return interpretAnswers(envelope);
  return interpretAcknowledgement(envelope);

  async function interpretAcknowledgement(sent: Kind<'signed'> | Kind<'could-not-sign'>): Promise<Interpretation> {
    const [text] = await tx.select({ sha256: checklistTexts.sha256 }).from(checklistTexts).where(and(eq(checklistTexts.organisationId, tx.organisationId), eq(checklistTexts.versionId, version.id), eq(checklistTexts.language, sent.language)));
    if (text?.sha256 !== sent.textSha256) return aside('The text it was signed on is not the published one, byte for byte.');
    const [asked] = await tx.select().from(checklistPeople).where(and(eq(checklistPeople.organisationId, tx.organisationId), eq(checklistPeople.versionId, version.id), eq(checklistPeople.personId, sent.personId)));
    if (!asked) return aside(`${person!.name} was not asked to sign this checklist.`);
    const newest = await newestVersion(tx, version.shiftId);
    const wasSuperseded = newest !== undefined && newest.number > version.number;
    const pinState: PinState = sent.kind === 'signed' ? await judgePin(sent.personId, sent.sealedPin, sent.textSha256, sent.nonce) : 'not-set';
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

  function interpretAnswers(sent: Kind<'briefing'> | Kind<'start-check'>): Interpretation {
    const checklist = JSON.parse(version.checklist.toString('utf8')) as Checklist;
    const taskId = sent.kind === 'start-check' ? sent.taskId : null;
    const lines = taskId === null ? checklist.morning : checklist.tasks.find((task) => task.taskId === taskId)?.live;
    if (!lines) return aside('It answers a task that is not on that checklist.');
    const strange = sent.answers.find((answer) => !lines.some((line) => line.id === answer.lineId));
    if (strange) return aside('It answers a line that is not on that checklist.');
    const id = newId();
    const answers = { organisationId: tx.organisationId, id, kind: sent.kind, versionId: version.id, taskId, personId: sent.personId, answers: JSON.stringify(sent.answers), ...times, deliveryId: delivery.id };
    const noes = sent.answers.filter((answer) => answer.answer === 'no').flatMap((answer) => lines.filter((line) => line.id === answer.lineId && line.isCritical).map((line) => ({ line, note: answer.note })));
    const actions = noes.map(({ line, note }) => openAction(line.taskId ?? taskId, line.id, [`"No" to: ${line.text.en}`, note].filter(Boolean).join(' '), person!.name));
    const draft: EntryDraft = { kind: sent.kind, subjectId: id, record: { id, kind: sent.kind, versionId: version.id, taskId, person: { id: sent.personId, name: person!.name }, answers: sent.answers, capturedAt: sent.capturedAt, receivedAt: delivery.receivedAt.toISOString(), envelopeSha256: sha256(delivery.bytes) } };
    return { delivery, answers, actions, drafts: [draft, ...actions.map(actionDraft)] };
  }

  async function interpretPin(sent: Kind<'pin-set'>, name: string): Promise<Interpretation> {
    const textHash = sha256(pinSetText(sent.personId));
    const opened = openSeal(sent.sealedPin, textHash, sent.nonce);
    if (opened === undefined) return aside(`The PIN of ${name} could not be opened. Ask them to set it again.`);
    if (!/^\d{4,8}$/.test(opened)) return aside(`The PIN of ${name} is not four to eight digits. Ask them to set it again.`);
    if (pinsBefore.has(sent.personId)) return aside(`${name} has a PIN already. If they forgot it, reset it in the office; they then set a new one.`);
    const { witnessPersonId } = sent;
    // Who is named as witness has shown their own PIN: anything less would put a witness on record who saw nothing.
    const isWitnessed = witnessPersonId === null || (witnessPersonId !== sent.personId && (await judgePin(witnessPersonId, sent.witnessSealedPin ?? '', textHash, sent.witnessNonce ?? '')) === 'confirmed');
    if (!isWitnessed) return aside(`The PIN that was to witness ${name}'s new one was not the witness's own. Ask them to set it again.`);
    const digest = pinDigest(keys.pinPepper, tx.organisationId, sent.personId, opened);
    pinsBefore.set(sent.personId, { digest, isPaused: false });
    return { delivery, pin: { organisationId: tx.organisationId, personId: sent.personId, digest, setAt: delivery.receivedAt, witnessPersonId, tabletId: delivery.tabletId }, actions: [], drafts: [] };
  }

  /** Wrong guesses count with those asked online; while that pause lasts no PIN counts as right, or guesses could hide in deliveries. */
  async function judgePin(personId: string, sealed: string, textHash: string, nonce: string): Promise<PinState> {
    const stored = pinsBefore.get(personId);
    if (!stored) return 'not-set';
    const pin = openSeal(sealed, textHash, nonce);
    if (pin === undefined || stored.isPaused) return 'not-confirmed';
    if (isSamePinDigest(stored.digest, pinDigest(keys.pinPepper, tx.organisationId, personId, pin))) return 'confirmed';
    const { rows } = await tx.execute<{ failures: number }>(sql`SELECT door_failed(${pinGuessKey(personId, delivery.tabletId)}) AS failures`);
    stored.isPaused = (rows[0]?.failures ?? 0) > freePinTries;
    return 'not-confirmed';
  }
  /** The PIN, when the seal opens and stands for this very text and nonce. */
  function openSeal(sealed: string, textHash: string, nonce: string): string | undefined {
    try {
      const opened = unsealPin(sealed, keys.pinSealingKey);
      return opened.textHash === textHash && opened.nonce === nonce ? opened.pin : undefined;
    } catch {
      return undefined;
    }
  }
  function openAction(taskId: string | null, lineId: string | null, text: string, openedBy: string): ActionRow {
    return { organisationId: tx.organisationId, id: newId(), jobId: version.jobId, shiftId: version.shiftId, versionId: version.id, taskId, lineId, text, openedAt: times.capturedAt, openedBy, deliveryId: delivery.id };
  }
}

const actionDraft = (action: ActionRow): EntryDraft => {
  const { organisationId: _, ...record } = action;
  return { kind: 'corrective-action', subjectId: action.id, record: { ...record, event: 'opened', openedAt: new Date(action.openedAt).toISOString() } };
};
const sha256 = (bytes: string | Uint8Array) => createHash('sha256').update(bytes).digest('hex');

/** A PIN on record; `isPaused` while too many wrong ones came from this tablet. */
interface KnownPin {
  readonly digest: string;
  isPaused: boolean;
}
/** Wrong PINs before waiting begins, for one person on one tablet, asked online or delivered. */
export const freePinTries = 5;
export const pinGuessKey = (personId: string, tabletId: string): string => `pin ${personId} on ${tabletId}`;

/** The PINs that the people named in these envelopes have now. All came from one tablet, or each is judged by itself. */
export async function readPins(tx: Tx, deliveries: readonly ReadDelivery[]): Promise<Map<string, KnownPin>> {
  const ids = deliveries.flatMap(({ envelope }) => (envelope ? [envelope.personId, ...(envelope.kind === 'pin-set' && envelope.witnessPersonId ? [envelope.witnessPersonId] : [])] : []));
  const tabletId = deliveries[0]?.tabletId;
  if (ids.length === 0 || !tabletId) return new Map();
  const rows = await tx
    .select({ personId: pins.personId, digest: pins.digest, waitSeconds: sql<number | null>`door_wait('pin ' || ${pins.personId} || ' on ' || ${tabletId}::text, ${freePinTries})` })
    .from(pins)
    .where(and(eq(pins.organisationId, tx.organisationId), inArray(pins.personId, ids)));
  return new Map(rows.map(({ personId, digest, waitSeconds }) => [personId, { digest, isPaused: (waitSeconds ?? 0) > 0 }]));
}
