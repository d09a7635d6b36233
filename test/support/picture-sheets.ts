import { createCanvas } from '@napi-rs/canvas';
import { turned, type Turns } from '#server/sds/reader/grey-picture';
import { openPagePictures } from '#server/sds/reader/page-pictures';
import { pdfOf } from './odd-pdfs';

/** The first pages of a PDF as pictures in another, without a letter of text, and a blank one: what a scanner makes of a printed sheet, laid in upright or turned. */
export async function pictureSheet(bytes: Uint8Array, pages: number, turns: Turns = 0): Promise<Uint8Array> {
  const pictures = await openPagePictures(bytes);
  const scans: Buffer[] = [];
  for (let number = 1; number <= Math.min(pages, pictures.pages); number++) scans.push(pngOf(turned((await pictures.draw(number)).picture, turns)));
  await pictures.close();
  return pdfOf((doc) => {
    const [width, height] = turns % 2 === 0 ? [612, 792] : [792, 612];
    for (const scan of scans) doc.addPage({ size: [width, height], margin: 0 }).image(scan, 0, 0, { width, height });
    doc.addPage({ size: 'LETTER', margin: 0 });
  }, { autoFirstPage: false });
}

/** A page of strokes, dots and rings that say nothing. */
export const scribbledSheet = (): Promise<Uint8Array> =>
  pdfOf((doc) => {
    let seed = 7;
    const next = (below: number): number => (seed = (seed * 48271) % 2147483647) % below;
    const canvas = createCanvas(1275, 1650);
    const pen = canvas.getContext('2d');
    pen.fillStyle = 'white';
    pen.fillRect(0, 0, canvas.width, canvas.height);
    for (let at = 0; at < 60; at++) {
      pen.beginPath();
      if (at % 2 === 0) pen.arc(next(1275), next(1650), 4 + next(20), 0, next(7));
      else pen.moveTo(next(1275), next(1650));
      pen.lineTo(next(1275), next(1650) % 300);
      pen.stroke();
      pen.fillStyle = 'black';
      pen.fillRect(next(1275), next(1650), next(12), next(12));
    }
    doc.image(canvas.toBuffer('image/png'), 0, 0, { width: 612, height: 792 });
  });

function pngOf({ width, height, pixels }: { width: number; height: number; pixels: Uint8Array }): Buffer {
  const canvas = createCanvas(width, height);
  const pen = canvas.getContext('2d');
  const image = pen.createImageData(width, height);
  new Uint32Array(image.data.buffer).set(Uint32Array.from(pixels, (grey) => (0xff000000 | (grey << 16) | (grey << 8) | grey) >>> 0));
  pen.putImageData(image, 0, 0);
  return canvas.toBuffer('image/png');
}
