import { describe, expect, it } from '@jest/globals';
import { buildDemoSheet, demoSheets, quarrybondPartB, quarrybondPartC, type DemoLayout } from '#test/support/demo-sheets';
import { decompressionBomb, pdfOf } from '#test/support/odd-pdfs';
import { readSheet } from './read-sheet';
import { sheetLine } from './sheet-line';

const layouts: readonly DemoLayout[] = ['plain', 'tables', 'running'];
const sorted = (values: readonly string[]): string[] => [...values].sort();

describe('every sheet of the demonstration, in every layout', () => {
  it.each(demoSheets.flatMap((spec) => layouts.map((layout) => [spec.fileName, layout, spec] as const)))('%s as %s reads back as it was written', async (_, layout, spec) => {
    const reading = await readSheet(await buildDemoSheet(spec, layout));
    expect(sheetLine(spec.fileName, reading)).toMatchObject({
      state: 'read',
      has_text_layer: true,
      language: spec.language,
      product_name: spec.productName,
      supplier: spec.supplier.name,
      revision_date: spec.revisedOn,
      signal_word: spec.signalWord.toUpperCase(),
      section_count: 16,
      components: spec.ingredients.map(({ cas, concentration }) => ({ cas, concentration })),
    });
    expect(reading.hazardCodes.map(({ value }) => value)).toEqual(sorted(spec.hazards));
    expect(reading.precautionaryCodes.map(({ value }) => value)).toEqual(sorted(spec.precautions));
    expect(reading.ingredients.map(({ value }) => value.name)).toEqual(spec.ingredients.map(({ name }) => name));
    expect(reading.limits.map(({ value }) => `${value.substance} ${value.kind} ${value.value}`)).toEqual(spec.limits.map(({ substance, kind, amount }) => `${substance} ${kind} ${parseFloat(amount)}`));
    expect(new Set(reading.ppeWords.map(({ value }) => value.topic))).toEqual(new Set(Object.keys(spec.ppe)));
    expect(reading.text).toMatch(/invented for demonstration/i);
  });

  it('is the same bytes each time', async () => {
    expect(await buildDemoSheet(quarrybondPartB)).toEqual(await buildDemoSheet(quarrybondPartB));
  });
});

describe('evidence', () => {
  it('gives page, place and words of each value', async () => {
    const reading = await readSheet(await buildDemoSheet(quarrybondPartC, 'plain'));
    const fields = [reading.productName, reading.supplier, reading.revisionDate, reading.signalWord, ...reading.hazardCodes, ...reading.precautionaryCodes, ...reading.ingredients, ...reading.limits, ...reading.ppeWords];
    for (const field of fields) {
      expect(field).not.toBeNull();
      if (!field) continue;
      expect(field.page).toBeGreaterThanOrEqual(1);
      expect(field.page).toBeLessThanOrEqual(reading.pages);
      expect(field.box.x).toBeGreaterThanOrEqual(0);
      expect(field.box.x + field.box.width).toBeLessThanOrEqual(612);
      expect(field.box.y + field.box.height).toBeLessThanOrEqual(792);
      expect(field.confidence).toBeGreaterThan(0);
      expect(field.confidence).toBeLessThanOrEqual(1);
      expect(reading.text.replace(/\s+/g, ' ')).toContain(field.quote.split('\n')[0]?.replace(/\s+/g, ' ').trim());
    }
  });

  it('places the name where it was drawn', async () => {
    const bytes = await pdfOf((doc) => {
      doc.fontSize(10).text('SECTION 1: Identification', 72, 100);
      doc.text('Product name', 72, 130).text('Quarrybond 40', 200, 130);
      doc.text('SECTION 2: Hazards identification', 72, 160).text('A sentence that makes the page long enough to be read as text.', 72, 180);
    });
    const { productName } = await readSheet(bytes);
    expect(productName).toMatchObject({ value: 'Quarrybond 40', page: 1, quote: 'Quarrybond 40' });
    expect(productName?.box.x).toBeCloseTo(200, 0);
    // pdfkit draws from the top of the line; letters stand within it.
    expect(productName?.box.y).toBeGreaterThan(125);
    expect(productName?.box.y).toBeLessThan(136);
  });
});

