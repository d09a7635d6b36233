import { type Words } from '../outcome';
import { commonPractice, sourced, usFederal, type Source } from '../source';

/** State of kit material; a label and a line name it, because the hazards differ. */
export const materialStates = ['dry', 'mixing', 'wet', 'cured-being-ground'] as const;
export type MaterialState = (typeof materialStates)[number];

/** What tells that an effect can occur: substances (CAS) or statements on the confirmed sheets of the parts. */
export interface MixingTrigger {
  readonly casNumbers: readonly string[];
  readonly codes: readonly string[];
}

/** What mixing adds to the hazards the single sheets name. Serves protection, never classification. */
export interface MixingEffect {
  readonly id: string;
  readonly state: MaterialState;
  /** One of the parts must carry this. */
  readonly trigger: MixingTrigger;
  /** Another part must carry this too; null where one part is enough. */
  readonly with: MixingTrigger | null;
  /** Whether the triggering part must be a powder. */
  readonly needsPowder: boolean;
  readonly text: Words;
  /** What protection must treat the mixed material as, beside the sheets' own codes. */
  readonly actsAs: readonly string[];
  readonly source: Source;
}

const CEMENT: MixingTrigger = { casNumbers: ['65997-15-1', '1305-62-0', '1305-78-8'], codes: ['EUH203'] };
const SILICA: MixingTrigger = { casNumbers: ['14808-60-7', '14464-46-1'], codes: [] };
const ISOCYANATE: MixingTrigger = { casNumbers: ['101-68-8', '9016-87-9', '26447-40-5', '822-06-0', '28182-81-2', '4098-71-9'], codes: ['EUH204'] };
const EPOXY: MixingTrigger = { casNumbers: ['25068-38-6', '1675-54-3', '25085-99-8', '9003-36-5'], codes: ['EUH205'] };
const AMINE: MixingTrigger = { casNumbers: ['2855-13-2', '112-24-3', '1477-55-0', '9046-10-0'], codes: [] };

export const MIXING_EFFECTS: readonly MixingEffect[] = [
  {
    id: 'silica-dust-while-tipping',
    state: 'mixing',
    trigger: SILICA,
    with: null,
    needsPowder: true,
    text: { en: 'Silica dust can rise while this powder is tipped and mixed.', es: 'Puede salir polvo de sílice al verter y mezclar este polvo.' },
    actsAs: ['H350', 'H372'],
    source: usFederal('1926.1153', 'partly', { paragraph: '(a)', note: 'Tipping dry silica filler in quantity is not on the list of tasks that likely stay below the action level (OSHA letter 25 Jul 2019); statements of quartz recalled.' }),
  },
  {
    id: 'alkaline-when-wet',
    state: 'wet',
    trigger: CEMENT,
    with: null,
    needsPowder: true,
    text: { en: 'Wet cement burns skin and eyes, often without pain at first.', es: 'El cemento mojado quema la piel y los ojos, a menudo sin dolor al principio.' },
    actsAs: ['H315', 'H318'],
    source: sourced('Statements of Portland cement on supplier sheets', 'from-memory', { note: 'Wet cement is alkaline; 1926.50(g) asks for eye and body flushing where corrosives can reach a person.' }),
  },
  {
    id: 'isocyanate-vapor-while-mixing',
    state: 'mixing',
    trigger: ISOCYANATE,
    with: null,
    needsPowder: false,
    text: { en: 'Isocyanate can be breathed in while mixing, more so when the mix is warm. Dust filters do not stop vapor.', es: 'Se puede respirar isocianato al mezclar, más si la mezcla está tibia. Los filtros de polvo no detienen el vapor.' },
    actsAs: ['H334', 'H317'],
    source: sourced('NIOSH pocket guide, methylene bisphenyl isocyanate', 'partly', { note: 'Limits read; that warmth raises the vapor is common knowledge of the trade.' }),
  },
  {
    id: 'carbon-dioxide-with-water',
    state: 'wet',
    trigger: ISOCYANATE,
    with: CEMENT,
    needsPowder: false,
    text: { en: 'The mix gives off gas. Never close a bucket of mixed material.', es: 'La mezcla suelta gas. Nunca cierre un balde con material mezclado.' },
    actsAs: [],
    source: sourced('Chemistry of isocyanates: with water they give off carbon dioxide', 'from-memory'),
  },
  {
    id: 'heat-of-reaction-epoxy',
    state: 'wet',
    trigger: EPOXY,
    with: AMINE,
    needsPowder: false,
    text: { en: 'Mixed resin left in the bucket heats up and can smoke. Pour it out at once.', es: 'La resina mezclada que queda en el balde se calienta y puede echar humo. Viértala enseguida.' },
    actsAs: [],
    source: commonPractice('Two-part resins give off heat; the bucket holds it.'),
  },
  {
    id: 'dust-of-cured-coat',
    state: 'cured-being-ground',
    trigger: SILICA,
    with: null,
    needsPowder: false,
    text: { en: 'Grinding or sanding the cured coat sets its silica free.', es: 'Al lijar o pulir la capa curada se libera la sílice que contiene.' },
    actsAs: ['H350', 'H372'],
    source: usFederal('1926.1153', 'derived', { paragraph: '(a)', note: 'The cured coat holds the filler of its powder part.' }),
  },
];
