import { type PartFacts } from '../facts';
import { type Pictogram } from './ghs-hazards.data';
import { labelElements } from './label-elements';
import { MIXING_EFFECTS, type MaterialState, type MixingEffect, type MixingTrigger } from './mixing-effects.data';
import { readHazardCodes } from './statements';

/** The hazards of a kit for choosing protection. Not a classification: a container label takes its statements from the sheets. */
export interface KitHazards {
  /** Union of the parts' statements as on their confirmed sheets, combinations kept. */
  readonly codes: readonly string[];
  /** Statements the mixed material acts like, which no sheet of the kit carries by itself. */
  readonly addedByMixing: readonly string[];
  readonly effects: readonly MixingEffect[];
  /** Every pictogram of every sheet, without precedence across sheets: all of a sheet's pictograms are shown. */
  readonly pictograms: readonly Pictogram[];
  /** Products without a confirmed sheet: their hazards are unknown, so the union is incomplete. */
  readonly partsWithoutSheet: readonly string[];
  /** Codes on the sheets that no table knows, with the product they stand on. */
  readonly unknownCodes: readonly { readonly productName: string; readonly text: string }[];
}

const matches = (part: PartFacts, { casNumbers, codes }: MixingTrigger): boolean =>
  part.sheet !== null && (part.sheet.casNumbers.some((each) => casNumbers.includes(each)) || part.sheet.hazardCodes.some((each) => codes.includes(each)));

function occurs(effect: MixingEffect, parts: readonly PartFacts[]): boolean {
  return parts.some(
    (part) => matches(part, effect.trigger) && (!effect.needsPowder || part.form === 'powder') && (effect.with === null || parts.some((other) => other !== part && matches(other, effect.with!))),
  );
}

/** Union of the parts' hazards plus what mixing adds, optionally for one state of the material. */
export function kitHazards(parts: readonly PartFacts[], state: MaterialState | null = null): KitHazards {
  const read = parts.flatMap((part) => (part.sheet === null ? [] : [{ part, ...readHazardCodes(part.sheet.hazardCodes) }]));
  const codes = [...new Set(read.flatMap((each) => each.codes))].sort();
  const effects = MIXING_EFFECTS.filter((effect) => (state === null || effect.state === state) && occurs(effect, parts));
  const shown = new Set(
    read.flatMap((each) => {
      const elements = labelElements(each.codes.map((code) => ({ code, category: null })));
      return [...elements.pictograms, ...elements.voluntaryPictograms];
    }),
  );
  return {
    codes,
    addedByMixing: [...new Set(effects.flatMap((effect) => effect.actsAs))].filter((code) => !codes.includes(code)).sort(),
    effects,
    pictograms: [...shown].sort(),
    partsWithoutSheet: parts.filter((part) => part.sheet === null).map((part) => part.productName),
    unknownCodes: read.flatMap(({ part, unknown }) => unknown.map(({ text }) => ({ productName: part.productName, text }))),
  };
}
