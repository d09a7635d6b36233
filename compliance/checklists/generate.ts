import { type Checklist, type ChecklistPerson, type ChecklistTask, type ShiftAnswer, type TaskAnswer } from '../answer';
import { type PersonFacts, type ShiftFacts, type TaskFacts } from '../facts';
import { sourceInPlace } from '../jurisdictions/law-of-place';
import { NOTICE, signedSentence } from '../notice';
import { TASKS } from '../silica/tasks.data';
import { clock, duration, eachLanguage, inside, listed, sentences, words } from '../words';
import { type Words } from '../outcome';
import { liveLines } from './live';
import { morningLines } from './morning';

/**
 * The day's checklist from a shift and its answer: morning lines for the lead, two to four live lines per task, each person's own lines.
 * Tasks stand in the order of the day; a held task stands with its reason and without live lines, so that nothing can unlock it.
 */
export function generateChecklist(facts: ShiftFacts, answer: ShiftAnswer): Checklist {
  const answerOf = new Map(answer.tasks.map((task) => [task.taskId, task]));
  const ordered = inOrderOfDay(facts.tasks).flatMap((task) => {
    const found = answerOf.get(task.id);
    return found === undefined ? [] : [{ task, answer: found }];
  });
  const masks = maskNeeds(answer);
  const competent = facts.people.find(({ id }) => id === facts.competentPersonId) ?? null;
  return {
    format: 'kneeboard-checklist/1',
    title: words('Day\'s checklist', 'Lista del día'),
    date: facts.date,
    jobName: facts.jobName,
    siteName: facts.siteName,
    competentPersonName: competent?.name ?? null,
    packId: answer.pack.id,
    packVersion: answer.pack.version,
    morning: morningLines(facts, { ...answer, tasks: ordered.map((each) => each.answer) }, maskNames(facts, answer, masks)).map((line) => ({ ...line, source: sourceInPlace(answer.pack, line.source) })),
    tasks: ordered.map((each) => checklistTask(each.task, each.answer, facts, masks, answer.pack)),
    people: facts.people.map((person) => checklistPerson(person, ordered, answer)),
    sentence: signedSentence(competent?.name ?? null),
    notice: answer.pack.gap === null ? NOTICE : sentences(answer.pack.gap, answer.pack.orientation?.words ?? null, NOTICE),
  };
}

const startOf = ({ assignments }: TaskFacts): number => Math.min(Number.POSITIVE_INFINITY, ...assignments.map(({ startMinute }) => startMinute));

/** Earliest start first; tasks that nobody does last; the id settles the rest, so that the order of the facts does not matter. */
function inOrderOfDay(tasks: readonly TaskFacts[]): readonly TaskFacts[] {
  return [...tasks].sort((a, b) => compare(startOf(a), startOf(b)) || compare(a.id, b.id));
}

function compare<T extends string | number>(a: T, b: T): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

type MaskNeeds = ReadonlySet<string>;
const need = (taskId: string, personId: string): string => `${taskId}\n${personId}`;

function maskNeeds({ people }: ShiftAnswer): MaskNeeds {
  return new Set(people.flatMap(({ personId, respirators }) => respirators.filter(({ respirator }) => respirator.outcome === 'required' || respirator.outcome === 'by-policy').map(({ taskId }) => need(taskId, personId))));
}

function maskNames(facts: ShiftFacts, { tasks }: ShiftAnswer, masks: MaskNeeds): readonly string[] {
  const open = tasks.filter(({ state }) => state === 'ready');
  return facts.people.filter(({ id }) => open.some(({ taskId }) => masks.has(need(taskId, id)))).map(({ name }) => name);
}

function checklistTask(task: TaskFacts, answer: TaskAnswer, facts: ShiftFacts, masks: MaskNeeds, pack: ShiftAnswer['pack']): ChecklistTask {
  const ids = new Set(task.assignments.map(({ personId }) => personId));
  return {
    taskId: task.id,
    name: answer.name,
    state: answer.state,
    heldBecause: answer.state === 'ready' ? null : answer.summary,
    personIds: facts.people.filter(({ id }) => ids.has(id)).map(({ id }) => id),
    respirator: answer.respirator.label,
    protection: answer.protection.map(({ mark, name }) => ({ mark, name })),
    live: liveLines(task, answer, facts, (personId) => masks.has(need(task.id, personId))).map((line) => ({ ...line, source: sourceInPlace(pack, line.source) })),
  };
}

interface Ordered {
  readonly task: TaskFacts;
  readonly answer: TaskAnswer;
}

function checklistPerson(person: PersonFacts, ordered: readonly Ordered[], answer: ShiftAnswer): ChecklistPerson {
  const own = ordered.filter(({ task }) => task.assignments.some(({ personId }) => personId === person.id));
  const times = answer.people.find(({ personId }) => personId === person.id);
  const respirators = new Map(times?.respirators.map(({ taskId, respirator }) => [taskId, respirator]));
  return {
    personId: person.id,
    name: person.name,
    language: person.language,
    taskIds: own.map(({ task }) => task.id),
    lines: [
      ...person.elsewhere.map((work) => words(`${spanOf([work])} ${work.jobName}: ${inside(TASKS[work.kind].name).en}.`, `${spanOf([work])} ${work.jobName}: ${inside(TASKS[work.kind].name).es}.`)),
      ...own.map((each) => taskLine(each, person, respirators.get(each.task.id)?.label ?? each.answer.respirator.label)),
      ...(times === undefined || times.table1Minutes === 0 ? [] : [table1Line(times.table1Minutes, times.maskRuleChangesAtMinute)]),
    ],
  };
}

function spanOf(spans: readonly { readonly startMinute: number; readonly endMinute: number }[]): string {
  return [...spans].sort((a, b) => a.startMinute - b.startMinute).map(({ startMinute, endMinute }) => `${clock(startMinute)}–${clock(endMinute)}`).join(', ');
}

function taskLine({ task, answer }: Ordered, person: PersonFacts, mask: Words): Words {
  const span = spanOf(task.assignments.filter(({ personId }) => personId === person.id));
  const head = eachLanguage((language) => `${span} ${answer.name[language]}.`);
  if (answer.state !== 'ready') return sentences(head, words('May not start.', 'No puede empezar.'));
  if (!TASKS[task.kind].isWork) return head;
  const gear = answer.protection.filter(({ mark }) => mark !== 'respirator');
  const wear = gear.length === 0 ? null : words(`Wear ${listed(gear.map(({ name }) => inside(name).en)).en}.`, `Use ${listed(gear.map(({ name }) => inside(name).es)).es}.`);
  return sentences(head, words(`Mask: ${mask.en}.`, `Máscara: ${mask.es}.`), wear);
}

function table1Line(minutes: number, changesAtMinute: number | null): Words {
  const total = words(`Your Table 1 time today, all jobs: ${duration(minutes)}.`, `Su tiempo de Tabla 1 hoy, en todas las obras: ${duration(minutes)}.`);
  const change = changesAtMinute === null ? null : words('That is over 4 h: the stricter mask holds all day.', 'Pasa de 4 h: la máscara más estricta vale todo el día.');
  return sentences(total, change);
}
