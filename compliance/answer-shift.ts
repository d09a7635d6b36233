import { type PersonAnswer, type ShiftAnswer, type TaskAnswer } from './answer';
import { answerKit } from './answer-kit';
import { describeTask } from './answer-words';
import { type PersonFacts, type ShiftFacts } from './facts';
import { doubleBookingRule, employerRule, type PersonInTask } from './gates/people';
import { protectionInPlace, respiratorInPlace } from './jurisdictions/law-of-place';
import { NOTICE } from './notice';
import { topics, type Finding } from './outcome';
import { protectionFor } from './ppe/protection';
import { protectionRule } from './ppe/protection-rule';
import { respiratorOf, taskRespirator } from './ppe/task-respirator';
import { consumablesOf } from './quantities/consumables';
import { decideIncidental, decideSilica, type SilicaDecision } from './silica/decision';
import { doubleBookings, NO_TABLE_1_TIME } from './silica/minutes';
import { type SilicaTask } from './silica/silica-context';
import { controlChecks, table1ControlRule } from './silica/table1-rules';
import { TASKS } from './silica/tasks.data';
import { shiftContext, taskContext, type ShiftContext } from './shift-context';
import { ask, present } from './shift-rule';
import { PERSON_IN_TASK_RULES, SHIFT_RULES, TASK_RULES } from './shift-rules';

/**
 * What the rules say of one shift. Pure: the same facts give the same answer in the browser and on the server.
 * Impossible facts do not throw: they hold the shift and are named (rule `facts-possible`).
 * `asOf` is the instant of asking (ISO 8601); dated rules go by the shift's own local date, so a plan made ahead is judged by its day.
 */
export function answerShift(facts: ShiftFacts, asOf: string): ShiftAnswer {
  const shift = shiftContext(facts);
  const day = isPlainDay(facts.date) ? facts.date : asOf.slice(0, 10);
  const place = { pack: shift.pack, day };
  const gates = present(SHIFT_RULES.map((rule) => ask(rule, shift, place)));
  const isShiftHeld = gates.some(({ isHolding }) => isHolding);
  const tasks = silicaTasks(shift).map((context) => answerTask(context, day, isShiftHeld));
  const { id, version, name, isComplete, gap, federalText, orientation } = shift.pack;
  return {
    pack: { id, version, name, isComplete, gap, federalText, orientation },
    tasks: tasks.map(({ answer }) => answer),
    people: facts.people.map((person) => answerPerson(shift, person, tasks, day)),
    gates,
    kits: facts.kits.map((kit) => answerKit(shift, kit, day)),
    consumables: consumablesOf(shift, place),
    notice: NOTICE,
  };
}

const isPlainDay = (date: string): boolean => /^\d{4}-\d{2}-\d{2}$/.test(date);

/** Every task with its silica decision; work that hangs on other work is decided after it. */
function silicaTasks(shift: ShiftContext): readonly SilicaTask[] {
  const contexts = shift.facts.tasks.map((task) => taskContext(shift, task));
  const own = contexts.filter(({ traits }) => traits.silica !== 'incidental').map((context) => ({ context, kind: context.task.kind, decision: decideSilica(context) }));
  const byTask = new Map(own.map(({ context, decision }) => [context.task, decision]));
  return contexts.map((context) => ({ ...context, silica: byTask.get(context.task) ?? decideIncidental(context, own) }));
}

interface AnsweredTask {
  readonly answer: TaskAnswer;
  readonly byPerson: readonly { readonly personId: string; readonly respirator: TaskAnswer['respirator']; readonly findings: readonly Finding[] }[];
}

function answerTask(context: SilicaTask, day: string, isShiftHeld: boolean): AnsweredTask {
  const { task, people, pack } = context;
  const place = { pack, day, taskId: task.id };
  const answers = people.map((person) => ({ person, respirator: respiratorInPlace(pack, respiratorOf(context, person)) }));
  const respirator = taskRespirator(answers, respiratorInPlace(pack, respiratorOf(context, null)));
  const byPerson = answers.map((each) => {
    const facts: PersonInTask = { ...context, ...each };
    return { personId: each.person.id, respirator: each.respirator, findings: present(PERSON_IN_TASK_RULES.map((rule) => ask(rule, facts, { ...place, personId: each.person.id }))) };
  });
  const protection = protectionInPlace(pack, protectionFor(context, respirator));
  const controls = controlChecks(context).map((check) => ask(table1ControlRule, { ...context, check }, { ...place, about: check.demand }));
  const findings = inOrder([...present([...TASK_RULES.map((rule) => ask(rule, context, place)), ...controls, ask(protectionRule, { ...context, protection }, place)]), ...byPerson.flatMap((each) => each.findings)]);
  const isHeld = context.traits.isWork && (isShiftHeld || findings.some(({ isHolding }) => isHolding));
  const silicaBasis = basisOf(context.silica);
  return {
    answer: {
      taskId: task.id,
      name: context.traits.name,
      ...describeTask(context, findings, { isHeld, isShiftHeld }),
      silicaBasis,
      table1Row: silicaBasis === 'table-1' ? rowOf(context.silica) : null,
      respirator,
      protection,
      findings,
    },
    byPerson,
  };
}

function basisOf(silica: SilicaDecision): TaskAnswer['silicaBasis'] {
  switch (silica.kind) {
    case 'table-1':
      return 'table-1';
    case 'basis':
      return silica.decision.kind === 'outside-scope' ? 'outside' : 'alternative';
    case 'none':
    case 'housekeeping':
    case 'incidental':
      return 'outside';
    default:
      return 'held';
  }
}

const rowOf = (silica: SilicaDecision): string | null => ('option' in silica ? silica.option.row : null);

/** Controls before protection; what holds comes first within its topic. */
function inOrder(findings: readonly Finding[]): readonly Finding[] {
  const rank = (finding: Finding): number => topics.indexOf(finding.topic) * 2 + (finding.isHolding ? 0 : 1);
  return [...findings].sort((a, b) => rank(a) - rank(b));
}

function answerPerson(shift: ShiftContext, person: PersonFacts, tasks: readonly AnsweredTask[], day: string): PersonAnswer {
  const place = { pack: shift.pack, day, personId: person.id };
  // Where the law knows no Table 1, its four hours mean nothing.
  const hasTable1 = shift.pack.silica !== null && shift.pack.silica.table1Rows.length > 0;
  const time = (hasTable1 ? shift.table1TimeByPerson.get(person.id) : undefined) ?? NO_TABLE_1_TIME;
  const bookings = doubleBookings(shift.facts, person);
  const own = tasks.flatMap(({ answer, byPerson }) => byPerson.filter(({ personId }) => personId === person.id).map((each) => ({ ...each, taskId: answer.taskId })));
  const nameOf = (idOrJob: string): string => {
    const task = shift.facts.tasks.find(({ id }) => id === idOrJob);
    return task === undefined ? idOrJob : TASKS[task.kind].name.en;
  };
  return {
    personId: person.id,
    table1Minutes: time.minutes,
    table1MinutesElsewhere: time.minutesElsewhere,
    maskRuleChangesAtMinute: time.passesAtMinute,
    doubleBookings: bookings,
    respirators: own.map(({ taskId, respirator }) => ({ taskId, respirator })),
    findings: [
      ...present([
        ask(employerRule, { ...shift, person }, place),
        ...bookings.map((booking, index) => ask(doubleBookingRule, { ...shift, person, booking: { ...booking, withName: nameOf(booking.with) } }, { ...place, about: String(index) })),
      ]),
      ...own.flatMap(({ findings }) => findings),
    ],
  };
}
