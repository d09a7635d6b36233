import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { HAZARD_ROWS } from './ghs-hazards.data';
import { labelElements } from './label-elements';

const label = (...codes: string[]) =>
  labelElements(
    codes.map((entry) => {
      const [code, category] = entry.split(':');
      return { code: code!, category: category ?? null };
    }),
  );

describe('[HAZ-07] label elements', () => {
  // 29 CFR 1910.1200 App. C.2.1, read as quoted; trap 18 of the reference for the last two.
  it.each<[string, string[], string, string[]]>([
    ['Danger displaces Warning', ['H315', 'H350'], 'danger', ['GHS07', 'GHS08']],
    ['(a) skull displaces the mark for acute toxicity', ['H301', 'H312'], 'danger', ['GHS06']],
    ['(a) but not for narcotic effects', ['H301', 'H336'], 'danger', ['GHS06', 'GHS07']],
    ['(b) corrosion displaces the mark for irritation', ['H318', 'H315'], 'danger', ['GHS05']],
    ['(b) but not for harmful if swallowed', ['H314', 'H302'], 'danger', ['GHS05', 'GHS07']],
    ['(b) nor for respiratory irritation', ['H314', 'H335'], 'danger', ['GHS05', 'GHS07']],
    ['(c) respiratory sensitizer displaces it for skin sensitizer and irritation', ['H334', 'H317', 'H315', 'H319'], 'danger', ['GHS08']],
    ['(c) but a carcinogen does not', ['H350', 'H317'], 'danger', ['GHS07', 'GHS08']],
    ['H317 + H334', ['H317', 'H334'], 'danger', ['GHS08']],
    ['H317 + H314', ['H317', 'H314'], 'danger', ['GHS05', 'GHS07']],
    ['combined acute codes', ['H302+H332'], 'warning', ['GHS07']],
    ['lactation has neither', ['H362'], 'none', []],
    ['supplements have neither', ['EUH066', 'EUH204'], 'none', []],
    ['nothing', [], 'none', []],
  ])('%s', (_name, codes, signalWord, pictograms) => {
    const elements = label(...codes);
    expect(elements.signalWord).toBe(signalWord);
    expect(elements.pictograms).toEqual(pictograms);
  });

  it('decides by category where the sheet gives one, and says so where it does not', () => {
    // Self-reactive type C is Danger, types E and F are Warning: table of the reference.
    expect(label('H242:Type C').signalWord).toBe('danger');
    expect(label('H242:Type E').signalWord).toBe('warning');
    expect(label('H242:Type E').categoryMissing).toEqual([]);
    expect(label('H272:Category 3').signalWord).toBe('warning');
    expect(label('H242')).toMatchObject({ signalWord: 'danger', categoryMissing: ['H242'] });
    expect(label('H314').categoryMissing).toEqual([]);
  });

  it('shows the environment pictogram as allowed, not demanded, in the US', () => {
    expect(label('H317', 'H411')).toMatchObject({ pictograms: ['GHS07'], voluntaryPictograms: ['GHS09'] });
    expect(label('H410').signalWord).toBe('none');
  });

  it('names statements that need not stand beside a stronger one', () => {
    // From memory: H318 beside H314, H400 beside H410.
    expect(label('H314', 'H318', 'H400', 'H410').redundant).toEqual([
      { code: 'H318', beside: 'H314' },
      { code: 'H400', beside: 'H410' },
    ]);
    expect(label('H318').redundant).toEqual([]);
  });

  const anyCodes = fc.array(fc.constantFrom(...new Set(HAZARD_ROWS.map((row) => row.code))), { maxLength: 12 });
  it('gives the same whatever the order, and adding a hazard never weakens the signal word', () => {
    const rank = ['none', 'warning', 'danger'];
    fc.assert(
      fc.property(anyCodes, fc.constantFrom(...HAZARD_ROWS.map((row) => row.code)), (codes, more) => {
        const before = label(...codes);
        expect(label(...[...codes].reverse())).toMatchObject({ signalWord: before.signalWord, pictograms: before.pictograms });
        const after = label(...codes, more);
        expect(rank.indexOf(after.signalWord)).toBeGreaterThanOrEqual(rank.indexOf(before.signalWord));
        const lost = before.pictograms.filter((each) => !after.pictograms.includes(each));
        expect(lost.filter((each) => each !== 'GHS07')).toEqual([]);
      }),
    );
  });
});
