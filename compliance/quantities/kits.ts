import { checkNumber } from '../input-error';
import { commonPractice, type Source } from '../source';
import { ft2FromM2 } from './units';

export const KIT_COVERAGE_SOURCE: Source = commonPractice('A three-part cementitious urethane kit covers about 25 ft² at 1/4 in and about 16 ft² at 3/8 in: one volume, 0.5208 ft³.');
export const KIT_MIXING_SOURCE: Source = commonPractice('A kit is mixed two minutes and leaves the bucket within about five; conditioned material gains five to seven.');

/** Minutes more in the bucket for conditioned (cooled) material, shortest and longest. Common practice, no source. */
export const CONDITIONED_GAIN_MINUTES = { shortest: 5, longest: 7 } as const;

/**
 * Coverage is always said with "about": a hundredth of a kit, or of a square foot, is the noise of rounded figures and not a whole kit more.
 */
const NOISE = 0.01;

/** Floor that one kit covers, m². */
export function coverageM2(volumeL: number, thicknessMm: number): number {
  checkNumber('volumeL', volumeL, { above: 0 });
  checkNumber('thicknessMm', thicknessMm, { above: 0 });
  return volumeL / thicknessMm;
}

/** Coverage as stated to people: whole square feet, rounded down, so that nobody counts on more floor than the kit gives. */
export function statedCoverageFt2(volumeL: number, thicknessMm: number): number {
  return Math.floor(ft2FromM2(coverageM2(volumeL, thicknessMm)) + NOISE);
}

/**
 * Kits for a floor: mixed volume over the volume of one kit, rounded up to whole kits.
 * Counted from the volume, not from the stated coverage, whose own rounding would be counted twice.
 */
export function kitsFor(areaM2: number, thicknessMm: number, volumeL: number): number {
  checkNumber('areaM2', areaM2, { min: 0 });
  return Math.max(0, Math.ceil(areaM2 / coverageM2(volumeL, thicknessMm) - NOISE));
}

export interface MixingFacts {
  readonly kits: number;
  readonly mixMinutesPerKit: number;
  /** Powder parts in one kit: each is one dump. */
  readonly powderParts: number;
}

/** Exposure time, not just material: minutes at the mixer, and how often a bag of powder is dumped. */
export function mixingOf({ kits, mixMinutesPerKit, powderParts }: MixingFacts): { readonly mixingMinutes: number; readonly powderDumps: number } {
  checkNumber('kits', kits, { min: 0 });
  checkNumber('mixMinutesPerKit', mixMinutesPerKit, { min: 0 });
  checkNumber('powderParts', powderParts, { min: 0 });
  return { mixingMinutes: kits * mixMinutesPerKit, powderDumps: kits * powderParts };
}
