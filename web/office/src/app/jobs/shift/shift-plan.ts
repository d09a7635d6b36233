import { type TaskKind } from '#compliance/facts';
import { TASKS } from '#compliance/silica/tasks.data';
import { type ShiftPlan } from '#shared/jobs';

/** Pure edits of a day's plan; each returns a new plan. Minutes count from local midnight. */
export type PlannedTask = ShiftPlan['tasks'][number];
export type Assignment = PlannedTask['assignments'][number];

export type StatedRate = NonNullable<ShiftPlan['consumableRates']>[number];

export const dayStartMinute = 6 * 60 + 30;
const shortestMinutes = 5;

export function addPerson(plan: ShiftPlan, personId: string): ShiftPlan {
  if (plan.personIds.includes(personId)) return plan;
  return { ...plan, personIds: [...plan.personIds, personId], competentPersonId: plan.competentPersonId ?? personId };
}

/** Takes a person off the shift with everything they were to do. */
export function removePerson(plan: ShiftPlan, personId: string): ShiftPlan {
  return {
    ...plan,
    personIds: plan.personIds.filter((id) => id !== personId),
    competentPersonId: plan.competentPersonId === personId ? null : plan.competentPersonId,
    ...(plan.inspectionCoverId === personId ? { inspectionCoverId: null } : {}),
    tasks: plan.tasks.map((task) => ({ ...task, assignments: task.assignments.filter((assignment) => assignment.personId !== personId), ...(task.logged ? { logged: task.logged.filter((span) => span.personId !== personId) } : {}) })),
  };
}

export function setLead(plan: ShiftPlan, competentPersonId: string | null): ShiftPlan {
  return { ...plan, competentPersonId };
}

/** Who inspects while the competent person runs a machine. */
export function setCover(plan: ShiftPlan, inspectionCoverId: string | null): ShiftPlan {
  return { ...plan, inspectionCoverId };
}

/** A stated rate in place of the one for its item, or at the end; null takes the item's rate away. */
export function setRate(plan: ShiftPlan, item: StatedRate['item'], rate: StatedRate | null): ShiftPlan {
  const others = (plan.consumableRates ?? []).filter((each) => each.item !== item);
  return { ...plan, consumableRates: rate === null ? others : [...others, rate] };
}

/** The latest minute anything of the plan ends, or the usual start of a day. */
export function planEnd(plan: ShiftPlan): number {
  return Math.max(dayStartMinute, ...plan.tasks.flatMap((task) => task.assignments.map(({ endMinute }) => endMinute)));
}

/** A new task after the others, with nobody on it yet; kit work takes the shift's only kit. */
export function newTask(plan: ShiftPlan, id: string, kind: TaskKind): PlannedTask {
  const only = plan.kits.length === 1 ? (plan.kits[0]?.kitId ?? null) : null;
  return { id, kind, assignments: [], equipmentId: null, collectorId: null, dustMethod: null, kitId: TASKS[kind].touchesKit ? only : null };
}

/** Puts a task in place of the one with its id, or at the end; its kit comes onto the shift with it. */
export function putTask(plan: ShiftPlan, task: PlannedTask): ShiftPlan {
  const isKnown = plan.tasks.some(({ id }) => id === task.id);
  const next = { ...plan, tasks: isKnown ? plan.tasks.map((other) => (other.id === task.id ? task : other)) : [...plan.tasks, task] };
  return task.kitId === null ? next : addKit(next, task.kitId);
}

export function removeTask(plan: ShiftPlan, taskId: string): ShiftPlan {
  return { ...plan, tasks: plan.tasks.filter(({ id }) => id !== taskId) };
}

/** Moves or stretches one assignment, named by its place in the task. The end always comes after the start. */
export function moveAssignment(plan: ShiftPlan, taskId: string, index: number, startMinute: number, endMinute: number): ShiftPlan {
  const start = Math.max(0, Math.round(startMinute));
  const end = Math.min(2880, Math.max(start + shortestMinutes, Math.round(endMinute)));
  return {
    ...plan,
    tasks: plan.tasks.map((task) =>
      task.id === taskId ? { ...task, assignments: task.assignments.map((assignment, at) => (at === index ? { ...assignment, startMinute: start, endMinute: end } : assignment)) } : task,
    ),
  };
}

export function addKit(plan: ShiftPlan, kitId: string): ShiftPlan {
  return plan.kits.some((kit) => kit.kitId === kitId) ? plan : { ...plan, kits: [...plan.kits, { kitId, count: null }] };
}

/** Takes a kit off the shift and out of the tasks that used it. */
export function removeKit(plan: ShiftPlan, kitId: string): ShiftPlan {
  return {
    ...plan,
    kits: plan.kits.filter((kit) => kit.kitId !== kitId),
    tasks: plan.tasks.map((task) => (task.kitId === kitId ? { ...task, kitId: null } : task)),
  };
}

/** Kits by hand; null lets area and thickness give the number. */
export function setKitCount(plan: ShiftPlan, kitId: string, count: number | null): ShiftPlan {
  return { ...plan, kits: plan.kits.map((kit) => (kit.kitId === kitId ? { ...kit, count } : kit)) };
}

/** "07:00" of a minute from midnight, as a time field wants it. */
export function timeText(minute: number): string {
  const ofDay = ((minute % 1440) + 1440) % 1440;
  return `${String(Math.floor(ofDay / 60)).padStart(2, '0')}:${String(ofDay % 60).padStart(2, '0')}`;
}

/** Minutes from midnight of "07:00"; null when it is no time. A time at or before `after` is the next day's. */
export function minuteFrom(text: string, after = -1): number | null {
  const match = /^(\d{1,2}):(\d{2})$/.exec(text);
  if (!match) return null;
  const minute = Number(match[1]) * 60 + Number(match[2]);
  return minute <= after ? minute + 1440 : minute;
}
