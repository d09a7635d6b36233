import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { casCheckDigit, checkCas } from './cas';

describe('[HAZ-11] CAS number', () => {
  it.each([
    ['107-07-3', 'CAS support page, verified'],
    ['71-23-8', 'CAS client services note, verified'],
    ['7732-18-5', 'CAS, verified'],
    // Worked example B7, derived: further numbers found on floor-kit sheets.
    ...[
      '14808-60-7', '14464-46-1', '65997-15-1', '1305-62-0', '1305-78-8', '25068-38-6', '1675-54-3', '25085-99-8', '9003-36-5', '100-51-6',
      '101-68-8', '9016-87-9', '26447-40-5', '101-77-9', '1317-65-3', '13463-67-7', '68609-97-2', '2855-13-2', '7631-86-9',
    ].map((number) => [number, 'B7, derived']),
  ])('%s is valid (%s)', (number) => {
    expect(checkCas(number!)).toEqual({ isValid: true, casNumber: number });
  });

  // A13, trade note, verified.
  it.each([
    ['50-00-1', 'check-digit', 0],
    ['0000050-00-0', 'malformed', null],
    ['50-0-0', 'malformed', null],
    ['', 'malformed', null],
    ['14808 60 7', 'malformed', null],
    ['12345678-00-0', 'malformed', null],
  ])('%s is refused: %s', (number, fault, expectedCheckDigit) => {
    expect(checkCas(number)).toEqual({ isValid: false, casNumber: number, fault, expectedCheckDigit });
  });

  it('computes the digits of A13: sums 33, 38 and 105', () => {
    expect([casCheckDigit('10707'), casCheckDigit('7123'), casCheckDigit('773218')]).toEqual([3, 8, 5]);
  });

  it('accepts exactly one check digit for any number', () => {
    fc.assert(
      fc.property(fc.integer({ min: 10, max: 9_999_999 }), fc.integer({ min: 0, max: 99 }), (first, second) => {
        const stem = `${first}-${String(second).padStart(2, '0')}`;
        expect([...Array(10).keys()].filter((digit) => checkCas(`${stem}-${digit}`).isValid)).toHaveLength(1);
      }),
    );
  });
});
