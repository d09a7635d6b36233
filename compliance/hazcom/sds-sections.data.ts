import { type Words } from '../outcome';
import { usFederal, type Source } from '../source';
import { type HazcomText } from './sds-phase-in.data';

/** One of the 16 sections; order and heading are mandatory. */
export interface SdsSectionRow {
  readonly id: string;
  readonly number: number;
  readonly heading: Words;
  /** Words that mark the heading on a sheet, in any wording met. */
  readonly marks: RegExp;
  /** Sections 12 to 15 must be there, but OSHA does not enforce what they say. */
  readonly isContentEnforced: boolean;
  readonly source: Source;
}

const TABLE = usFederal('1910.1200', 'read', { paragraph: 'App. D Table D.1', note: 'Headings and the position of sections 12 to 15 read in OSHA summary and a reproduction.' });
const section = (number: number, en: string, es: string, marks: RegExp): SdsSectionRow => ({
  id: `sds-section/${number}`,
  number,
  heading: { en, es },
  marks,
  isContentEnforced: number < 12 || number === 16,
  source: TABLE,
});

export const SDS_SECTIONS: readonly SdsSectionRow[] = [
  section(1, 'Identification', 'Identificación', /identifica(tion|ci[oó]n)/i),
  section(2, 'Hazard(s) identification', 'Identificación de los peligros', /hazard|peligro/i),
  section(3, 'Composition/information on ingredients', 'Composición/información sobre los componentes', /composi(tion|ci[oó]n)|ingredient|componentes/i),
  section(4, 'First-aid measures', 'Primeros auxilios', /first.?aid|primeros auxilios/i),
  section(5, 'Fire-fighting measures', 'Medidas de lucha contra incendios', /fire|incendio/i),
  section(6, 'Accidental release measures', 'Medidas en caso de vertido accidental', /release|spill|vertido|derrame|liberaci[oó]n/i),
  section(7, 'Handling and storage', 'Manipulación y almacenamiento', /handling|storage|manipulaci[oó]n|almacenamiento/i),
  section(8, 'Exposure controls/personal protection', 'Controles de exposición/protección personal', /exposure|protection|exposici[oó]n|protecci[oó]n/i),
  section(9, 'Physical and chemical properties', 'Propiedades físicas y químicas', /propert|propiedades/i),
  section(10, 'Stability and reactivity', 'Estabilidad y reactividad', /stability|reactivity|estabilidad|reactividad/i),
  section(11, 'Toxicological information', 'Información toxicológica', /toxicolog/i),
  section(12, 'Ecological information', 'Información ecotoxicológica', /ecolog|ecotox/i),
  section(13, 'Disposal considerations', 'Información sobre la eliminación', /disposal|eliminaci[oó]n|desecho/i),
  section(14, 'Transport information', 'Información sobre el transporte', /transport/i),
  section(15, 'Regulatory information', 'Información reglamentaria', /regulatory|reglamentaria|normativa/i),
  section(16, 'Other information', 'Otras informaciones', /other|otra|date of preparation|last revision/i),
];

/** One thing a section must hold at the least. `marks` finds it in the section's text; absence of a mark is a question, never a fault. */
export interface SdsContentRow {
  readonly id: string;
  readonly section: number;
  readonly name: Words;
  /** '2024' stands only in the amended text. */
  readonly since: HazcomText;
  readonly marks: RegExp;
  readonly source: Source;
}

const READ = usFederal('1910.1200', 'read', { paragraph: 'App. D Table D.1' });
const PARTLY = usFederal('1910.1200', 'partly', { paragraph: 'App. D Table D.1', note: 'Sections 9 to 11 of the 2012 list read in a training text; the rest recalled.' });
const RECALLED = usFederal('1910.1200', 'from-memory', { paragraph: 'App. D Table D.1' });

const content = (id: string, since: HazcomText, en: string, es: string, marks: RegExp, source: Source): SdsContentRow => ({
  id: `sds-content/${id}`,
  section: Number(id.split('.')[0]),
  name: { en, es },
  since,
  marks,
  source,
});

