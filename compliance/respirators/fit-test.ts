import { type FitTestKind } from '../facts';
import { checkNumber } from '../input-error';
import { addYears, checkIsoDate, type IsoDate } from '../iso-date';
import { type Words } from '../outcome';
import { usFederal, type Source } from '../source';
import { type FacePiece } from './apf.data';

const paragraph = (text: string): Source => usFederal('1910.134', 'read', { paragraph: text });
export const WEARER_SOURCES = {
  clearance: paragraph('(e)(1)'),
  fitTest: paragraph('(f)(2)'),
  faceChange: paragraph('(f)(3)'),
  fitFactor: paragraph('(f)(6)-(7)'),
  facialHair: paragraph('(g)(1)(i)'),
  training: paragraph('(k)(5)'),
} as const satisfies Record<string, Source>;

/** Fit factor a quantitative test must reach, by face piece. */
export const LEAST_FIT_FACTOR: Readonly<Partial<Record<FacePiece, number>>> = { 'quarter-mask': 100, 'filtering-facepiece': 100, 'half-mask': 100, 'full-facepiece': 500 };
/** A qualitative test shows a fit factor of 100 at most: a negative-pressure mask so tested serves to 10 times the limit. */
export const QUALITATIVE_MAX_RATIO = 10;
const FIT_TEST_YEARS = 1;
const TRAINING_YEARS = 1;

export interface RespiratorModel {
  readonly maker: string;
  readonly model: string;
  readonly style: string;
  readonly size: string;
}

/** Dates and results only; medical findings have no place here. */
export interface FitTest extends RespiratorModel {
  readonly testedOn: IsoDate;
  readonly kind: FitTestKind;
  readonly isPassed: boolean;
  /** Of a quantitative test. */
  readonly fitFactor: number | null;
}

export interface Wearer {
  readonly facePiece: FacePiece;
  readonly isNegativePressure: boolean;
  readonly wears: RespiratorModel;
  readonly clearedOn: IsoDate | null;
  readonly fitTests: readonly FitTest[];
  /** Last scar, dental work, surgery or obvious change of weight; null when none is known. */
  readonly faceChangedOn: IsoDate | null;
  /** Seen by the lead this morning; null when nobody looked. */
  readonly hasHairAtSeal: boolean | null;
  readonly trainedOn: IsoDate | null;
  /** Hazard ratio of the task; null where Table 1 sets the factor. */
  readonly hazardRatio: number | null;
}

export interface WearerCheck {
  readonly id: 'clearance' | 'fit-test' | 'fit-factor' | 'facial-hair' | 'training';
  readonly outcome: 'met' | 'unmet' | 'undecided' | 'not-applicable';
  /** Until when it stays met. */
  readonly validUntil: IsoDate | null;
  readonly reason: Words;
  readonly source: Source;
}

const isTight = (facePiece: FacePiece): boolean => facePiece !== 'hood' && facePiece !== 'loose-fitting';
const sameModel = (a: RespiratorModel, b: RespiratorModel): boolean => a.maker === b.maker && a.model === b.model && a.style === b.style && a.size === b.size;

/** Whether a person may wear this respirator on this day; each "no" with its reason. Nobody is listed for a mask with an unmet or undecided line. */
export function checkWearer(wearer: Wearer, asOf: IsoDate): readonly WearerCheck[] {
  checkIsoDate('asOf', asOf);
  return [clearance(wearer, asOf), ...fit(wearer, asOf), facialHair(wearer), training(wearer, asOf)];
}

function clearance({ clearedOn }: Wearer, asOf: IsoDate): WearerCheck {
  const id = 'clearance';
  const source = WEARER_SOURCES.clearance;
  if (clearedOn === null || checkIsoDate('clearedOn', clearedOn) > asOf) {
    return { id, outcome: 'unmet', validUntil: null, reason: { en: 'Not cleared to wear a respirator yet.', es: 'Todavía sin autorización médica para usar respirador.' }, source };
  }
  return { id, outcome: 'met', validUntil: null, reason: { en: `Cleared on ${clearedOn}. No yearly repeat; again on symptoms or changed work.`, es: `Autorizado el ${clearedOn}. Sin repetición anual; de nuevo si hay síntomas o cambia el trabajo.` }, source };
}

