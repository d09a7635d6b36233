import { type PDFDocumentProxy } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { linesOf } from './page-lines';

export type Pdf = PDFDocumentProxy;

/**
 * Opens a PDF in the browser: the library and its worker are fetched only now, and neither compiles code at run time
 * (the page's content policy forbids it), so no eval and no WebAssembly. Rejects when it is no PDF, needs a password or is out of reach.
 */
export async function openPdf(source: string | ArrayBuffer): Promise<{ readonly pdf: Pdf; readonly close: () => void }> {
  const library = await import('pdfjs-dist/legacy/build/pdf.mjs');
  library.GlobalWorkerOptions.workerSrc = new URL('pdf.worker.min.mjs', document.baseURI).href;
  const task = library.getDocument({
    // The worker takes the bytes away from whoever holds them: give it a copy.
    ...(typeof source === 'string' ? { url: source } : { data: new Uint8Array(source.slice(0)) }),
    isEvalSupported: false,
    useWasm: false,
    enableXfa: false,
    standardFontDataUrl: new URL('pdf-fonts/', document.baseURI).href,
  });
  return { pdf: await task.promise, close: () => void task.destroy() };
}

/** The text of a page as lines, for those who do not see the picture. */
export async function pageText(pdf: Pdf, pageNumber: number): Promise<readonly string[]> {
  const page = await pdf.getPage(pageNumber);
  const content = await page.getTextContent();
  return linesOf(content.items.flatMap((item) => ('str' in item ? [{ text: item.str, x: Number(item.transform[4]), y: Number(item.transform[5]), height: item.height }] : [])));
}
