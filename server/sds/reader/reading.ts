/**
 * What the reader answers about one safety data sheet. Plain data: it crosses a process border as JSON.
 * Boxes are PDF points (1/72 inch) from the top left corner of the page; pages count from 1.
 */

/** Why there is, or is not, anything to show. Only `read` and `read-by-ocr` (from pictures of the pages) carry values. */
export type ReadingState =
  | 'read'
  | 'read-by-ocr'
  | 'no-text-layer'
  | 'encrypted'
  | 'damaged'
  | 'not-a-pdf'
  | 'too-large'
  | 'too-slow'
  | 'too-much-memory';

/** PDF points, top left origin. */
export interface Box {
  x: number;
  y: number;
  width: number;
  height: number;
}

/** One value with its evidence. `quote` is the text as it stands on the page; `confidence` runs from 0 to 1. */
export interface Field<T> {
  value: T;
  page: number;
  box: Box;
  quote: string;
  confidence: number;
  /** Plain words for a person, when the choice was not obvious. */
  because?: string;
}

/** A line of section 3. `concentration` is as printed ("≥10 - ≤20", "30-60%"), percent unless it says otherwise. */
export interface Ingredient {
  name: string | null;
  cas: string;
  concentration: string | null;
}

/** A line of section 8. `text` is as printed; `value` and `unit` are null when the limit is only words. */
export interface ExposureLimit {
  substance: string | null;
  /** "OSHA PEL", "ACGIH TLV", "NIOSH REL", "TWA", "STEL", … as far as the sheet says. */
  kind: string | null;
  value: number | null;
  unit: string | null;
  text: string;
}

export type PpeTopic = 'eyes' | 'hands' | 'skin' | 'respiratory' | 'hearing';

export interface PpeWords {
  topic: PpeTopic;
  text: string;
}

export interface SectionHeading {
  /** 1 to 16. */
  number: number;
  heading: string;
  page: number;
}

/** Whether a reading carries values. */
export const carriesValues = (state: ReadingState): boolean => state === 'read' || state === 'read-by-ocr';

/**
 * What a person must know about the whole file: more than one sheet in it (only the first was read), a language whose
 * words the reader does not know, a date of revision that names no day.
 */
export type NoticeKind = 'several-sheets' | 'language-not-read' | 'date-without-day';

export interface Notice {
  kind: NoticeKind;
  page: number;
  /** What shows it, as printed: the title of the next sheet, the language, the date. */
  quote: string;
}

export type SignalWord = 'danger' | 'warning' | 'none';

export interface SheetReading {
  state: ReadingState;
  pages: number;
  hasTextLayer: boolean;
  /** ISO 639-1, "en". */
  language: Field<string> | null;
  productName: Field<string> | null;
  supplier: Field<string> | null;
  /** ISO date, "2024-11-22". */
  revisionDate: Field<string> | null;
  /** Null when section 2 was not found; `none` when it was and prints no signal word. */
  signalWord: Field<SignalWord> | null;
  /** The product's own codes, section 2 only: "H314", "H360FD", "H301+H311". */
  hazardCodes: Field<string>[];
  precautionaryCodes: Field<string>[];
  ingredients: Field<Ingredient>[];
  limits: Field<ExposureLimit>[];
  ppeWords: Field<PpeWords>[];
  /** One entry per section found, in order of number. */
  sections: SectionHeading[];
  notices: Notice[];
  /** The whole text in reading order, pages separated by form feeds. */
  text: string;
}

/** A reading without values, for files that could not be read. */
export function emptyReading(state: ReadingState, pages = 0): SheetReading {
  return {
    state,
    pages,
    hasTextLayer: false,
    language: null,
    productName: null,
    supplier: null,
    revisionDate: null,
    signalWord: null,
    hazardCodes: [],
    precautionaryCodes: [],
    ingredients: [],
    limits: [],
    ppeWords: [],
    sections: [],
    notices: [],
    text: '',
  };
}