function fit(wearer: Wearer, asOf: IsoDate): WearerCheck[] {
  const id = 'fit-test';
  const source = WEARER_SOURCES.fitTest;
  if (!isTight(wearer.facePiece)) {
    return [{ id, outcome: 'not-applicable', validUntil: null, reason: { en: 'A loose-fitting hood needs no fit test.', es: 'Una capucha holgada no necesita prueba de ajuste.' }, source }];
  }
  const unmet = (en: string, es: string, why: Source = source): WearerCheck[] => [{ id, outcome: 'unmet', validUntil: null, reason: { en, es }, source: why }];
  const test = latestTest(wearer, asOf);
  if (test === null) return unmet('No fit test for this maker, model, style and size.', 'Sin prueba de ajuste para esta marca, modelo, estilo y talla.');
  if (!test.isPassed) return unmet('The last fit test was not passed.', 'No pasó la última prueba de ajuste.');
  if (wearer.clearedOn !== null && test.testedOn < wearer.clearedOn) {
    // A renewed clearance is no fault, a first one after the test is: the dates alone do not tell.
    return [{ id, outcome: 'undecided', validUntil: null, reason: { en: 'The fit test is older than the clearance. Was there an earlier clearance?', es: 'La prueba de ajuste es anterior a la autorización. ¿Hubo una autorización antes?' }, source: WEARER_SOURCES.clearance }];
  }
  if (wearer.faceChangedOn !== null && checkIsoDate('faceChangedOn', wearer.faceChangedOn) > test.testedOn) {
    return unmet('The face has changed since the fit test.', 'La cara ha cambiado desde la prueba de ajuste.', WEARER_SOURCES.faceChange);
  }
  const validUntil = addYears(test.testedOn, FIT_TEST_YEARS);
  if (asOf > validUntil) return unmet(`The fit test ran out on ${validUntil}.`, `La prueba de ajuste venció el ${validUntil}.`);
  return [{ id, outcome: 'met', validUntil, reason: { en: `Fit test good until ${validUntil}.`, es: `Prueba de ajuste válida hasta el ${validUntil}.` }, source }, fitFactor(wearer, test)];
}

function latestTest({ fitTests, wears }: Wearer, asOf: IsoDate): FitTest | null {
  const own = fitTests.filter((test) => sameModel(test, wears) && checkIsoDate('testedOn', test.testedOn) <= asOf);
  return own.sort((a, b) => (a.testedOn < b.testedOn ? 1 : -1))[0] ?? null;
}

function fitFactor({ facePiece, isNegativePressure, hazardRatio }: Wearer, test: FitTest): WearerCheck {
  const id = 'fit-factor';
  const source = WEARER_SOURCES.fitFactor;
  const least = LEAST_FIT_FACTOR[facePiece]!;
  if (test.kind === 'quantitative') {
    if (test.fitFactor === null) return { id, outcome: 'undecided', validUntil: null, reason: { en: 'The fit factor of the test is not on file.', es: 'Falta el factor de ajuste de la prueba.' }, source };
    const isEnough = checkNumber('fitFactor', test.fitFactor, { min: 0 }) >= least;
    return { id, outcome: isEnough ? 'met' : 'unmet', validUntil: null, reason: { en: `Fit factor ${test.fitFactor}, at least ${least} needed.`, es: `Factor de ajuste ${test.fitFactor}; se necesita al menos ${least}.` }, source };
  }
  if (isNegativePressure && hazardRatio !== null && hazardRatio > QUALITATIVE_MAX_RATIO) {
    return { id, outcome: 'unmet', validUntil: null, reason: { en: 'Tested by taste or smell: good to 10 times the limit only. A counted test is needed.', es: 'Probado por sabor u olor: sirve solo hasta 10 veces el límite. Se necesita una prueba cuantitativa.' }, source };
  }
  if (isNegativePressure && hazardRatio === null && facePiece === 'full-facepiece') {
    // Table 1 asks 10 or 25: the wearer's facts do not say which.
    return { id, outcome: 'undecided', validUntil: null, reason: { en: 'Tested by taste or smell: good where a factor of 10 is asked, not more. Which is asked?', es: 'Probado por sabor u olor: sirve donde se pide un factor de 10, no más. ¿Cuál se pide?' }, source };
  }
  return { id, outcome: 'met', validUntil: null, reason: { en: 'Tested by taste or smell: enough here.', es: 'Probado por sabor u olor: basta aquí.' }, source };
}

function facialHair({ facePiece, hasHairAtSeal }: Wearer): WearerCheck {
  const id = 'facial-hair';
  const source = WEARER_SOURCES.facialHair;
  if (!isTight(facePiece)) return { id, outcome: 'not-applicable', validUntil: null, reason: { en: 'No seal on the face.', es: 'No sella contra la cara.' }, source };
  if (hasHairAtSeal === null) return { id, outcome: 'undecided', validUntil: null, reason: { en: 'Look: is the face shaved where the mask seals?', es: 'Mire: ¿está afeitada la cara donde sella la máscara?' }, source };
  return hasHairAtSeal
    ? { id, outcome: 'unmet', validUntil: null, reason: { en: 'Hair where the mask seals: it leaks.', es: 'Hay pelo donde sella la máscara: no ajusta.' }, source }
    : { id, outcome: 'met', validUntil: null, reason: { en: 'Shaved where the mask seals.', es: 'Afeitado donde sella la máscara.' }, source };
}

function training({ trainedOn }: Wearer, asOf: IsoDate): WearerCheck {
  const id = 'training';
  const source = WEARER_SOURCES.training;
  const validUntil = trainedOn === null ? null : addYears(checkIsoDate('trainedOn', trainedOn), TRAINING_YEARS);
  if (trainedOn === null || validUntil === null || trainedOn > asOf || asOf > validUntil) {
    return { id, outcome: 'unmet', validUntil: null, reason: { en: 'Respirator training is due: before use and every year.', es: 'Falta la capacitación sobre respiradores: antes de usarlo y cada año.' }, source };
  }
  return { id, outcome: 'met', validUntil, reason: { en: `Respirator training good until ${validUntil}.`, es: `Capacitación sobre respiradores válida hasta el ${validUntil}.` }, source };
}
