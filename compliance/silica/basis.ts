import { type ExposureBasis, type TaskKind } from '../facts';
import { isIsoDate, type IsoDate } from '../iso-date';
import { hazardRatio } from '../respirators/select';
import { type RespiratorFactors, type SilicaLaw } from './shift-pack';

/** What a signed basis settles for a task. */
export type BasisDecision =
  | { readonly kind: 'outside-scope'; readonly basis: ExposureBasis }
  /** `ratio` is exposure ÷ limit; `apf` is null while it is at most 1, else the least factor that covers it. */
  | { readonly kind: 'assessed'; readonly basis: ExposureBasis; readonly ratio: number; readonly apf: number | null }
  | { readonly kind: 'sampling-day'; readonly basis: ExposureBasis; readonly apf: number }
  /** Signed and in time, but it settles nothing: the fault says why. */
  | { readonly kind: 'unusable'; readonly basis: ExposureBasis; readonly fault: BasisFault };

export type BasisFault = 'no-exposure' | 'no-conditions' | 'not-below-action-level' | 'no-action-level' | 'no-interim-respirator' | 'beyond-every-respirator' | 'no-factors';

/** Whether a named person signed it and the day lies inside its life. A sampling day is good for the one day it ends on. */
export function isInForce(basis: ExposureBasis, day: IsoDate): boolean {
  if (basis.signedBy.trim() === '' || !isIsoDate(basis.signedOn) || !isIsoDate(basis.endsOn) || basis.signedOn > day) return false;
  return basis.kind === 'sampling-day' ? basis.endsOn === day : basis.endsOn >= day;
}

/** Smallest factor of the law that is enough for the ratio of exposure to limit; undefined beyond every respirator. */
export function apfForRatio(ratio: number, { classes, mustExceedRatio }: RespiratorFactors): number | undefined {
  return classes.find((apf) => (mustExceedRatio ? apf > ratio : apf >= ratio));
}

function judge(basis: ExposureBasis, law: SilicaLaw): BasisDecision {
  const unusable = (fault: BasisFault): BasisDecision => ({ kind: 'unusable', basis, fault });
  const exposure = basis.exposureMicrogramsPerM3;
  if (basis.conditions.trim() === '') return unusable('no-conditions');
  if (basis.kind === 'sampling-day') {
    const apf = basis.interimApf;
    return apf === null || !Number.isFinite(apf) || apf <= 0 ? unusable('no-interim-respirator') : { kind: 'sampling-day', basis, apf };
  }
  if (basis.kind === 'below-action-level') {
    if (law.actionLevel === null) return unusable('no-action-level');
    // Exactly at the action level is not below it.
    if (exposure !== null && !(exposure >= 0 && exposure < law.actionLevel)) return unusable('not-below-action-level');
    return { kind: 'outside-scope', basis };
  }
  if (exposure === null || !Number.isFinite(exposure) || exposure < 0) return unusable('no-exposure');
  const ratio = hazardRatio(exposure, law.limit);
  if (ratio <= 1) return { kind: 'assessed', basis, ratio, apf: null };
  if (law.factors === null) return unusable('no-factors');
  const apf = apfForRatio(ratio, law.factors);
  return apf === undefined ? unusable('beyond-every-respirator') : { kind: 'assessed', basis, ratio, apf };
}

/** Strictest last; a basis that settles nothing beats those that do only when its exposure has no respirator. */
function strictness(decision: BasisDecision): number {
  switch (decision.kind) {
    case 'unusable':
      return decision.fault === 'beyond-every-respirator' || decision.fault === 'no-factors' ? Number.POSITIVE_INFINITY : -1;
    case 'outside-scope':
      return 0;
    case 'assessed':
      return 1 + decision.ratio;
    case 'sampling-day':
      return 1 + decision.apf;
  }
}

/** The decision in force for a kind of work on a day: of several, the strictest, so that a high result is never hidden by a lower one. */
export function decideByBasis(bases: readonly ExposureBasis[], kinds: readonly TaskKind[], day: IsoDate, law: SilicaLaw): BasisDecision | null {
  const decisions = bases.filter((basis) => kinds.includes(basis.taskKind) && isInForce(basis, day)).map((basis) => judge(basis, law));
  return decisions.reduce<BasisDecision | null>((top, next) => (top === null || compare(next, top) > 0 ? next : top), null);
}

function compare(a: BasisDecision, b: BasisDecision): number {
  return strictness(a) - strictness(b) || (a.basis.id < b.basis.id ? 1 : -1);
}

/** The last basis of this kind of work that has ended, so that the line can say so. */
export function endedBasis(bases: readonly ExposureBasis[], kinds: readonly TaskKind[], day: IsoDate): ExposureBasis | null {
  const ended = bases.filter((basis) => kinds.includes(basis.taskKind) && isIsoDate(basis.endsOn) && basis.endsOn < day);
  return [...ended].sort((a, b) => (a.endsOn === b.endsOn ? (a.id < b.id ? -1 : 1) : a.endsOn > b.endsOn ? -1 : 1))[0] ?? null;
}
