import { pageLines } from './lines';
import { pdfText, type PdfTextLimits } from './pdf-text';
import { emptyReading, type SheetReading } from './reading';

export type ReadSheetOptions = Partial<PdfTextLimits>;

const defaultLimits: PdfTextLimits = { maxBytes: 25 * 1024 * 1024, maxPages: 1000 };

/**
 * Reads one safety data sheet. Knows no database, no network, no clock; never throws for a bad file and never
 * invents a value: what is not on the sheet is null.
 */
export async function readSheet(bytes: Uint8Array, options: ReadSheetOptions = {}): Promise<SheetReading> {
  const pdf = await pdfText(bytes, { ...defaultLimits, ...options });
  if (pdf.state !== 'read') return emptyReading(pdf.state, pdf.pages);
  const letters = pdf.pages.reduce((sum, page) => sum + page.items.reduce((count, item) => count + item.text.length, 0), 0);
  if (letters < 20) return emptyReading('no-text-layer', pdf.pages.length);
  const pages = pdf.pages.map(pageLines);
  return {
    ...emptyReading('read', pdf.pages.length),
    hasTextLayer: true,
    text: pages.map((lines) => lines.map((line) => line.text).join('\n')).join('\f'),
  };
}
