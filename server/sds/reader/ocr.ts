import { liesSideways, turned, type Turns } from './grey-picture';
import { openPagePictures, type PagePicture } from './page-pictures';
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

/** A page read after it was turned upright, with the size it has in the file. */
interface TurnedPage extends PicturePage {
  turns: Turns;
  drawn: { width: number; height: number };
}

/** Below this share of sure letters a page may stand on its head. */
const leastSure = 0.6;
/** The share of a page, from above its middle, that tells which way up it is. */
const sample = { from: 0.25, to: 0.35 };

/** Reads a page the way up its lines run; of two ways the one whose words are surer. `guess` is how the page before lay. */
async function wordsUpright(reader: WordReader, drawn: PagePicture, guess: Turns): Promise<TurnedPage> {
  const isSideways = liesSideways(drawn.picture);
  let ways: [Turns, Turns] = isSideways ? [1, 3] : [0, 2];
  const isLikely = ways.includes(guess);
  const surer = isSideways && !isLikely ? (await surenessOf(reader, turnedPicture(drawn, 3))) > (await surenessOf(reader, turnedPicture(drawn, 1))) : guess === ways[1];
  if (surer) ways = [ways[1], ways[0]];
  const size = { width: drawn.width, height: drawn.height };
  const first = await reader.wordsOf(turnedPicture(drawn, ways[0]));
  const sure = surenessIn(first.items);
  // The other way is looked at only when this one says little.
  const isWrong = first.items.length > 0 && sure < leastSure && (await surenessOf(reader, turnedPicture(drawn, ways[1]))) > sure;
  return isWrong ? { ...(await reader.wordsOf(turnedPicture(drawn, ways[1]))), turns: ways[1], drawn: size } : { ...first, turns: ways[0], drawn: size };
}

function turnedPicture(drawn: PagePicture, turns: Turns): PagePicture {
  const [width, height] = turns % 2 === 0 ? [drawn.width, drawn.height] : [drawn.height, drawn.width];
  return { ...drawn, width, height, picture: turned(drawn.picture, turns) };
}

/** How sure the words of a part of the page are. */
async function surenessOf(reader: WordReader, page: PagePicture): Promise<number> {
  const { width, height, pixels } = page.picture;
  const [top, bottom] = [Math.floor(height * sample.from), Math.floor(height * sample.to)];
  const { items } = await reader.wordsOf({ ...page, picture: { width, height: bottom - top, pixels: pixels.subarray(top * width, bottom * width) } });
  return surenessIn(items);
}

/** From 0 to 1, letter by letter. */
function surenessIn(items: readonly PictureWord[]): number {
  const letters = items.reduce((sum, { text }) => sum + text.length, 0);
  return items.reduce((sum, { text, sureness }) => sum + text.length * sureness, 0) / Math.max(1, letters);
}

/** Where a box of the upright page lies on the page as it is in the file. */
function asDrawn({ x, y, width, height }: Box, { turns, drawn }: TurnedPage): Box {
  if (turns === 1) return { x: y, y: drawn.height - x - width, width: height, height: width };
  if (turns === 2) return { x: drawn.width - x - width, y: drawn.height - y - height, width, height };
  if (turns === 3) return { x: drawn.width - y - height, y: x, width: height, height: width };
  return { x, y, width, height };
}

/** English first; a first page in Spanish is read again, and the rest with it, by the Spanish data. */
async function recognisedPages(bytes: Uint8Array, onPage: (page: number, pages: number) => void): Promise<TurnedPage[]> {
  const pictures = await openPagePictures(bytes);
  let reader: WordReader | undefined;
  try {
    reader = await openWordReader('eng');
    const pages: TurnedPage[] = [];
    for (let number = 1; number <= pictures.pages; number++) {
      onPage(number, pictures.pages);
      const picture = await pictures.draw(number);
      let words = await wordsUpright(reader, picture, pages.at(-1)?.turns ?? 0);
      if (number === 1 && languageOfPage(words) === 'spa') {
        await reader.close();
        reader = await openWordReader('spa');
        words = await wordsUpright(reader, picture, words.turns);
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
function markedAsOcr(reading: SheetReading, pages: readonly TurnedPage[]): SheetReading {
  const mark = <T>(field: Field<T>): Field<T> => {
    const page = pages[field.page - 1];
    return { ...field, box: page ? asDrawn(field.box, page) : field.box, confidence: Math.min(mostConfidence, field.confidence * leastSureness(page?.items ?? [], field.box)), because };
  };
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

function leastSureness(words: readonly PictureWord[], { x, y, width, height }: Box): number {
  const inside = words.filter((word) => {
    const middle = { x: word.x + word.width / 2, y: word.y + word.height / 2 };
    return middle.x >= x && middle.x <= x + width && middle.y >= y && middle.y <= y + height;
  });
  return inside.length === 0 ? 0.5 : Math.min(...inside.map(({ sureness }) => sureness));
}
