import { type Mark, type ShiftAnswer, type TaskAnswer, type TaskState } from '../answer';
import { type ShiftFacts, type TaskFacts } from '../facts';
import { NOTICE } from '../notice';
import { type Finding, type Topic, type Words } from '../outcome';
import { TASKS } from '../silica/tasks.data';
import { sourceLine } from '../source';
import { clock, sentences, words } from '../words';

/** The plan of a day as anyone on site may read it: every task with its controls before its protection, and no person's name. */
export interface DayPlan {
  readonly format: 'kneeboard-day-plan/1';
  /** Local date of the shift, ISO. */
  readonly date: string;
  readonly packName: Words;
  readonly packVersion: string;
  /** How many people the day has; who they are stands on the list they sign. */
  readonly peopleCount: number;
  readonly isCompetentPersonNamed: boolean;
  readonly place: readonly PlanLine[];
  readonly tasks: readonly PlanTask[];
  readonly notice: Words;
}

export interface PlanLine {
  readonly text: Words;
  /** One line: citation, paragraph, how sure. */
  readonly source: string;
}

export interface PlanTask {
  readonly name: Words;
  readonly state: TaskState;
  readonly heldBecause: Words | null;
  /** Clock times from the first start to the last end: "07:00–09:10"; null while nobody is on it. */
  readonly span: string | null;
  readonly peopleCount: number;
  readonly controls: readonly PlanLine[];
  readonly access: readonly PlanLine[];
  readonly housekeeping: readonly PlanLine[];
  readonly respirator: Words;
  readonly protection: readonly { readonly mark: Mark; readonly name: Words }[];
}

/** Gates that say something of the place. What they say of people stays on the list. */
const PLACE_RULES = ['host-hazards-asked', 'floor-survey', 'engines-indoors', 'floor-profile', 'grind-then-blast'];
const someone = words('a named person', 'una persona nombrada');
const peopleNotReady = words('The people for it are not ready. Ask the lead.', 'Falta algo de las personas. Pregunte al líder.');
const shiftHeld = words('The whole shift is held. Ask the lead.', 'Todo el turno está detenido. Pregunte al líder.');

/** Sources: 29 CFR 1926.1153(g)(1)(i) to (iv), the four elements of a written plan; (g)(3), readable by every employee. */
export function dayPlan(facts: ShiftFacts, answer: ShiftAnswer): DayPlan {
  const unnamed = withoutNames(facts);
  const line = ({ text, source }: Finding): PlanLine => ({ text: unnamed(text), source: sourceLine(source) });
  return {
    format: 'kneeboard-day-plan/1',
    date: facts.date,
    packName: answer.pack.name,
    packVersion: answer.pack.version,
    peopleCount: facts.people.length,
    isCompetentPersonNamed: facts.people.some(({ id }) => id === facts.competentPersonId),
    place: answer.gates.filter(({ ruleId, outcome }) => PLACE_RULES.includes(ruleId) && outcome !== 'not-applicable').map(line),
    tasks: inOrder(facts.tasks).flatMap((task) => answer.tasks.filter(({ taskId }) => taskId === task.id).map((each) => planTask(task, each, line, unnamed))),
    notice: answer.pack.gap === null ? NOTICE : sentences(answer.pack.gap, answer.pack.orientation?.words ?? null, NOTICE),
  };
}

function planTask(task: TaskFacts, answer: TaskAnswer, line: (finding: Finding) => PlanLine, unnamed: (text: Words) => Words): PlanTask {
  const about = (...wanted: readonly Topic[]): readonly PlanLine[] =>
    once(answer.findings.filter(({ topic, personId, outcome }) => wanted.includes(topic) && personId === null && outcome !== 'not-applicable').map(line));
  return {
    name: answer.name,
    state: answer.state,
    heldBecause: answer.state === 'ready' ? null : unnamed(heldBecause(answer)),
    span: task.assignments.length === 0 ? null : `${clock(startOf(task))}–${clock(Math.max(...task.assignments.map(({ endMinute }) => endMinute)))}`,
    peopleCount: new Set(task.assignments.map(({ personId }) => personId)).size,
    controls: TASKS[task.kind].isWork ? about('gate', 'control') : [],
    access: about('access'),
    housekeeping: about('housekeeping'),
    respirator: answer.respirator.label,
    protection: answer.protection.filter(({ mark }) => mark !== 'respirator').map(({ mark, name }) => ({ mark, name })),
  };
}

/** What is missing of the task itself; what is missing of a person is between that person and the office. */
function heldBecause({ findings }: TaskAnswer): Words {
  const holding = findings.filter(({ isHolding }) => isHolding);
  if (holding.length === 0) return shiftHeld;
  const reasons = new Map(holding.filter(({ personId }) => personId === null).map(({ reason }) => [reason.en, reason]));
  return sentences(...[...reasons.values()].slice(0, 2), holding.some(({ personId }) => personId !== null) ? peopleNotReady : null);
}

const startOf = ({ assignments }: TaskFacts): number => Math.min(Number.POSITIVE_INFINITY, ...assignments.map(({ startMinute }) => startMinute));
const inOrder = (tasks: readonly TaskFacts[]): readonly TaskFacts[] => [...tasks].sort((a, b) => (startOf(a) === startOf(b) ? (a.id < b.id ? -1 : 1) : startOf(a) - startOf(b)));
const once = (lines: readonly PlanLine[]): readonly PlanLine[] => [...new Map(lines.map((each) => [each.text.en, each])).values()];

/** Whoever has the printed code reads the plan: a name that a rule's sentence carries is replaced. */
function withoutNames(facts: ShiftFacts): (text: Words) => Words {
  const names = [...facts.people.map(({ name }) => name), facts.firstAid.firstAiderName, ...facts.bases.map(({ signedBy }) => signedBy), ...facts.equipment.map(({ airflow }) => airflow?.takenBy ?? null)].filter((name): name is string => name !== null && name.trim() !== '');
  // The longer first: "Ana Tena" stands inside "Ana Tena Ruiz".
  const longestFirst = [...new Set(names)].sort((a, b) => b.length - a.length);
  return (text) => ({ en: longestFirst.reduce((said, name) => said.replaceAll(name, someone.en), text.en), es: longestFirst.reduce((said, name) => said.replaceAll(name, someone.es), text.es) });
}
