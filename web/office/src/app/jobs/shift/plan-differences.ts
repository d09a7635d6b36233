import { TASKS } from '#compliance/silica/tasks.data';
import { type ShiftPlan } from '#shared/jobs';
import { type Difference } from '../../pieces/differences';
import { timeText, type PlannedTask } from './shift-plan';

/** Name of a person, machine or kit by its id. */
export type NameOf = (id: string) => string;

function taskWords(task: PlannedTask | undefined, nameOf: NameOf): string {
  if (!task) return 'not planned';
  const people = task.assignments.map(({ personId, startMinute, endMinute }) => `${nameOf(personId)} ${timeText(startMinute)} to ${timeText(endMinute)}`);
  const things = [task.equipmentId, task.collectorId, task.kitId].filter((id) => id !== null).map(nameOf);
  const logged = (task.logged ?? []).map(({ personId, startMinute, endMinute }) => `worked: ${nameOf(personId)} ${timeText(startMinute)} to ${timeText(endMinute)}`);
  return [...(people.length > 0 ? people : ['nobody']), ...logged, ...things, ...(task.dustMethod === null ? [] : [task.dustMethod])].join(', ');
}

const kitWords = (kit: ShiftPlan['kits'][number] | undefined): string => (kit ? (kit.count === null ? 'as computed' : `${kit.count}`) : 'not used');
const named = (ids: readonly string[], nameOf: NameOf): string => [...ids].map(nameOf).sort().join(', ') || 'nobody';

const coverWords = ({ inspectionCoverId }: ShiftPlan, nameOf: NameOf): string => (inspectionCoverId ? nameOf(inspectionCoverId) : 'nobody');
const rateWords = ({ consumableRates }: ShiftPlan): string => [...(consumableRates ?? [])].map(({ item, amount, unit, per, statedBy }) => `${item} ${amount} ${unit} a ${per} (${statedBy})`).sort().join(', ') || 'nothing stated';

/** Where two plans of one day differ, in words a lead can choose by. */
export function planDifferences(mine: ShiftPlan, theirs: ShiftPlan, nameOf: NameOf): readonly Difference[] {
  const taskIds = [...new Set([...mine.tasks, ...theirs.tasks].map(({ id }) => id))];
  const kitIds = [...new Set([...mine.kits, ...theirs.kits].map(({ kitId }) => kitId))];
  const lead = (plan: ShiftPlan) => (plan.competentPersonId === null ? 'nobody' : nameOf(plan.competentPersonId));
  const all: readonly Difference[] = [
    { path: 'Competent person', mine: lead(mine), theirs: lead(theirs) },
    { path: 'Inspects meanwhile', mine: coverWords(mine, nameOf), theirs: coverWords(theirs, nameOf) },
    { path: 'What it uses up', mine: rateWords(mine), theirs: rateWords(theirs) },
    { path: 'People', mine: named(mine.personIds, nameOf), theirs: named(theirs.personIds, nameOf) },
    ...taskIds.map((taskId) => {
      const [ours, other] = [mine, theirs].map((plan) => plan.tasks.find(({ id }) => id === taskId));
      const kind = ours?.kind ?? other?.kind;
      return { path: kind ? TASKS[kind].name.en : 'Task', mine: taskWords(ours, nameOf), theirs: taskWords(other, nameOf) };
    }),
    ...kitIds.map((kitId) => {
      const [ours, other] = [mine, theirs].map((plan) => plan.kits.find((kit) => kit.kitId === kitId));
      return { path: nameOf(kitId), mine: kitWords(ours), theirs: kitWords(other) };
    }),
  ];
  return all.filter((difference) => difference.mine !== difference.theirs);
}
