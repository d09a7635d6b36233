import { describe, expect, it } from '@jest/globals';
import { pagesFrom } from '#test/support/sheet-text';
import { withLabelsOnTop } from './middle-cells';

const texts = (drawn: string): string[] => withLabelsOnTop(pagesFrom(drawn).flat()).map(({ text }) => text);

describe('labels beside the middle of their text', () => {
  it('move up to its first line, so that the statement above them is theirs', () => {
    const drawn = `Signal word         Danger

                    First statement.
Hazard statements   Second statement.
                    Third statement.

Precautions         Wear gloves.`;
    expect(texts(drawn)).toEqual(['Signal word  Danger', 'Hazard statements  First statement.', 'Second statement.', 'Third statement.', 'Precautions  Wear gloves.']);
  });

  it('of two lines become one, beside a value of one', () => {
    const lines = pagesFrom('Trade name          Quarrybond 40\n\nName of the\n\n\nUse                 Floors').flat();
    const [, upper] = lines;
    const value = { page: 1, text: 'Slate Resins, Inc.', box: { x: 130, y: (upper?.box.y ?? 0) + 6, width: 90, height: 9 } };
    const lower = { page: 1, text: 'supplier', box: { x: 30, y: (upper?.box.y ?? 0) + 12, width: 40, height: 9 } };
    const mixed = [...lines.slice(0, 2), ...[value, lower].map((segment) => ({ page: 1, text: segment.text, box: segment.box, segments: [segment] })), ...lines.slice(2)];
    expect(withLabelsOnTop(mixed).map(({ text }) => text)).toEqual(['Trade name  Quarrybond 40', 'Name of the supplier  Slate Resins, Inc.', 'Use  Floors']);
  });

  it.each([
    ['a list of rows', 'Xylene              1330-20-7\nToluene             108-88-3\nAcetone             67-64-1'],
    ['labels at the top', 'Supplier            Slate Resins, Inc.\n                    8 Quay Street\n                    Superior\n\nPhone               715 555 0100'],
    ['two labels of a cell', '                    one\nFirst:              two\nSecond:             three\n                    four'],
  ])('stay: %s', (_, drawn) => {
    expect(texts(drawn)).toEqual(pagesFrom(drawn).flat().map(({ text }) => text));
  });
});
