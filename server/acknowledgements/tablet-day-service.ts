import { and, asc, desc, eq, gte, inArray, isNotNull, lte, ne, or, sql } from 'drizzle-orm';
import { type Checklist } from '#compliance/answer';
import { correctiveActions } from '#drizzle/schema/acknowledgements';
import { answerSets, checklistTexts, checklistVersions } from '#drizzle/schema/checklists';
import { jobs, shiftKits, shifts } from '#drizzle/schema/jobs';
import { organisations } from '#drizzle/schema/organisations';
import { people } from '#drizzle/schema/people';
import { pins } from '#drizzle/schema/pins';
import { kitParts, products, revisions } from '#drizzle/schema/sheets';
import { deliveries } from '#drizzle/schema/tablets';
import { type TabletDay } from '#shared/envelopes';
import { type ShiftPlan } from '#shared/jobs';
import { type Deps } from '../deps';
import { type TabletActor } from '../http/actor';
import { localDate } from '../jobs/jobs-service';
import { readAsked } from '../jobs/shift-store';
import { pinPublicKeySpki } from '../people/pin-unsealing';
import { type Tx } from '../platform/database';
import { readLeads } from '../people/witnesses';

const dayMs = 24 * 3600 * 1000;
type Answers = { lineId: string; answer: 'yes' | 'no' }[];

export function tabletDayService({ config, database, clock }: Deps) {
  const sealingKey = pinPublicKeySpki(config.keys.pinSealingKey);

  return {
    /** Today's published checklists of open jobs, by each job's own local date, and yesterday's that run past midnight. */
    read: (actor: TabletActor): Promise<TabletDay> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const now = clock.now();
        const near = (days: number) => new Date(now.getTime() + days * dayMs).toISOString().slice(0, 10);
        const candidates = await tx
          .select({ shift: shifts, job: jobs })
          .from(shifts)
          .innerJoin(jobs, and(eq(jobs.organisationId, shifts.organisationId), eq(jobs.id, shifts.jobId)))
          .where(and(eq(shifts.organisationId, tx.organisationId), eq(jobs.isOpen, true), gte(shifts.date, near(-2)), lte(shifts.date, near(2))))
          .orderBy(asc(jobs.name), asc(shifts.date));
        const current = candidates.filter(({ shift, job }) => {
          const today = localDate(now, job.timeZone);
          const passesMidnight = (shift.plan as ShiftPlan).tasks.some((task) => task.assignments.some((each) => each.endMinute > 1440));
          return shift.date === today || (passesMidnight && shift.date === localDate(new Date(now.getTime() - dayMs), job.timeZone));
        });
        const versions = current.length === 0 ? [] : await tx.selectDistinctOn([checklistVersions.shiftId]).from(checklistVersions).where(and(eq(checklistVersions.organisationId, tx.organisationId), inArray(checklistVersions.shiftId, current.map(({ shift }) => shift.id)))).orderBy(checklistVersions.shiftId, desc(checklistVersions.number));
        const [organisation] = await tx.select().from(organisations);
        const officer = await tx.execute<{ name: string }>(sql`SELECT p.name FROM door_members() m JOIN ${people} p ON p.id = m.person_id AND p.organisation_id = ${tx.organisationId} WHERE m.role = 'safety-officer' AND p.is_active ORDER BY p.name LIMIT 1`);
        const published = current.flatMap(({ shift, job }) => versions.filter((version) => version.shiftId === shift.id).map((version) => ({ shift, job, version })));
        return {
          tablet: { id: actor.tabletId, name: actor.tabletName },
          organisationName: actor.organisationName,
          serverTime: now.toISOString(),
          sealingKey,
          officerName: officer.rows[0]?.name ?? null,
          officerPhone: organisation?.phone ?? null,
          witnesses: await readWitnesses(tx, now),
          jobs: await Promise.all(published.map((each) => toTabletJob(tx, each))),
        };
      }),
  };

  async function toTabletJob(tx: Tx, { shift, job, version }: { shift: typeof shifts.$inferSelect; job: typeof jobs.$inferSelect; version: typeof checklistVersions.$inferSelect }): Promise<TabletDay['jobs'][number]> {
    const texts = await tx.select().from(checklistTexts).where(and(eq(checklistTexts.organisationId, tx.organisationId), eq(checklistTexts.versionId, version.id))).orderBy(asc(checklistTexts.language));
    const asked = (await readAsked(tx, [version.id])).get(version.id) ?? [];
    const withPin = asked.length === 0 ? [] : await tx.select({ personId: pins.personId, proof: pins.proof }).from(pins).where(and(eq(pins.organisationId, tx.organisationId), inArray(pins.personId, asked.map((person) => person.personId))));
    // In the order of arrival: a tablet that stands in another year must not have the last word.
    const answers = await tx.select({ set: answerSets, name: people.name, sentAt: deliveries.sentAt }).from(answerSets).innerJoin(people, and(eq(people.organisationId, answerSets.organisationId), eq(people.id, answerSets.personId))).innerJoin(deliveries, and(eq(deliveries.organisationId, answerSets.organisationId), eq(deliveries.id, answerSets.deliveryId))).where(and(eq(answerSets.organisationId, tx.organisationId), eq(answerSets.versionId, version.id))).orderBy(asc(answerSets.receivedAt), asc(answerSets.id));
    const everyStop = await tx
      .select({ stop: correctiveActions, ownerName: people.name })
      .from(correctiveActions)
      .leftJoin(people, and(eq(people.organisationId, correctiveActions.organisationId), eq(people.id, correctiveActions.ownerPersonId)))
      .where(and(eq(correctiveActions.organisationId, tx.organisationId), eq(correctiveActions.shiftId, shift.id), or(isNotNull(correctiveActions.taskId), isNotNull(correctiveActions.lineId))))
      .orderBy(asc(correctiveActions.openedAt), asc(correctiveActions.id));
    const sheets = await tx
      .selectDistinct({ revisionId: revisions.id, productName: products.name })
      .from(shiftKits)
      .innerJoin(kitParts, and(eq(kitParts.organisationId, shiftKits.organisationId), eq(kitParts.kitId, shiftKits.kitId)))
      .innerJoin(products, and(eq(products.organisationId, kitParts.organisationId), eq(products.id, kitParts.productId)))
      .innerJoin(revisions, and(eq(revisions.organisationId, products.organisationId), eq(revisions.productId, products.id), eq(revisions.isCurrent, true)))
      .where(and(eq(shiftKits.organisationId, tx.organisationId), eq(shiftKits.shiftId, shift.id)))
      .orderBy(asc(products.name));
    const briefing = answers.filter(({ set }) => set.kind === 'briefing').at(-1);
    const noLines = (set: typeof answerSets.$inferSelect) => (JSON.parse(set.answers) as Answers).filter((answer) => answer.answer === 'no').map((answer) => answer.lineId);
    const { tasks } = JSON.parse(version.checklist.toString('utf8')) as Checklist;
    // A "No" to a line about the whole job names no task: it stops each of them.
    const ofTasks = everyStop.flatMap(({ stop, ownerName }) => (stop.taskId ? [stop.taskId] : tasks.map((task) => task.taskId)).map((taskId) => ({ taskId, stop, ownerName })));
    const begun = startsOf(tasks, answers, ofTasks.flatMap(({ taskId, stop }) => (stop.resolvedAt ? [{ taskId, resolvedAt: stop.resolvedAt }] : [])), noLines);
    const competent = (shift.plan as ShiftPlan).competentPersonId;
    return {
      shiftId: shift.id,
      jobId: job.id,
      jobName: job.name,
      siteName: job.siteName,
      date: shift.date,
      version: { id: version.id, number: version.number, publishedAt: version.publishedAt.toISOString(), texts: texts.map(({ language, sha256, bytes }) => ({ language: language as 'en' | 'es', sha256, text: bytes.toString('utf8') })) },
      people: asked.map(({ personId, ...person }) => ({ ...person, id: personId, isLead: personId === competent, hasPin: withPin.some((pin) => pin.personId === personId), isPinProven: withPin.some((pin) => pin.personId === personId && pin.proof !== 'none') })),
      briefing: briefing ? { at: briefing.set.capturedAt.toISOString(), noLineIds: noLines(briefing.set), by: briefing.name, isProven: briefing.set.pinState === 'confirmed' } : null,
      stopped: ofTasks.filter(({ stop }) => stop.resolvedAt === null).map(({ taskId, stop, ownerName }) => ({ taskId, lineId: stop.lineId, text: stop.text, actionId: stop.id, openedAt: stop.openedAt.toISOString(), openedBy: stop.openedBy, ownerName })),
      reopened: ofTasks
        .flatMap(({ taskId, stop }) => (stop.resolvedAt ? [{ taskId, lineId: stop.lineId, text: stop.text, actionId: stop.id, resolvedAt: stop.resolvedAt.toISOString(), resolvedBy: stop.resolvedBy ?? '', evidence: stop.evidence ?? '' }] : []))
        .sort((one, other) => (one.resolvedAt < other.resolvedAt ? -1 : 1)),
      ...begun,
      sheets,
    };
  }
}

