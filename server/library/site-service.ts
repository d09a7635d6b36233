import { and, desc, eq, inArray } from 'drizzle-orm';
import { kitHazards } from '#compliance/hazcom/kit-hazards';
import { type DayPlan } from '#compliance/plans/day-plan';
import { checklistVersions } from '#drizzle/schema/checklists';
import { shifts } from '#drizzle/schema/jobs';
import { siteCodes } from '#drizzle/schema/library';
import { organisations } from '#drizzle/schema/organisations';
import { people } from '#drizzle/schema/people';
import { revisions } from '#drizzle/schema/sheets';
import { type ShiftPlan, type SiteFacts } from '#shared/jobs';
import { type SiteCode, type SitePage } from '#shared/library';
import { type SheetFields } from '#shared/sheets';
import { type Deps } from '../deps';
import { NotFoundError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { localDate } from '../jobs/jobs-service';
import { findJob } from '../jobs/shift-store';
import { type Tx } from '../platform/database';
import { dropLink, makeLink, openLink } from '../platform/links';
import { readKitFacts } from '../products/products-service';
import { type SheetsService } from '../sds/sheets-service';

/** The printed code of a job: all its sheets and its plan, read-only, without an account or anyone's name, until revoked. */
export function siteService({ config, database, clock }: Deps, sheets: SheetsService) {
  const stored = async (tx: Tx, jobId: string): Promise<SiteCode> => {
    await findJob(tx, jobId);
    const [row] = await tx
      .select({ code: siteCodes, name: people.name })
      .from(siteCodes)
      .innerJoin(people, and(eq(people.organisationId, siteCodes.organisationId), eq(people.id, siteCodes.madeBy)))
      .where(and(eq(siteCodes.organisationId, tx.organisationId), eq(siteCodes.jobId, jobId)));
    return { jobId, isOn: row !== undefined && row.code.revokedAt === null, madeAt: row?.code.madeAt.toISOString() ?? null, madeBy: row?.name ?? null, address: null };
  };

  return {
    read: (actor: PersonActor, jobId: string): Promise<SiteCode> => database.inOrganisation(actor.organisationId, (tx) => stored(tx, jobId)),

    /** A new code; paper with an older one stops working. */
    make: (actor: PersonActor, jobId: string): Promise<SiteCode> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer', 'crew-lead');
        await findJob(tx, jobId);
        const values = { madeAt: clock.now(), madeBy: actor.personId, revokedAt: null };
        await tx.insert(siteCodes).values({ organisationId: tx.organisationId, jobId, ...values }).onConflictDoUpdate({ target: [siteCodes.organisationId, siteCodes.jobId], set: values });
        const token = await makeLink(tx, 'site', jobId, null);
        return { ...(await stored(tx, jobId)), address: `${config.publicUrl}/site/job#${token}` };
      }),

    revoke: (actor: PersonActor, jobId: string): Promise<SiteCode> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer', 'crew-lead');
        await findJob(tx, jobId);
        await dropLink(tx, 'site', jobId);
        await tx.update(siteCodes).set({ revokedAt: clock.now() }).where(and(eq(siteCodes.organisationId, tx.organisationId), eq(siteCodes.jobId, jobId)));
        return stored(tx, jobId);
      }),

    async open(token: string, address: string): Promise<SitePage> {
      const { organisationId, subjectId: jobId } = await openLink(database, 'site', token, clock.now(), address);
      return database.inOrganisation(organisationId, (tx) => pageOfJob(tx, jobId));
    },

    /** A sheet of this very job, by its code. */
    async readSheet(token: string, revisionId: string, address: string) {
      const { organisationId, subjectId: jobId } = await openLink(database, 'site', token, clock.now(), address);
      const page = await database.inOrganisation(organisationId, (tx) => pageOfJob(tx, jobId));
      if (!page.sheets.some((sheet) => sheet.revisionId === revisionId)) throw new NotFoundError('sheet');
      return sheets.readFile(organisationId, revisionId, true);
    },
  };

  async function pageOfJob(tx: Tx, jobId: string): Promise<SitePage> {
    const job = await findJob(tx, jobId);
    const site = job.site as SiteFacts;
    const today = localDate(clock.now(), job.timeZone);
    const days = await tx.select().from(shifts).where(and(eq(shifts.organisationId, tx.organisationId), eq(shifts.jobId, jobId))).orderBy(desc(shifts.date)).limit(60);
    const plans = days.map((day) => day.plan as ShiftPlan);
    const kitIds = [...new Set(plans.flatMap((plan) => plan.kits.map((kit) => kit.kitId)))];
    const parts = kitIds.length === 0 ? [] : (await readKitFacts(tx, kitIds)).flatMap((kit) => kit.parts);
    const [organisation] = await tx.select().from(organisations);
    const current = await tx.select().from(revisions).where(and(eq(revisions.organisationId, tx.organisationId), eq(revisions.isCurrent, true)));
    const inUse = [...new Map(parts.map((part) => [part.productId, part])).values()];
    return {
      organisationName: organisation?.name ?? '',
      jobName: job.name,
      siteName: job.siteName,
      emergencyNumber: site.firstAid.emergencyNumber,
      address: site.firstAid.address,
      hasFirstAider: Boolean(site.firstAid.firstAiderName?.trim()),
      hostHazards: site.hostHazards,
      asOf: clock.now().toISOString(),
      plan: await planOf(tx, days, today),
      sheets: inUse.flatMap((part) =>
        current
          .filter((revision) => revision.productId === part.productId)
          .map((revision) => {
            const fields = revision.fields as SheetFields;
            return {
              revisionId: revision.id,
              productName: part.productName,
              supplier: fields.supplier?.value ?? '',
              language: revision.language ?? 'en',
              revisedOn: revision.revisedOn,
              signalWord: fields.signalWord?.value ?? null,
              hazardCodes: fields.hazardCodes.map((field) => field.value),
              pictograms: [...kitHazards([part]).pictograms],
            };
          }),
      ),
      productsWithoutSheet: inUse.filter((part) => part.sheet === null).map((part) => part.productName),
    };
  }
}

type Day = typeof shifts.$inferSelect;
/** Today's, else the next day's, else the last one's: of those that are published. */
async function planOf(tx: Tx, days: readonly Day[], today: string): Promise<SitePage['plan']> {
  if (days.length === 0) return null;
  const versions = await tx
    .selectDistinctOn([checklistVersions.shiftId], { date: checklistVersions.date, number: checklistVersions.number, publishedAt: checklistVersions.publishedAt, plan: checklistVersions.plan })
    .from(checklistVersions)
    .where(and(eq(checklistVersions.organisationId, tx.organisationId), inArray(checklistVersions.shiftId, days.map((day) => day.id))))
    .orderBy(checklistVersions.shiftId, desc(checklistVersions.number));
  const byDate = [...versions].sort((a, b) => (a.date < b.date ? -1 : 1));
  const chosen = byDate.find(({ date }) => date >= today) ?? byDate.at(-1);
  if (!chosen) return null;
  const { date, number, publishedAt, plan } = chosen;
  return { date, isToday: date === today, number, publishedAt: publishedAt.toISOString(), day: plan && (JSON.parse(plan.toString('utf8')) as DayPlan) };
}
export type SiteService = ReturnType<typeof siteService>;
