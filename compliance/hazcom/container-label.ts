import { type PartFacts } from '../facts';
import { type Words } from '../outcome';
import { usFederal } from '../source';
import { words } from '../words';
import { type Pictogram, type SignalWord } from './ghs-hazards.data';
import { kitHazards } from './kit-hazards';
import { labelElements } from './label-elements';
import { type MaterialState } from './mixing-effects.data';
import { readHazardCodes, statementText } from './statements';

export const CONTAINER_LABEL_SOURCE = usFederal('1910.1200', 'partly', { paragraph: '(f)(6)(ii)', note: 'Product identifier with words and pictures of the hazards; a label once the container leaves the hands of who filled it, (f)(8), from a university program.' });

const STATE_WORDS: Readonly<Record<MaterialState, Words>> = {
  dry: words('dry powder', 'polvo seco'),
  mixing: words('being mixed', 'mezclándose'),
  wet: words('mixed, wet', 'mezclado, húmedo'),
  'cured-being-ground': words('cured', 'curado'),
};

/** What is printed on a bucket of decanted or mixed material. Statements are those of the sheets; mixing effects are words beside them, never a classification. */
export interface ContainerLabel {
  /** Product names with their parts. */
  readonly identifier: string;
  readonly state: Words;
  readonly signalWord: SignalWord;
  readonly pictograms: readonly Pictogram[];
  readonly statements: readonly { readonly code: string; readonly text: Words }[];
  /** What mixing adds in this state, in plain words. */
  readonly effects: readonly Words[];
  /** Products without a confirmed sheet: the label must not be printed before their sheet is there. */
  readonly blockedBy: readonly string[];
}

/** The label for the parts that are in one container, in one state. */
export function containerLabelFor(parts: readonly PartFacts[], state: MaterialState): ContainerLabel {
  const { codes } = readHazardCodes(parts.flatMap((part) => part.sheet?.hazardCodes ?? []));
  const ordered = [...codes].sort();
  const { signalWord, pictograms } = labelElements(ordered.map((code) => ({ code, category: null })));
  return {
    identifier: parts.map((part) => (part.part === '' || part.productName.endsWith(` ${part.part}`) ? part.productName : `${part.productName} (${part.part})`)).join(' + '),
    state: STATE_WORDS[state],
    signalWord,
    pictograms,
    statements: ordered.map((code) => ({ code, text: statementText(code)! })),
    effects: kitHazards(parts, state).effects.map((effect) => effect.text),
    blockedBy: parts.filter((part) => part.sheet === null).map((part) => part.productName),
  };
}
