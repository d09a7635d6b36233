import { createRequire } from 'node:module';
import path from 'node:path';
import { type ReadingState } from './reading';

/** A run of text as the PDF draws it. Points, top left origin; `y` is the top of the letters, `baseline` their foot. */
export interface TextItem {
  page: number;
  text: string;
  x: number;
  y: number;
  width: number;
  height: number;
  baseline: number;
}

export interface TextPage {
  page: number;
  width: number;
  height: number;
  items: TextItem[];
}

export type PdfText = { state: 'read'; pages: TextPage[] } | { state: Exclude<ReadingState, 'read'>; pages: number };

export interface PdfTextLimits {
  maxBytes: number;
  maxPages: number;
}

type Pdfjs = typeof import('pdfjs-dist/legacy/build/pdf.mjs');
let pdfjs: Promise<Pdfjs> | undefined;

/** Folders of the installed package: character maps and metrics some sheets need. */
function assetFolders(): { cMapUrl: string; standardFontDataUrl: string } {
  const root = path.dirname(createRequire(import.meta.url).resolve('pdfjs-dist/package.json'));
  return { cMapUrl: `${root}/cmaps/`, standardFontDataUrl: `${root}/standard_fonts/` };
}

/**
 * Takes the text runs of every page with their places.
 *
 * pdfjs accepts junk before the header, so the header is checked here, at offset 0. Never throws for a bad file.
 */
export async function pdfText(bytes: Uint8Array, limits: PdfTextLimits): Promise<PdfText> {
  if (!startsAsPdf(bytes)) return { state: 'not-a-pdf', pages: 0 };
  if (bytes.length > limits.maxBytes) return { state: 'too-large', pages: 0 };
  pdfjs ??= import('pdfjs-dist/legacy/build/pdf.mjs');
  const { getDocument, VerbosityLevel } = await pdfjs;
  // pdfjs takes the buffer over, so it gets its own copy.
  const task = getDocument({
    data: new Uint8Array(bytes),
    cMapUrl: assetFolders().cMapUrl,
    disableFontFace: true,
    isEvalSupported: false,
    useSystemFonts: false,
    verbosity: VerbosityLevel.ERRORS,
  });
  try {
    const document = await task.promise;
    if (document.numPages > limits.maxPages) return { state: 'too-large', pages: document.numPages };
    const pages: TextPage[] = [];
    for (let number = 1; number <= document.numPages; number++) pages.push(await textPage(document, number));
    return { state: 'read', pages };
  } catch (error) {
    return { state: error instanceof Error && error.name === 'PasswordException' ? 'encrypted' : 'damaged', pages: 0 };
  } finally {
    await task.destroy();
  }
}

function startsAsPdf(bytes: Uint8Array): boolean {
  return bytes.length > 5 && bytes[0] === 0x25 && bytes[1] === 0x50 && bytes[2] === 0x44 && bytes[3] === 0x46 && bytes[4] === 0x2d;
}

type PdfDocument = Awaited<ReturnType<Pdfjs['getDocument']>['promise']>;

async function textPage(document: PdfDocument, number: number): Promise<TextPage> {
  const page = await document.getPage(number);
  const viewport = page.getViewport({ scale: 1 });
  const [a = 1, b = 0, c = 0, d = -1, e = 0, f = 0] = viewport.transform;
  const content = await page.getTextContent();
  const items: TextItem[] = [];
  for (const item of content.items) {
    if (!('str' in item) || item.str.trim() === '') continue;
    const [p = 1, q = 0, r = 0, s = 1, t = 0, u = 0] = item.transform as number[];
    // Direction of writing and of the letters' height, in page space.
    const along = { x: a * p + c * q, y: b * p + d * q };
    const up = { x: a * r + c * s, y: b * r + d * s };
    // Text that does not run left to right (watermarks, edge stamps) is not part of the reading.
    if (along.x <= 0 || Math.abs(along.y) > Math.abs(along.x) * 0.1) continue;
    const size = Math.hypot(up.x, up.y) || item.height || 1;
    const x = a * t + c * u + e;
    const baseline = b * t + d * u + f;
    items.push({ page: number, text: item.str, x, y: baseline - size * 0.8, width: item.width, height: size, baseline });
  }
  page.cleanup();
  return { page: number, width: viewport.width, height: viewport.height, items };
}
