import { and, asc, desc, eq, inArray, isNull, ne } from 'drizzle-orm';
import { answerShift, generateChecklist } from '#compliance';
import { type ElsewhereFacts, type ExposureBasis, type PersonFacts } from '#compliance/facts';
import { acknowledgements, correctiveActions } from '#drizzle/schema/acknowledgements';
import { answerSets, checklistPeople, checklistTexts, checklistVersions } from '#drizzle/schema/checklists';
import { exposureBases, jobs, shifts } from '#drizzle/schema/jobs';
import { people } from '#drizzle/schema/people';
import { type PinState, type TimeDoubt } from '#shared/acknowledgements';
import { assembleFacts, type PublishedVersion, type Shift, type ShiftPlan, type SiteFacts } from '#shared/jobs';
import { NotFoundError } from '../errors';
import { listAllEquipment } from '../equipment/equipment-service';
import { type Tx } from '../platform/database';
import { readKitFacts } from '../products/products-service';

export type JobRow = typeof jobs.$inferSelect;
export type ShiftRow = typeof shifts.$inferSelect;
export type VersionRow = typeof checklistVersions.$inferSelect;

export async function findJob(tx: Tx, id: string): Promise<JobRow> {
  const [row] = await tx.select().from(jobs).where(and(eq(jobs.organisationId, tx.organisationId), eq(jobs.id, id)));
  if (!row) throw new NotFoundError('job');
  return row;
}
export async function findShift(tx: Tx, id: string, lock = false): Promise<ShiftRow> {
  const query = tx.select().from(shifts).where(and(eq(shifts.organisationId, tx.organisationId), eq(shifts.id, id)));
  const [row] = lock ? await query.for('update') : await query;
  if (!row) throw new NotFoundError('shift');
  return row;
}

/** Everything the shift page and the publisher need, read in one transaction. */
export async function readShift(tx: Tx, id: string, asOf: Date): Promise<Shift> {
  const row = await findShift(tx, id);
  const job = await findJob(tx, row.jobId);
  const plan = row.plan as ShiftPlan;
  const openActions = await tx
    .select()
    .from(correctiveActions)
    .where(and(eq(correctiveActions.organisationId, tx.organisationId), eq(correctiveActions.shiftId, id), isNull(correctiveActions.resolvedAt)))
    .orderBy(asc(correctiveActions.openedAt));
  const versions = await readVersions(tx, id);
  const shift = {
    id,
    jobId: job.id,
    date: row.date,
    version: row.version,
    plan,
    job: { id: job.id, name: job.name, siteName: job.siteName, jurisdictionId: job.jurisdictionId, timeZone: job.timeZone, site: job.site as SiteFacts, version: job.version },
    context: {
      people: await readPersonFacts(tx, row),
      kits: await readKitFacts(tx, null),
      equipment: await listAllEquipment(tx),
      bases: await readBases(tx, job.id),
      failedControls: Object.fromEntries(openActions.flatMap((action) => (action.taskId ? [[action.taskId, action.text]] : []))),
    },
    versions,
    openActions: openActions.map((action) => ({ id: action.id, taskId: action.taskId, text: action.text, openedAt: action.openedAt.toISOString(), openedBy: action.openedBy })),
  };
  const newest = await newestVersion(tx, id);
  return { ...shift, hasUnpublishedChanges: newest ? !newest.checklist.equals(draftChecklist(shift, asOf).checklistBytes) : plan.tasks.length > 0 };
}

/** The checklist as it would be published now. What people sign has changed when these bytes have, whatever else in the facts did. */
export function draftChecklist(shift: Parameters<typeof assembleFacts>[0], asOf: Date) {
  const facts = assembleFacts(shift);
  const answer = answerShift(facts, asOf.toISOString());
  const checklist = generateChecklist(facts, answer);
  return { facts, answer, checklist, factsBytes: Buffer.from(JSON.stringify(facts)), checklistBytes: Buffer.from(JSON.stringify(checklist)) };
}

