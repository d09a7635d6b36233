import { sourced, usFederal, type Source } from '../source';

/** Permitted hours a day at a level, dBA slow response. */
export interface DurationRow {
  readonly id: string;
  readonly levelDba: number;
  readonly hours: number;
}

export const TABLE_D2_SOURCE: Source = usFederal('1926.52', 'read', { paragraph: '(d)(1) Table D-2', note: 'Cornell LII copy and the Michigan parallel rule.' });
export const MIXED_LEVELS_SOURCE: Source = usFederal('1926.52', 'read', { paragraph: '(d)(2)(ii)', note: 'Some copies lose the plus signs of the formula.' });
export const IMPULSE_SOURCE: Source = usFederal('1926.52', 'parallel-text', { paragraph: '(e)', note: 'Read in 41 CFR 50-204.10 and 1910.95; the paragraph itself recalled.' });
export const IMPULSE_LIMIT_DB_PEAK = 140;

const d2 = (levelDba: number, hours: number): DurationRow => ({ id: `noise-d2/${levelDba}`, levelDba, hours });
/** Construction. Rounded steps; nothing is permitted above the last. */
export const TABLE_D2: readonly DurationRow[] = [d2(90, 8), d2(92, 6), d2(95, 4), d2(97, 3), d2(100, 2), d2(102, 1.5), d2(105, 1), d2(110, 0.5), d2(115, 0.25)];

export const TABLE_G16A_SOURCE: Source = usFederal('1910.95', 'read', { paragraph: 'App. A Table G-16a', note: 'One OSHA copy prints 21.2 h for 83 dB; the formula gives 21.11.' });
const g16a = ([levelDba, hours]: readonly [number, number]): DurationRow => ({ id: `noise-g16a/${levelDba}`, levelDba, hours });
const G16A_PAIRS: readonly (readonly [number, number])[] = [
  [80, 32], [81, 27.9], [82, 24.3], [83, 21.1], [84, 18.4], [85, 16], [86, 13.9], [87, 12.1], [88, 10.6], [89, 9.2],
  [90, 8], [91, 7.0], [92, 6.1], [93, 5.3], [94, 4.6], [95, 4], [96, 3.5], [97, 3.0], [98, 2.6], [99, 2.3],
  [100, 2], [101, 1.7], [102, 1.5], [103, 1.3], [104, 1.1], [105, 1], [106, 0.87], [107, 0.76], [108, 0.66], [109, 0.57],
  [110, 0.5], [111, 0.44], [112, 0.38], [113, 0.33], [114, 0.29], [115, 0.25], [116, 0.22], [117, 0.19], [118, 0.16], [119, 0.14],
  [120, 0.125], [125, 0.063], [130, 0.031],
];
/** General industry, as printed; for checking and for hand-made sums. A construction shift is not judged by it. */
export const TABLE_G16A: readonly DurationRow[] = G16A_PAIRS.map(g16a);

/** Published levels, for orientation until the machine on site is measured. */
export interface PublishedLevelRow {
  readonly id: string;
  readonly what: string;
  readonly dba: number | null;
  readonly source: Source;
}

export const PUBLISHED_LEVELS: readonly PublishedLevelRow[] = [
  { id: 'noise-level/handheld-grinding-enclosed', what: 'handheld concrete grinding, enclosed, mean of 52 sessions (87.9 to 113)', dba: 97.0, source: sourced('J Occup Environ Hyg 2013;10(9):478-486', 'read') },
  { id: 'noise-level/handheld-grinding-uncontrolled', what: 'the same without dust control', dba: 98.9, source: sourced('J Occup Environ Hyg 2013;10(9):478-486', 'read') },
  { id: 'noise-level/handheld-grinding-wet', what: 'the same, wet', dba: 98.5, source: sourced('J Occup Environ Hyg 2013;10(9):478-486', 'read') },
  { id: 'noise-level/handheld-grinding-vacuum', what: 'the same with vacuum shroud', dba: 96.2, source: sourced('J Occup Environ Hyg 2013;10(9):478-486', 'read') },
  { id: 'noise-level/walk-behind', what: 'walk-behind grinders and shot blasters: no published figure found; measure, or take the maker’s', dba: null, source: sourced('literature search', 'from-memory') },
];
