import { averageWithinLimit, collectorAirflow, dilutionEnough, mixtureWithinLimits } from '../air/air-rules';
import { LIMIT_ROWS } from '../air/limits.data';
import { monitoringDue, reassessOnChange } from '../air/monitoring-rules';
import { noticeOfAssessment } from '../air/notice-rule';
import { PUBLISHED_EXPOSURES } from '../air/published-exposure.data';
import { airRecordContents, laboratoryContents, objectiveDataContents, observationOffered } from '../air/record-contents';
import { SUBSTANCES } from '../air/substances.data';
import { type ContentsRule } from '../contents';
import { HAZARD_ROWS } from '../hazcom/ghs-hazards.data';
import { STATEMENT_EN_SOURCE, STATEMENT_TEXTS } from '../hazcom/ghs-statements.data';
import { MIXING_EFFECTS } from '../hazcom/mixing-effects.data';
import { PRECAUTIONARY_ROWS } from '../hazcom/precautionary-ppe.data';
import { containerLabel, hazcomProgram, multiEmployer, sheetsAccessible } from '../hazcom/program-rules';
import { PHASE_IN_ROWS } from '../hazcom/sds-phase-in.data';
import { SDS_CONTENT, SDS_SECTIONS } from '../hazcom/sds-sections.data';
import { sheetAudit, sheetMatchesProduct, trainingAtNewHazard } from '../hazcom/sheet-rules';
import { SUPPLEMENTARY_STATEMENTS, UNCODED_HAZARDS } from '../hazcom/supplementary-statements.data';
import { PACKS } from '../jurisdictions/packs.data';
import { PLACES_WITHOUT_PACK } from '../jurisdictions/places.data';
import { hearingProtection, noiseInShift } from '../noise/noise-rules';
import { PUBLISHED_LEVELS, TABLE_D2, TABLE_D2_SOURCE, TABLE_G16A, TABLE_G16A_SOURCE } from '../noise/noise-tables.data';
import { type Words } from '../outcome';
import { LIVE_LINES } from '../checklists/live-lines.data';
import { clinicianPacket, silicaPlanAvailable, silicaPlanElements, silicaPlanReview, silicaTraining } from '../plans/silica-plan';
import { PROTECTION } from '../ppe/protection.data';
import { machinePreUse, wasteHandling } from '../plans/site-papers';
import { accessInTime, mayDiscardRecord, rightsNotice, safetyMeetings } from '../records/record-rules';
import { RETENTION_ROWS } from '../records/retention.data';
import { CONSUMABLES } from '../quantities/consumables.data';
import { APF_ROWS } from '../respirators/apf.data';
import { fitTestRecord, medicalSurveillance, respiratorByRatio, respiratorProgram, respiratorProgramEvaluation, voluntaryUse, wearerReady } from '../respirators/respirator-rules';
import { type ListedRule } from '../rule';
import { LISTED_SHIFT_RULES } from '../shift-rules';
import { TABLE_1_CONDITIONS } from '../silica/table1-conditions.data';
import { TABLE_1 } from '../silica/table1.data';
import { type Source } from '../source';
import { COATING_RANGES, METHOD_RANGES, PROFILE_CHIPS } from '../surface/profiles.data';
import { words } from '../words';

/** Rules that list what a record, paper or training must hold. */
export const CONTENTS_RULES: readonly ContentsRule[] = [
  silicaPlanElements,
  silicaPlanAvailable,
  silicaTraining,
  clinicianPacket,
  airRecordContents,
  objectiveDataContents,
  laboratoryContents,
  observationOffered,
  hazcomProgram,
  multiEmployer,
  containerLabel,
  sheetsAccessible,
  voluntaryUse,
  fitTestRecord,
  respiratorProgram,
  wasteHandling,
  machinePreUse,
];

/** Rules about papers, records, readings and dates: beside the shift, not on its checklist. */
export const OFFICE_RULES: readonly ListedRule[] = [
  ...CONTENTS_RULES,
  silicaPlanReview,
  monitoringDue,
  reassessOnChange,
  noticeOfAssessment,
  averageWithinLimit,
  mixtureWithinLimits,
  collectorAirflow,
  dilutionEnough,
  sheetAudit,
  sheetMatchesProduct,
  trainingAtNewHazard,
  respiratorByRatio,
  wearerReady,
  medicalSurveillance,
  respiratorProgramEvaluation,
  noiseInShift,
  hearingProtection,
  mayDiscardRecord,
  accessInTime,
  rightsNotice,
  safetyMeetings,
];

