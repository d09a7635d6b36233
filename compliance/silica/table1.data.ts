import { type Words } from '../outcome';
import { usFederal, type Source, type Verified } from '../source';

/** Machines and tools of 29 CFR 1926.1153(c)(1) Table 1, one name for each heading. */
export const table1Tools = [
  'stationary-masonry-saw',
  'handheld-power-saw',
  'fiber-cement-saw',
  'walk-behind-saw',
  'drivable-saw',
  'rig-mounted-core-saw',
  'drill',
  'dowel-drilling-rig',
  'vehicle-mounted-drilling-rig',
  'chipping-tool',
  'mortar-removal-grinder',
  'handheld-grinder',
  'walk-behind-grinder-or-mill',
  'small-drivable-mill',
  'large-drivable-mill',
  'crusher',
  'demolition-vehicle',
  'grading-vehicle',
] as const;
export type Table1Tool = (typeof table1Tools)[number];

export type Table1Method = 'water' | 'vacuum' | 'cab' | 'water-and-vacuum';

/** What a row demands, beyond the machine and the respirator. Each has words in `table1-demands.data.ts`. */
export const table1Demands = [
  'makers-manual',
  'run-to-keep-dust-low',
  'built-in-water-feed',
  'water-at-impact-point',
  'water-sprays',
  'water-with-surfactant',
  'water-at-dust-points',
  'water-or-suppressant-as-needed',
  'water-or-suppressant-when-others-near',
  'water-on-bit',
  'low-flow-water-at-collector',
  'shroud',
  'close-capture-hood',
  'dust-collection-commercial',
  'dust-collection-makers-system',
  'airflow-makers-figure',
  'airflow-25-cfm-per-inch',
  'filter-99-percent',
  'filter-cleaning',
  'cyclone-or-filter-cleaning',
  'hepa-vacuum-for-holes',
  'hepa-vacuum-between-passes-indoors',
  'drum-exhaust',
  'booth-or-remote-control',
  'enclosed-cab',
  'asphalt-only',
  'cut-at-most-4-inches',
  'blade-at-most-8-inches',
  'less-than-half-lane',
  'half-lane-or-wider',
  'operator-alone',
  'no-abrading-or-demolition',
] as const;
export type Table1Demand = (typeof table1Demands)[number];

/** Required minimum assigned protection factor; null where the row asks for no respirator. */
export type Table1Apf = 10 | 25 | null;

export interface Table1Respirator {
  /** Four hours or less of Table 1 work in the shift; exactly four belongs here. */
  readonly upTo4Hours: Table1Apf;
  readonly over4Hours: Table1Apf;
}

export interface Table1Option {
  /** Permanent: row, then the option's letter where a row has several. */
  readonly id: string;
  /** As printed in the standard. */
  readonly row: string;
  readonly tool: Table1Tool;
  readonly heading: Words;
  readonly method: Table1Method;
  readonly demands: readonly Table1Demand[];
  readonly outdoors: Table1Respirator;
  /** Indoors or in an enclosed area; null where the row does not exist for that place: the task then leaves Table 1. */
  readonly indoors: Table1Respirator | null;
  readonly source: Source;
}

const NONE: Table1Respirator = { upTo4Hours: null, over4Hours: null };
const TEN_OVER_4: Table1Respirator = { upTo4Hours: null, over4Hours: 10 };
const ALWAYS_10: Table1Respirator = { upTo4Hours: 10, over4Hours: 10 };

const row = (number: string, verified: Verified, note: string): Source =>
  usFederal('1926.1153', verified, { paragraph: `(c)(1) Table 1 row (${number})`, note });

const CALIFORNIA_COPY = 'Read in California 8 CCR 1532.3 Table 1, same values.';
const MANUAL: Table1Demand = 'makers-manual';
const GRINDER_COLLECTOR: readonly Table1Demand[] = [MANUAL, 'shroud', 'airflow-25-cfm-per-inch', 'filter-99-percent', 'cyclone-or-filter-cleaning'];