describe('layouts drawn against the reading order', () => {
  it('reads a sheet whose right column is drawn first and whose heading is printed twice for bold', async () => {
    const bytes = await pdfOf((doc) => {
      doc.fontSize(10);
      doc.text('Danger', 300, 200, { lineBreak: false });
      doc.text('Quarrybond 40', 300, 120, { lineBreak: false });
      doc.text('H315 Causes skin irritation.', 300, 220, { lineBreak: false });
      for (const shift of [0, 0.3, 0.6]) doc.text('SECTION 2: Hazards identification', 72 + shift, 180, { lineBreak: false });
      doc.text('Hazard statements', 72, 220, { lineBreak: false }).text('Signal word', 72, 200, { lineBreak: false }).text('Product name', 72, 120, { lineBreak: false });
      doc.text('SECTION 1: Identification', 72, 100, { lineBreak: false });
    });
    const reading = await readSheet(bytes);
    expect(reading.productName?.value).toBe('Quarrybond 40');
    expect(reading.signalWord?.value).toBe('danger');
    expect(reading.hazardCodes.map(({ value }) => value)).toEqual(['H315']);
    expect(reading.sections).toHaveLength(2);
  });
});

describe('files that are no readable sheet', () => {
  const state = async (bytes: Uint8Array, options = {}): Promise<string> => (await readSheet(bytes, options)).state;
  const hundredLetters = 'Section 1. Identification. Product name: Quarrybond 40. '.repeat(3);

  it('have a name each', async () => {
    const good = await buildDemoSheet(quarrybondPartC);
    expect(await state(new Uint8Array())).toBe('not-a-pdf');
    expect(await state(new Uint8Array([0xff, 0xd8, 0xff, 0xe0, 0, 16, 74, 70, 73, 70, 0]))).toBe('not-a-pdf');
    expect(await state(new Uint8Array([0x20, ...good]))).toBe('not-a-pdf');
    expect(await state(good.slice(0, Math.floor(good.length / 2)))).toBe('damaged');
    expect(await state(new TextEncoder().encode('%PDF-1.7\nnothing here'))).toBe('damaged');
    expect(await state(await pdfOf((doc) => doc.text(hundredLetters), { userPassword: 'secret', ownerPassword: 'owner', pdfVersion: '1.7' }))).toBe('encrypted');
    expect(await state(await pdfOf((doc) => doc.rect(10, 10, 100, 100).fill('red')))).toBe('no-text-layer');
    expect(await state(await pdfOf((doc) => doc.text('1 / 1')))).toBe('no-text-layer');
    expect(await state(good, { maxBytes: 1000 })).toBe('too-large');
    expect(await state(good, { maxPages: 1 })).toBe('too-large');
  });

  it('carry no values', async () => {
    expect(await readSheet(await pdfOf((doc) => doc.rect(10, 10, 100, 100).fill('red')))).toMatchObject({ hasTextLayer: false, pages: 1, productName: null, signalWord: null, hazardCodes: [], ingredients: [], text: '' });
  });

  it('read an owner-protected sheet that opens without a password', async () => {
    expect(await state(await pdfOf((doc) => doc.text(hundredLetters), { ownerPassword: 'owner', pdfVersion: '1.7' }))).toBe('read');
  });

  it('read a sheet of three hundred pages', async () => {
    const bytes = await pdfOf((doc) => {
      for (let page = 1; page <= 300; page++) {
        if (page > 1) doc.addPage();
        doc.text(`SECTION ${Math.min(16, Math.ceil(page / 18))}: ${page <= 18 ? 'Identification' : 'Further'}`).text(page === 1 ? 'Product name: Quarrybond 40' : 'More text of this section.');
      }
    });
    expect(await readSheet(bytes)).toMatchObject({ state: 'read', pages: 300, productName: { value: 'Quarrybond 40' } });
  }, 60_000);

  it('survive script, control characters and directional marks as plain text', async () => {
    const bytes = await pdfOf((doc) => doc.text('Section 1. Identification').text("Product name: <script>alert('x')</script>; DROP TABLE").text(hundredLetters));
    expect((await readSheet(bytes)).productName?.value).toBe("<script>alert('x')</script>; DROP TABLE");
  });

  it('do not fall for a page that swells when unpacked, as long as it stays within bounds', async () => {
    expect(await state(decompressionBomb(1))).toBe('no-text-layer');
  }, 60_000);
});
