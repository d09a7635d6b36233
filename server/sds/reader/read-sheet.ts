import { exposureLimits } from './limits';
import { hazardStatements } from './hazard-statements';
import { ingredients } from './ingredients';
import { languageOf } from './language';
import { notices } from './notices';
import { type Line } from './lines';
import { pdfText, type PdfTextLimits } from './pdf-text';
import { ppeWords } from './ppe-words';
import { productName } from './product-name';
import { readingLines } from './reading-order';
import { emptyReading, type Field, type SheetReading } from './reading';
import { revisionDate } from './revision-date';
import { splitRunningLines } from './running-lines';
import { findSections, isSectionHeading } from './sections';
import { type SheetParts } from './sheet-parts';
import { signalWord } from './signal-word';
import { supplier } from './supplier';

export type ReadSheetOptions = Partial<PdfTextLimits>;

const defaultLimits: PdfTextLimits = { maxBytes: 25 * 1024 * 1024, maxPages: 1000 };

/**
 * Reads one safety data sheet. Knows no database, no network, no clock; never throws for a bad file and never
 * invents a value: what is not on the sheet is null.
 */
export async function readSheet(bytes: Uint8Array, options: ReadSheetOptions = {}): Promise<SheetReading> {
  const pdf = await pdfText(bytes, { ...defaultLimits, ...options });
  if (pdf.state !== 'read') return emptyReading(pdf.state, pdf.pages);
  return readLines(pdf.pages.map(readingLines));
}

/** The reading of lines that are already in order; pages without letters make the sheet one without a text layer. */
export function readLines(pages: Line[][]): SheetReading {
  const text = pages.map((lines) => lines.map((line) => line.text).join('\n')).join('\f');
  if (!hasEnoughLetters.test(text)) return emptyReading('no-text-layer', pages.length);
  const { pages: kept, running } = splitRunningLines(pages, isSectionHeading);
  const lines = kept.flat();
  const sections = findSections(lines);
  const language = languageField(text, lines);
  const { nextSheet } = sections;
  const own = nextSheet ? lines.slice(0, lines.indexOf(nextSheet)) : lines;
  const ownRunning = nextSheet ? running.filter((line) => line.page < nextSheet.page) : running;
  const parts: SheetParts = { sections, lines: own, running: ownRunning, pages: pages.length, language: language?.value ?? 'en' };
  const composition = ingredients(parts);
  const revised = revisionDate(parts);
  return {
    state: 'read',
    pages: pages.length,
    hasTextLayer: true,
    language,
    productName: productName(parts),
    supplier: supplier(parts),
    revisionDate: revised,
    signalWord: signalWord(parts),
    ...hazardStatements(parts),
    ingredients: composition,
    limits: exposureLimits(parts, composition.flatMap(({ value }) => (value.name ? [value.name] : []))),
    ppeWords: ppeWords(parts),
    sections: sections.headings,
    notices: notices(parts, language, revised),
    text,
  };
}

/** Fewer letters than this on the whole sheet are a stamp or a page number over pictures, not a text layer. */
const hasEnoughLetters = /(?:\p{L}\P{L}*){60}/u;

function languageField(text: string, lines: Line[]): Field<string> | null {
  const guess = languageOf(text);
  const [first] = lines;
  return guess && first ? { value: guess.language, page: first.page, box: first.box, quote: first.text, confidence: guess.confidence } : null;
}
