import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import path from 'node:path';
import { withRepairedCas } from './cas-repair';
import { pgmOf } from './grey-picture';
import { type PagePicture } from './page-pictures';
import { type TextItem, type TextPage } from './pdf-text';

/** Languages with data in the project's packages. */
export type OcrLanguage = 'eng' | 'spa';

/** A word recognised in a picture; `sureness` runs from 0 to 1. */
export interface PictureWord extends TextItem {
  sureness: number;
}
export type PicturePage = Omit<TextPage, 'items'> & { items: PictureWord[] };

export interface WordReader {
  wordsOf(drawn: PagePicture): Promise<PicturePage>;
  close(): Promise<void>;
}

/** Below this a number is not to be trusted, and a short word is dirt, a rule or a piece of a drawing. */
const leastSureness = 0.3;
/** Height from the foot of g to the top of A, in em: common to text faces, from memory. */
const rowOfEm = 0.93;

/** Starts the recogniser of one language. Its data lie in the installed package; nothing is fetched. */
export async function openWordReader(language: OcrLanguage): Promise<WordReader> {
  const { createWorker, OEM, PSM } = (await import('tesseract.js')).default;
  const langPath = path.join(path.dirname(createRequire(import.meta.url).resolve(`@tesseract.js-data/${language}/package.json`)), '4.0.0_best_int');
  // The recogniser would look on the network for data that are not there.
  await readFile(path.join(langPath, `${language}.traineddata.gz`));
  const worker = await createWorker(language, OEM.LSTM_ONLY, { langPath, gzip: true, cacheMethod: 'none', errorHandler: () => undefined });
  await worker.setParameters({ tessedit_pageseg_mode: PSM.AUTO });
  return {
    async wordsOf(drawn) {
      await worker.setParameters({ user_defined_dpi: String(Math.round(drawn.scale * 72)) });
      const { data } = await worker.recognize(Buffer.from(pgmOf(drawn.picture)), {}, { blocks: true, text: false });
      const lines = (data.blocks ?? []).flatMap(({ paragraphs }) => paragraphs.flatMap((paragraph) => paragraph.lines));
      return pageOf(drawn, lines);
    },
    async close() {
      await worker.terminate();
    },
  };
}

/** A line as the recogniser gives it, in pixels. */
export interface RecognisedLine {
  baseline: { x0: number; y0: number; x1: number; y1: number };
  rowAttributes: { rowHeight: number };
  words: { text: string; confidence: number; bbox: { x0: number; y0: number; x1: number; y1: number } }[];
}

/** Words in PDF points; a page that lies askew is set straight for the rows, not for the boxes. */
export function pageOf({ page, width, height, scale }: Omit<PagePicture, 'picture'>, lines: readonly RecognisedLine[]): PicturePage {
  const slope = slopeOf(lines);
  const items = lines.flatMap(({ baseline, rowAttributes, words }) => {
    const em = rowAttributes.rowHeight / rowOfEm;
    const lineSlope = (baseline.y1 - baseline.y0) / Math.max(1, baseline.x1 - baseline.x0);
    return words.flatMap(({ text, confidence, bbox }): PictureWord[] => {
      const sureness = confidence / 100;
      const word = capitalI(withoutRules(text));
      if (word === '' || (sureness < leastSureness && !/\p{L}{4}/u.test(word))) return [];
      const middle = (bbox.x0 + bbox.x1) / 2;
      const foot = baseline.y0 + lineSlope * (middle - baseline.x0);
      return [{ page, text: word, x: bbox.x0 / scale, y: (foot - em * 0.8) / scale, width: (bbox.x1 - bbox.x0) / scale, height: em / scale, baseline: (foot - slope * middle) / scale, sureness }];
    });
  });
  return { page, width, height, items: withRepairedCas(items) };
}

/** How far the page leans: the middle slope of its long lines. */
function slopeOf(lines: readonly RecognisedLine[]): number {
  const slopes = lines.filter(({ baseline, words }) => words.length >= 4 && baseline.x1 > baseline.x0).map(({ baseline }) => (baseline.y1 - baseline.y0) / (baseline.x1 - baseline.x0));
  slopes.sort((a, b) => a - b);
  return slopes[Math.floor(slopes.length / 2)] ?? 0;
}

/** No word of these languages starts with a small l before such a letter: it is a capital I. */
const capitalI = (word: string): string => word.replace(/^l(?=[bcdfghjkmnpqrstvwxz])/, 'I');

/** Rules of tables and frames come as bars and dashes beside or instead of words. */
function withoutRules(text: string): string {
  const word = text.replace(/^[|¦[\]{}_~]+(?=.)|(?<=.)[|¦[\]{}_~]+$/g, '');
  return /[\p{L}\p{N}%<>≤≥=+]|^[-–—:.,&/*•]$/u.test(word) ? word : '';
}
