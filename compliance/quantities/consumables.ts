import { type ConsumableRate, type TaskFacts } from '../facts';
import { type Finding, type Words } from '../outcome';
import { sheetRespiratorDemand } from '../ppe/task-respirator';
import { met, undecided, unmet } from '../rule';
import { totalMinutes } from '../silica/minutes';
import { taskContext, type ShiftContext } from '../shift-context';
import { ask, present, type FindingPlace, type ShiftRule } from '../shift-rule';
import { commonPractice } from '../source';
import { words } from '../words';
import { CONSUMABLES, type ConsumableRow } from './consumables.data';
import { countKits } from './kit-rules';
import { ft2FromM2 } from './units';

export interface ConsumableOfShift extends ShiftContext {
  readonly row: ConsumableRow;
  readonly tasks: readonly TaskFacts[];
  readonly rate: ConsumableRate | null;
}

function tasksUsing({ usedBy }: ConsumableRow, shift: ShiftContext): readonly TaskFacts[] {
  const { tasks } = shift.facts;
  if (usedBy === 'collected') return tasks.filter(({ collectorId }) => collectorId !== null);
  if (usedBy === 'vapor-mask') return tasks.filter((task) => sheetRespiratorDemand(taskContext(shift, task)).kind === 'required');
  return tasks.filter(({ kind }) => usedBy.includes(kind));
}

/** How much there is of what the rate counts by; null where the facts do not say. Machine hours count each task's own time once. */
function baseOf(per: ConsumableRate['per'], { facts, tasks, ...shift }: ConsumableOfShift): number | null {
  switch (per) {
    case 'ft2':
      return facts.areaM2 === null ? null : ft2FromM2(facts.areaM2);
    case 'm2':
      return facts.areaM2;
    case 'hour':
      return tasks.reduce((sum, { assignments }) => sum + totalMinutes(assignments), 0) / 60;
    case 'person':
      return new Set(tasks.flatMap(({ assignments }) => assignments.map(({ personId }) => personId))).size;
    case 'kit': {
      const counts = facts.kits.map((kit) => countKits({ facts, ...shift }, kit)?.kits ?? null);
      return counts.length === 0 || counts.includes(null) ? null : counts.reduce<number>((sum, kits) => sum + (kits ?? 0), 0);
    }
  }
}

/** A thousandth is the noise of conversions, not one piece more. */
const NOISE = 1e-3;
/** Pieces are whole; weights and lengths keep two decimals, rounded up. */
export function rounded(amount: number, unit: ConsumableRate['unit']): number {
  return unit === 'pieces' ? Math.ceil(amount - NOISE) : Math.ceil(amount * 100 - NOISE) / 100;
}

const isStated = ({ amount, statedBy }: ConsumableRate): boolean => Number.isFinite(amount) && amount > 0 && statedBy.trim() !== '';
const PER: Readonly<Record<ConsumableRate['per'], Words>> = { ft2: words('ft²', 'ft²'), m2: words('m²', 'm²'), hour: words('machine hour', 'hora de máquina'), kit: words('kit', 'kit'), person: words('person', 'persona') };
const UNIT: Readonly<Record<ConsumableRate['unit'], Words>> = { pieces: words('pieces', 'piezas'), lb: words('lb', 'lb'), kg: words('kg', 'kg'), ft: words('ft', 'ft'), m: words('m', 'm') };
const unitOf = (unit: ConsumableRate['unit'], amount: unknown): Words => (unit === 'pieces' && amount === 1 ? words('piece', 'pieza') : UNIT[unit]);

/** Amounts for the shift from rates that a person stated. A rate that nobody stated is not known: it is never put in by the program. */
export const consumableRule: ShiftRule<ConsumableOfShift> = {
  id: 'consumable-amount',
  title: words('What the shift uses up', 'Lo que gasta el turno'),
  source: commonPractice('Amount = stated rate × area, machine hours, kits or people. No rate is assumed.'),
  duties: [],
  topic: 'gate',
  holds: false,
  evaluate(context) {
    const { row, rate } = context;
    const inputs = { rate: rate?.amount ?? null, unit: rate?.unit ?? null, per: rate?.per ?? null, 'stated by': rate?.statedBy ?? null };
    const state = words('State a rate and where it comes from.', 'Dé un consumo y de dónde sale.');
    if (rate === null) return undecided(words('Nobody stated a rate.', 'Nadie dio un consumo.'), row.whoSays, { inputs, whatWouldChange: state });
    if (!isStated(rate)) return unmet(words('The rate is not above zero, or nobody is named for it.', 'El consumo no es mayor que cero, o nadie responde por él.'), { inputs, whatWouldChange: state });
    const base = baseOf(rate.per, context);
    if (base === null || !Number.isFinite(base) || base < 0) return undecided(words(`Not known: how many ${PER[rate.per].en} is missing.`, `No se sabe: falta cuántos ${PER[rate.per].es}.`), words('the crew lead', 'el líder'), { inputs, whatWouldChange: words('Give area, thickness or count.', 'Dé área, espesor o cuenta.') });
    const amount = rounded(rate.amount * base, rate.unit);
    return met(words(`${rate.amount} ${unitOf(rate.unit, rate.amount).en} a ${PER[rate.per].en}, stated by ${rate.statedBy}.`, `${rate.amount} ${unitOf(rate.unit, rate.amount).es} por ${PER[rate.per].es}, según ${rate.statedBy}.`), {
      inputs: { ...inputs, [`counted, ${PER[rate.per].en}`]: Math.round(base * 100) / 100 },
      results: { [`amount, ${rate.unit}`]: amount },
    });
  },
  line(context, { outcome, results }) {
    const { row, rate } = context;
    const amount = rate === null ? null : results[`amount, ${rate.unit}`];
    if (outcome !== 'met' || rate === null || amount === undefined) return words(`${row.name.en}: amount not known.`, `${row.name.es}: cantidad sin saber.`);
    const unit = unitOf(rate.unit, amount);
    return words(`${row.name.en}: ${amount} ${unit.en}.`, `${row.name.es}: ${amount} ${unit.es}.`);
  },
  sourceOf: ({ row }) => row.source,
};

/** One line for each thing that the planned work uses up, in the order of the table. */
export function consumablesOf(shift: ShiftContext, place: FindingPlace): readonly Finding[] {
  const rates = new Map((shift.facts.consumableRates ?? []).map((rate) => [rate.item, rate]));
  return present(
    CONSUMABLES.map((row) => {
      const tasks = tasksUsing(row, shift);
      return tasks.length === 0 ? null : ask(consumableRule, { ...shift, row, tasks, rate: rates.get(row.id) ?? null }, { ...place, about: row.id });
    }),
  );
}
