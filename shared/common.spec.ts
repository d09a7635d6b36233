import { describe, expect, it } from '@jest/globals';
import { Line, Paragraph } from './common';
import { ConsumableRate } from './jobs';
import { CartridgeSchedule } from './products';

/** Characters that show nothing. Source: Unicode 15, categories Cf, Zs, Zl, Zp, and the fillers that are letters or symbols by category. */
const unseen = ['', ' ', '\u00a0', '\u200b', '\u200b\u200d', '\u2060', '\u200f', '\ufeff', '\u2028', '\u00ad', '\u115f', '\u2800', '\u3164', '\uffa0'];
const messages = (answer: { error?: { issues: readonly { message: string }[] } }): string[] => (answer.error?.issues ?? []).map(({ message }) => message);

describe('a line that a person types', () => {
  it.each(unseen.map((text) => [JSON.stringify(text), text]))('says something one can see: %s does not', (_, text) => {
    expect(messages(Line(20).safeParse(text))).toContain('Fill this in.');
  });
  it('is asked for once where it is empty', () => expect(messages(Line(20).safeParse(''))).toEqual(['Fill this in.']));
  it.each(['Ñandú', '3', '–', '°', 'שלום\u200f', 'नमस्\u200dते', '日本'])('is kept as typed: %s', (text) => expect(Line(20).parse(text)).toBe(text));
  it.each(['two\u2028lines', 'two\u2029lines', 'two\nlines'])('is one line: %j is not', (text) => expect(messages(Line(20).safeParse(text))).toEqual(['Remove control characters.']));
});

describe('what counts as stated, and opens a held task', () => {
  it.each(unseen.map((text) => [JSON.stringify(text), text]))('is not stated by %s', (_, text) => {
    expect(CartridgeSchedule.safeParse({ change: text, basedOn: 'the maker’s table' }).success).toBe(false);
    expect(ConsumableRate.shape.statedBy.safeParse(text).success).toBe(false);
    expect(Paragraph(2000).min(10).safeParse(text.repeat(20)).success).toBe(false);
  });
  it('several lines may stay empty', () => expect(Paragraph(10).parse(' \n ')).toBe(''));
});