/** Which tasks may run: live lines answered after the last stop, without a critical "No", by somebody with a proven PIN; and those where only the PIN is missing. */
function startsOf(
  tasks: Checklist['tasks'],
  answers: readonly { readonly set: typeof answerSets.$inferSelect; readonly sentAt: Date }[],
  reopenings: readonly { taskId: string; resolvedAt: Date }[],
  noLines: (set: typeof answerSets.$inferSelect) => string[],
): { startedTaskIds: string[]; unprovenTaskIds: string[] } {
  const opening = (taskId: string, live: readonly { id: string; isCritical: boolean }[]) => {
    const since = Math.max(0, ...reopenings.filter((each) => each.taskId === taskId).map((each) => each.resolvedAt.getTime()));
    return answers.filter(({ set, sentAt }) => set.kind === 'start-check' && set.taskId === taskId && answeredAtMs(set, sentAt) >= since && !noLines(set).some((id) => live.find((line) => line.id === id)?.isCritical)).map(({ set }) => set);
  };
  const opened = tasks.map((task) => ({ taskId: task.taskId, sets: opening(task.taskId, task.live) }));
  const isProven = (set: typeof answerSets.$inferSelect) => set.pinState === 'confirmed';
  return {
    startedTaskIds: opened.filter((each) => each.sets.some(isProven)).map((each) => each.taskId),
    unprovenTaskIds: opened.filter((each) => each.sets.length > 0 && !each.sets.some(isProven)).map((each) => each.taskId),
  };
}

/** When it was answered by our clock: a check of before a stop may arrive after it, from a tablet without signal. */
const answeredAtMs = ({ capturedAt, receivedAt }: typeof answerSets.$inferSelect, sentAt: Date): number => Math.min(receivedAt.getTime(), capturedAt.getTime() + receivedAt.getTime() - sentAt.getTime());

/** Leads, officers and owners whose own PIN is proven. */
async function readWitnesses(tx: Tx, now: Date): Promise<TabletDay['witnesses']> {
  const leads = await readLeads(tx, now);
  const proven = await tx.select({ personId: pins.personId }).from(pins).where(and(eq(pins.organisationId, tx.organisationId), ne(pins.proof, 'none')));
  return leads.filter(({ id }) => proven.some((pin) => pin.personId === id));
}
export type TabletDayService = ReturnType<typeof tabletDayService>;
