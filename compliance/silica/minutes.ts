import { type Assignment, type PersonFacts, type ShiftFacts, type TaskKind } from '../facts';
import { MINUTES_PER_DAY } from '../input-error';
import { FOUR_HOURS_MINUTES } from './table1';

/** Kinds of floor work that stand in Table 1. Counted by kind, so that a machine outside its row never shortens anyone's sum. */
export const TABLE_1_KINDS: ReadonlySet<TaskKind> = new Set<TaskKind>([
  'floor-grinding', 'edge-grinding', 'scarifying', 'joint-sawing', 'handheld-sawing', 'crack-chasing', 'mortar-removal', 'chipping', 'drilling',
]);

export interface Interval {
  readonly startMinute: number;
  readonly endMinute: number;
}

/** Whether the times can be: finite, in order, 24 hours at most, from the day before to the end of the day after. */
export function isPossible({ startMinute, endMinute }: Interval): boolean {
  return Number.isFinite(startMinute) && Number.isFinite(endMinute) && startMinute >= -MINUTES_PER_DAY && endMinute <= 2 * MINUTES_PER_DAY && startMinute <= endMinute && endMinute - startMinute <= MINUTES_PER_DAY;
}

/** The same time in sorted pieces that do not overlap. */
export function merge(intervals: readonly Interval[]): readonly Interval[] {
  const sorted = intervals.filter(isPossible).sort((a, b) => a.startMinute - b.startMinute);
  const merged: Interval[] = [];
  for (const next of sorted) {
    const last = merged[merged.length - 1];
    if (last === undefined || next.startMinute > last.endMinute) merged.push({ startMinute: next.startMinute, endMinute: next.endMinute });
    else merged[merged.length - 1] = { startMinute: last.startMinute, endMinute: Math.max(last.endMinute, next.endMinute) };
  }
  return merged;
}

export function totalMinutes(intervals: readonly Interval[]): number {
  return merge(intervals).reduce((sum, { startMinute, endMinute }) => sum + (endMinute - startMinute), 0);
}

/** Minute of the day at which the sum reaches four hours, where it goes on past them; null when it never passes. */
export function minuteOfPassing(intervals: readonly Interval[], limitMinutes = FOUR_HOURS_MINUTES): number | null {
  let sum = 0;
  for (const { startMinute, endMinute } of merge(intervals)) {
    const length = endMinute - startMinute;
    if (sum + length > limitMinutes) return startMinute + (limitMinutes - sum);
    sum += length;
  }
  return null;
}

/** Minutes that conversions cost; less than this is no minute begun. */
const NOISE_MINUTES = 1e-6;

/** A begun minute counts whole: nobody holds a stopwatch, so every doubt goes to the stricter side. */
export function wholeMinutes({ startMinute, endMinute }: Interval): Interval {
  return { startMinute: Math.floor(startMinute + NOISE_MINUTES), endMinute: Math.ceil(endMinute - NOISE_MINUTES) };
}

export interface Table1Time {
  /** All jobs together, planned and logged. */
  readonly minutes: number;
  /** The part that was logged outside the planned times. */
  readonly minutesLoggedBeyondPlan: number;
  /** The part on other jobs. */
  readonly minutesElsewhere: number;
  readonly passesAtMinute: number | null;
}

export const NO_TABLE_1_TIME: Table1Time = { minutes: 0, minutesLoggedBeyondPlan: 0, minutesElsewhere: 0, passesAtMinute: null };

/**
 * Table 1 time of a person over all jobs of the shift: the person, not the job, carries the minutes.
 * Planned and logged times count together: a log that ends early takes nothing off the plan, one that runs on adds to it.
 */
export function table1Time(facts: ShiftFacts, person: PersonFacts): Table1Time {
  const elsewhere = person.elsewhere.filter(({ kind }) => TABLE_1_KINDS.has(kind));
  const tasks = facts.tasks.filter(({ kind }) => TABLE_1_KINDS.has(kind));
  const own = (spans: readonly Assignment[]): readonly Interval[] => spans.filter(({ personId }) => personId === person.id);
  const whole = (spans: readonly Interval[]): readonly Interval[] => spans.filter(isPossible).map(wholeMinutes);
  const planned = whole([...tasks.flatMap(({ assignments }) => own(assignments)), ...elsewhere]);
  const all = [...planned, ...whole(tasks.flatMap(({ logged = [] }) => own(logged)))];
  const minutes = totalMinutes(all);
  return { minutes, minutesLoggedBeyondPlan: minutes - totalMinutes(planned), minutesElsewhere: totalMinutes(whole(elsewhere)), passesAtMinute: minuteOfPassing(all) };
}

export interface DoubleBooking extends Interval {
  /** Task id of the other work here, or the other job's name. */
  readonly with: string;
}

/** Times at which a person stands in two places of the plan. A break or an inspection beside work is no double booking. */
export function doubleBookings(facts: ShiftFacts, person: PersonFacts): readonly DoubleBooking[] {
  const here = facts.tasks
    .filter(({ kind }) => kind !== 'break' && kind !== 'inspection')
    .flatMap((task) => task.assignments.filter(({ personId }) => personId === person.id).map((assignment) => ({ ...assignment, name: task.id, isHere: true })));
  const elsewhere = person.elsewhere.map((work) => ({ ...work, name: work.jobName, isHere: false }));
  const all = [...here, ...elsewhere].filter(isPossible).sort((a, b) => a.startMinute - b.startMinute || a.endMinute - b.endMinute || (a.name < b.name ? -1 : 1));
  return all.flatMap((first, index) =>
    all.slice(index + 1).flatMap((second) => {
      const startMinute = Math.max(first.startMinute, second.startMinute);
      const endMinute = Math.min(first.endMinute, second.endMinute);
      return startMinute < endMinute ? [{ startMinute, endMinute, with: first.isHere ? second.name : first.name }] : [];
    }),
  );
}
