import { type Words } from '../outcome';
import { sourced, type Source } from '../source';

/** Concrete surface profile, 1 (nearly flat) to 10 (over 6 mm), matched by tactile chips. */
export type SurfaceMethod =
  | 'detergent-scrub'
  | 'acid-etch'
  | 'grinding'
  | 'abrasive-blasting'
  | 'shot-blasting'
  | 'scarifying'
  | 'needle-scaling'
  | 'scabbling'
  | 'water-jetting'
  | 'milling';

export interface ProfileChipRow {
  readonly id: string;
  readonly profile: number;
  readonly name: Words;
  readonly source: Source;
}

const CHIPS_READ = sourced('ICRI 310.2R', 'read', { note: 'Chips 1 to 6 in three sources.' });
const CHIPS_LIST = sourced('ICRI 310.2R', 'read', { note: 'Names of chips 7 to 10 in an instrument maker’s list.' });
const chip = (profile: number, en: string, es: string): ProfileChipRow => ({ id: `csp-chip/${profile}`, profile, name: { en, es }, source: profile <= 6 ? CHIPS_READ : CHIPS_LIST });

export const PROFILE_CHIPS: readonly ProfileChipRow[] = [
  chip(1, 'acid etched', 'grabado con ácido'),
  chip(2, 'grinding', 'pulido con diamante'),
  chip(3, 'light shot blast', 'granallado ligero'),
  chip(4, 'light scarification', 'escarificado ligero'),
  chip(5, 'medium shot blast', 'granallado medio'),
  chip(6, 'medium scarification', 'escarificado medio'),
  chip(7, 'heavy abrasive blast', 'chorreado abrasivo fuerte'),
  chip(8, 'scabbled', 'bujardado'),
  chip(9, 'heavy scarification', 'escarificado fuerte'),
  chip(10, 'handheld breaker and abrasive blast', 'martillo de mano y chorreado abrasivo'),
];

export interface MethodRangeRow {
  readonly id: string;
  readonly method: SurfaceMethod;
  readonly name: Words;
  readonly minProfile: number;
  readonly maxProfile: number;
  readonly source: Source;
}

const recalled = (note?: string): Source => sourced('ICRI 310.2R, usual range of the method', 'from-memory', note === undefined ? {} : { note });
const range = (method: SurfaceMethod, en: string, es: string, minProfile: number, maxProfile: number, note?: string): MethodRangeRow => ({ id: `csp-method/${method}`, method, name: { en, es }, minProfile, maxProfile, source: recalled(note) });

/** What a method usually leaves. All recalled: the chip held against the floor decides. */
export const METHOD_RANGES: readonly MethodRangeRow[] = [
  range('detergent-scrub', 'detergent scrub, low-pressure water', 'lavado con detergente, agua a baja presión', 1, 1),
  range('acid-etch', 'acid etch', 'grabado con ácido', 1, 3),
  range('grinding', 'diamond grinding', 'pulido con diamante', 1, 3),
  range('abrasive-blasting', 'abrasive (sand) blasting', 'chorreado abrasivo (arena)', 2, 5, 'Give or take 1.'),
  range('shot-blasting', 'steel shot blasting', 'granallado con acero', 2, 8, 'Give or take 1; an older edition 3 to 9 was read.'),
  range('scarifying', 'scarifying', 'escarificado', 4, 7, 'Give or take 2.'),
  range('needle-scaling', 'needle scaling', 'agujas neumáticas', 2, 4, 'Uncertain.'),
  range('scabbling', 'scabbling', 'bujardado', 7, 9, 'Give or take 1.'),
  range('water-jetting', 'high-pressure water jetting', 'agua a alta presión', 3, 10),
  range('milling', 'milling, handheld breaker', 'fresado, martillo de mano', 7, 10, 'Uncertain.'),
];

export interface CoatingRangeRow {
  readonly id: string;
  readonly coating: Words;
  readonly maxThicknessMm: number | null;
  readonly minProfile: number;
  readonly maxProfile: number;
  readonly source: Source;
}

const GUIDE = sourced('Coating thickness guide of the trade', 'from-memory', { note: 'The product data sheet prevails.' });
const coating = (id: string, en: string, es: string, maxThicknessMm: number | null, minProfile: number, maxProfile: number): CoatingRangeRow => ({ id: `csp-coating/${id}`, coating: { en, es }, maxThicknessMm, minProfile, maxProfile, source: GUIDE });

/** By thickness: 10 mil = 0.254 mm, 40 mil = 1.016 mm, ⅛ in = 3.175 mm, ¼ in = 6.35 mm. */
export const COATING_RANGES: readonly CoatingRangeRow[] = [
  coating('thin-film', 'sealer, thin film', 'sellador, capa delgada', 0.254, 1, 3),
  coating('high-build', 'high-build coating', 'recubrimiento de alto espesor', 1.016, 3, 5),
  coating('self-levelling', 'self-leveling', 'autonivelante', 3.175, 4, 6),
  coating('overlay', 'polymer overlay', 'sobrecapa polimérica', 6.35, 5, 9),
  coating('repair', 'overlay or repair over ¼ in', 'sobrecapa o reparación de más de ¼ in', null, 5, 10),
];
