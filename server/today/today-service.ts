import { and, asc, count, eq, gte, isNull, lte, max, sql } from 'drizzle-orm';
import { answerShift, TASKS } from '#compliance';
import { acknowledgements, correctiveActions } from '#drizzle/schema/acknowledgements';
import { jobs, shifts } from '#drizzle/schema/jobs';
import { kitParts, kits, products, revisions } from '#drizzle/schema/sheets';
import { deliveryOutcomes, tablets } from '#drizzle/schema/tablets';
import { type PinState } from '#shared/acknowledgements';
import { assembleFacts, type Shift } from '#shared/jobs';
import { type Today, type TodayItem } from '#shared/today';
import { type Deps } from '../deps';
import { type PersonActor } from '../http/actor';
import { localDate } from '../jobs/jobs-service';
import { readShift } from '../jobs/shift-store';
import { type Tx } from '../platform/database';
import { readGuessAlarms } from '../session/guess-alarms';
import { revisedSheets } from './revised-sheets';

const dayMs = 24 * 3600 * 1000;
const renewWithinDays = 30;
type Level = TodayItem['level'];
const harm: Record<Level, number> = { stop: 0, caution: 10, plain: 20 };
/** Within a level: work that runs unprotected comes before work that waits, and that before paper. */
const urgency: Readonly<Record<string, number>> = { Stopped: 0, 'May not start': 1, 'Sign again': 2, 'No sheet': 3, Help: 4, 'Not signed': 5 };
const rank = (item: TodayItem) => harm[item.level] + (urgency[item.label] ?? 6);
const counted = (n: number, one: string, many: string) => `${n} ${n === 1 ? one : many}`;

