import { checkIsoDate, addYears, type IsoDate } from '../iso-date';
import { type Outcome, type Words } from '../outcome';
import { sourced, usFederal, type Source } from '../source';
import { CAS_SOURCE, checkCas } from './cas';
import { type Pictogram, type SignalWord } from './ghs-hazards.data';
import { labelElements, PRECEDENCE_SOURCE, type StatedHazard } from './label-elements';
import { acceptedTexts, type ProductKind } from './sds-phase-in.data';
import { SDS_CONTENT, SDS_SECTIONS } from './sds-sections.data';
import { readHazardCodes } from './statements';

/** What a reader or a person found on one revision. `null`: not read, which is never the same as absent. */
export interface SdsForAudit {
  readonly kind: ProductKind;
  /** BCP 47 language of the sheet. */
  readonly language: string;
  /** In the order in which they stand on the sheet. */
  readonly sections: readonly { readonly number: number; readonly heading: string; readonly text: string }[];
  /** Signal words found in section 2; several are a fault. */
  readonly signalWords: readonly SignalWord[] | null;
  readonly hazards: readonly StatedHazard[] | null;
  /** Pictograms shown or named. */
  readonly pictograms: readonly Pictogram[] | null;
  readonly casNumbers: readonly string[];
  readonly revisedOn: IsoDate | null;
  /** The organisation's own limit of age in years; null where it has none. */
  readonly maxAgeYears: number | null;
}

/** One line of the audit. `basis` keeps the organisation's own policy apart from the law. */
export interface AuditLine {
  readonly id: string;
  readonly section: number | null;
  readonly outcome: Outcome;
  readonly basis: 'law' | 'policy';
  readonly text: Words;
  readonly source: Source;
}

const APP_D = usFederal('1910.1200', 'read', { paragraph: '(g)(2), App. D', note: 'Order and headings are mandatory; sections 12 to 15 must appear.' });
const APP_C = usFederal('1910.1200', 'partly', { paragraph: 'App. C' });
const NO_EXPIRY = usFederal('1910.1200', 'partly', { paragraph: '(g)(5)', note: 'No fixed expiry of a sheet; where nothing new is known the original stands (trade publisher summary).' });
const ENGLISH = usFederal('1910.1200', 'partly', { paragraph: '(g)(2)', note: 'Trade publisher’s answer: in English; copies in other languages may be kept beside it.' });
const POLICY = sourced('organisation policy, not law', 'common-practice');
const WORD: Readonly<Record<SignalWord, string>> = { danger: 'Danger', warning: 'Warning', none: '–' };

const line = (id: string, section: number | null, outcome: Outcome, en: string, es: string, source: Source, basis: AuditLine['basis'] = 'law'): AuditLine => ({ id, section, outcome, basis, text: { en, es }, source });

/** Audits one revision against Appendix D (form) and Appendix C (statements, signal word, pictograms). What was not read is a question. */
export function auditSds(sheet: SdsForAudit, asOf: IsoDate): readonly AuditLine[] {
  checkIsoDate('asOf', asOf);
  if (sheet.revisedOn !== null) checkIsoDate('revisedOn', sheet.revisedOn);
  return [...sectionLines(sheet), ...contentLines(sheet, asOf), ...labelLines(sheet), ...casLines(sheet), ...dateLines(sheet, asOf), ...languageLines(sheet)];
}

function sectionLines({ sections }: SdsForAudit): AuditLine[] {
  const lines = SDS_SECTIONS.map((row): AuditLine => {
    const found = sections.filter((each) => each.number === row.number);
    const id = `section-${row.number}`;
    const { en, es } = row.heading;
    if (found.length === 0) return line(id, row.number, 'unmet', `Section ${row.number} (${en}) is missing.`, `Falta la sección ${row.number} (${es}).`, APP_D);
    if (!found.some((each) => row.marks.test(each.heading)))
      return line(id, row.number, 'unmet', `Section ${row.number} should be headed "${en}", not "${found[0]!.heading.trim()}".`, `La sección ${row.number} debe titularse «${es}», no «${found[0]!.heading.trim()}».`, APP_D);
    if (found.every((each) => each.text.trim() === '') && row.isContentEnforced)
      return line(id, row.number, 'unmet', `Section ${row.number} is empty; where nothing applies it must say so.`, `La sección ${row.number} está vacía; si nada aplica, debe decirlo.`, APP_D);
    return line(id, row.number, 'met', `Section ${row.number} is there.`, `La sección ${row.number} está.`, APP_D);
  });
  const numbers = sections.map((each) => each.number);
  const isInOrder = numbers.every((number, i) => i === 0 || number >= numbers[i - 1]!);
  lines.push(
    isInOrder
      ? line('section-order', null, 'met', 'The sections stand in order.', 'Las secciones están en orden.', APP_D)
      : line('section-order', null, 'unmet', 'The sections do not stand in the order of the rule.', 'Las secciones no siguen el orden de la norma.', APP_D),
  );
  return lines;
}

