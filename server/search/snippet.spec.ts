import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { markEnd, markStart, snippetOf } from './snippet';

const shown = (text: string, stems: string[]): string | null => snippetOf(text, stems)?.replaceAll(markStart, '[').replaceAll(markEnd, ']') ?? null;
const filler = 'Store in a dry place and keep the lid closed after each use. '.repeat(20);

describe('snippetOf', () => {
  it('marks each match, whatever its ending, case and accents', () => {
    expect(shown('May cause an Allergic reaction; allergy is for life.', ['allergi'])).toBe('May cause an [Allergic] reaction; [allergy] is for life.');
    expect(shown('Asegure la ventilación adecuada.', ['ventil'])).toBe('Asegure la [ventilación] adecuada.');
    expect(shown('Peut provoquer une réaction.', ['reaction'])).toBe('Peut provoquer une [réaction].');
  });
  it('marks beginnings of words only', () => {
    expect(shown('Reoil the hinge with oil.', ['oil'])).toBe('Reoil the hinge with [oil].');
    expect(snippetOf('Reoil the hinge.', ['oil'])).toBeNull();
  });
  it('cuts at spaces and says so', () => {
    const found = shown(`${filler}Wear a respirator. ${filler}`, ['respir']) ?? '';
    expect(found).toMatch(/^… \S.*\[respirator\]\. .*\S …$/u);
    expect(found.length).toBeLessThan(200);
    for (const word of found.replace(/[[\]…]/gu, '').trim().split(' ')) expect(`${filler} Wear a respirator.`.split(' ')).toContain(word);
  });
  it('prefers the place where the words stand together', () => {
    expect(shown(`Wear gloves. ${filler} Wear a respirator and gloves. ${filler}`, ['glove', 'respir'])).toContain('[respirator] and [gloves]');
  });
  it('gives nothing for a text without the word, and for no word', () => {
    expect(snippetOf('Keep dry.', ['respir'])).toBeNull();
    expect(snippetOf('Keep dry.', [])).toBeNull();
  });
  it('takes direction marks of the sheet out, so that only its own remain', () => {
    expect(snippetOf('a \u202eb\u2068 oil \u2069c', ['oil'])).toBe(`a b ${markStart}oil${markEnd} c`);
  });
  it('never throws, never adds a word, and closes each mark, whatever the text and the stems', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 600 }), fc.array(fc.string({ unit: 'grapheme', maxLength: 6 }), { maxLength: 4 }), (text, stems) => {
        const found = snippetOf(text, stems);
        if (found === null) return;
        expect([...found].filter((letter) => letter === markStart)).toHaveLength([...found].filter((letter) => letter === markEnd).length);
        const plain = text.normalize('NFC').replace(/[\s\p{Cc}]+/gu, ' ').replace(/[\u202a-\u202e\u2066-\u2069]/gu, '');
        expect(plain).toContain(found.replace(/^… | …$/gu, '').replace(/[\u2068\u2069]/gu, '').trim());
      }),
    );
  });
});