/** What needs a person, worst first; who is on site; how the library stands. */
export function todayService({ database, clock }: Deps) {
  return {
    read: (actor: PersonActor): Promise<Today> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const now = clock.now();
        const shiftsNow = await currentShifts(tx, now);
        const revised = await revisedSheets(tx, shiftsNow);
        const items = [...(await stops(tx)), ...revised.items, ...shiftsNow.flatMap((shift) => shiftItems(shift, now).filter(({ id }) => id !== `again-${shift.id}` || !revised.shiftIds.has(shift.id))), ...(await libraryItems(tx)), ...(await keptAside(tx)), ...(await guesses(tx, actor, now)), ...renewals(shiftsNow, now)];
        return {
          items: items.sort((a, b) => rank(a) - rank(b)).slice(0, 100),
          onSite: await Promise.all(shiftsNow.map((shift) => onSite(tx, shift, now))),
          library: await library(tx),
        };
      }),
  };

  async function currentShifts(tx: Tx, now: Date): Promise<Shift[]> {
    const near = (days: number) => new Date(now.getTime() + days * dayMs).toISOString().slice(0, 10);
    const rows = await tx
      .select({ id: shifts.id, date: shifts.date, timeZone: jobs.timeZone })
      .from(shifts)
      .innerJoin(jobs, and(eq(jobs.organisationId, shifts.organisationId), eq(jobs.id, shifts.jobId)))
      .where(and(eq(shifts.organisationId, tx.organisationId), eq(jobs.isOpen, true), gte(shifts.date, near(-1)), lte(shifts.date, near(1))))
      .orderBy(asc(jobs.name))
      .limit(40);
    const today = rows.filter((row) => row.date === localDate(now, row.timeZone));
    const read: Shift[] = [];
    for (const row of today) read.push(await readShift(tx, row.id, now));
    return read;
  }

  async function stops(tx: Tx): Promise<TodayItem[]> {
    const rows = await tx
      .select({ action: correctiveActions, jobName: jobs.name })
      .from(correctiveActions)
      .innerJoin(jobs, and(eq(jobs.organisationId, correctiveActions.organisationId), eq(jobs.id, correctiveActions.jobId)))
      .where(and(eq(correctiveActions.organisationId, tx.organisationId), isNull(correctiveActions.resolvedAt)))
      .orderBy(asc(correctiveActions.openedAt))
      .limit(50);
    return rows.map(({ action, jobName }) => ({
      id: `action-${action.id}`,
      level: action.taskId ? 'stop' : 'caution',
      label: action.taskId ? 'Stopped' : 'Help',
      text: action.text,
      detail: jobName,
      aside: action.openedBy,
      link: `/jobs/${action.jobId}/shifts/${action.shiftId}`,
      linkText: 'Fix it, or re-assess',
    }));
  }

  function shiftItems(shift: Shift, now: Date): TodayItem[] {
    const answer = answerShift(assembleFacts(shift), now.toISOString());
    const link = `/jobs/${shift.jobId}/shifts/${shift.id}`;
    const held = answer.tasks
      .filter((task) => task.state !== 'ready' && !shift.context.failedControls[task.taskId])
      .map((task): TodayItem => {
        const holding = task.findings.find((finding) => finding.isHolding);
        return { id: `held-${task.taskId}`, level: 'stop', label: 'May not start', text: `${task.name.en} at ${shift.job.siteName}`, detail: holding?.reason.en ?? task.summary.en, aside: 'planned today', link, linkText: 'Choose' };
      });
    const newest = shift.versions[0];
    const missing = newest?.asked.filter((person) => person.state !== 'signed') ?? [];
    const again = shift.hasUnpublishedChanges && newest;
    const signing: TodayItem[] = !newest
      ? shift.plan.tasks.length > 0
        ? [{ id: `publish-${shift.id}`, level: 'caution', label: 'Publish', text: `${shift.job.name}: today's checklist is not published`, detail: shift.job.siteName, aside: '', link, linkText: 'Open' }]
        : []
      : again
        ? [{ id: `again-${shift.id}`, level: 'stop', label: 'Sign again', text: `${shift.job.name}: the facts changed after version ${newest.number}`, detail: `Publish, and ${counted(newest.asked.length, 'person is', 'people are')} asked to sign again.`, aside: '', link, linkText: 'See what changed' }]
        : missing.length > 0
          ? [{ id: `sign-${shift.id}`, level: 'caution', label: 'Not signed', text: `${shift.job.name}: ${counted(missing.length, 'person has', 'people have')} not signed`, detail: missing.map((person) => `${person.name}${doubts[person.pinState ?? 'confirmed']}`).join(', '), aside: `version ${newest.number}`, link, linkText: 'Open' }]
          : [];
    return [...held, ...signing];
  }

  async function libraryItems(tx: Tx): Promise<TodayItem[]> {
    const waiting = await tx.select({ id: revisions.id, fileName: revisions.fileName, state: revisions.state, fields: revisions.fields }).from(revisions).where(and(eq(revisions.organisationId, tx.organisationId), sql`${revisions.state} IN ('read', 'needs-entry')`)).orderBy(asc(revisions.uploadedAt)).limit(20);
    const bare = await tx
      .selectDistinct({ id: products.id, name: products.name, kit: kits.name })
      .from(kitParts)
      .innerJoin(products, and(eq(products.organisationId, kitParts.organisationId), eq(products.id, kitParts.productId)))
      .innerJoin(kits, and(eq(kits.organisationId, kitParts.organisationId), eq(kits.id, kitParts.kitId)))
      .leftJoin(revisions, and(eq(revisions.organisationId, products.organisationId), eq(revisions.productId, products.id), eq(revisions.isCurrent, true)))
      .where(and(eq(kitParts.organisationId, tx.organisationId), isNull(revisions.id)))
      .limit(20);
    return [
      ...bare.map((row): TodayItem => ({ id: `bare-${row.id}`, level: 'caution', label: 'No sheet', text: `${row.name} has no confirmed safety data sheet`, detail: `It is a part of ${row.kit}.`, aside: '', link: '/sheets', linkText: 'Add the sheet' })),
      ...waiting.map((row): TodayItem => ({ id: `sheet-${row.id}`, level: 'plain', label: 'Check', text: `${row.fileName} waits to be checked`, detail: row.state === 'read' ? 'Read; a person confirms it before it reaches a crew.' : 'The reader could not read it: fill it in by hand.', aside: '', link: `/sheets/${row.id}`, linkText: 'Check it' })),
    ];
  }

  async function keptAside(tx: Tx): Promise<TodayItem[]> {
    const [row] = await tx.select({ found: count() }).from(deliveryOutcomes).where(and(eq(deliveryOutcomes.organisationId, tx.organisationId), eq(deliveryOutcomes.outcome, 'kept-aside')));
    const found = row?.found ?? 0;
    return found === 0 ? [] : [{ id: 'kept-aside', level: 'caution', label: 'Kept aside', text: `${counted(found, 'delivery', 'deliveries')} from tablets could not be recorded`, detail: 'Nothing is lost: the bytes are stored. See which tablet and why.', aside: '', link: '/tablets', linkText: 'Look' }];
  }

  /** To owners, and to whose account it is. */
  async function guesses(tx: Tx, actor: PersonActor, now: Date): Promise<TodayItem[]> {
    const alarms = await readGuessAlarms(tx, now);
    return alarms
      .filter(({ personId }) => actor.role === 'owner' || actor.personId === personId)
      .map((alarm) => ({
        id: `guesses-${alarm.id}`,
        level: 'caution',
        label: 'Guessing',
        text: `${counted(alarm.failures, 'wrong sign-in', 'wrong sign-ins')} for ${alarm.name} from ${counted(alarm.addresses, 'address', 'addresses')}`,
        detail: 'They are slowed, and nobody got in by them. Where this person signed in before they still can. If it was not you, give a longer password.',
        aside: alarm.lastAt.toISOString().slice(0, 16).replace('T', ' '),
        link: actor.role === 'owner' ? `/people/${alarm.personId}` : '/account',
        linkText: 'Open',
      }));
  }

  /** Fit tests of people on today's shifts that end soon. 1910.134(f)(2): at least annually. */
  function renewals(shiftsNow: readonly Shift[], now: Date): TodayItem[] {
    const people = new Map(shiftsNow.flatMap((shift) => shift.context.people.filter((person) => shift.plan.personIds.includes(person.id)).map((person) => [person.id, person])));
    return [...people.values()].flatMap((person) =>
      person.respirators.flatMap((respirator): TodayItem[] => {
        if (!respirator.fitTestedOn) return [];
        const ends = new Date(`${respirator.fitTestedOn}T00:00:00Z`);
        ends.setUTCFullYear(ends.getUTCFullYear() + 1);
        const days = Math.ceil((ends.getTime() - now.getTime()) / dayMs);
        if (days > renewWithinDays) return [];
        const text = days < 0 ? `Fit test of ${person.name} has ended` : `Fit test of ${person.name} ends in ${counted(days, 'day', 'days')}`;
        return [{ id: `fit-${person.id}-${respirator.label}`, level: 'caution', label: 'Renew', text, detail: `${respirator.label}. After that they cannot be listed for it.`, aside: ends.toISOString().slice(0, 10), link: '/people', linkText: 'Open' }];
      }),
    );
  }

  async function onSite(tx: Tx, shift: Shift, now: Date): Promise<Today['onSite'][number]> {
    const newest = shift.versions[0];
    const asked = newest?.asked ?? [];
    const signed = asked.filter((person) => person.state === 'signed').length;
    const minute = minuteAt(now, shift.job.timeZone);
    const doing = shift.plan.tasks.filter((task) => task.assignments.some((each) => each.startMinute <= minute && minute < each.endMinute)).map((task) => TASKS[task.kind].name.en.toLowerCase());
    const first = shift.plan.tasks.flatMap((task) => task.assignments.map((each) => ({ at: each.startMinute, name: TASKS[task.kind].name.en.toLowerCase() }))).filter((each) => each.at > minute).sort((a, b) => a.at - b.at)[0];
    const [heard] = newest
      ? await tx.select({ name: tablets.name, at: max(tablets.lastHeardAt) }).from(acknowledgements).innerJoin(tablets, and(eq(tablets.organisationId, acknowledgements.organisationId), eq(tablets.id, acknowledgements.tabletId))).where(and(eq(acknowledgements.organisationId, tx.organisationId), eq(acknowledgements.shiftId, shift.id))).groupBy(tablets.name).orderBy(tablets.name).limit(1)
      : [];
    return {
      shiftId: shift.id,
      jobId: shift.jobId,
      jobName: shift.job.name,
      siteName: shift.job.siteName,
      doing: doing.length > 0 ? [...new Set(doing)].join(', ') : first ? `${first.name} from ${clockText(first.at)}` : shift.plan.tasks.length > 0 ? 'done for today' : 'nothing planned yet',
      signed,
      asked: asked.length,
      level: shift.openActions.some((action) => action.taskId) ? 'stop' : !newest ? 'plain' : signed === asked.length ? 'done' : 'caution',
      tabletName: heard?.name ?? null,
      tabletHeardAt: heard?.at?.toISOString() ?? null,
    };
  }

  async function library(tx: Tx): Promise<Today['library']> {
    const rows = await tx.select({ state: revisions.state, isCurrent: revisions.isCurrent, found: count() }).from(revisions).where(eq(revisions.organisationId, tx.organisationId)).groupBy(revisions.state, revisions.isCurrent);
    const sum = (fits: (row: (typeof rows)[number]) => boolean) => rows.filter(fits).reduce((total, row) => total + row.found, 0);
    return { sheetsInUse: sum((row) => row.isCurrent), waitingForYou: sum((row) => row.state === 'read' || row.state === 'needs-entry'), beingRead: sum((row) => row.state === 'waiting') };
  }
}
export type TodayService = ReturnType<typeof todayService>;

/** Why a signature that came does not count, behind the name. */
const doubts: Readonly<Record<PinState, string>> = { confirmed: '', 'not-confirmed': ' (PIN not right)', 'not-set': ' (no PIN)', unwitnessed: ' (PIN set without witness)' };
const clockText = (minute: number) => `${String(Math.floor(minute / 60) % 24).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;
function minuteAt(now: Date, timeZone: string): number {
  const [hours = 0, minutes = 0] = new Intl.DateTimeFormat('en-GB', { timeZone, hour: '2-digit', minute: '2-digit', hourCycle: 'h23' }).format(now).split(':').map(Number);
  return hours * 60 + minutes;
}
