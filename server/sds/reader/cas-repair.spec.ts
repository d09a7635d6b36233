import { describe, expect, it } from '@jest/globals';
import { repairCas, withRepairedCas } from './cas-repair';

/** Check digits after the CAS Registry's own rule (www.cas.org/training/documentation/chemical-substances/checkdig). */
describe('CAS numbers out of a picture', () => {
  it.each([
    ['133O-2O-7', '1330-20-7'],
    ['l330-20-7', '1330-20-7'],
    ['1330–20–7', '1330-20-7'],
    ['1330_20-7', '1330-20-7'],
    ['100-4l-4', '100-41-4'],
    ['2SO85-99-8', '25085-99-8'],
    ['1480B-60-7', '14808-60-7'],
    ['(14B08-60-7)', '(14808-60-7)'],
  ])('%s becomes %s, whose check digit fits', (read, right) => {
    expect(repairCas(read)).toBe(right);
  });

  it.each([
    ['1330-20-8', 'a wrong check digit is not guessed at'],
    ['I33O-2O-8', 'letters that do not make a number that fits'],
    ['lOO-4l-4', 'more than two letters: as good as a word'],
    ['BOIL-SO-S', 'a word'],
    ['133-O2-45', 'a phone-like number'],
    ['F046H0413B', 'a code'],
    ['1330-20-7', 'a number that was read right'],
  ])('%s stays: %s', (read) => {
    expect(repairCas(read)).toBe(read);
  });

  it('leaves everything else of a word as it was', () => {
    expect(withRepairedCas([{ text: 'l330-20-7', x: 3 }])).toEqual([{ text: '1330-20-7', x: 3 }]);
  });
});
