import { type WrittenException } from '../facts';
import { checkNumber, InputError } from '../input-error';
import { type Words } from '../outcome';
import { WHO } from '../rule';
import { commonPractice, type Source } from '../source';
import { COATING_RANGES, METHOD_RANGES, type CoatingRangeRow, type MethodRangeRow, type SurfaceMethod } from './profiles.data';

export const ORDER_SOURCE: Source = commonPractice('Grinding takes a blasted profile off again: grind first, then blast.');

function checkProfile(field: string, profile: number): number {
  checkNumber(field, profile, { min: 1, max: 10 });
  if (!Number.isInteger(profile)) throw new InputError(field, 'must be a whole number');
  return profile;
}

/** Methods that usually reach a target profile, the gentlest first. */
export function methodsFor(targetProfile: number): readonly MethodRangeRow[] {
  checkProfile('targetProfile', targetProfile);
  return METHOD_RANGES.filter((row) => row.minProfile <= targetProfile && targetProfile <= row.maxProfile).sort((a, b) => a.maxProfile - b.maxProfile || a.minProfile - b.minProfile);
}

export type ProfileAnswer =
  | { readonly outcome: 'met'; readonly reason: Words; readonly source: Source }
  | { readonly outcome: 'exception'; readonly exception: WrittenException; readonly reason: Words; readonly source: Source }
  | { readonly outcome: 'unmet' | 'undecided'; readonly reason: Words; readonly whoDecides: Words; readonly proposals: readonly MethodRangeRow[]; readonly source: Source };

/**
 * Whether the last method in `methods` can leave the target profile. A written exception of the supplier is recorded as such:
 * it never turns into "meets the profile".
 * @param methods in the order in which they are done; the last that touches the floor counts.
 */
export function profileAnswer(targetProfile: number | null, methods: readonly SurfaceMethod[], exception: WrittenException | null = null): ProfileAnswer {
  if (targetProfile === null) {
    return { outcome: 'undecided', reason: { en: 'No floor profile is set. The product data sheet names it.', es: 'No se ha fijado el perfil del piso. Lo indica la hoja técnica del producto.' }, whoDecides: WHO.supplier, proposals: [], source: METHOD_RANGES[0]!.source };
  }
  checkProfile('targetProfile', targetProfile);
  const proposals = methodsFor(targetProfile);
  const last = METHOD_RANGES.find((row) => row.method === methods.at(-1));
  if (last === undefined) {
    return { outcome: 'undecided', reason: { en: 'No preparation is planned yet.', es: 'Aún no se ha planeado la preparación.' }, whoDecides: WHO.competentPerson, proposals, source: METHOD_RANGES[0]!.source };
  }
  if (last.minProfile <= targetProfile && targetProfile <= last.maxProfile) {
    return { outcome: 'met', reason: { en: `CSP ${targetProfile} is within reach of ${last.name.en} (${last.minProfile} to ${last.maxProfile}). The chip on the floor decides.`, es: `CSP ${targetProfile} está al alcance de ${last.name.es} (${last.minProfile} a ${last.maxProfile}). Decide la placa sobre el piso.` }, source: last.source };
  }
  if (exception !== null && targetProfile > last.maxProfile) {
    return { outcome: 'exception', exception, reason: { en: `${last.name.en} gives CSP ${last.minProfile} to ${last.maxProfile}, not ${targetProfile}. The supplier allows it in writing: ${exception.reference}.`, es: `${last.name.es} da CSP ${last.minProfile} a ${last.maxProfile}, no ${targetProfile}. El proveedor lo permite por escrito: ${exception.reference}.` }, source: last.source };
  }
  const isUndoing = methods.slice(0, -1).some((method) => METHOD_RANGES.some((row) => row.method === method && row.maxProfile >= targetProfile));
  return {
    outcome: 'unmet',
    reason: isUndoing && last.method === 'grinding'
      ? { en: 'Grinding last takes the blasted profile off again: grind first, then blast.', es: 'Pulir al final quita el perfil del granallado: primero pulir, luego granallar.' }
      : { en: `${last.name.en} gives CSP ${last.minProfile} to ${last.maxProfile}, not ${targetProfile}.`, es: `${last.name.es} da CSP ${last.minProfile} a ${last.maxProfile}, no ${targetProfile}.` },
    whoDecides: WHO.supplier,
    proposals,
    source: isUndoing ? ORDER_SOURCE : last.source,
  };
}

/** The guide's profile for a coat of this thickness; the product data sheet prevails. */
export function profileForThickness(thicknessMm: number): CoatingRangeRow {
  checkNumber('thicknessMm', thicknessMm, { above: 0, max: 300 });
  return COATING_RANGES.find((row) => row.maxThicknessMm === null || thicknessMm <= row.maxThicknessMm)!;
}
