import { type AuditLine } from '#compliance/hazcom/sds-audit';
import { type Language, type Words } from '#compliance/outcome';
import { type ReaderState } from '#shared/sheets';

export interface ReturnedSheet {
  readonly productName: string;
  readonly fileName: string;
  /** ISO; null when the sheet says none or nobody found it. */
  readonly revisedOn: string | null;
  readonly readerState: ReaderState | null;
  readonly findings: readonly AuditLine[];
}

/** What is wrong with the file itself, as its supplier must hear it. */
const fileTrouble: Partial<Record<ReaderState, Words>> = {
  encrypted: { en: 'The file asks for a password, so nobody on site can open it.', es: 'El archivo pide una contraseña y nadie en la obra puede abrirlo.' },
  damaged: { en: 'The file is damaged and does not open.', es: 'El archivo está dañado y no se abre.' },
  'not-a-pdf': { en: 'The file is not a PDF.', es: 'El archivo no es un PDF.' },
  'no-text-layer': { en: 'The sheet is a picture without text: it cannot be searched or read aloud.', es: 'La hoja es una imagen sin texto: no se puede buscar ni leer en voz alta.' },
  'read-by-ocr': { en: 'The sheet is a picture without text: it cannot be searched or read aloud.', es: 'La hoja es una imagen sin texto: no se puede buscar ni leer en voz alta.' },
};

const say: Readonly<Record<Language, { head: (sheet: ReturnedSheet) => string; findings: string; none: string; foot: string }>> = {
  en: {
    head: ({ productName, fileName, revisedOn }) => `We cannot use your safety data sheet of ${productName} (${revisedOn === null ? 'no revision date found' : `revision of ${revisedOn}`}, file ${fileName}).`,
    findings: 'What we found:',
    none: 'What we found: (write it here)',
    foot: 'Please send a corrected sheet as a PDF, with all 16 sections.',
  },
  es: {
    head: ({ productName, fileName, revisedOn }) => `No podemos usar su hoja de datos de seguridad de ${productName} (${revisedOn === null ? 'sin fecha de revisión' : `revisión del ${revisedOn}`}, archivo ${fileName}).`,
    findings: 'Lo que encontramos:',
    none: 'Lo que encontramos: (escríbalo aquí)',
    foot: 'Por favor envíe una hoja corregida en PDF, con las 16 secciones.',
  },
};

/** More than this nobody reads in a mail; the rest is counted. */
const mostFindings = 20;
const andMore: Readonly<Record<Language, (count: number) => string>> = { en: (count) => `- and ${count} more`, es: (count) => `- y ${count} más` };

/** A first wording of the mail in one language: what the audit found unmet, each with its source. What it could not decide is not the supplier's fault. */
export function returnMessage(sheet: ReturnedSheet, language: Language): string {
  const words = say[language];
  const trouble = sheet.readerState === null ? undefined : fileTrouble[sheet.readerState];
  const found = sheet.findings.filter(({ outcome }) => outcome === 'unmet').map(({ text, source }) => `- ${text[language]} (${[source.citation, source.paragraph].filter(Boolean).join(' ')})`);
  const lines = [...(trouble ? [`- ${trouble[language]}`] : []), ...found];
  const shown = lines.length > mostFindings ? [...lines.slice(0, mostFindings), andMore[language](lines.length - mostFindings)] : lines;
  return [words.head(sheet), '', ...(shown.length > 0 ? [words.findings, ...shown] : [words.none]), '', words.foot].join('\n');
}