const HANDHELD_GRINDER: Words = { en: 'Handheld grinder, other than mortar removal', es: 'Amoladora de mano, salvo quitar mortero' };
const FLOOR_GRINDER: Words = { en: 'Walk-behind milling machine and floor grinder', es: 'Fresadora y pulidora de piso de empuje' };
const CHIPPING: Words = { en: 'Jackhammer and handheld powered chipping tool', es: 'Martillo neumático y cincel de mano con motor' };
const DRILLING_RIG: Words = { en: 'Vehicle-mounted drilling rig for rock and concrete', es: 'Perforadora sobre vehículo para roca y concreto' };
const LARGE_MILL: Words = { en: 'Large drivable milling machine, half a lane or wider', es: 'Fresadora grande con asiento, medio carril o más' };
const GRADING: Words = { en: 'Heavy equipment for grading and digging', es: 'Maquinaria pesada para nivelar y excavar' };

const LARGE_MILL_NOTE = 'Controls read in a training text; "none", and that the maker\'s instructions are not named, recalled.';
const GRADING_NOTE = 'Both options and "none" read in a fact sheet of the agency and a training text.';

/** All 18 rows; where a row gives a choice of controls, one entry for each. */
export const TABLE_1: readonly Table1Option[] = [
  {
    id: 'i', row: 'i', tool: 'stationary-masonry-saw', heading: { en: 'Stationary masonry saw', es: 'Sierra fija de mampostería' }, method: 'water',
    demands: [MANUAL, 'built-in-water-feed'], outdoors: NONE, indoors: NONE, source: row('i', 'parallel-text', CALIFORNIA_COPY),
  },
  {
    id: 'ii', row: 'ii', tool: 'handheld-power-saw', heading: { en: 'Handheld power saw', es: 'Sierra de mano con motor' }, method: 'water',
    demands: [MANUAL, 'built-in-water-feed'], outdoors: TEN_OVER_4, indoors: ALWAYS_10, source: row('ii', 'parallel-text', CALIFORNIA_COPY),
  },
  {
    id: 'iii', row: 'iii', tool: 'fiber-cement-saw', heading: { en: 'Handheld saw for fiber-cement board', es: 'Sierra de mano para fibrocemento' }, method: 'vacuum',
    demands: [MANUAL, 'blade-at-most-8-inches', 'dust-collection-commercial', 'airflow-makers-figure', 'filter-99-percent'], outdoors: NONE, indoors: null,
    source: row('iii', 'parallel-text', CALIFORNIA_COPY),
  },
  {
    id: 'iv', row: 'iv', tool: 'walk-behind-saw', heading: { en: 'Walk-behind saw', es: 'Sierra de empuje' }, method: 'water',
    demands: [MANUAL, 'built-in-water-feed'], outdoors: NONE, indoors: ALWAYS_10, source: row('iv', 'parallel-text', CALIFORNIA_COPY),
  },
  {
    id: 'v', row: 'v', tool: 'drivable-saw', heading: { en: 'Drivable saw', es: 'Sierra con asiento' }, method: 'water',
    demands: [MANUAL, 'built-in-water-feed'], outdoors: NONE, indoors: null, source: row('v', 'parallel-text', CALIFORNIA_COPY),
  },
  {
    id: 'vi', row: 'vi', tool: 'rig-mounted-core-saw', heading: { en: 'Rig-mounted core saw or drill', es: 'Sacanúcleos o taladro sobre soporte' }, method: 'water',
    demands: [MANUAL, 'built-in-water-feed'], outdoors: NONE, indoors: NONE, source: row('vi', 'partly', 'Water feed and no respirator read in the agency\'s fact sheet on the row.'),
  },
  {
    id: 'vii', row: 'vii', tool: 'drill', heading: { en: 'Handheld or stand-mounted drill', es: 'Taladro de mano o de soporte' }, method: 'vacuum',
    demands: [MANUAL, 'shroud', 'airflow-makers-figure', 'filter-99-percent', 'filter-cleaning', 'hepa-vacuum-for-holes'], outdoors: NONE, indoors: NONE,
    source: row('vii', 'read', 'Row read whole in a tool maker\'s reproduction.'),
  },
  {
    id: 'viii', row: 'viii', tool: 'dowel-drilling-rig', heading: { en: 'Dowel drilling rig for concrete', es: 'Perforadora de pasadores para concreto' }, method: 'vacuum',
    demands: [MANUAL, 'shroud', 'filter-99-percent', 'filter-cleaning', 'hepa-vacuum-for-holes'], outdoors: ALWAYS_10, indoors: null,
    source: row('viii', 'partly', 'Outdoors only, controls and "always a respirator" read in a training text; the value 10 recalled; an independent public listing has the same.'),
  },
  {
    id: 'ix-a', row: 'ix', tool: 'vehicle-mounted-drilling-rig', heading: DRILLING_RIG, method: 'water-and-vacuum',
    demands: [MANUAL, 'close-capture-hood', 'low-flow-water-at-collector'], outdoors: NONE, indoors: NONE, source: row('ix', 'partly', 'Both options read in a training text.'),
  },
  {
    id: 'ix-b', row: 'ix', tool: 'vehicle-mounted-drilling-rig', heading: DRILLING_RIG, method: 'cab',
    demands: [MANUAL, 'enclosed-cab', 'water-on-bit'], outdoors: NONE, indoors: NONE, source: row('ix', 'partly', 'Both options read in a training text.'),
  },
  {
    id: 'x-a', row: 'x', tool: 'chipping-tool', heading: CHIPPING, method: 'water',
    demands: [MANUAL, 'water-at-impact-point'], outdoors: TEN_OVER_4, indoors: ALWAYS_10, source: row('x', 'partly', 'Controls read in a reproduction; respirator values recalled; an independent public listing has the same.'),
  },
  {
    id: 'x-b', row: 'x', tool: 'chipping-tool', heading: CHIPPING, method: 'vacuum',
    demands: [MANUAL, 'shroud', 'airflow-makers-figure', 'filter-99-percent', 'filter-cleaning'], outdoors: TEN_OVER_4, indoors: ALWAYS_10,
    source: row('x', 'partly', 'Controls read in a tool maker\'s reproduction; respirator values recalled; an independent public listing has the same.'),
  },
  {
    id: 'xi', row: 'xi', tool: 'mortar-removal-grinder', heading: { en: 'Handheld grinder for mortar removal', es: 'Amoladora de mano para quitar mortero' }, method: 'vacuum',
    demands: GRINDER_COLLECTOR, outdoors: { upTo4Hours: 10, over4Hours: 25 }, indoors: { upTo4Hours: 10, over4Hours: 25 },
    source: row('xi', 'partly', 'Controls read in a reproduction whose row numbers are shifted by one; 10 and 25 stand there under the wrong heading, an independent public listing has them here.'),
  },
  {
    // Outdoors only, although some trade tip sheets read as if it held indoors too.
    id: 'xii-a', row: 'xii', tool: 'handheld-grinder', heading: HANDHELD_GRINDER, method: 'water',
    demands: [MANUAL, 'built-in-water-feed'], outdoors: NONE, indoors: null,
    source: row('xii', 'partly', 'The agency\'s fact sheet describes the wet method for outdoor work; the row\'s own wording of that limit recalled.'),
  },
  {
    id: 'xii-b', row: 'xii', tool: 'handheld-grinder', heading: HANDHELD_GRINDER, method: 'vacuum',
    demands: GRINDER_COLLECTOR, outdoors: NONE, indoors: TEN_OVER_4, source: row('xii', 'partly', 'Controls read whole in a trade reproduction; heading and "indoors over 4 h: 10" read in a sheet quoting the row; 25 cfm per inch in the agency\'s video.'),
  },
  {
    id: 'xiii-a', row: 'xiii', tool: 'walk-behind-grinder-or-mill', heading: FLOOR_GRINDER, method: 'water',
    demands: [MANUAL, 'built-in-water-feed'], outdoors: NONE, indoors: NONE, source: row('xiii', 'read', 'Both options read in a trade reproduction.'),
  },
  {
    id: 'xiii-b', row: 'xiii', tool: 'walk-behind-grinder-or-mill', heading: FLOOR_GRINDER, method: 'vacuum',
    demands: [MANUAL, 'dust-collection-makers-system', 'airflow-makers-figure', 'filter-99-percent', 'filter-cleaning', 'hepa-vacuum-between-passes-indoors'],
    outdoors: NONE, indoors: NONE, source: row('xiii', 'read', 'Both options read in a trade reproduction.'),
  },
  {
    id: 'xiv', row: 'xiv', tool: 'small-drivable-mill', heading: { en: 'Small drivable milling machine, less than half a lane', es: 'Fresadora pequeña con asiento, menos de medio carril' }, method: 'water',
    demands: ['run-to-keep-dust-low', 'less-than-half-lane', 'water-sprays', 'water-with-surfactant'], outdoors: NONE, indoors: NONE, source: row('xiv', 'read', 'Row read in a trade reproduction: kept and run so that dust stays low; the maker\'s instructions are not named.'),
  },
  {
    id: 'xv-a', row: 'xv', tool: 'large-drivable-mill', heading: LARGE_MILL, method: 'water-and-vacuum',
    demands: ['run-to-keep-dust-low', 'half-lane-or-wider', 'asphalt-only', 'drum-exhaust', 'water-sprays'], outdoors: NONE, indoors: NONE, source: row('xv', 'partly', LARGE_MILL_NOTE),
  },
  {
    id: 'xv-b', row: 'xv', tool: 'large-drivable-mill', heading: LARGE_MILL, method: 'water-and-vacuum',
    demands: ['run-to-keep-dust-low', 'half-lane-or-wider', 'cut-at-most-4-inches', 'drum-exhaust', 'water-sprays'], outdoors: NONE, indoors: NONE, source: row('xv', 'partly', LARGE_MILL_NOTE),
  },
  {
    id: 'xv-c', row: 'xv', tool: 'large-drivable-mill', heading: LARGE_MILL, method: 'water',
    demands: ['run-to-keep-dust-low', 'half-lane-or-wider', 'cut-at-most-4-inches', 'water-sprays', 'water-with-surfactant'], outdoors: NONE, indoors: NONE, source: row('xv', 'partly', LARGE_MILL_NOTE),
  },
  {
    id: 'xvi', row: 'xvi', tool: 'crusher', heading: { en: 'Crushing machine', es: 'Trituradora' }, method: 'water',
    demands: [MANUAL, 'water-at-dust-points', 'booth-or-remote-control'], outdoors: NONE, indoors: NONE,
    source: row('xvi', 'partly', 'Water and "none" read in a training text; that the booth or remote station is also required follows from an answer of the agency.'),
  },
  {
    id: 'xvii', row: 'xvii', tool: 'demolition-vehicle', heading: { en: 'Heavy equipment that abrades, breaks or demolishes', es: 'Maquinaria pesada que raspa, rompe o demuele' }, method: 'cab',
    demands: ['enclosed-cab', 'water-or-suppressant-when-others-near'], outdoors: NONE, indoors: NONE,
    source: row('xvii', 'partly', 'Controls read in the agency\'s fact sheet; "none" recalled; an independent public listing has the same.'),
  },
  {
    id: 'xviii-a', row: 'xviii', tool: 'grading-vehicle', heading: GRADING, method: 'water',
    demands: ['no-abrading-or-demolition', 'water-or-suppressant-as-needed'], outdoors: NONE, indoors: NONE, source: row('xviii', 'partly', GRADING_NOTE),
  },
  {
    id: 'xviii-b', row: 'xviii', tool: 'grading-vehicle', heading: GRADING, method: 'cab',
    demands: ['no-abrading-or-demolition', 'operator-alone', 'enclosed-cab'], outdoors: NONE, indoors: NONE, source: row('xviii', 'partly', GRADING_NOTE),
  },
];
