import { describe, expect, it } from '@jest/globals';
import { greyOf, liesSideways, pgmOf, turned, withoutScreens, type GreyPicture } from './grey-picture';

const blank = (width: number, height: number): GreyPicture => ({ width, height, pixels: new Uint8Array(width * height).fill(255) });
function fill(picture: GreyPicture, left: number, top: number, width: number, height: number): void {
  for (let y = top; y < top + height; y++) picture.pixels.fill(0, y * picture.width + left, y * picture.width + left + width);
}
/** Every other pixel, the rows shifted: a grey ground as a fax prints it. */
function screen(picture: GreyPicture, left: number, top: number, width: number, height: number): void {
  for (let y = top; y < top + height; y++) for (let x = left + (y % 2); x < left + width; x += 2) picture.pixels[y * picture.width + x] = 0;
}
const blacks = ({ pixels }: GreyPicture): number => pixels.filter((grey) => grey === 0).length;

describe('a grey ground made of dots', () => {
  it('goes, and the strokes on it stay', () => {
    const picture = blank(640, 160);
    screen(picture, 32, 48, 560, 48);
    fill(picture, 300, 56, 12, 32);
    const cleaned = withoutScreens(picture);
    expect(cleaned.pixels[72 * 640 + 306]).toBe(0);
    expect(cleaned.pixels[72 * 640 + 100]).toBe(255);
    expect(Math.abs(blacks(cleaned) - 12 * 32)).toBeLessThan(12 * 32 * 0.4);
  });

  it('is not seen in print: strokes three pixels wide, seven apart, stay as they are', () => {
    const picture = blank(640, 160);
    for (let x = 40; x < 600; x += 10) fill(picture, x, 60, 3, 30);
    expect(withoutScreens(picture)).toEqual(picture);
  });
});

it('grey follows the eye: green is lighter than red, red than blue (ITU-R BT.601)', () => {
  const { pixels } = greyOf(new Uint8ClampedArray([255, 255, 255, 255, 0, 255, 0, 255, 255, 0, 0, 255, 0, 0, 255, 255, 0, 0, 0, 255]), 5, 1);
  expect([...pixels]).toEqual([255, 149, 76, 28, 0]);
});

it('a PGM file carries its size before its bytes', () => {
  expect(Buffer.from(pgmOf({ width: 2, height: 1, pixels: new Uint8Array([65, 66]) })).toString('latin1')).toBe('P5\n2 1\n255\nAB');
});

describe('a page laid in sideways', () => {
  const written = (): GreyPicture => {
    const page = blank(200, 300);
    for (let line = 20; line < 280; line += 20) for (let word = 20; word < 160; word += 35) fill(page, word + (line % 7), line, 25, 8);
    return page;
  };

  it('is known by its ink, whichever way it was turned', () => {
    expect([0, 1, 2, 3].map((turns) => liesSideways(turned(written(), turns as 0)))).toEqual([false, true, false, true]);
    expect(liesSideways(blank(200, 300))).toBe(false);
  });

  it('turns clockwise, and back after four quarters', () => {
    const corner: GreyPicture = { width: 3, height: 2, pixels: Uint8Array.from([1, 2, 3, 4, 5, 6]) };
    expect(turned(corner, 1)).toEqual({ width: 2, height: 3, pixels: Uint8Array.from([4, 1, 5, 2, 6, 3]) });
    expect(turned(turned(corner, 1), 3)).toEqual(corner);
    expect(turned(turned(corner, 2), 2)).toEqual(corner);
  });
});
