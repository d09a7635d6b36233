import { type Words } from '../outcome';
import { sourced, usFederal, type Source } from '../source';
import { words } from '../words';

/** Parts of the law that a pack can hold. */
export const packAreas = ['silica-limits', 'silica-table-1', 'silica-assessment', 'respirator-factors', 'respirator-program', 'hazard-communication', 'limits-of-substances', 'noise', 'protection', 'records', 'medical', 'meetings'] as const;
export type PackArea = (typeof packAreas)[number];

/** How much of an area a pack holds. 'partial' says in its note what; 'missing' decides nothing there. */
export interface AreaCoverage {
  readonly area: PackArea;
  readonly state: 'complete' | 'partial' | 'missing';
  readonly note: Words | null;
  readonly source: Source | null;
}

/** A duty this place has besides or instead of the federal ones. */
export interface LocalDuty {
  readonly id: string;
  readonly text: Words;
  readonly source: Source;
}

export interface SilicaLawOfPack {
  /** µg/m³ respirable crystalline silica, 8-hour average. */
  readonly limitMicrogramsPerM3: number;
  /** null where the law knows no action level. */
  readonly actionLevelMicrogramsPerM3: number | null;
  readonly limitSource: Source;
  /** Rows of Table 1 whose text for this place was compared; 'all', or none where the law has no such table. */
  readonly table1Rows: 'all' | readonly string[];
  readonly noticeScope: 'construction' | 'general-industry' | null;
}

export interface JurisdictionPack {
  readonly id: string;
  /** Year and month of the pack's state of knowledge. */
  readonly version: string;
  readonly name: Words;
  readonly silica: SilicaLawOfPack;
  /** Whose factors in respirators/apf.data.ts serve here; null where none were compared. */
  readonly apfJurisdictionId: string | null;
  readonly coverage: readonly AreaCoverage[];
  readonly localDuties: readonly LocalDuty[];
  /** Days between regular safety meetings; null where none is set or known. */
  readonly meetingEveryWorkingDays: number | null;
}

const complete = (area: PackArea, source: Source | null = null): AreaCoverage => ({ area, state: 'complete', note: null, source });
const partial = (area: PackArea, en: string, es: string, source: Source | null = null): AreaCoverage => ({ area, state: 'partial', note: words(en, es), source });
const missing = (area: PackArea, en: string, es: string): AreaCoverage => ({ area, state: 'missing', note: words(en, es), source: null });

const US_FEDERAL: JurisdictionPack = {
  id: 'us-federal',
  version: '2026.12',
  name: words('US federal rules', 'Reglas federales de EE. UU.'),
  silica: { limitMicrogramsPerM3: 50, actionLevelMicrogramsPerM3: 25, limitSource: usFederal('1926.1153', 'read', { paragraph: '(b), (d)(1)', inForceFrom: '2017-06-23' }), table1Rows: 'all', noticeScope: 'construction' },
  apfJurisdictionId: 'us-federal',
  coverage: [
    complete('silica-limits', usFederal('1926.1153', 'read', { paragraph: '(b), (d)(1)' })),
    complete('silica-table-1', usFederal('1926.1153', 'partly', { paragraph: '(c)', note: 'Some respirator values recalled; each row carries its own mark.' })),
    complete('silica-assessment', usFederal('1926.1153', 'parallel-text', { paragraph: '(d)', note: 'Read in OAR 437-002-1056; each paragraph carries its own mark.' })),
    complete('respirator-factors', usFederal('1910.134', 'read', { paragraph: '(d)(3)(i)(A)' })),
    complete('respirator-program', usFederal('1910.134', 'read')),
    complete('hazard-communication', usFederal('1910.1200', 'partly')),
    complete('limits-of-substances', usFederal('1926.55', 'partly')),
    complete('noise', usFederal('1926.52', 'read')),
    complete('protection', usFederal('1926.95', 'partly')),
    complete('records', usFederal('1910.1020', 'partly', { note: 'Each row carries its own mark.' })),
    complete('medical', usFederal('1926.1153', 'parallel-text', { paragraph: '(h)' })),
    complete('meetings', usFederal('1926.21', 'from-memory', { note: 'No federal interval of safety meetings.' })),
  ],
  localDuties: [],
  meetingEveryWorkingDays: null,
};