export async function newestVersion(tx: Tx, shiftId: string): Promise<VersionRow | undefined> {
  const [row] = await tx.select().from(checklistVersions).where(and(eq(checklistVersions.organisationId, tx.organisationId), eq(checklistVersions.shiftId, shiftId))).orderBy(desc(checklistVersions.number)).limit(1);
  return row;
}

/** People with the work they have on other jobs that day: the person carries the minutes. */
async function readPersonFacts(tx: Tx, shift: ShiftRow): Promise<PersonFacts[]> {
  const rows = await tx.select().from(people).where(and(eq(people.organisationId, tx.organisationId), eq(people.isActive, true))).orderBy(asc(people.name), asc(people.id));
  const others = await tx
    .select({ plan: shifts.plan, jobName: jobs.name })
    .from(shifts)
    .innerJoin(jobs, and(eq(jobs.organisationId, shifts.organisationId), eq(jobs.id, shifts.jobId)))
    .where(and(eq(shifts.organisationId, tx.organisationId), eq(shifts.date, shift.date), ne(shifts.id, shift.id)))
    .orderBy(asc(shifts.id));
  const elsewhere = new Map<string, ElsewhereFacts[]>();
  for (const { plan, jobName } of others)
    for (const task of (plan as ShiftPlan).tasks)
      for (const { personId, startMinute, endMinute } of [...task.assignments, ...(task.logged ?? [])]) elsewhere.set(personId, [...(elsewhere.get(personId) ?? []), { jobName, kind: task.kind, startMinute, endMinute }]);
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    language: row.language as PersonFacts['language'],
    isLead: false,
    employer: row.employer,
    isAdultConfirmed: row.isAdultConfirmed,
    isKeptFromIsocyanates: row.isKeptFromIsocyanates,
    silicaTrainedOn: row.silicaTrainedOn,
    silicaTrainedBy: row.silicaTrainedBy,
    hazcomTrainedOn: row.hazcomTrainedOn,
    hazcomTrainedBy: row.hazcomTrainedBy,
    respirators: row.respirators as PersonFacts['respirators'],
    elsewhere: elsewhere.get(row.id) ?? [],
  }));
}

async function readBases(tx: Tx, jobId: string): Promise<ExposureBasis[]> {
  const rows = await tx.select().from(exposureBases).where(and(eq(exposureBases.organisationId, tx.organisationId), eq(exposureBases.jobId, jobId))).orderBy(asc(exposureBases.signedAt), asc(exposureBases.id));
  // The newest decision about a kind of task replaces the older ones.
  const newest = new Map(rows.map((row) => [row.taskKind, row]));
  return [...newest.values()].map((row) => ({
    id: row.id,
    taskKind: row.taskKind as ExposureBasis['taskKind'],
    kind: row.kind as ExposureBasis['kind'],
    exposureMicrogramsPerM3: row.exposureMicrogramsPerM3,
    conditions: row.conditions,
    signedBy: row.signedByName,
    signedOn: row.signedOn,
    endsOn: row.endsOn,
    interimApf: row.interimApf,
  }));
}

