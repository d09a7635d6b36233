import { type Words } from '../outcome';
import { usFederal, type Source } from '../source';
import { words } from '../words';

/** A condition that Table 1 sets for every row it touches, (c)(2): it is part of "fully and properly" as much as the row itself. */
export interface Table1ConditionRow {
  readonly id: string;
  readonly holdsFor: 'indoors-or-enclosed' | 'wet-methods' | 'cab-or-booth';
  readonly text: Words;
  readonly source: Source;
}

const WASHINGTON = (paragraph: string, parallel: string): Source => usFederal('1926.1153', 'parallel-text', { paragraph, note: `Read in WAC 296-840-110(2)(${parallel}), same words.` });
const cab = (letter: string, numeral: string, en: string, es: string): Table1ConditionRow => ({
  id: `table-1-condition/cab-${letter}`,
  holdsFor: 'cab-or-booth',
  text: words(en, es),
  source: WASHINGTON(`(c)(2)(iii)(${letter.toUpperCase()})`, `c)(${numeral}`),
});

/** Cabs and booths stand in rows (ix), (xvi), (xvii) and (xviii); floor crews meet the first two conditions. */
export const TABLE_1_CONDITIONS: readonly Table1ConditionRow[] = [
  { id: 'table-1-condition/exhaust', holdsFor: 'indoors-or-enclosed', text: words('exhaust as needed to keep visible dust from building up', 'extracción según haga falta para que no se acumule polvo visible'), source: WASHINGTON('(c)(2)(i)', 'a') },
  { id: 'table-1-condition/water-flow', holdsFor: 'wet-methods', text: words('enough water to keep visible dust down; no figure is set', 'agua suficiente para que no salga polvo visible; no se fija una cifra'), source: WASHINGTON('(c)(2)(ii)', 'b') },
  cab('a', 'i', 'as free of settled dust as can be', 'tan libre de polvo asentado como se pueda'),
  cab('b', 'ii', 'door seals and closers that work', 'sellos y cierres de puerta que funcionan'),
  cab('c', 'iii', 'gaskets and seals in good condition', 'juntas y sellos en buen estado'),
  cab('d', 'iv', 'positive pressure from a steady flow of fresh air', 'presión positiva con entrada continua de aire fresco'),
  cab('e', 'v', 'intake filter 95 % efficient from 0.3 to 10.0 µm, for example MERV-16', 'filtro de entrada con 95 % de eficiencia de 0.3 a 10.0 µm, por ejemplo MERV-16'),
  cab('f', 'vi', 'heating and cooling', 'calefacción y refrigeración'),
];
