import { type ShiftFacts } from '../facts';
import { isIsoDate } from '../iso-date';
import { notApplicable, unmet } from '../rule';
import { isPossible } from '../silica/minutes';
import { type ShiftContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { commonPractice } from '../source';
import { words } from '../words';

/** In mm of a coat and in L of a kit: no coat is thinner than a thousandth of a millimeter and no kit smaller than a milliliter. */
export const LEAST_AMOUNT = 0.001;

/** Names of the fields that cannot be: a refusal by name in place of a throw, so that the page can point at them. */
export function impossibleFields(facts: ShiftFacts): readonly string[] {
  // Each names its field when the fact cannot be; a fact that nobody stated (null) can.
  const below = (min: number, field: string, value: number | null): readonly string[] => (value === null || (Number.isFinite(value) && value >= min) ? [] : [field]);
  const twice = (field: string, ids: readonly string[]): readonly string[] => (new Set(ids).size === ids.length ? [] : [field]);
  const people = new Set(facts.people.map(({ id }) => id));
  const fields = [
    // The floor: a day that exists, no area or room below zero, a concrete surface profile of CSP 1 to 10, a coat that has a thickness.
    ...(isIsoDate(facts.date) ? [] : ['date']),
    ...below(0, 'areaM2', facts.areaM2),
    ...below(0, 'roomVolumeM3', facts.roomVolumeM3),
    ...(facts.targetProfile === null || (Number.isInteger(facts.targetProfile) && facts.targetProfile >= 1 && facts.targetProfile <= 10) ? [] : ['targetProfile']),
    ...below(LEAST_AMOUNT, 'thicknessMm', facts.thicknessMm),
    // Nobody and nothing listed twice.
    ...twice('people.id', facts.people.map(({ id }) => id)),
    ...twice('tasks.id', facts.tasks.map(({ id }) => id)),
    ...twice('kits.id', facts.kits.map(({ id }) => id)),
    ...twice('equipment.id', facts.equipment.map(({ id }) => id)),
    // Kits: no volume, minutes or count that cannot be.
    ...facts.kits.flatMap((kit) => [
      ...below(LEAST_AMOUNT, `kits.${kit.id}.volumeL`, kit.volumeL),
      ...below(0, `kits.${kit.id}.mixMinutesPerKit`, kit.mixMinutesPerKit),
      ...below(LEAST_AMOUNT, `kits.${kit.id}.bucketMinutes`, kit.bucketMinutes),
      ...below(0, `kits.${kit.id}.count`, kit.count),
    ]),
    ...twice('consumableRates.item', (facts.consumableRates ?? []).map(({ item }) => item)),
    // Times, planned, logged and on other jobs (`isPossible`: start not after end, 24 hours at most, from the day before to the end of the day after), each of a person on the list.
    ...facts.tasks.flatMap((task) => task.assignments.flatMap((assignment) => [...(isPossible(assignment) ? [] : [`tasks.${task.id}.assignments`]), ...(people.has(assignment.personId) ? [] : [`tasks.${task.id}.personId`])])),
    ...facts.tasks.flatMap((task) => ((task.logged ?? []).every((span) => isPossible(span) && people.has(span.personId)) ? [] : [`tasks.${task.id}.logged`])),
    ...facts.people.flatMap((person) => (person.elsewhere.every(isPossible) ? [] : [`people.${person.id}.elsewhere`])),
  ];
  return [...new Set(fields)].sort();
}

/** No law: a plan whose times or amounts cannot be (the list is `impossibleFields`, above) holds the shift, and its fields are named. */
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
