import { type ChecklistLine, type TaskAnswer } from '../answer';
import { type ShiftFacts, type TaskFacts } from '../facts';
import { TASKS } from '../silica/tasks.data';
import { usFederal } from '../source';
import { inside, listed, words } from '../words';
import { LIVE_LINES, type LiveLine } from './live-lines.data';

/** A crew reads few lines at a start, or none. */
export const MOST_LIVE_LINES = 4;

const SEAL = usFederal('1910.134', 'read', { paragraph: '(g)(1)(iii)' });

function fits(line: LiveLine, task: TaskFacts, answer: TaskAnswer, facts: ShiftFacts): boolean {
  if (!line.kinds.includes(task.kind) || (line.isIndoorsOnly && facts.setting === 'outdoors')) return false;
  if (line.method !== null && line.method !== task.dustMethod) return false;
  // A flame line only where a sheet of this job says that the liquid burns.
  return line.id !== 'no-flame' || answer.findings.some(({ ruleId }) => ruleId === 'flammable-vapor-and-sparks');
}

/** Names of the people who wear a mask in this task; all of them where everyone does. */
function masked(task: TaskFacts, facts: ShiftFacts, needsMask: (personId: string) => boolean): readonly string[] {
  const ids = new Set(task.assignments.map(({ personId }) => personId));
  return facts.people.filter(({ id }) => ids.has(id) && needsMask(id)).map(({ name }) => name);
}

function maskLine(answer: TaskAnswer, names: readonly string[], stopsNoVapor: boolean): ChecklistLine {
  const who = listed(names);
  const why = stopsNoVapor ? words('It stops dust, not resin vapor.', 'Detiene el polvo, no el vapor de resina.') : words('A loose mask stops nothing.', 'Una máscara floja no detiene nada.');
  return {
    id: `${answer.taskId}/mask-on`,
    ruleId: 'mask-cleared-and-fitted',
    taskId: answer.taskId,
    mark: 'respirator',
    isCritical: true,
    text: words(`Mask on, seal checked: ${who.en}.`, `Máscara puesta y sello revisado: ${who.es}.`),
    why,
    source: SEAL,
  };
}

function gearLine(answer: TaskAnswer): ChecklistLine | null {
  const gear = answer.protection.filter(({ mark }) => mark !== 'respirator');
  const first = gear[0];
  if (first === undefined) return null;
  const en = listed(gear.map(({ name }) => inside(name).en)).en;
  const es = listed(gear.map(({ name }) => inside(name).es)).es;
  return { id: `${answer.taskId}/gear-on`, ruleId: 'protection-for-task', taskId: answer.taskId, mark: first.mark, isCritical: false, text: words(`On: ${en}.`, `Puesto: ${es}.`), why: first.reason, source: first.source };
}

/** Two to four lines that unlock a task each time it starts, controls first. None for breaks and inspections, none while the task is held. */
export function liveLines(task: TaskFacts, answer: TaskAnswer, facts: ShiftFacts, needsMask: (personId: string) => boolean): readonly ChecklistLine[] {
  if (!TASKS[task.kind].isWork || answer.state !== 'ready') return [];
  const names = masked(task, facts, needsMask);
  const hasVapor = answer.findings.some(({ ruleId }) => ruleId === 'vapor-apart-from-dust');
  const protection = [names.length > 0 ? maskLine(answer, names, hasVapor) : null, gearLine(answer)].filter((line) => line !== null);
  const controls = LIVE_LINES.filter((line) => fits(line, task, answer, facts)).map(({ id, ruleId, mark, isCritical, text, why, source }) => ({ id: `${answer.taskId}/${id}`, ruleId, taskId: answer.taskId, mark, isCritical, text, why, source }));
  return [...controls.slice(0, MOST_LIVE_LINES - protection.length), ...protection];
}
