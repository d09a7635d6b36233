import { describe, expect, it } from '@jest/globals';
import { hazardWords } from './hazard-words';
import { STATEMENT_TEXTS } from './ghs-statements.data';

const en = (codes: readonly string[]) => hazardWords(codes).map((each) => each.en);

describe('[HAZ-09] hazards in plain words', () => {
  // Meaning of each statement: UN GHS Annex 3, as in ghs-statements.data.ts.
  it.each([
    [['H350'], ['can cause cancer']],
    [['H350i', 'H315'], ['can cause cancer', 'stings skin, eyes or nose']],
    [['H302+H332'], ['is bad to breathe or swallow']],
    [['H318', 'H314'], ['burns skin or eyes']],
    [['H334', 'H317'], ['can start asthma', 'can cause a skin allergy']],
    [['H226'], ['catches fire']],
    [['H411', 'H290'], []],
  ])('%j says %j', (codes, expected) => {
    expect(en(codes)).toEqual(expected);
  });

  it('has words for every statement about people: none of H300 to H373 is silent but those OSHA does not use', () => {
    // 29 CFR 1910.1200 App. A leaves out acute toxicity category 5 (H303, H313, H333).
    const silent = STATEMENT_TEXTS.map(({ code }) => code).filter((code) => /^H3\d\d$/.test(code) && hazardWords([code]).length === 0);
    expect(silent.sort()).toEqual(['H303', 'H313', 'H333']);
  });
});
