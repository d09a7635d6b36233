import { afterAll, afterEach, beforeAll, describe, expect, it } from '@jest/globals';
import { mkdtemp, rm } from 'node:fs/promises';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { buildDemoSheet, quarrybondPartA } from '#test/support/demo-sheets';
import { pdfOf } from '#test/support/odd-pdfs';
import { pictureSheet, scribbledSheet } from '#test/support/picture-sheets';
import { createGuardedReader, type GuardedReader } from './guarded-reader';
import { readSheetOrPictures } from './ocr';
import { readSheet } from './read-sheet';
import { sheetLine } from './sheet-line';

const megabyte = 1024 * 1024;
// Inside the project, so that the bundle finds the packages it leaves outside.
let folder = '';
let entry = '';
let scan: Uint8Array;
beforeAll(async () => {
  folder = await mkdtemp(fileURLToPath(new URL('../../../node_modules/.kneeboard-', import.meta.url)));
  entry = path.join(folder, 'sheet-reader.mjs');
  await build({ entryPoints: [fileURLToPath(new URL('./child.ts', import.meta.url))], outfile: entry, bundle: true, platform: 'node', format: 'esm', packages: 'external', target: 'node20' });
  scan = await pictureSheet(await buildDemoSheet(quarrybondPartA), 1);
}, 60_000);
afterAll(async () => rm(folder, { recursive: true, force: true }));

const open: GuardedReader[] = [];
const reader = (wallClockMs: number, maxRssBytes = 1500 * megabyte): GuardedReader => {
  const made = createGuardedReader({ wallClockMs, maxRssBytes, entry, withPictures: true });
  open.push(made);
  return made;
};
afterEach(async () => {
  await Promise.all(open.splice(0).map((each) => each.close()));
});

describe('a sheet that is pictures', () => {
  it('is read in the guarded child, built as it is delivered: values right, each marked for a look, pages counted', async () => {
    expect(await readSheet(scan)).toMatchObject({ state: 'no-text-layer', pages: 2 });
    const heard: [number, number][] = [];
    const reading = await reader(280_000).read(scan, (page, pages) => heard.push([page, pages]));
    expect(heard).toEqual([[1, 2], [2, 2]]);
    const { productName, supplier, revisedOn, signalWord, hazards, ingredients } = quarrybondPartA;
    expect(sheetLine('', reading)).toMatchObject({
      state: 'read-by-ocr',
      has_text_layer: false,
      product_name: productName,
      supplier: supplier.name,
      revision_date: revisedOn,
      signal_word: signalWord.toUpperCase(),
      h_codes: [...hazards].sort(),
      cas_numbers: ingredients.map(({ cas }) => cas),
    });
    const fields = [reading.productName, reading.supplier, reading.revisionDate, reading.signalWord, ...reading.hazardCodes, ...reading.ingredients];
    // 0.8 is where the office stops asking for a look.
    for (const field of fields) expect({ isUnder: (field?.confidence ?? 1) < 0.8, because: field?.because }).toEqual({ isUnder: true, because: 'Read by OCR from a picture of the page.' });
    const text = await readSheet(await buildDemoSheet(quarrybondPartA));
    expect(Math.abs((reading.productName?.box.x ?? 0) - (text.productName?.box.x ?? 0))).toBeLessThan(4);
    expect(Math.abs((reading.productName?.box.y ?? 0) - (text.productName?.box.y ?? 0))).toBeLessThan(4);
  }, 300_000);

  it('is read when it was laid in sideways, and shown where it stands on the page', async () => {
    const bytes = await buildDemoSheet(quarrybondPartA);
    const [reading, text] = [await readSheetOrPictures(await pictureSheet(bytes, 1, 1)), await readSheet(bytes)];
    expect(sheetLine('', reading)).toMatchObject({ state: 'read-by-ocr', product_name: quarrybondPartA.productName, h_codes: [...quarrybondPartA.hazards].sort() });
    const [turnedBox, upright] = [reading.productName?.box, text.productName?.box];
    // A quarter turn clockwise: what was the distance from the top is now the distance from the right edge, 792 points away.
    expect(Math.abs((turnedBox?.y ?? 0) - (upright?.x ?? 0))).toBeLessThan(4);
    expect(Math.abs(792 - (turnedBox?.x ?? 0) - (turnedBox?.width ?? 0) - (upright?.y ?? 0))).toBeLessThan(4);
  }, 300_000);

  it('is stopped when it takes too long or too much memory', async () => {
    expect((await reader(300).read(scan)).state).toBe('too-slow');
    expect((await reader(280_000, 150 * megabyte).read(scan)).state).toBe('too-much-memory');
  }, 300_000);

  it('has no values when the picture says nothing', async () => {
    expect(await readSheetOrPictures(await scribbledSheet())).toMatchObject({ state: 'no-text-layer', pages: 1, hasTextLayer: false, language: null, productName: null, supplier: null, revisionDate: null, signalWord: null, hazardCodes: [], ingredients: [], text: '' });
  }, 300_000);

  it('is left to a person when it is longer than any sheet, before a page is drawn', async () => {
    const long = await pdfOf((doc) => {
      for (let page = 1; page < 41; page++) doc.addPage();
    });
    const heard: number[] = [];
    expect(await readSheetOrPictures(long, { onPage: (page) => heard.push(page) })).toMatchObject({ state: 'too-large', pages: 41 });
    expect(heard).toEqual([]);
  });
});

it('a sheet with text is read as ever, without a picture', async () => {
  const bytes = await buildDemoSheet(quarrybondPartA);
  expect(await readSheetOrPictures(bytes, { onPage: () => expect('a page').toBe('not drawn') })).toEqual(await readSheet(bytes));
});
