import { and, desc, eq, isNotNull, isNull, lt, or, sql } from 'drizzle-orm';
import { TASKS } from '#compliance';
import type * as z from 'zod';
import { correctiveActions } from '#drizzle/schema/acknowledgements';
import { jobs, shifts } from '#drizzle/schema/jobs';
import { people } from '#drizzle/schema/people';
import { type ActionsQuery, type CorrectiveAction } from '#shared/actions';
import { type Page } from '#shared/common';
import { type ShiftPlan } from '#shared/jobs';
import { type Deps } from '../deps';
import { ConflictError, InputError, NotFoundError, RefusedError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { readCursor, toPage } from '../paging';
import { type Tx } from '../platform/database';
import { appendEntry } from '../recordlog/recordlog-store';

const select = (tx: Tx) =>
  tx
    .select({ action: correctiveActions, jobName: jobs.name, date: shifts.date, plan: shifts.plan, ownerName: people.name })
    .from(correctiveActions)
    .innerJoin(jobs, and(eq(jobs.organisationId, correctiveActions.organisationId), eq(jobs.id, correctiveActions.jobId)))
    .innerJoin(shifts, and(eq(shifts.organisationId, correctiveActions.organisationId), eq(shifts.id, correctiveActions.shiftId)))
    .leftJoin(people, and(eq(people.organisationId, correctiveActions.organisationId), eq(people.id, correctiveActions.ownerPersonId)));
type Row = Awaited<ReturnType<typeof select>>[number];

const toAction = ({ action, jobName, date, plan, ownerName }: Row): CorrectiveAction => {
  const task = (plan as ShiftPlan).tasks.find((each) => each.id === action.taskId);
  return {
    id: action.id,
    jobId: action.jobId,
    jobName,
    shiftId: action.shiftId,
    shiftDate: date,
    taskId: action.taskId,
    taskName: task ? TASKS[task.kind].name.en : null,
    text: action.text,
    openedAt: action.openedAt.toISOString(),
    openedBy: action.openedBy,
    ownerPersonId: action.ownerPersonId,
    ownerName,
    resolvedAt: action.resolvedAt?.toISOString() ?? null,
    resolvedBy: action.resolvedBy,
    evidence: action.evidence,
    version: action.version,
  };
};

export function actionsService({ database, clock }: Deps) {
  const find = async (tx: Tx, id: string): Promise<CorrectiveAction> => {
    const [row] = await select(tx).where(and(eq(correctiveActions.organisationId, tx.organisationId), eq(correctiveActions.id, id)));
    if (!row) throw new NotFoundError('corrective action');
    return toAction(row);
  };
  async function change(tx: Tx, id: string, version: number, values: Partial<typeof correctiveActions.$inferInsert>): Promise<CorrectiveAction> {
    const changed = await tx
      .update(correctiveActions)
      .set({ ...values, version: sql`${correctiveActions.version} + 1` })
      .where(and(eq(correctiveActions.organisationId, tx.organisationId), eq(correctiveActions.id, id), eq(correctiveActions.version, version), isNull(correctiveActions.resolvedAt)))
      .returning({ id: correctiveActions.id });
    const action = await find(tx, id);
    if (changed.length > 0) return action;
    if (action.resolvedAt) throw new RefusedError(`This was resolved by ${action.resolvedBy}. If the trouble is back, stop the task again.`);
    throw new ConflictError('Somebody changed this action after you opened it. Look at it again.', action);
  }

  return {
    list: (actor: PersonActor, { after, limit, state, shiftId }: z.output<typeof ActionsQuery>): Promise<Page<CorrectiveAction>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'instant', 'id');
        const rows = await select(tx)
          .where(
            and(
              eq(correctiveActions.organisationId, tx.organisationId),
              state === 'open' ? isNull(correctiveActions.resolvedAt) : state === 'resolved' ? isNotNull(correctiveActions.resolvedAt) : undefined,
              shiftId ? eq(correctiveActions.shiftId, shiftId) : undefined,
              cursor ? or(lt(correctiveActions.openedAt, new Date(String(cursor[0]))), and(eq(correctiveActions.openedAt, new Date(String(cursor[0]))), lt(correctiveActions.id, String(cursor[1])))) : undefined,
            ),
          )
          .orderBy(desc(correctiveActions.openedAt), desc(correctiveActions.id))
          .limit(limit + 1);
        return toPage(rows, limit, ({ action }) => [action.openedAt.toISOString(), action.id], toAction);
      }),
    assign: (actor: PersonActor, id: string, version: number, ownerPersonId: string): Promise<CorrectiveAction> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer', 'crew-lead');
        const [owner] = await tx.select({ id: people.id }).from(people).where(and(eq(people.organisationId, tx.organisationId), eq(people.id, ownerPersonId), eq(people.isActive, true)));
        if (!owner) throw new InputError('The action was not given to anybody.', [{ path: 'ownerPersonId', message: 'There is no such active person.' }]);
        return change(tx, id, version, { ownerPersonId });
      }),
    /** Restart needs the evidence: what was done and how it was checked. */
    resolve: (actor: PersonActor, id: string, version: number, evidence: string): Promise<CorrectiveAction> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer', 'crew-lead');
        const resolvedAt = clock.now();
        const action = await change(tx, id, version, { resolvedAt, resolvedBy: actor.personName, evidence });
        await appendEntry(tx, clock, { kind: 'corrective-action', subjectId: id, record: { id, event: 'resolved', evidence, resolvedBy: { id: actor.personId, name: actor.personName }, resolvedAt: resolvedAt.toISOString() } });
        return action;
      }),
  };
}
export type ActionsService = ReturnType<typeof actionsService>;
