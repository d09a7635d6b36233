import { type Words } from '../outcome';
import { sourced, usFederal, type Source } from '../source';

export type RecordKind =
  | 'exposure'
  | 'background-data'
  | 'analysis'
  | 'sheet'
  | 'register-of-use'
  | 'medical'
  | 'fit-test'
  | 'noise-measurement'
  | 'audiogram'
  | 'training'
  | 'silica-plan'
  | 'monitoring-of-persons'
  | 'monitoring-other'
  | 'health-record'
  | 'extraction-test';

/** How long a record is kept. */
export type Keeping =
  | { readonly kind: 'years'; readonly years: number }
  /** From the end of employment. */
  | { readonly kind: 'employment-plus'; readonly years: number }
  | { readonly kind: 'until-replaced' }
  | { readonly kind: 'no-period' };

export interface RetentionRow {
  readonly id: string;
  readonly jurisdictionId: string;
  readonly record: RecordKind;
  readonly keeping: Keeping;
  readonly name: Words;
  readonly note: Words | null;
  readonly source: Source;
}

const ACCESS = (paragraph: string, note?: string): Source => usFederal('1910.1020', 'read', { paragraph, note: note ?? 'Construction through 1926.33.' });
/** No construction rule sets a shorter period, so the access rule's own holds; where the text was not seen, the longer period is the safe one. */
const NOISE_IN_CONSTRUCTION = (paragraph: string): Source => usFederal('1910.1020', 'from-memory', { paragraph, note: 'Through 1926.33. That noise is a "harmful physical agent" is recalled; the letters of 11 May 1983 and 17 August 2000 on 2 years speak of 1910.95.' });
const row = (jurisdictionId: string, record: RecordKind, keeping: Keeping, en: string, es: string, source: Source, note: Words | null = null): RetentionRow => ({
  id: `retention/${jurisdictionId}/${record}`,
  jurisdictionId,
  record,
  keeping,
  name: { en, es },
  note,
  source,
});
const years = (count: number): Keeping => ({ kind: 'years', years: count });

export const RETENTION_ROWS: readonly RetentionRow[] = [
  row('us-federal', 'exposure', years(30), 'exposure record: air monitoring, objective data relied on', 'registro de exposición: muestras de aire, datos objetivos usados', ACCESS('(d)(1)(ii)')),
  row('us-federal', 'background-data', years(1), 'laboratory work papers', 'hojas de trabajo del laboratorio', ACCESS('(d)(1)(ii)(A)'), {
    en: 'Only where results, method and a summary are kept for 30 years.',
    es: 'Solo si los resultados, el método y un resumen se guardan 30 años.',
  }),
  row('us-federal', 'analysis', years(30), 'analysis that uses exposure or medical records', 'análisis que usa registros de exposición o médicos', usFederal('1910.1020', 'from-memory', { paragraph: '(d)(1)(iii)', note: 'Construction through 1926.33.' })),
  row('us-federal', 'sheet', years(30), 'safety data sheet', 'hoja de datos de seguridad', ACCESS('(d)(1)(ii)(B)', 'OSHA letter, 8 Nov 1985.'), {
    en: 'No fixed period where a register of what it was, where and when it was used is kept for 30 years.',
    es: 'Sin plazo fijo si por 30 años se guarda un registro de qué era, dónde y cuándo se usó.',
  }),
  row('us-federal', 'register-of-use', years(30), 'register of use: identity, where and when', 'registro de uso: identidad, dónde y cuándo', ACCESS('(d)(1)(ii)(B)')),
  row('us-federal', 'medical', { kind: 'employment-plus', years: 30 }, 'medical record, clearance', 'registro médico, autorización', ACCESS('(d)(1)(i)', 'Open textbook restating the paragraph.')),
  row('us-federal', 'fit-test', { kind: 'until-replaced' }, 'fit test', 'prueba de ajuste', usFederal('1910.134', 'read', { paragraph: '(m)(2)(ii)' })),
  row('us-federal', 'noise-measurement', years(30), 'noise measurement', 'medición de ruido', NOISE_IN_CONSTRUCTION('(c)(5), (c)(13), (d)(1)(ii)'), {
    en: 'The 2 years of 1910.95(m)(3) are general industry: that rule does not reach construction.',
    es: 'Los 2 años de 1910.95(m)(3) son de la industria general: esa norma no alcanza a la construcción.',
  }),
  row('us-federal', 'audiogram', { kind: 'employment-plus', years: 30 }, 'audiogram', 'audiograma', NOISE_IN_CONSTRUCTION('(c)(6), (d)(1)(i)'), {
    en: 'General industry keeps it for the time of employment, 1910.95(m)(3); in construction it is a medical record.',
    es: 'La industria general lo guarda durante el empleo, 1910.95(m)(3); en construcción es un registro médico.',
  }),
  row('us-federal', 'training', { kind: 'no-period' }, 'hazard communication training, toolbox talk', 'capacitación en comunicación de peligros, charla', usFederal('1910.1200', 'from-memory', { note: 'No federal period.' })),
  row('us-federal', 'silica-plan', { kind: 'until-replaced' }, 'written exposure control plan', 'plan escrito de control de exposición', usFederal('1926.1153', 'read', { paragraph: '(g)(2)', note: 'Keeping old versions as evidence is practice.' })),

  row('great-britain', 'monitoring-of-persons', years(40), 'exposure monitoring of identifiable persons', 'mediciones de exposición de personas identificables', sourced('COSHH reg. 10(5)', 'parallel-text', { note: 'Read in the Northern Ireland regulations of 2003; the GB clause recalled.' })),
  row('great-britain', 'monitoring-other', years(5), 'other exposure monitoring', 'otras mediciones de exposición', sourced('COSHH reg. 10(5)', 'parallel-text', { note: 'Read in the Northern Ireland regulations of 2003; the GB clause recalled.' })),
  row('great-britain', 'health-record', years(40), 'health record', 'registro de salud', sourced('COSHH reg. 11', 'from-memory')),
  row('great-britain', 'extraction-test', years(5), 'examination of local extraction', 'examen de la extracción localizada', sourced('COSHH reg. 9', 'partly', { note: 'Two supplier texts.' })),
];