export const SDS_CONTENT: readonly SdsContentRow[] = [
  content('1.identifier', '2012', 'product identifier', 'identificador del producto', /product (name|identifier)|trade name|nombre (del producto|comercial)|identificador/i, READ),
  content('1.use', '2012', 'recommended use and restrictions', 'uso recomendado y restricciones', /recommended use|(identified|intended|product) use|\buses?\b|uso/i, READ),
  content('1.address', '2012', 'US address of the responsible party', 'dirección en EE. UU. del responsable', /\b[A-Z]{2}\.?,? \d{5}(-\d{4})?\b/, READ),
  content('1.phone', '2012', 'US phone of the responsible party', 'teléfono en EE. UU. del responsable', /\(?\d{3}\)?[\s.-]\d{3}[\s.-]\d{4}/, READ),
  content('1.emergency-phone', '2012', 'emergency phone number', 'teléfono de emergencia', /emergency|24.?h|emergencia/i, READ),
  content('2.classification', '2012', 'classification', 'clasificación', /classif|category|clasific|categor/i, READ),
  content('2.precautionary', '2012', 'precautionary statements', 'consejos de prudencia', /precaution|\bP\d{3}\b|prudencia|prevention/i, READ),
  content('2.not-otherwise-classified', '2012', 'hazards not otherwise classified', 'peligros no clasificados de otra manera', /not otherwise classified|HNOC|other hazards|otros peligros|no clasificados/i, READ),
  content('2.changed-use', '2024', 'hazards from changes in intended use', 'peligros por cambios en el uso previsto', /intended use|chemical reaction|uso previsto/i, RECALLED),
  content('3.ingredients', '2012', 'names, CAS numbers and concentrations of classified ingredients', 'nombres, números CAS y concentraciones de los componentes clasificados', /\b\d{2,7}-\d{2}-\d\b|trade secret|secreto comercial|proprietary|no hazardous ingredients/i, PARTLY),
  content('4.routes', '2012', 'first aid by route', 'primeros auxilios según la vía', /(inhal|eye|skin|ingest|swallow|ojos|piel)/i, RECALLED),
  content('4.symptoms', '2012', 'most important symptoms, acute and delayed', 'síntomas más importantes, agudos y retardados', /symptom|effects|s[ií]ntoma|efectos/i, RECALLED),
  content('5.media', '2012', 'suitable and unsuitable extinguishing media', 'medios de extinción adecuados e inadecuados', /extinguish|media|extinci[oó]n|foam|espuma/i, RECALLED),
  content('6.precautions', '2012', 'personal precautions and protective equipment', 'precauciones personales y equipo de protección', /precaution|protective|personal|precauci/i, RECALLED),
  content('6.clean-up', '2012', 'containment and clean-up', 'contención y limpieza', /contain|clean|absorb|conten|limpi/i, RECALLED),
  content('7.handling', '2012', 'precautions for safe handling', 'precauciones para la manipulación segura', /handl|manipul/i, RECALLED),
  content('7.storage', '2012', 'storage conditions and incompatibilities', 'condiciones de almacenamiento e incompatibilidades', /stor|almacen/i, RECALLED),
  content('8.limits', '2012', 'OSHA PEL, ACGIH TLV and other limits', 'PEL de OSHA, TLV de ACGIH y otros límites', /\bPEL\b|\bTLV\b|\bTWA\b|limit|l[ií]mite/i, RECALLED),
  content('8.controls', '2012', 'engineering controls', 'controles de ingeniería', /engineering|ventilat|ingenier|ventilac/i, RECALLED),
  content('8.protection', '2012', 'individual protection measures', 'medidas de protección individual', /glove|goggle|respirat|guante|gafas|protective/i, RECALLED),
  content('9.flash-point', '2012', 'flash point', 'punto de inflamación', /flash|inflamaci/i, PARTLY),
  content('9.ph', '2012', 'pH', 'pH', /\bpH\b/, PARTLY),
  content('9.particles', '2024', 'particle characteristics (solids)', 'características de las partículas (sólidos)', /particle|part[ií]cula/i, RECALLED),
  content('10.conditions', '2012', 'conditions to avoid, incompatibles, decomposition products', 'condiciones que deben evitarse, incompatibles, productos de descomposición', /avoid|incompatib|decompos|evitar|descomposici/i, PARTLY),
  content('11.routes', '2012', 'routes, symptoms and effects, numerical toxicity', 'vías, síntomas y efectos, toxicidad numérica', /LD50|LC50|LD ?50|route|inhal|DL50|v[ií]a/i, PARTLY),
  content('11.carcinogen', '2012', 'carcinogen listing (NTP, IARC, OSHA)', 'inclusión como cancerígeno (NTP, IARC, OSHA)', /IARC|\bNTP\b|carcinogen|cancer[ií]geno/i, PARTLY),
  content('11.interactive', '2024', 'interactive effects', 'efectos interactivos', /interact|interac/i, RECALLED),
  content('16.date', '2012', 'date of preparation or last revision', 'fecha de preparación o de la última revisión', /revis|prepar|issue|date|fecha/i, READ),
];
