import { describe, expect, it } from '@jest/globals';
import { pagesFrom } from '#test/support/sheet-text';
import { casNumbersIn } from './cas';
import { concentrationIn, wholeConcentration } from './concentration';
import { readLines } from './read-sheet';

const read = (...section3: string[]) => {
  const [first = '', ...more] = section3;
  return readLines(pagesFrom(`Section 1. Identification\nProduct name: Quarrybond 40, a product of the demonstration\nSection 3. Composition/information on ingredients\n${first}`, ...more.map((page, at) => (at === more.length - 1 ? `${page}\nSection 4. First aid measures\nToluene 108-88-3 5 %` : page)))).ingredients.map(({ value }) => value);
};
const rows = (...section3: string[]): string[] => read(...section3, '').map(({ name, cas, concentration }) => `${name} | ${cas} | ${concentration}`);

describe('CAS numbers', () => {
  /** Real numbers of generic substances; the check digit rule is compared in compliance/hazcom. */
  it('are taken with any dash and told from phones, EC, index and registration numbers', () => {
    expect(casNumbersIn('14808–60–7, 65997-15-1 and 0001305-62-0').map(({ cas }) => cas)).toEqual(['14808-60-7', '65997-15-1', '1305-62-0']);
    expect(casNumbersIn('EC 238-878-4; index 601-022-00-9; 01-2119489428-22-0000; 1-800-424-9300; 12-05-2014; 14808-60-8')).toEqual([]);
  });
});

describe('amounts', () => {
  it.each(['30-60%', '≥10 - ≤20', '10 - <25', '0.1 - <1.0', '< 1', '>95', '<= 100 %', '2,5 - < 10', '10 to 30 %', '5–10', '1 - 5 % w/w', '40 - 60 % by weight', '2.5 <= x % < 10', '.1-1.0', 'approx. 5 %', '100'])('%s is an amount', (text) => {
    expect(wholeConcentration(text)).toBe(text);
  });

  it.each(['Proprietary', '100 ppm', '5 mg/m3', '1330-20-7', '250', '60 - 30', 'Flam. Liq. 2', ''])('%s is none', (text) => {
    expect(wholeConcentration(text)).toBeNull();
  });

  it('are found among words by their percent sign or range, not among limits', () => {
    expect(concentrationIn('Xylene, 10-30 % by weight')).toMatch(/^10-30 %/);
    expect(concentrationIn('TLV 50-100 ppm')).toBeNull();
  });
});

