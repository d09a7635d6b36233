import { type Words } from '../outcome';
import { sourced, usFederal, type Source } from '../source';

/** A statement without class, signal word or pictogram of its own: European supplements on resin sheets. */
export interface SupplementaryStatement {
  readonly code: string;
  readonly text: Words;
  readonly source: Source;
}

const CLP = 'Regulation (EC) 1272/2008 Annexes II and III';
const READ_IN_LISTS = 'English read in two public lists; Spanish recalled.';

export const SUPPLEMENTARY_STATEMENTS: readonly SupplementaryStatement[] = [
  { code: 'EUH066', text: { en: 'Repeated exposure may cause skin dryness or cracking', es: 'La exposición repetida puede provocar sequedad o formación de grietas en la piel' }, source: sourced(CLP, 'partly', { note: READ_IN_LISTS }) },
  { code: 'EUH071', text: { en: 'Corrosive to the respiratory tract', es: 'Corrosivo para las vías respiratorias' }, source: sourced(CLP, 'from-memory') },
  { code: 'EUH203', text: { en: 'Contains chromium (VI). May produce an allergic reaction', es: 'Contiene cromo (VI). Puede provocar una reacción alérgica' }, source: sourced(CLP, 'partly', { note: READ_IN_LISTS }) },
  { code: 'EUH204', text: { en: 'Contains isocyanates. May produce an allergic reaction', es: 'Contiene isocianatos. Puede provocar una reacción alérgica' }, source: sourced(CLP, 'partly', { note: 'English read in EU guidance; Spanish recalled.' }) },
  { code: 'EUH205', text: { en: 'Contains epoxy constituents. May produce an allergic reaction', es: 'Contiene componentes epoxídicos. Puede provocar una reacción alérgica' }, source: sourced(CLP, 'partly', { note: READ_IN_LISTS }) },
  { code: 'EUH208', text: { en: 'Contains a sensitizing substance. May produce an allergic reaction', es: 'Contiene una sustancia sensibilizante. Puede provocar una reacción alérgica' }, source: sourced(CLP, 'partly', { note: 'English read on a sheet; the sheet names the substance. Spanish recalled.' }) },
  { code: 'EUH210', text: { en: 'Safety data sheet available on request', es: 'Puede solicitarse la ficha de datos de seguridad' }, source: sourced(CLP, 'partly', { note: READ_IN_LISTS }) },
];

/** Hazards of the US rule without a code. */
export interface UncodedHazard {
  readonly id: string;
  readonly text: Words;
  readonly signalWord: 'warning';
  readonly source: Source;
}

export const UNCODED_HAZARDS: readonly UncodedHazard[] = [
  { id: 'combustible-dust', text: { en: 'May form combustible dust concentrations in air', es: 'Puede formar concentraciones de polvo combustible en el aire' }, signalWord: 'warning', source: usFederal('1910.1200', 'from-memory', { paragraph: 'App. C' }) },
  { id: 'simple-asphyxiant', text: { en: 'May displace oxygen and cause rapid suffocation', es: 'Puede desplazar el oxígeno y causar asfixia rápida' }, signalWord: 'warning', source: usFederal('1910.1200', 'from-memory', { paragraph: 'App. C' }) },
];