function contentLines({ sections, kind }: SdsForAudit, asOf: IsoDate): AuditLine[] {
  const { texts, row: phaseIn } = acceptedTexts('manufacturer', kind, asOf);
  return SDS_CONTENT.map((row): AuditLine => {
    const id = row.id.replace('sds-content/', 'content-');
    const { en, es } = row.name;
    const text = sections.filter((each) => each.number === row.section).map((each) => each.text).join('\n');
    if (row.marks.test(text)) return line(id, row.section, 'met', `Section ${row.section}: ${en} found.`, `Sección ${row.section}: se encontró ${es}.`, row.source);
    if (row.since === '2024' && texts.includes('2012'))
      return line(id, row.section, 'not-applicable', `Section ${row.section}: ${en} is not yet required (from ${phaseIn.on2024Only}).`, `Sección ${row.section}: ${es} aún no se exige (desde ${phaseIn.on2024Only}).`, phaseIn.source);
    return line(id, row.section, 'undecided', `Section ${row.section}: ${en} was not found. Is it on the sheet?`, `Sección ${row.section}: no se encontró ${es}. ¿Está en la hoja?`, row.source);
  });
}

function labelLines({ hazards, signalWords, pictograms }: SdsForAudit): AuditLine[] {
  if (hazards === null) return [line('statements', 2, 'undecided', 'The hazard statements were not read. Which stand in section 2?', 'No se leyeron las indicaciones de peligro. ¿Cuáles hay en la sección 2?', APP_C)];
  const { unknown } = readHazardCodes(hazards.map((each) => each.code));
  const asked = unknown.map((each) => line(`statement-${each.text}`, 2, 'undecided', each.question.en, each.question.es, APP_C));
  const read = hazards.flatMap((each) => readHazardCodes([each.code]).codes.map((code) => ({ code, category: each.category })));
  const expected = labelElements(read);
  const missing = expected.categoryMissing.map((code) =>
    line(`category-${code}`, 2, 'undecided', `${code} needs its category: the signal word or pictogram hangs on it.`, `${code} necesita su categoría: de ella depende la palabra de advertencia o el pictograma.`, APP_C),
  );
  const isOpen = asked.length + missing.length > 0;
  return [...asked, ...missing, signalWordLine(expected.signalWord, signalWords, isOpen), ...pictogramLines(expected, pictograms, isOpen)];
}

function signalWordLine(expected: SignalWord, found: readonly SignalWord[] | null, isOpen: boolean): AuditLine {
  const id = 'signal-word';
  if (found === null) return line(id, 2, 'undecided', 'The signal word was not read.', 'No se leyó la palabra de advertencia.', APP_C);
  const words = [...new Set(found.filter((each) => each !== 'none'))];
  if (words.length > 1) return line(id, 2, 'unmet', 'Two signal words: Danger displaces Warning.', 'Dos palabras de advertencia: Peligro desplaza a Atención.', PRECEDENCE_SOURCE);
  const shown = words[0] ?? 'none';
  if (shown === expected) return line(id, 2, 'met', `The signal word (${WORD[shown]}) fits the statements.`, `La palabra de advertencia (${WORD[shown]}) concuerda con las indicaciones.`, APP_C);
  return line(id, 2, isOpen ? 'undecided' : 'unmet', `The statements ask for "${WORD[expected]}", the sheet shows "${WORD[shown]}".`, `Las indicaciones piden «${WORD[expected]}»; la hoja muestra «${WORD[shown]}».`, APP_C);
}

