import { and, count, desc, eq, ilike, inArray, isNull, lt, or, sql } from 'drizzle-orm';
import { TZDate } from '@date-fns/tz';
import { format } from 'date-fns';
import { v7 as newId } from 'uuid';
import type * as z from 'zod';
import { correctiveActions } from '#drizzle/schema/acknowledgements';
import { checklistVersions } from '#drizzle/schema/checklists';
import { equipment, exposureBases, jobs, shiftEquipment, shiftKits, shiftPeople, shifts } from '#drizzle/schema/jobs';
import { people } from '#drizzle/schema/people';
import { kits } from '#drizzle/schema/sheets';
import { type Page } from '#shared/common';
import { type AddShift, type Job, type JobEdit, type JobSummary, type JobsQuery, type Shift, type ShiftPlan, type ShiftSummary, type SignBasis } from '#shared/jobs';
import { type Deps } from '../deps';
import { ConflictError, InputError, RefusedError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { readCursor, toPage } from '../paging';
import { databaseErrorCode, type Tx } from '../platform/database';
import { appendEntry } from '../recordlog/recordlog-store';
import { findJob, findShift, readAsked, readShift, type JobRow, type ShiftRow } from './shift-store';

const emptyPlan: ShiftPlan = { competentPersonId: null, personIds: [], tasks: [], kits: [] };
/** The local date at a job's site. */
export const localDate = (at: Date, timeZone: string): string => format(new TZDate(at, timeZone), 'yyyy-MM-dd');

export function jobsService({ database, clock }: Deps) {
  async function summarise(tx: Tx, rows: readonly ShiftRow[]): Promise<ShiftSummary[]> {
    if (rows.length === 0) return [];
    const ids = rows.map((row) => row.id);
    const versions = await tx
      .selectDistinctOn([checklistVersions.shiftId], { id: checklistVersions.id, shiftId: checklistVersions.shiftId, number: checklistVersions.number })
      .from(checklistVersions)
      .where(and(eq(checklistVersions.organisationId, tx.organisationId), inArray(checklistVersions.shiftId, ids)))
      .orderBy(checklistVersions.shiftId, desc(checklistVersions.number));
    const asked = await readAsked(tx, versions.map((version) => version.id));
    const open = await tx
      .select({ shiftId: correctiveActions.shiftId, found: count() })
      .from(correctiveActions)
      .where(and(eq(correctiveActions.organisationId, tx.organisationId), inArray(correctiveActions.shiftId, ids), isNull(correctiveActions.resolvedAt)))
      .groupBy(correctiveActions.shiftId);
    return rows.map((row) => {
      const version = versions.find((each) => each.shiftId === row.id);
      const people = version ? (asked.get(version.id) ?? []) : [];
      return { id: row.id, date: row.date, publishedVersion: version?.number ?? null, asked: people.length, signed: people.filter((person) => person.state === 'signed').length, openActions: open.find((each) => each.shiftId === row.id)?.found ?? 0 };
    });
  }
  const shiftsOf = (tx: Tx, jobIds: readonly string[]) => tx.select().from(shifts).where(and(eq(shifts.organisationId, tx.organisationId), inArray(shifts.jobId, [...jobIds]))).orderBy(desc(shifts.date));

  async function toJob(tx: Tx, row: JobRow): Promise<Job> {
    const { organisationId: _, createdAt: __, site, ...rest } = row;
    return { ...rest, site: site as Job['site'], shifts: await summarise(tx, await shiftsOf(tx, [row.id])) };
  }

  /** Rows for whom and what the plan names: the foreign keys refuse another organisation's. */
  async function writeReferences(tx: Tx, shiftId: string, plan: ShiftPlan): Promise<void> {
    const personIds = [...new Set([...plan.personIds, ...(plan.competentPersonId ? [plan.competentPersonId] : []), ...[plan.inspectionCoverId].flatMap((id) => id ?? []), ...plan.tasks.flatMap((task) => [...task.assignments, ...(task.logged ?? [])].map((each) => each.personId))])];
    const kitIds = [...new Set([...plan.kits.map((kit) => kit.kitId), ...plan.tasks.flatMap((task) => (task.kitId ? [task.kitId] : []))])];
    const equipmentIds = [...new Set(plan.tasks.flatMap((task) => [task.equipmentId, task.collectorId].filter((id) => id !== null)))];
    const missing = async (table: typeof people | typeof kits | typeof equipment, ids: readonly string[]): Promise<string | undefined> => {
      if (ids.length === 0) return undefined;
      const found = await tx.select({ id: table.id }).from(table).where(and(eq(table.organisationId, tx.organisationId), inArray(table.id, [...ids])));
      return ids.find((id) => !found.some((row) => row.id === id));
    };
    if (await missing(people, personIds)) throw new InputError('The plan was not saved.', [{ path: 'personIds', message: 'It names a person who is not here. Load the page again.' }]);
    if (await missing(kits, kitIds)) throw new InputError('The plan was not saved.', [{ path: 'kits', message: 'It names a kit that is not here. Load the page again.' }]);
    if (await missing(equipment, equipmentIds)) throw new InputError('The plan was not saved.', [{ path: 'tasks', message: 'It names a machine that is not here. Load the page again.' }]);
    const own = { organisationId: tx.organisationId, shiftId };
    await tx.delete(shiftPeople).where(and(eq(shiftPeople.organisationId, tx.organisationId), eq(shiftPeople.shiftId, shiftId)));
    await tx.delete(shiftKits).where(and(eq(shiftKits.organisationId, tx.organisationId), eq(shiftKits.shiftId, shiftId)));
    await tx.delete(shiftEquipment).where(and(eq(shiftEquipment.organisationId, tx.organisationId), eq(shiftEquipment.shiftId, shiftId)));
    if (personIds.length > 0) await tx.insert(shiftPeople).values(personIds.map((personId) => ({ ...own, personId })));
    if (kitIds.length > 0) await tx.insert(shiftKits).values(kitIds.map((kitId) => ({ ...own, kitId })));
    if (equipmentIds.length > 0) await tx.insert(shiftEquipment).values(equipmentIds.map((equipmentId) => ({ ...own, equipmentId })));
  }

  return {
    list: (actor: PersonActor, { after, limit, q, isOpen }: z.output<typeof JobsQuery>): Promise<Page<JobSummary>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'instant', 'id');
        const like = q ? `%${q.replace(/[\\%_]/g, '\\$&')}%` : undefined;
        const rows = await tx
          .select()
          .from(jobs)
          .where(
            and(
              eq(jobs.organisationId, tx.organisationId),
              isOpen ? eq(jobs.isOpen, isOpen === 'true') : undefined,
              like ? or(ilike(jobs.name, like), ilike(jobs.siteName, like)) : undefined,
              cursor ? or(lt(jobs.createdAt, new Date(String(cursor[0]))), and(eq(jobs.createdAt, new Date(String(cursor[0]))), lt(jobs.id, String(cursor[1])))) : undefined,
            ),
          )
          .orderBy(desc(jobs.createdAt), desc(jobs.id))
          .limit(limit + 1);
        const allShifts = rows.length > 0 ? await shiftsOf(tx, rows.map((row) => row.id)) : [];
        const latest = rows.flatMap((row) => allShifts.find((shift) => shift.jobId === row.id) ?? []);
        const summaries = new Map((await summarise(tx, latest)).map((summary) => [summary.id, summary]));
        return toPage(
          rows,
          limit,
          (row) => [row.createdAt.toISOString(), row.id],
          ({ id, name, siteName, jurisdictionId, isOpen: open, version }) => {
            const shift = latest.find((each) => each.jobId === id);
            return { id, name, siteName, jurisdictionId, isOpen: open, version, latestShift: (shift && summaries.get(shift.id)) ?? null };
          },
        );
      }),

    read: (actor: PersonActor, id: string): Promise<Job> => database.inOrganisation(actor.organisationId, async (tx) => toJob(tx, await findJob(tx, id))),
    add: (actor: PersonActor, edit: JobEdit): Promise<Job> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer', 'crew-lead');
        const [row] = await tx.insert(jobs).values({ organisationId: tx.organisationId, id: newId(), createdAt: clock.now(), ...edit }).returning();
        return toJob(tx, row as JobRow);
      }),
    edit: (actor: PersonActor, id: string, version: number, edit: JobEdit): Promise<Job> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer', 'crew-lead');
        const [row] = await tx
          .update(jobs)
          .set({ ...edit, version: sql`${jobs.version} + 1` })
          .where(and(eq(jobs.organisationId, tx.organisationId), eq(jobs.id, id), eq(jobs.version, version)))
          .returning();
        if (!row) throw new ConflictError('Somebody changed this job after you opened it. Here are both versions.', await toJob(tx, await findJob(tx, id)));
        return toJob(tx, row);
      }),

    async addShift(actor: PersonActor, jobId: string, { date, copyFromShiftId }: AddShift): Promise<Shift> {
      try {
        return await database.inOrganisation(actor.organisationId, async (tx) => {
          demandRole(actor, 'safety-officer', 'crew-lead');
          await findJob(tx, jobId);
          const copied = copyFromShiftId ? ((await findShift(tx, copyFromShiftId)).plan as ShiftPlan) : emptyPlan;
          // Tasks get ids of their own and no logged time: a stop on yesterday's grinding is not a stop on today's, nor are its hours.
          const plan = { ...copied, tasks: copied.tasks.map((task) => ({ ...task, id: newId(), logged: [] })) };
          const id = newId();
          await tx.insert(shifts).values({ organisationId: tx.organisationId, id, jobId, date, plan });
          await writeReferences(tx, id, plan);
          return readShift(tx, id, clock.now());
        });
      } catch (error) {
        if (databaseErrorCode(error) === '23505') throw new RefusedError(`This job has a shift on ${date} already. Open that one.`);
        throw error;
      }
    },
    readShift: (actor: PersonActor, id: string): Promise<Shift> => database.inOrganisation(actor.organisationId, (tx) => readShift(tx, id, clock.now())),
    editPlan: (actor: PersonActor, id: string, version: number, plan: ShiftPlan): Promise<Shift> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer', 'crew-lead');
        const doubled = plan.tasks.findIndex((task, at) => plan.tasks.some((other, before) => before < at && other.id === task.id));
        if (doubled >= 0) throw new InputError('The plan was not saved.', [{ path: `tasks.${doubled}.id`, message: 'Two tasks have the same id.' }]);
        const changed = await tx
          .update(shifts)
          .set({ plan, version: sql`${shifts.version} + 1` })
          .where(and(eq(shifts.organisationId, tx.organisationId), eq(shifts.id, id), eq(shifts.version, version)))
          .returning({ id: shifts.id });
        if (changed.length === 0) {
          await findShift(tx, id);
          throw new ConflictError('Somebody changed this shift after you opened it. Here are both versions.', await readShift(tx, id, clock.now()));
        }
        await writeReferences(tx, id, plan);
        return readShift(tx, id, clock.now());
      }),

    /** The act of a named person: their typed name must be their own. */
    signBasis: (actor: PersonActor, shiftId: string, { typedName, ...basis }: SignBasis): Promise<Shift> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const shift = await findShift(tx, shiftId);
        const job = await findJob(tx, shift.jobId);
        const plain = (name: string) => name.normalize('NFKC').toLowerCase().replace(/\s+/g, ' ').trim();
        if (plain(typedName) !== plain(actor.personName)) throw new InputError('The basis was not signed.', [{ path: 'typedName', message: `Type your own name as it stands here: ${actor.personName}.` }]);
        const signedAt = clock.now();
        const signedOn = localDate(signedAt, job.timeZone);
        if (basis.endsOn < signedOn) throw new InputError('The basis was not signed.', [{ path: 'endsOn', message: 'The end date is past.' }]);
        if (basis.kind === 'sampling-day' && basis.endsOn > shift.date) throw new InputError('The basis was not signed.', [{ path: 'endsOn', message: `A sampling day is one shift: it ends on ${shift.date}.` }]);
        const id = newId();
        const row = { organisationId: tx.organisationId, id, jobId: job.id, ...basis, signedBy: actor.personId, signedByName: actor.personName, signedAt, signedOn };
        await tx.insert(exposureBases).values(row);
        const { organisationId: _, ...record } = row;
        const read = await readShift(tx, shiftId, clock.now());
        await appendEntry(tx, clock, { kind: 'exposure-basis', subjectId: id, record: { ...record, typedName, signedAt: signedAt.toISOString() } });
        return read;
      }),
  };
}
export type JobsService = ReturnType<typeof jobsService>;
