import { openPagePictures } from './page-pictures';
import { openWordReader, type OcrLanguage, type PicturePage, type PictureWord, type WordReader } from './picture-words';
import { readLines, readSheet, type ReadSheetOptions } from './read-sheet';
import { emptyReading, type Box, type Field, type SheetReading } from './reading';
import { readingLines } from './reading-order';

export interface OcrOptions extends ReadSheetOptions {
  /** Told before each page, from 1. */
  onPage?: (page: number, pages: number) => void;
}

/** Pages recognised at most; a longer scan is for a person. */
const mostPages = 40;
/** Every value asks for a person's look, which starts below 0.8. */
const mostConfidence = 0.75;
/** Fewer sections than this, and the pictures are not a safety data sheet that could be read. */
const leastSections = 3;
const because = 'Read by OCR from a picture of the page.';

/**
 * Reads a sheet; one without a text layer is recognised from drawings of its pages, page by page. Never throws for a
 * bad file. Values from pictures stay under the confidence that asks a person to look.
 */
export async function readSheetOrPictures(bytes: Uint8Array, { onPage, ...limits }: OcrOptions = {}): Promise<SheetReading> {
  const plain = await readSheet(bytes, limits);
  if (plain.state !== 'no-text-layer') return plain;
  if (plain.pages > mostPages) return emptyReading('too-large', plain.pages);
  const pages = await recognisedPages(bytes, onPage ?? (() => undefined));
  const reading = readLines(pages.map(readingLines));
  if (reading.state !== 'read' || reading.sections.length < leastSections) return plain;
  return markedAsOcr(reading, pages);
}

/** English first; a first page in Spanish is read again, and the rest with it, by the Spanish data. */
async function recognisedPages(bytes: Uint8Array, onPage: (page: number, pages: number) => void): Promise<PicturePage[]> {
  const pictures = await openPagePictures(bytes);
  let reader: WordReader | undefined;
  try {
    reader = await openWordReader('eng');
    const pages: PicturePage[] = [];
    for (let number = 1; number <= pictures.pages; number++) {
      onPage(number, pictures.pages);
      const picture = await pictures.draw(number);
      let words = await reader.wordsOf(picture);
      if (number === 1 && languageOfPage(words) === 'spa') {
        await reader.close();
        reader = await openWordReader('spa');
        words = await reader.wordsOf(picture);
      }
      pages.push(words);
    }
    return pages;
  } finally {
    await reader?.close();
    await pictures.close();
  }
}

const languageOfPage = (page: PicturePage): OcrLanguage => (readLines([readingLines(page)]).language?.value === 'es' ? 'spa' : 'eng');

/** Each value as sure as the least sure word it was read from, and never sure enough to pass unseen. */
function markedAsOcr(reading: SheetReading, pages: readonly PicturePage[]): SheetReading {
  const mark = <T>(field: Field<T>): Field<T> => ({ ...field, confidence: Math.min(mostConfidence, field.confidence * surenessIn(pages[field.page - 1]?.items ?? [], field.box)), because });
  const markOne = <T>(field: Field<T> | null): Field<T> | null => field && mark(field);
  return {
    ...reading,
    state: 'read-by-ocr',
    hasTextLayer: false,
    language: markOne(reading.language),
    productName: markOne(reading.productName),
    supplier: markOne(reading.supplier),
    revisionDate: markOne(reading.revisionDate),
    signalWord: markOne(reading.signalWord),
    hazardCodes: reading.hazardCodes.map(mark),
    precautionaryCodes: reading.precautionaryCodes.map(mark),
    ingredients: reading.ingredients.map(mark),
    limits: reading.limits.map(mark),
    ppeWords: reading.ppeWords.map(mark),
  };
}

function surenessIn(words: readonly PictureWord[], { x, y, width, height }: Box): number {
  const inside = words.filter((word) => {
    const middle = { x: word.x + word.width / 2, y: word.y + word.height / 2 };
    return middle.x >= x && middle.x <= x + width && middle.y >= y && middle.y <= y + height;
  });
  return inside.length === 0 ? 0.5 : Math.min(...inside.map(({ sureness }) => sureness));
}
