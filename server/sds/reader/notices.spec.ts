import { describe, expect, it } from '@jest/globals';
import { pagesFrom } from '#test/support/sheet-text';
import { readLines } from './read-sheet';

const sheet = (front: string, words: string): string => `${front}
1. Identification
Product name: Quarrybond 40, a product of the demonstration
2. Hazards identification
${words}
3. Composition
4. First aid measures`;
const found = (text: string) => readLines(pagesFrom(text)).notices.map(({ kind, quote }) => `${kind}: ${quote}`);
const english = 'The product is not for the use of the public and is to be kept in the store of the shop.';

describe('what a person must know about the whole file', () => {
  it('is nothing for one dated sheet in a language that is known', () => {
    expect(found(sheet('Revised 3 March 2024', english))).toEqual([]);
  });

  it('is a language that is not known', () => {
    expect(found(sheet('Data da revisão: 10/05/2022', 'Não é para uso do público e não deve ficar com os olhos ou a pele em contato, por uma ou duas horas, com o produto ao ar.'))).toEqual(['language-not-read: pt']);
  });

  it('is a month of revision without a day, though an older date is complete', () => {
    const reading = readLines(pagesFrom(sheet('Revised: March 2024   Issued: 5 May 2019', english)));
    expect(reading.notices).toMatchObject([{ kind: 'date-without-day', page: 1, quote: 'Revised: March 2024' }]);
    expect(reading.revisionDate).toBeNull();
  });

  it('is no month beside a complete date of revision, nor that of a rule or of the next review', () => {
    expect(found(sheet('Revised: 3 March 2024   Next review: March 2029', english))).toEqual([]);
    expect(found(sheet('Issued: 5 May 2019   Standard of May 2012', english))).toEqual([]);
  });
});
