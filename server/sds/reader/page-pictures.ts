import { createRequire } from 'node:module';
import path from 'node:path';
import { greyOf, withoutScreens, type GreyPicture } from './grey-picture';

/** One page drawn in grey; `scale` is its pixels per PDF point. */
export interface PagePicture {
  page: number;
  /** Size of the page, PDF points. */
  width: number;
  height: number;
  scale: number;
  picture: GreyPicture;
}

export interface PagePictures {
  pages: number;
  /** Draws page `number`, from 1. Rejects when its content cannot be drawn. */
  draw(number: number): Promise<PagePicture>;
  close(): Promise<void>;
}

const pointsPerInch = 72;
const dotsPerInch = 300;
/** A letter page at 300 dpi has 8.4 million pixels; a poster is drawn coarser. */
const mostPixelsOfPage = 12_000_000;
/** Pictures larger than this are not unpacked: A4 at 600 dpi has 35 million pixels. */
const mostPixelsOfImage = 60_000_000;

/** Opens a PDF for drawing its pages one by one. Throws for a file that cannot be opened. */
export async function openPagePictures(bytes: Uint8Array): Promise<PagePictures> {
  const { getDocument, VerbosityLevel } = await import('pdfjs-dist/legacy/build/pdf.mjs');
  const { createCanvas } = await import('@napi-rs/canvas');
  const root = path.dirname(createRequire(import.meta.url).resolve('pdfjs-dist/package.json'));
  const task = getDocument({
    data: new Uint8Array(bytes),
    cMapUrl: `${root}/cmaps/`,
    standardFontDataUrl: `${root}/standard_fonts/`,
    wasmUrl: `${root}/wasm/`,
    disableFontFace: true,
    isEvalSupported: false,
    useSystemFonts: false,
    maxImageSize: mostPixelsOfImage,
    verbosity: VerbosityLevel.ERRORS,
  });
  const document = await task.promise.catch(async (error: unknown) => {
    await task.destroy();
    throw error;
  });
  return {
    pages: document.numPages,
    async draw(number) {
      const page = await document.getPage(number);
      const { width, height } = page.getViewport({ scale: 1 });
      const scale = Math.min(dotsPerInch / pointsPerInch, Math.sqrt(mostPixelsOfPage / (width * height)));
      const viewport = page.getViewport({ scale });
      const canvas = createCanvas(Math.max(1, Math.floor(viewport.width)), Math.max(1, Math.floor(viewport.height)));
      // pdfjs is written against the browser's canvas; this one answers to the same calls.
      await page.render({ canvas: canvas as unknown as HTMLCanvasElement, viewport, background: 'white' }).promise;
      page.cleanup();
      const { data } = canvas.getContext('2d').getImageData(0, 0, canvas.width, canvas.height);
      return { page: number, width, height, scale, picture: withoutScreens(greyOf(data, canvas.width, canvas.height)) };
    },
    close: () => task.destroy(),
  };
}
