import { type Shift } from '#shared/jobs';
import { type Equipment } from '#shared/equipment';
import { type Person } from '#shared/people';
import { type Kit } from '#shared/products';
import { type NameOf } from './plan-differences';

export interface ShiftThings {
  readonly people: readonly Person[];
  readonly equipment: readonly Equipment[];
  readonly kits: readonly Kit[];
}
export const noThings: ShiftThings = { people: [], equipment: [], kits: [] };

/** Finds the name of anything a plan points at. */
export function namesFor(shift: Shift | null, things: ShiftThings): NameOf {
  const names = new Map<string, string>();
  for (const list of [things.people, things.equipment, things.kits, shift?.context.people ?? [], shift?.context.equipment ?? [], shift?.context.kits ?? []]) {
    for (const { id, name } of list) names.set(id, name);
  }
  return (id) => names.get(id) ?? 'somebody or something no longer listed';
}
