import { and, asc, desc, eq, gte, inArray, isNotNull, isNull, lte, or } from 'drizzle-orm';
import { type Checklist } from '#compliance/answer';
import { correctiveActions } from '#drizzle/schema/acknowledgements';
import { answerSets, checklistTexts, checklistVersions } from '#drizzle/schema/checklists';
import { jobs, shiftKits, shifts } from '#drizzle/schema/jobs';
import { organisations } from '#drizzle/schema/organisations';
import { people, pins } from '#drizzle/schema/people';
import { kitParts, products, revisions } from '#drizzle/schema/sheets';
import { type TabletDay } from '#shared/envelopes';
import { type ShiftPlan } from '#shared/jobs';
import { sql } from 'drizzle-orm';
import { type Deps } from '../deps';
import { type TabletActor } from '../http/actor';
import { localDate } from '../jobs/jobs-service';
import { readAsked } from '../jobs/shift-store';
import { pinPublicKeySpki } from '../people/pin-unsealing';
import { type Tx } from '../platform/database';

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
          jobs: await Promise.all(published.map((each) => toTabletJob(tx, each))),
        };
      }),
  };

  async function toTabletJob(tx: Tx, { shift, job, version }: { shift: typeof shifts.$inferSelect; job: typeof jobs.$inferSelect; version: typeof checklistVersions.$inferSelect }): Promise<TabletDay['jobs'][number]> {
    const texts = await tx.select().from(checklistTexts).where(and(eq(checklistTexts.organisationId, tx.organisationId), eq(checklistTexts.versionId, version.id))).orderBy(asc(checklistTexts.language));
    const asked = (await readAsked(tx, [version.id])).get(version.id) ?? [];
    const withPin = asked.length === 0 ? [] : await tx.select({ personId: pins.personId }).from(pins).where(and(eq(pins.organisationId, tx.organisationId), inArray(pins.personId, asked.map((person) => person.personId))));
    const answers = await tx.select().from(answerSets).where(and(eq(answerSets.organisationId, tx.organisationId), eq(answerSets.versionId, version.id))).orderBy(asc(answerSets.capturedAt));
    const stops = await tx.select().from(correctiveActions).where(and(eq(correctiveActions.organisationId, tx.organisationId), eq(correctiveActions.shiftId, shift.id), isNull(correctiveActions.resolvedAt), or(isNotNull(correctiveActions.taskId), isNotNull(correctiveActions.lineId)))).orderBy(asc(correctiveActions.openedAt));
    const sheets = await tx
      .selectDistinct({ revisionId: revisions.id, productName: products.name })
      .from(shiftKits)
      .innerJoin(kitParts, and(eq(kitParts.organisationId, shiftKits.organisationId), eq(kitParts.kitId, shiftKits.kitId)))
      .innerJoin(products, and(eq(products.organisationId, kitParts.organisationId), eq(products.id, kitParts.productId)))
      .innerJoin(revisions, and(eq(revisions.organisationId, products.organisationId), eq(revisions.productId, products.id), eq(revisions.isCurrent, true)))
      .where(and(eq(shiftKits.organisationId, tx.organisationId), eq(shiftKits.shiftId, shift.id)))
      .orderBy(asc(products.name));
    const briefing = answers.filter((set) => set.kind === 'briefing').at(-1);
    const noLines = (set: typeof answerSets.$inferSelect) => (JSON.parse(set.answers) as Answers).filter((answer) => answer.answer === 'no').map((answer) => answer.lineId);
    const taskIds = (JSON.parse(version.checklist.toString('utf8')) as Checklist).tasks.map((task) => task.taskId);
    const competent = (shift.plan as ShiftPlan).competentPersonId;
    return {
      shiftId: shift.id,
      jobId: job.id,
      jobName: job.name,
      siteName: job.siteName,
      date: shift.date,
      version: { id: version.id, number: version.number, publishedAt: version.publishedAt.toISOString(), texts: texts.map(({ language, sha256, bytes }) => ({ language: language as 'en' | 'es', sha256, text: bytes.toString('utf8') })) },
      people: asked.map(({ personId, ...person }) => ({ ...person, id: personId, isLead: personId === competent, hasPin: withPin.some((pin) => pin.personId === personId) })),
      briefing: briefing ? { at: briefing.capturedAt.toISOString(), noLineIds: noLines(briefing) } : null,
      // A "No" to a line about the whole job names no task: it stops each of them.
      stopped: stops.flatMap((stop) => (stop.taskId ? [stop.taskId] : taskIds).map((taskId) => ({ taskId, lineId: stop.lineId, text: stop.text, actionId: stop.id }))),
      startedTaskIds: [...new Set(answers.filter((set) => set.kind === 'start-check' && set.taskId && noLines(set).length === 0).map((set) => set.taskId as string))],
      sheets,
    };
  }
}
export type TabletDayService = ReturnType<typeof tabletDayService>;
