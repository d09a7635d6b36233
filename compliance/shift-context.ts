import { type EquipmentFacts, type KitFacts, type PartFacts, type PersonFacts, type ShiftFacts, type TaskFacts } from './facts';
import { kitHazards, type KitHazards } from './hazcom/kit-hazards';
import { singleCodes } from './hazcom/statements';
import { type Words } from './outcome';
import { table1Time, type Table1Time } from './silica/minutes';
import { shiftPack, type ShiftPack } from './silica/shift-pack';
import { TASKS, type TaskTraits } from './silica/tasks.data';
import { listed } from './words';

/** The facts of a shift with its things found by id. */
export interface ShiftContext {
  readonly facts: ShiftFacts;
  readonly pack: ShiftPack;
  readonly peopleById: ReadonlyMap<string, PersonFacts>;
  readonly kitsById: ReadonlyMap<string, KitFacts>;
  readonly equipmentById: ReadonlyMap<string, EquipmentFacts>;
  readonly hazardsByKit: ReadonlyMap<string, KitHazardsOfShift>;
  readonly table1TimeByPerson: ReadonlyMap<string, Table1Time>;
}

/** A kit's hazards with the questions that the shift's rules ask of them. */
export interface KitHazardsOfShift extends KitHazards {
  /** Codes on the confirmed sheets, combinations taken apart. */
  readonly single: ReadonlySet<string>;
  /** Cement in a powder part: burns when wet, whatever its sheet says. */
  readonly isWetCement: boolean;
  /** Parts whose sheet shows isocyanate or a breathing sensitizer. */
  readonly isocyanateParts: readonly Pick<PartFacts, 'part' | 'productName'>[];
  /** Codes for flammable liquids (H224 to H226) on the sheets. */
  readonly flammableCodes: readonly string[];
}

/** One task of the shift with everything that it uses. */
export interface TaskContext extends ShiftContext {
  readonly task: TaskFacts;
  readonly traits: TaskTraits;
  readonly tool: EquipmentFacts | null;
  readonly collector: EquipmentFacts | null;
  readonly kit: KitFacts | null;
  readonly kitHazards: KitHazardsOfShift | null;
  /** Each assigned person once, in the order of the crew list. */
  readonly people: readonly PersonFacts[];
}

const byId = <T extends { readonly id: string }>(things: readonly T[]): ReadonlyMap<string, T> => new Map(things.map((thing) => [thing.id, thing]));

export function shiftContext(facts: ShiftFacts): ShiftContext {
  return {
    facts,
    pack: shiftPack(facts.jurisdictionId),
    peopleById: byId(facts.people),
    kitsById: byId(facts.kits),
    equipmentById: byId(facts.equipment),
    hazardsByKit: new Map(facts.kits.map((kit) => [kit.id, hazardsOf(kit)])),
    table1TimeByPerson: new Map(facts.people.map((person) => [person.id, table1Time(facts, person)])),
  };
}

const FLAMMABLE = ['H224', 'H225', 'H226'];
/** The sheet itself says it (EUH204, H334), or an ingredient's number does (see hazcom/mixing-effects.data.ts). */
const ISOCYANATE_EFFECT = 'isocyanate-vapor-while-mixing';
const SENSITIZER_CODES = ['EUH204', 'H334'];

function hazardsOf(kit: KitFacts): KitHazardsOfShift {
  const hazards = kitHazards(kit.parts);
  const single = new Set(singleCodes(hazards.codes));
  const isSensitizer = (part: PartFacts): boolean => {
    const own = kitHazards([part]);
    return own.effects.some(({ id }) => id === ISOCYANATE_EFFECT) || singleCodes(own.codes).some((code) => SENSITIZER_CODES.includes(code));
  };
  return {
    ...hazards,
    single,
    isWetCement: hazards.effects.some(({ id }) => id === 'alkaline-when-wet'),
    isocyanateParts: kit.parts.filter(isSensitizer).map(({ part, productName }) => ({ part, productName })),
    flammableCodes: FLAMMABLE.filter((code) => single.has(code)),
  };
}

export function taskContext(shift: ShiftContext, task: TaskFacts): TaskContext {
  const assigned = new Set(task.assignments.map(({ personId }) => personId));
  return {
    ...shift,
    task,
    traits: TASKS[task.kind],
    tool: task.equipmentId === null ? null : (shift.equipmentById.get(task.equipmentId) ?? null),
    collector: task.collectorId === null ? null : (shift.equipmentById.get(task.collectorId) ?? null),
    kit: task.kitId === null ? null : (shift.kitsById.get(task.kitId) ?? null),
    kitHazards: task.kitId === null ? null : (shift.hazardsByKit.get(task.kitId) ?? null),
    people: shift.facts.people.filter(({ id }) => assigned.has(id)),
  };
}

export function isIndoors({ facts }: ShiftContext): boolean {
  return facts.setting !== 'outdoors';
}

export function namesOf(people: readonly PersonFacts[]): Words {
  return listed(people.map(({ name }) => name));
}
