/** A picture of one grey byte a pixel, row by row from the top; 0 is black, 255 white. */
export interface GreyPicture {
  width: number;
  height: number;
  pixels: Uint8Array;
}

/** Red, green, blue, opacity to grey, in the weights of ITU-R BT.601. */
export function greyOf(rgba: Uint8ClampedArray, width: number, height: number): GreyPicture {
  const pixels = new Uint8Array(width * height);
  for (let from = 0, to = 0; to < pixels.length; from += 4, to++) {
    pixels[to] = ((rgba[from] ?? 0) * 77 + (rgba[from + 1] ?? 0) * 150 + (rgba[from + 2] ?? 0) * 29) >> 8;
  }
  return { width, height, pixels };
}

/** The picture as a binary PGM file. */
export function pgmOf({ width, height, pixels }: GreyPicture): Uint8Array {
  const header = new TextEncoder().encode(`P5\n${width} ${height}\n255\n`);
  const file = new Uint8Array(header.length + pixels.length);
  file.set(header);
  file.set(pixels, header.length);
  return file;
}

const dark = 128;

/** Quarter turns clockwise. */
export type Turns = 0 | 1 | 2 | 3;

/** The picture turned clockwise. */
export function turned({ width, height, pixels }: GreyPicture, turns: Turns): GreyPicture {
  if (turns === 0) return { width, height, pixels };
  const [newWidth, newHeight] = turns === 2 ? [width, height] : [height, width];
  const result = new Uint8Array(pixels.length);
  for (let y = 0, from = 0; y < height; y++) {
    for (let x = 0; x < width; x++, from++) {
      const [toX, toY] = turns === 1 ? [height - 1 - y, x] : turns === 2 ? [width - 1 - x, height - 1 - y] : [y, width - 1 - x];
      result[toY * newWidth + toX] = pixels[from] ?? 255;
    }
  }
  return { width: newWidth, height: newHeight, pixels: result };
}

/** How much more the ink must change from column to column than from row to row. */
const sidewaysShare = 1.5;

/** Whether lines of print run up or down the page: then the ink comes and goes from column to column, not from row to row. */
export function liesSideways({ width, height, pixels }: GreyPicture): boolean {
  const rows = new Float64Array(height);
  const columns = new Float64Array(width);
  for (let y = 0, at = 0; y < height; y++) {
    for (let x = 0; x < width; x++, at++) {
      if ((pixels[at] ?? 255) >= dark) continue;
      rows[y] = (rows[y] ?? 0) + 1 / width;
      columns[x] = (columns[x] ?? 0) + 1 / height;
    }
  }
  return changesOf(columns) > changesOf(rows) * sidewaysShare;
}

const changesOf = (shares: Float64Array): number => shares.reduce((sum, share, at) => sum + (at === 0 ? 0 : (share - (shares[at - 1] ?? 0)) ** 2), 0);

const tile = 16;
/** Changes between dark and light per pixel over five tiles; printed lines stay under a sixth, dots of a screen lie above. */
const screenChanges = 0.2;
/** Mean grey over 5 by 5 pixels under which a spot in a screen is ink and not dots. */
const ink = 90;
/** Tiles between two stretches of one screen: a heading in bold letters. */
const longestHeading = 24;

/**
 * Takes out the dots a fax or scanner makes of a grey ground, as under the headings of many sheets: there every spot
 * becomes black or white by the mean around it. Elsewhere the picture stays as it is.
 */
export function withoutScreens(picture: GreyPicture): GreyPicture {
  const { width, height, pixels } = picture;
  const columns = Math.ceil(width / tile);
  const rows = Math.ceil(height / tile);
  const isScreen = Array.from({ length: rows }, (_, row) => screenOf(picture, row, columns));
  const cleaned = pixels.slice();
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      // Half a tile at the upper and lower edge of a screen holds dots as well.
      if (![row - 1, row, row + 1].some((near) => isScreen[near]?.[column])) continue;
      for (let y = row * tile; y < Math.min(height, (row + 1) * tile); y++) {
        for (let x = column * tile; x < Math.min(width, (column + 1) * tile); x++) cleaned[y * width + x] = meanAround(picture, x, y) < ink ? 0 : 255;
      }
    }
  }
  return { width, height, pixels: cleaned };
}

/** Which tiles of one row lie in a screen, the letters printed on it included. */
function screenOf(picture: GreyPicture, row: number, columns: number): boolean[] {
  const changes = Array.from({ length: columns }, (_, column) => changesIn(picture, column * tile, row * tile) / (tile * tile));
  const isScreen = new Array<boolean>(columns).fill(false);
  let last = -Infinity;
  for (let column = 2; column < columns - 2; column++) {
    const mean = changes.slice(column - 2, column + 3).reduce((sum, each) => sum + each, 0) / 5;
    if (mean < screenChanges) continue;
    isScreen.fill(true, column - last <= longestHeading ? last : column - 2, column + 3);
    last = column;
  }
  return isScreen;
}

/** How often dark and light change along the rows of one tile. */
function changesIn({ width, height, pixels }: GreyPicture, left: number, top: number): number {
  let changes = 0;
  for (let y = top; y < Math.min(height, top + tile); y++) {
    let before = (pixels[y * width + left] ?? 255) < dark;
    for (let x = left + 1; x < Math.min(width, left + tile); x++) {
      const now = (pixels[y * width + x] ?? 255) < dark;
      if (now !== before) changes++;
      before = now;
    }
  }
  return changes;
}

function meanAround({ width, height, pixels }: GreyPicture, x: number, y: number): number {
  let sum = 0;
  let count = 0;
  for (let row = Math.max(0, y - 2); row <= Math.min(height - 1, y + 2); row++) {
    for (let column = Math.max(0, x - 2); column <= Math.min(width - 1, x + 2); column++) {
      sum += pixels[row * width + column] ?? 255;
      count++;
    }
  }
  return sum / count;
}