describe('ingredient tables', () => {
  it('with the number first', () => {
    expect(rows('CAS-No.      Chemical Name                   %\n64742-95-6   Aromatic hydrocarbon            75 - 100\n919-30-2     3-Aminopropyltriethoxysilane    10 - <25')).toEqual(['Aromatic hydrocarbon | 64742-95-6 | 75 - 100', '3-Aminopropyltriethoxysilane | 919-30-2 | 10 - <25']);
  });

  it('with the amount first and limits below the number', () => {
    expect(rows('% by WT     CAS No.       INGREDIENT            UNITS\n7           64742-88-7    Mineral spirits\n                             ACGIH TLV    100   ppm\n29          64742-48-9    Heavy naphtha\n                             OSHA PEL     100   ppm')).toEqual(['Mineral spirits | 64742-88-7 | 7', 'Heavy naphtha | 64742-48-9 | 29']);
  });

  it('with limits in the row of the number', () => {
    expect(rows('COMPONENT         CAS NO.       OSHA PEL      ACGIH TLV     %\nXylene            1330-20-7     100 ppm       20 ppm        10-30\nCarbon black      1333-86-4     3.5 mg/m3     3 mg/m3       5')).toEqual(['Xylene | 1330-20-7 | 10-30', 'Carbon black | 1333-86-4 | 5']);
  });

  it('with names that wrap and notes behind', () => {
    expect(rows('Chemical name               CAS number     Weight %\nPropylene glycol monomethyl 108-65-6       60 - 100*\nether acetate\nQuartz                      14808-60-7     1 - 5*\n* The exact percentage is withheld.')).toEqual(['Propylene glycol monomethyl ether acetate | 108-65-6 | 60 - 100', 'Quartz | 14808-60-7 | 1 - 5']);
  });

  it('with amounts and numbers that wrap in cells of identifiers', () => {
    expect(rows('Product/ingredient name     Identifiers        %        Classification\nSodium carbonate            RRN : 01-          10 -     Xi; R36\n                            2119485498-19      20       H319\n                            EC:207-838-8\n                            CAS : 497-19-8\n                            Index:\nSodium silicate             RRN : 01-          5 - 10   Xi; R41\n                            2119448725-31\n                            CAS : 1344-09-8\n                            Index:').map((row) => row.replace(/^[^|]*\| /, ''))).toEqual(['497-19-8 | 10 - 20', '1344-09-8 | 5 - 10']);
  });

  it('as blocks with the number on the next line', () => {
    expect(rows('Acetone                              30-60%\nCAS number: 67-64-1\nClassification\nFlam. Liq. 2 - H225\nXylene                               10-30%\nCAS number: 1330-20-7\nClassification\nFlam. Liq. 3 - H226').map((row) => row.replace(/^[^|]*\| /, ''))).toEqual(['67-64-1 | 30-60%', '1330-20-7 | 10-30%']);
  });

  it('split over a page', () => {
    expect(rows('Component                    CAS-No        Weight %\nQuartz                       14808-60-7    60 - 80', 'Portland cement              65997-15-1    10 - 30')).toEqual(['Quartz | 14808-60-7 | 60 - 80', 'Portland cement | 65997-15-1 | 10 - 30']);
  });

  it('as a sentence', () => {
    expect(rows('Calcium chloride (CAS 10043-52-4) 70-90%')).toEqual(['Calcium chloride | 10043-52-4 | 70-90%']);
  });

  it('with numbers broken in a narrow cell', () => {
    expect(rows('Name              CAS         %\nSolvent naphtha   64742-      5 - 10\n                  95-6').map((row) => row.replace(/^[^|]*\| /, ''))).toEqual(['64742-95-6 | 5 - 10']);
  });

  it('with rows that have no number, or no amount, in between', () => {
    expect(rows('Chemical Name       CAS number    Concentration %\nMineral spirits     64742-88-7    40 – 50 %\nAcrylic resin       MIXTURE       30 – 40 %\nDye                 1333-86-4     Proprietary\nXylene              1330-20-7     10 - 15 %')).toEqual(['Mineral spirits | 64742-88-7 | 40 – 50 %', 'Dye | 1333-86-4 | null', 'Xylene | 1330-20-7 | 10 - 15 %']);
  });

  it('of several products at once leave the amount open', () => {
    expect(rows('Chemical Name     CAS. No.       QB10     QB20     QB30\nQuartz            14808-60-7     20-30    10-20    1-5\nTalc              14807-96-6     5-10     5-10     5-10\nXylene            1330-20-7                        1-5').map((row) => row.replace(/^[^|]*\| /, ''))).toEqual(['14808-60-7 | null', '14807-96-6 | null', '1330-20-7 | null']);
  });

  it('that name a number again later keep the first row', () => {
    expect(rows('CAS-No.      Name       %\n1330-20-7    Xylene     5 - 10\nCAS-No.      Symbols    Statements\n1330-20-7    GHS02      H226-312-332')).toEqual(['Xylene | 1330-20-7 | 5 - 10']);
  });

  it('end where section 3 ends', () => {
    expect(read('Name     CAS          %\nXylene   1330-20-7    5', '').map(({ cas }) => cas)).toEqual(['1330-20-7']);
  });
});

describe('ingredients in running text', () => {
  it('take the amount of their own clause, after the number or before it', () => {
    expect(rows('Cement (CAS 65997-15-1) 70-95%; limestone (CAS 1317-65-3) 5-15%; gypsum (CAS 13397-24-5)\n2-10%; water (CAS 7732-18-5), balance.')).toEqual(['Cement | 65997-15-1 | 70-95%', 'limestone | 1317-65-3 | 5-15%', 'gypsum | 13397-24-5 | 2-10%', 'water | 7732-18-5 | null']);
    expect(rows('60-80 % toluene (108-88-3) and 20-40 % acetone (67-64-1)').map((row) => row.split(' | ').slice(1).join(' '))).toEqual(['108-88-3 60-80 %', '67-64-1 20-40 %']);
  });

  it('keep the words of their amount', () => {
    expect(rows('Epoxy resin: CAS 25068-38-6, greater than 50%\nQuartz: CAS 14808-60-7, less than\n0.5 %.').map((row) => row.split(' | ')[2])).toEqual(['greater than 50%', 'less than 0.5 %']);
  });

  it('do not take a percentage that is part of the name where amounts have a column', () => {
    expect(rows('Ingredient                                  CAS No.       Weight %\nXylene (contains ethylbenzene up to 20 %)   1330-20-7     10 to <20\nToluene (purity 99 %)                       108-88-3      withheld')).toEqual([expect.stringMatching(/1330-20-7 \| 10 to <20$/), expect.stringMatching(/108-88-3 \| null$/)]);
  });
});
