import { describe, expect, it } from '@jest/globals';
import { searchTerms } from './search-terms';

// CAS numbers of castor oil, water and MDI: CAS Common Chemistry (8001-79-4, 7732-18-5, 101-68-8).
describe('CAS numbers', () => {
  it.each([
    ['8001-79-4', ['8001794']],
    ['8001794', ['8001794']],
    ['0008001-79-4', ['8001794']],
    ['CAS 8001-79-4', ['8001794']],
    ['CAS-No. 8001-79-4', ['8001794']],
    ['cas# 8001794', ['8001794']],
    ['8001\u201179\u20114', ['8001794']],
    ['101\u221268\u22128', ['101688']],
    ['8001-79-4 7732-18-5', ['8001794', '7732185']],
  ])('finds them in "%s"', (typed, casDigits) => {
    expect(searchTerms(typed)).toMatchObject({ casDigits, words: '' });
  });
  it('writes them as CAS does', () => {
    expect(searchTerms('0008001794').casNumbers).toEqual(['8001-79-4']);
  });
  it.each(['8001795', '40', '2024-03-18', '715-555-0142', 'QB-40-1', '8001-79-41'])('does not take "%s" for one', (typed) => {
    expect(searchTerms(typed)).toMatchObject({ casDigits: [], words: typed });
  });
});

// Forms of codes: UN GHS Rev.10 annex 3, and EUH of CLP annex II.
describe('codes', () => {
  it.each([
    ['H317', ['h317']],
    ['h 317', ['h317']],
    ['H302+H332', ['h302', 'h332']],
    ['P305 + P351 + P338', ['p305', 'p351', 'p338']],
    ['EUH066', ['euh066']],
    ['H360FD', ['h360fd']],
  ])('are found in "%s"', (typed, codes) => {
    expect(searchTerms(typed).codes).toEqual(codes);
  });
  it('leave the words beside them', () => {
    expect(searchTerms('quarrybond H317')).toMatchObject({ codes: ['h317'], words: 'quarrybond' });
  });
  it.each(['H31', 'AH317', 'P1000', 'P100', 'Hall 3'])('"%s" holds none but what has three digits', (typed) => {
    expect(searchTerms(typed).codes).toEqual(typed === 'P100' ? ['p100'] : []);
  });
});
