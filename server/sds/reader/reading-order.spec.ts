import { describe, expect, it } from '@jest/globals';
import { withoutOverprints } from './lines';
import { type TextItem, type TextPage } from './pdf-text';
import { readingLines } from './reading-order';

const item = (text: string, x: number, baseline: number, size = 10): TextItem => ({ page: 1, text, x, y: baseline - size * 0.8, width: text.length * size * 0.5, height: size, baseline });
const page = (items: TextItem[]): TextPage => ({ page: 1, width: 612, height: 792, items });
const texts = (items: TextItem[]): string[] => readingLines(page(items)).map(({ text }) => text);

describe('reading order', () => {
  it('sorts by place, not by the order of drawing', () => {
    expect(texts([item('Danger', 200, 100), item('SECTION 2', 50, 80), item('Signal word', 50, 100)])).toEqual(['SECTION 2', 'Signal word  Danger']);
  });

  it('joins the pieces of a word, parts words at a small gap and cells at a wide one', () => {
    expect(texts([item('Haz', 50, 80), item('ard', 65, 80), item('word', 83, 80), item('cell', 150, 80)])).toEqual(['Hazard word  cell']);
  });

  it('keeps a raised figure with its line', () => {
    expect(texts([item('5 mg/m', 50, 80), item('3', 80, 77, 6)])).toEqual(['5 mg/m3']);
  });

  it('reads words printed twice for bold type once', () => {
    const once = [item('Hazard identification', 50, 80), item('Hazard identification', 50.4, 80)];
    expect(withoutOverprints(once).map(({ text }) => text)).toEqual(['Hazard identification']);
    expect(withoutOverprints([item('Hazard identification', 50, 80), item('identification', 86, 80.2)])).toHaveLength(1);
  });

  it('keeps the same word standing twice in a row of a table', () => {
    expect(texts([item('100 ppm', 50, 80), item('100 ppm', 150, 80)])).toEqual(['100 ppm  100 ppm']);
  });

  it('reads two columns of prose one after the other', () => {
    const prose = (side: string, x: number): TextItem[] => Array.from({ length: 12 }, (_, row) => item(`${side}${row} ${'word '.repeat(9)}`.slice(0, 46), x, 100 + row * 12));
    const lines = texts([...prose('R', 320), ...prose('L', 50)]);
    expect(lines.map((line) => line.split(' ')[0])).toEqual([...Array.from({ length: 12 }, (_, row) => `L${row}`), ...Array.from({ length: 12 }, (_, row) => `R${row}`)]);
  });

  it('reads labels and values across, however many there are', () => {
    const rows = Array.from({ length: 12 }, (_, row) => [item(`Label ${row}`, 50, 100 + row * 12), item(`${'value '.repeat(9)}`, 300, 100 + row * 12)]).flat();
    expect(texts(rows)[0]).toMatch(/^Label 0 {2}value/);
  });

  it('reads a label from its dots', () => {
    expect(texts([item('Trade name.......: Quarrybond 40', 50, 80)])).toEqual(['Trade name: Quarrybond 40']);
    expect(texts([item('Address ........ 400 Pier Ave', 50, 80)])).toEqual(['Address ........ 400 Pier Ave']);
    expect(texts([item('Address ........ Pier Ave 400', 50, 80)])).toEqual(['Address: Pier Ave 400']);
    expect(texts([item('1. Identification ........ 2', 50, 80)])).toEqual(['1. Identification ........ 2']);
  });

  it('joins the words of a justified line that ends too early, but not the cells of a row', () => {
    const spread = (words: string[], gap: number): TextItem[] => words.reduce<TextItem[]>((items, word) => [...items, item(word, (items.at(-1)?.x ?? 40 - gap) + (items.at(-1)?.width ?? 0) + gap, 80)], []);
    expect(texts(spread(['Supplied', 'by:', 'Slate', 'Hollow', 'Co.'], 60))).toEqual(['Supplied by: Slate Hollow Co.']);
    expect(texts([item('Xylene', 50, 80), item('1330-20-7', 150, 80), item('10-30', 250, 80)])).toEqual(['Xylene  1330-20-7  10-30']);
    const values = [item('Slate Finishes LP', 40, 95), item('4 Quay Street', 140, 95), item('800 555 0150', 240, 95)];
    expect(texts([item('COMPANY', 40, 80), item('ADDRESS', 140, 80), item('CONTACT', 240, 80), ...values])[0]).toBe('COMPANY  ADDRESS  CONTACT');
  });

  it('parts a cell that nearly touches the next where a column of the rows around it starts', () => {
    const row = (y: number, amount: string): TextItem[] => [item('Quartz', 50, y), item(amount, 220, y), item('STOT RE 1, H372', 261, y)];
    const lines = readingLines(page([...row(80, '< 1'), ...row(95, '30 - 5')])).map(({ segments }) => segments.map(({ text }) => text));
    expect(lines).toEqual([['Quartz', '< 1', 'STOT RE 1, H372'], ['Quartz', '30 - 5', 'STOT RE 1, H372']]);
  });

  it('reads two columns with headings of their own one after the other', () => {
    const column = (first: number, x: number, shift: number): TextItem[] => ['Identification', 'Hazards identification', 'Composition', 'First aid measures'].flatMap((title, at) => [item(`Section ${first + at} - ${first === 1 ? title : ['Accidental release measures', 'Handling and storage', 'Exposure controls', 'Physical and chemical properties'][at]}`, x, 100 + shift + at * 40), item('short text', x, 115 + shift + at * 40)]);
    expect(texts([...column(1, 50, 0), ...column(6, 320, 5)]).filter((line) => line.startsWith('Section')).map((line) => Number(/\d+/.exec(line)?.[0]))).toEqual([1, 2, 3, 4, 6, 7, 8, 9]);
  });

  it('drops rules drawn with underscores', () => {
    expect(texts([item('______________', 50, 80), item('Text', 50, 100)])).toEqual(['Text']);
  });
});
