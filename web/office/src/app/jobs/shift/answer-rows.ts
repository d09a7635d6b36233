import { type ShiftAnswer, type TaskAnswer, type TaskState } from '#compliance/answer';
import { type Finding } from '#compliance/outcome';
import { type ShiftPlan } from '#shared/jobs';
import { type StateKind } from '#ui/state';

export const stateKinds: Readonly<Record<TaskState, StateKind>> = { 'may-not-start': 'stop', 'not-decided': 'caution', ready: 'done' };
const severity: Readonly<Record<TaskState, number>> = { 'may-not-start': 0, 'not-decided': 1, ready: 2 };

/** Tasks with the worst first, then by when they start. */
export function orderedTasks(answer: ShiftAnswer, plan: ShiftPlan): readonly TaskAnswer[] {
  const start = new Map(plan.tasks.map((task) => [task.id, Math.min(Infinity, ...task.assignments.map(({ startMinute }) => startMinute))]));
  const startOf = (task: TaskAnswer) => start.get(task.taskId) ?? Infinity;
  // Two tasks without anybody start "never": Infinity - Infinity is no number.
  return [...answer.tasks].sort((a, b) => severity[a.state] - severity[b.state] || (startOf(a) === startOf(b) ? 0 : startOf(a) - startOf(b)));
}

export const heldTasks = (answer: ShiftAnswer): readonly TaskAnswer[] => answer.tasks.filter((task) => task.state !== 'ready');

/** "Publish", "Publish with 1 task held", "Publish version 2 with 3 tasks held". */
export function publishLabel(held: number, latestVersion: number | null): string {
  const version = latestVersion === null ? '' : ` version ${latestVersion + 1}`;
  const tasks = held === 0 ? '' : held === 1 ? ' with 1 task held' : ` with ${held} tasks held`;
  return `Publish${version}${tasks}`;
}

/** Lines about the place and the people that are not as they must be; a line that holds work comes first. */
export function openLines(answer: ShiftAnswer): readonly Finding[] {
  return [...answer.gates, ...answer.people.flatMap(({ findings }) => findings), ...answer.kits.flatMap(({ findings }) => findings)]
    .filter(({ outcome }) => outcome === 'unmet' || outcome === 'undecided')
    .sort((a, b) => Number(b.isHolding) - Number(a.isHolding));
}

/** Lines about the place and the people that are as they must be. */
export function metLines(answer: ShiftAnswer): readonly Finding[] {
  return [...answer.gates, ...answer.people.flatMap(({ findings }) => findings), ...answer.kits.flatMap(({ findings }) => findings)].filter(({ outcome }) => outcome === 'met');
}

export function lineState({ outcome, isHolding }: Finding): { readonly kind: StateKind; readonly words: string } {
  if (outcome === 'met') return { kind: 'done', words: 'Met' };
  if (outcome === 'not-applicable') return { kind: 'plain', words: 'Does not apply' };
  if (outcome === 'undecided') return { kind: isHolding ? 'stop' : 'caution', words: 'Not decided' };
  return isHolding ? { kind: 'stop', words: 'Holds work' } : { kind: 'caution', words: 'Not met' };
}