/** Every rule, by its permanent id. */
export const RULES: readonly ListedRule[] = [...LISTED_SHIFT_RULES, ...OFFICE_RULES];

export function findRule(id: string): ListedRule | null {
  return RULES.find((rule) => rule.id === id) ?? null;
}

/** One row of a data table, as a list of sources shows it. */
export interface ListedRow {
  readonly id: string;
  readonly source: Source;
}

export interface DataTable {
  readonly id: string;
  readonly title: Words;
  readonly rows: readonly ListedRow[];
}

const table = (id: string, en: string, es: string, rows: readonly ListedRow[]): DataTable => ({ id, title: words(en, es), rows });
const under = (source: Source, rows: readonly { readonly id: string }[]): readonly ListedRow[] => rows.map(({ id }) => ({ id, source }));

/** Every table of facts with the source of each row. */
export const DATA_TABLES: readonly DataTable[] = [
  table('table-1', 'Silica Table 1', 'Tabla 1 de sílice', TABLE_1),
  table('table-1-conditions', 'Conditions of Table 1 for every row', 'Condiciones de la Tabla 1 para cada fila', TABLE_1_CONDITIONS),
  table('protection', 'Protection by hazard and task', 'Protección por peligro y tarea', PROTECTION),
  table('live-lines', 'Lines at the start of a task', 'Líneas al empezar una tarea', LIVE_LINES),
  table('limits', 'Limits of substances', 'Límites de sustancias', LIMIT_ROWS),
  table('substances', 'Substances', 'Sustancias', SUBSTANCES),
  table('published-exposures', 'Published exposures, for orientation', 'Exposiciones publicadas, como guía', PUBLISHED_EXPOSURES),
  table('protection-factors', 'Assigned protection factors', 'Factores de protección asignados', APF_ROWS),
  table('hazards', 'Hazard classes and label elements', 'Clases de peligro y elementos de etiqueta', HAZARD_ROWS),
  table('statements', 'Hazard statements', 'Indicaciones de peligro', STATEMENT_TEXTS.map(({ code }) => ({ id: `statement/${code}`, source: STATEMENT_EN_SOURCE }))),
  table('supplementary-statements', 'Supplementary statements', 'Indicaciones suplementarias', [...SUPPLEMENTARY_STATEMENTS.map(({ code, source }) => ({ id: `statement/${code}`, source })), ...UNCODED_HAZARDS]),
  table('precautionary', 'Precautionary statements on protection', 'Consejos de prudencia sobre protección', PRECAUTIONARY_ROWS),
  table('mixing-effects', 'What mixing adds', 'Lo que añade la mezcla', MIXING_EFFECTS),
  table('sds-sections', 'Sections of a sheet', 'Secciones de la hoja', SDS_SECTIONS),
  table('sds-content', 'Least content of a sheet', 'Contenido mínimo de la hoja', SDS_CONTENT),
  table('consumables', 'What work uses up', 'Lo que gasta el trabajo', CONSUMABLES),
  table('phase-in', 'Dates of the 2024 amendment', 'Fechas de la enmienda de 2024', PHASE_IN_ROWS),
  table('noise-d2', 'Noise, Table D-2', 'Ruido, Tabla D-2', under(TABLE_D2_SOURCE, TABLE_D2)),
  table('noise-g16a', 'Noise, Table G-16a', 'Ruido, Tabla G-16a', under(TABLE_G16A_SOURCE, TABLE_G16A)),
  table('noise-levels', 'Published noise levels', 'Niveles de ruido publicados', PUBLISHED_LEVELS),
  table('profile-chips', 'Surface profile chips', 'Placas de perfil', PROFILE_CHIPS),
  table('profile-methods', 'Profiles by method', 'Perfiles por método', METHOD_RANGES),
  table('profile-coatings', 'Profiles by coating', 'Perfiles por recubrimiento', COATING_RANGES),
  table('retention', 'How long records are kept', 'Cuánto se guardan los registros', RETENTION_ROWS),
  table('packs', 'Packs', 'Conjuntos de reglas', PACKS.map((pack) => ({ id: `pack/${pack.id}`, source: pack.silica.limitSource }))),
  table('places', 'Places without a pack', 'Lugares sin reglas', PLACES_WITHOUT_PACK.map((place) => ({ id: `place/${place.id}`, source: place.points[0]!.source }))),
];
