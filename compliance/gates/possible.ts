import { type ShiftFacts } from '../facts';
import { isIsoDate } from '../iso-date';
import { notApplicable, unmet } from '../rule';
import { isPossible } from '../silica/minutes';
import { type ShiftContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { commonPractice } from '../source';
import { words } from '../words';

/** No coat is thinner than a thousandth of a millimeter and no kit smaller than a milliliter. */
export const LEAST_AMOUNT = 0.001;

/** Names of the fields that cannot be: a refusal by name in place of a throw, so that the page can point at them. */
export function impossibleFields(facts: ShiftFacts): readonly string[] {
  const ofAtLeast = (field: string, value: number | null, min: number): readonly string[] => (value === null || (Number.isFinite(value) && value >= min) ? [] : [field]);
  const ofPositive = (field: string, value: number): readonly string[] => (Number.isFinite(value) && value >= LEAST_AMOUNT ? [] : [field]);
  const repeated = (field: string, ids: readonly string[]): readonly string[] => (new Set(ids).size === ids.length ? [] : [field]);
  const people = new Set(facts.people.map(({ id }) => id));
  const fields = [
    ...(isIsoDate(facts.date) ? [] : ['date']),
    ...ofAtLeast('areaM2', facts.areaM2, 0),
    ...ofAtLeast('roomVolumeM3', facts.roomVolumeM3, 0),
    ...(facts.targetProfile === null || (Number.isInteger(facts.targetProfile) && facts.targetProfile >= 1 && facts.targetProfile <= 10) ? [] : ['targetProfile']),
    ...(facts.thicknessMm === null ? [] : ofPositive('thicknessMm', facts.thicknessMm)),
    ...repeated('people.id', facts.people.map(({ id }) => id)),
    ...repeated('tasks.id', facts.tasks.map(({ id }) => id)),
    ...repeated('kits.id', facts.kits.map(({ id }) => id)),
    ...repeated('equipment.id', facts.equipment.map(({ id }) => id)),
    ...facts.tasks.flatMap((task) => task.assignments.flatMap((assignment) => [...(isPossible(assignment) ? [] : [`tasks.${task.id}.assignments`]), ...(people.has(assignment.personId) ? [] : [`tasks.${task.id}.personId`])])),
    ...facts.tasks.flatMap((task) => ((task.logged ?? []).every((span) => isPossible(span) && people.has(span.personId)) ? [] : [`tasks.${task.id}.logged`])),
    ...facts.people.flatMap((person) => (person.elsewhere.every(isPossible) ? [] : [`people.${person.id}.elsewhere`])),
    ...facts.kits.flatMap((kit) => [
      ...ofPositive(`kits.${kit.id}.volumeL`, kit.volumeL),
      ...ofAtLeast(`kits.${kit.id}.mixMinutesPerKit`, kit.mixMinutesPerKit, 0),
      ...ofAtLeast(`kits.${kit.id}.count`, kit.count, 0),
    ]),
    ...repeated('consumableRates.item', (facts.consumableRates ?? []).map(({ item }) => item)),
  ];
  return [...new Set(fields)].sort();
}

/** Facts that cannot be hold the shift and are named. */
export const possibleFactsRule: ShiftRule<ShiftContext> = {
  id: 'facts-possible',
  title: words('Facts that can be', 'Datos posibles'),
  source: commonPractice('A plan with impossible times or amounts decides nothing.'),
  duties: [],
  topic: 'gate',
  holds: true,
  evaluate({ facts }) {
    const fields = impossibleFields(facts);
    if (fields.length === 0) return notApplicable(words('The plan can be.', 'El plan es posible.'));
    const names = fields.join(', ');
    return unmet(words(`Cannot be: ${names}.`, `No puede ser: ${names}.`), { inputs: { fields: names }, whatWouldChange: words('Mend the plan.', 'Corrija el plan.') });
  },
  line: () => words('The plan holds times or amounts that cannot be.', 'El plan tiene horas o cantidades imposibles.'),
};
