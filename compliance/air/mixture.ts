import { checkNumber } from '../input-error';
import { type Words } from '../outcome';
import { WHO } from '../rule';
import { usFederal } from '../source';
import { withoutNoise } from './units';

export const MIXTURE_SOURCE = usFederal('1910.1000', 'read', { paragraph: '(d)(2)(i)', note: 'Meant for contaminants that act together.' });

/** One contaminant's 8-hour average and its limit, both in the same unit; `limit` null where the law sets none. */
export interface MixtureMember {
  readonly name: string;
  readonly concentration: number;
  readonly limit: number | null;
}

export type MixtureIndex =
  | { readonly isDecided: true; readonly index: number; readonly isExceeded: boolean; readonly shares: readonly { readonly name: string; readonly share: number }[] }
  | { readonly isDecided: false; readonly withoutLimit: readonly string[]; readonly reason: Words; readonly whoDecides: Words };

/** Em = Σ C/L; above 1 exceeds. A contaminant without a limit leaves it undecided. */
export function additiveMixture(members: readonly MixtureMember[]): MixtureIndex {
  members.forEach((member, i) => {
    checkNumber(`members[${i}].concentration`, member.concentration, { min: 0 });
    if (member.limit !== null) checkNumber(`members[${i}].limit`, member.limit, { above: 0 });
  });
  const limited = members.filter((member): member is MixtureMember & { limit: number } => member.limit !== null);
  const withoutLimit = members.filter((member) => member.limit === null).map((member) => member.name);
  if (withoutLimit.length > 0) {
    const names = withoutLimit.join(', ');
    return { isDecided: false, withoutLimit, reason: { en: `No limit is on file for: ${names}.`, es: `No hay un límite registrado para: ${names}.` }, whoDecides: WHO.hygienist };
  }
  const shares = limited.map(({ name, concentration, limit }) => ({ name, share: concentration / limit }));
  const index = withoutNoise(shares.reduce((sum, { share }) => sum + share, 0));
  return { isDecided: true, index, isExceeded: index > 1, shares };
}