/** Newest first, each with who was asked and what came back. */
export async function readVersions(tx: Tx, shiftId: string): Promise<PublishedVersion[]> {
  const rows = await tx.select().from(checklistVersions).where(and(eq(checklistVersions.organisationId, tx.organisationId), eq(checklistVersions.shiftId, shiftId))).orderBy(desc(checklistVersions.number));
  if (rows.length === 0) return [];
  const ids = rows.map((row) => row.id);
  const texts = await tx
    .select({ versionId: checklistTexts.versionId, language: checklistTexts.language, sha256: checklistTexts.sha256 })
    .from(checklistTexts)
    .where(and(eq(checklistTexts.organisationId, tx.organisationId), inArray(checklistTexts.versionId, ids)))
    .orderBy(asc(checklistTexts.language));
  const asked = await readAsked(tx, ids);
  const answers = await tx
    .select({ id: answerSets.id, versionId: answerSets.versionId, kind: answerSets.kind, taskId: answerSets.taskId, personName: people.name, answers: answerSets.answers, at: answerSets.capturedAt, receivedAt: answerSets.receivedAt, pinState: answerSets.pinState, timeDoubt: answerSets.timeDoubt })
    .from(answerSets)
    .innerJoin(people, and(eq(people.organisationId, answerSets.organisationId), eq(people.id, answerSets.personId)))
    .where(and(eq(answerSets.organisationId, tx.organisationId), inArray(answerSets.versionId, ids)))
    .orderBy(asc(answerSets.receivedAt), asc(answerSets.id));
  return rows.map((row) => ({
    id: row.id,
    number: row.number,
    publishedAt: row.publishedAt.toISOString(),
    publishedBy: row.publishedByName,
    manifestSha256: row.manifestSha256,
    texts: texts.filter((text) => text.versionId === row.id).map(({ language, sha256 }) => ({ language: language as 'en' | 'es', sha256 })),
    asked: asked.get(row.id) ?? [],
    answers: answers.filter((set) => set.versionId === row.id).map(({ versionId: _, kind, answers: given, at, receivedAt, pinState, timeDoubt, ...set }) => ({
      ...set,
      kind: kind as 'briefing' | 'start-check',
      at: at.toISOString(),
      receivedAt: receivedAt.toISOString(),
      noCount: (JSON.parse(given) as { answer: string }[]).filter(({ answer }) => answer === 'no').length,
      pinState: pinState as PinState,
      timeDoubt: timeDoubt as TimeDoubt | null,
    })),
  }));
}

export type Asked = PublishedVersion['asked'][number];
/**
 * Who each version asks, and how far each person is. A signature stands above an earlier "I can't sign yet". One that no proven PIN
 * stands beside is kept and marked, and counts when the person signs again with a witnessed PIN: a lead's word would prove the lead.
 */
export async function readAsked(tx: Tx, versionIds: readonly string[]): Promise<Map<string, Asked[]>> {
  if (versionIds.length === 0) return new Map();
  const asked = await tx.select().from(checklistPeople).where(and(eq(checklistPeople.organisationId, tx.organisationId), inArray(checklistPeople.versionId, [...versionIds]))).orderBy(asc(checklistPeople.name), asc(checklistPeople.personId));
  const answers = await tx
    .select({ versionId: acknowledgements.versionId, personId: acknowledgements.personId, kind: acknowledgements.kind, pinState: acknowledgements.pinState, capturedAt: acknowledgements.capturedAt })
    .from(acknowledgements)
    .where(and(eq(acknowledgements.organisationId, tx.organisationId), inArray(acknowledgements.versionId, [...versionIds])))
    .orderBy(asc(acknowledgements.entryIndex));
  const result = new Map<string, Asked[]>();
  for (const person of asked) {
    const own = answers.filter((answer) => answer.versionId === person.versionId && answer.personId === person.personId);
    const answer = own.find((each) => each.kind !== 'could-not-sign' && !isUnproven(each)) ?? own.at(-1);
    const state: Asked['state'] = !answer ? 'not-yet' : answer.kind === 'could-not-sign' ? 'could-not-sign' : isUnproven(answer) ? 'not-confirmed' : 'signed';
    result.set(person.versionId, [...(result.get(person.versionId) ?? []), { personId: person.personId, name: person.name, language: person.language as 'en' | 'es', state, at: answer?.capturedAt.toISOString() ?? null, pinState: answer?.kind === 'signed' ? (answer.pinState as PinState) : null }]);
  }
  return result;
}
/** Paper and witnessed records stand by themselves; what was signed on a tablet stands by its PIN. */
const isUnproven = ({ kind, pinState }: { kind: string; pinState: string }): boolean => kind === 'signed' && pinState !== 'confirmed';