const CA_SILICA = sourced('8 CCR 1532.3', 'read', { note: 'Limits; Table 1 rows (i) to (v) hold the same values.' });
const US_CALIFORNIA: JurisdictionPack = {
  id: 'us-california',
  version: '2026.12',
  name: words('California', 'California'),
  silica: { limitMicrogramsPerM3: 50, actionLevelMicrogramsPerM3: 25, limitSource: CA_SILICA, table1Rows: ['i', 'ii', 'iii', 'iv', 'v'], noticeScope: 'construction' },
  apfJurisdictionId: null,
  coverage: [
    complete('silica-limits', CA_SILICA),
    partial('silica-table-1', 'Rows i to v compared; floor and hand grinders (xii, xiii) were not.', 'Comparadas las filas i a v; las de pulidoras (xii, xiii), no.', CA_SILICA),
    missing('silica-assessment', '8 CCR 1532.3(d) was not read.', 'No se leyó 8 CCR 1532.3(d).'),
    missing('respirator-factors', 'Factors of 8 CCR 5144 were not compared.', 'No se compararon los factores de 8 CCR 5144.'),
    missing('respirator-program', '8 CCR 5144 was not read.', 'No se leyó 8 CCR 5144.'),
    missing('hazard-communication', '8 CCR 5194 was not read.', 'No se leyó 8 CCR 5194.'),
    missing('limits-of-substances', 'Limits of 8 CCR 5155 are often lower than federal ones; not on file.', 'Los límites de 8 CCR 5155 suelen ser más bajos que los federales; no están registrados.'),
    missing('noise', 'Not read.', 'No se leyó.'),
    missing('protection', 'Not read.', 'No se leyó.'),
    missing('records', 'Not read.', 'No se leyó.'),
    missing('medical', 'Not read.', 'No se leyó.'),
    partial('meetings', 'A meeting every ten working days; the rest of the section was not read.', 'Una reunión cada diez días hábiles; no se leyó el resto de la sección.', sourced('8 CCR 1509', 'read', { note: 'Quoted on the state department’s page and in the contractors board’s newsletter.' })),
  ],
  localDuties: [
    { id: 'us-california/dust-reduction', text: words('Power tools on concrete or masonry need dust reduction, beside the silica rule.', 'Las herramientas motorizadas sobre concreto o mampostería necesitan reducción de polvo, además de la norma de sílice.'), source: sourced('8 CCR 1530.1', 'partly', { note: 'That the section exists was read.' }) },
    { id: 'us-california/artificial-stone', text: words('The artificial-stone rules of 2024 and 2025 leave out construction work under 1532.3.', 'Las reglas de piedra artificial de 2024 y 2025 excluyen la construcción bajo 1532.3.'), source: sourced('8 CCR 5204', 'read') },
  ],
  meetingEveryWorkingDays: 10,
};

const GB_LIMIT = sourced('EH40 workplace exposure limit', 'partly', { note: 'Several UK texts; there is no action level.' });
const GREAT_BRITAIN: JurisdictionPack = {
  id: 'great-britain',
  version: '2026.12',
  name: words('Great Britain', 'Gran Bretaña'),
  silica: { limitMicrogramsPerM3: 100, actionLevelMicrogramsPerM3: null, limitSource: GB_LIMIT, table1Rows: [], noticeScope: null },
  apfJurisdictionId: 'great-britain',
  coverage: [
    complete('silica-limits', GB_LIMIT),
    missing('silica-table-1', 'The law here has no such table: every task needs an assessment.', 'La ley de aquí no tiene esa tabla: cada tarea necesita una evaluación.'),
    partial('silica-assessment', 'Adequate control under COSHH regulation 7; whether silica work counts as carcinogenic is uncertain.', 'Control adecuado según COSHH, regla 7; no es seguro si el trabajo con sílice cuenta como cancerígeno.', sourced('COSHH reg. 7', 'from-memory')),
    partial('respirator-factors', 'Filtering facepieces, masks and TH classes read; TM classes, air line and SCBA recalled.', 'Leídos los de mascarillas, máscaras y clases TH; los de clases TM, línea de aire y equipo autónomo, de memoria.', sourced('HSG53 class factors', 'partly')),
    partial('respirator-program', 'Face-fit test for tight-fitting masks, again on change.', 'Prueba de ajuste para máscaras ajustadas, de nuevo si hay cambios.', sourced('Supplier text on COSHH', 'read')),
    missing('hazard-communication', 'GB CLP was not read.', 'No se leyó GB CLP.'),
    missing('limits-of-substances', 'Only silica is on file.', 'Solo está registrada la sílice.'),
    missing('noise', 'Not read; hearing protectors are rated by SNR here.', 'No se leyó; aquí los protectores auditivos usan SNR.'),
    missing('protection', 'Not read.', 'No se leyó.'),
    partial('records', 'Monitoring 40 or 5 years, extraction tests 5 years.', 'Mediciones 40 o 5 años, exámenes de extracción 5 años.', sourced('COSHH reg. 9 and 10(5)', 'parallel-text')),
    missing('medical', 'Not read.', 'No se leyó.'),
    missing('meetings', 'Not read.', 'No se leyó.'),
  ],
  localDuties: [
    { id: 'great-britain/extraction-examination', text: words('Local extraction is examined thoroughly at least every 14 months.', 'La extracción localizada se examina a fondo al menos cada 14 meses.'), source: sourced('COSHH reg. 9', 'partly', { note: 'Two supplier texts.' }) },
    { id: 'great-britain/extraction-class', text: words('Extraction of class M or H on tools.', 'Extracción de clase M o H en las herramientas.'), source: sourced('Trade text on construction dust', 'partly', { note: '"M class minimum".' }) },
  ],
  meetingEveryWorkingDays: null,
};

export const PACKS: readonly JurisdictionPack[] = [US_FEDERAL, US_CALIFORNIA, GREAT_BRITAIN];