function pictogramLines(expected: ReturnType<typeof labelElements>, found: readonly Pictogram[] | null, isOpen: boolean): AuditLine[] {
  if (found === null) return [line('pictograms', 2, 'undecided', 'The pictograms were not read. Which are shown?', 'No se leyeron los pictogramas. ¿Cuáles se muestran?', APP_C)];
  const wrong: Outcome = isOpen ? 'undecided' : 'unmet';
  const missing = expected.pictograms.filter((each) => !found.includes(each)).map((each) => line(`pictogram-${each}`, 2, wrong, `The statements ask for ${each}; the sheet does not show it.`, `Las indicaciones piden ${each}; la hoja no lo muestra.`, APP_C));
  const extra = found
    .filter((each) => !expected.pictograms.includes(each) && !expected.voluntaryPictograms.includes(each))
    .map((each) => {
      const isDisplaced = each === 'GHS07' && expected.displaced.length > 0;
      return isDisplaced
        ? line('pictogram-GHS07', 2, wrong, 'The exclamation mark must give way to the stronger pictogram here.', 'El signo de exclamación debe ceder aquí ante el pictograma más grave.', PRECEDENCE_SOURCE)
        : line(`pictogram-${each}`, 2, wrong, `${each} is shown, but no statement asks for it.`, `Se muestra ${each}, pero ninguna indicación lo pide.`, APP_C);
    });
  if (missing.length + extra.length > 0) return [...missing, ...extra];
  return [line('pictograms', 2, 'met', 'The pictograms fit the statements.', 'Los pictogramas concuerdan con las indicaciones.', APP_C)];
}

function casLines({ casNumbers }: SdsForAudit): AuditLine[] {
  return casNumbers.map((number): AuditLine => {
    const result = checkCas(number);
    const id = `cas-${result.casNumber}`;
    if (result.isValid) return line(id, 3, 'met', `${number}: check digit is right.`, `${number}: el dígito de control es correcto.`, CAS_SOURCE);
    if (result.fault === 'malformed') return line(id, 3, 'unmet', `${number} does not have the form of a CAS number.`, `${number} no tiene la forma de un número CAS.`, CAS_SOURCE);
    return line(id, 3, 'unmet', `${number}: the check digit should be ${result.expectedCheckDigit}.`, `${number}: el dígito de control debería ser ${result.expectedCheckDigit}.`, CAS_SOURCE);
  });
}

function dateLines({ revisedOn, maxAgeYears }: SdsForAudit, asOf: IsoDate): AuditLine[] {
  if (revisedOn === null) return [line('revised-on', 16, 'undecided', 'No date of preparation or revision was read. Which date is on the sheet?', 'No se leyó la fecha de preparación o revisión. ¿Qué fecha tiene la hoja?', APP_D)];
  if (revisedOn > asOf) return [line('revised-on', 16, 'undecided', `The sheet is dated ${revisedOn}, which is still to come. Check the date.`, `La hoja tiene fecha ${revisedOn}, aún por venir. Revise la fecha.`, APP_D)];
  const law = line('age-law', 16, 'not-applicable', 'US law sets no age at which a sheet expires; it must match the product received.', 'La ley de EE. UU. no fija una edad de caducidad; la hoja debe corresponder al producto recibido.', NO_EXPIRY);
  if (maxAgeYears === null) return [law];
  const isTooOld = addYears(revisedOn, maxAgeYears) < asOf;
  return [
    law,
    isTooOld
      ? line('age-policy', 16, 'unmet', `Older than the ${maxAgeYears} years your organization allows: ask the supplier whether it still stands.`, `Más antigua que los ${maxAgeYears} años que permite su organización: pregunte al proveedor si sigue vigente.`, POLICY, 'policy')
      : line('age-policy', 16, 'met', `Within the ${maxAgeYears} years your organization allows.`, `Dentro de los ${maxAgeYears} años que permite su organización.`, POLICY, 'policy'),
  ];
}

function languageLines({ language }: SdsForAudit): AuditLine[] {
  if (language.toLowerCase().startsWith('en')) return [];
  return [line('language', null, 'undecided', 'This sheet is not in English. Is the English sheet of the same product on file?', 'Esta hoja no está en inglés. ¿Está archivada la hoja en inglés del mismo producto?', ENGLISH)];
}
