import { type PDFDocumentProxy } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { linesOf } from './page-lines';

export type Pdf = PDFDocumentProxy;

/** A worker that says nothing for this long has been lost on the way: seen now and then on a very busy machine. */
const silenceMs = 12_000;

type Library = typeof import('pdfjs-dist/legacy/build/pdf.mjs');

/**
 * Opens a PDF in the browser: the library and its worker are fetched only now, and neither compiles code at run time
 * (the page's content policy forbids it), so no eval and no WebAssembly. Tries a second time, with a new worker, when the
 * first falls silent or cannot be reached. Rejects when it is no PDF, needs a password or is out of reach.
 */
export async function openPdf(source: string | ArrayBuffer): Promise<{ readonly pdf: Pdf; readonly close: () => void }> {
  const library = await import('pdfjs-dist/legacy/build/pdf.mjs');
  library.GlobalWorkerOptions.workerSrc = new URL('pdf.worker.min.mjs', document.baseURI).href;
  try {
    return await openOnce(library, source);
  } catch (error) {
    // These say something about the file: trying again would say it again.
    if (error instanceof Error && /^(?:PasswordException|InvalidPDFException)$/.test(error.name)) throw error;
    return openOnce(library, source);
  }
}

async function openOnce(library: Library, source: string | ArrayBuffer): Promise<{ readonly pdf: Pdf; readonly close: () => void }> {
  const task = library.getDocument({
    // The worker takes the bytes away from whoever holds them: give it a copy.
    ...(typeof source === 'string' ? { url: source } : { data: new Uint8Array(source.slice(0)) }),
    isEvalSupported: false,
    useWasm: false,
    enableXfa: false,
    standardFontDataUrl: new URL('pdf-fonts/', document.baseURI).href,
  });
  let timer: ReturnType<typeof setTimeout> | undefined;
  const silence = new Promise<never>((_, reject) => {
    const listen = (): void => {
      clearTimeout(timer);
      timer = setTimeout(() => reject(new Error('The page reader did not answer.')), silenceMs);
    };
    // A large file over a slow line is not silence.
    task.onProgress = listen;
    listen();
  });
  try {
    return { pdf: await Promise.race([task.promise, silence]), close: () => void task.destroy() };
  } catch (error) {
    void task.destroy();
    throw error;
  } finally {
    clearTimeout(timer);
  }
}

/** The text of a page as lines, for those who do not see the picture. */
export async function pageText(pdf: Pdf, pageNumber: number): Promise<readonly string[]> {
  const page = await pdf.getPage(pageNumber);
  const content = await page.getTextContent();
  return linesOf(content.items.flatMap((item) => ('str' in item ? [{ text: item.str, x: Number(item.transform[4]), y: Number(item.transform[5]), height: item.height }] : [])));
}
