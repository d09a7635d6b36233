import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { deratedLevel, deratedLevelDual, protectedLevel, protectedLevelDual } from './hearing-protection';

describe('[NOI-03] hearing protection', () => {
  it.each([
    ['A7, WAC 296-307-63215, verified: 95 dBA, NRR 20', protectedLevel(95, 'A', 20), 82, 'app-b'],
    ['A8, WAC 296-307-63215, verified: 100 dBA, plug 20 and muff 12', protectedLevelDual(100, 'A', 20, 12), 82, 'app-b-dual'],
    ['A9, training page, verified: 100 dBA, NRR 19', protectedLevel(100, 'A', 19), 88, 'app-b'],
    ['A9, training page, verified: 108 dBC, NRR 32', protectedLevel(108, 'C', 32), 76, 'app-b'],
    ['A9, training page, verified: 110 dBC, plug 29 and muff 19', protectedLevelDual(110, 'C', 29, 19), 76, 'app-b-dual'],
    ['A10, third-party quotation, verified: 100 dBA, NRR 25', protectedLevel(100, 'A', 25), 82, 'app-b'],
    ['A10, third-party quotation, verified: the same, derated by half', deratedLevel(100, 25), 91, 'field-derated'],
    ['derated dual, from memory: 100 dBA, 25 and 12', deratedLevelDual(100, 25, 12), 86, 'field-derated-dual'],
    ['a rating under 7 protects nothing by the A-weighted method (derived)', protectedLevel(95, 'A', 5), 95, 'app-b'],
  ])('%s', (_name, result, level, method) => {
    expect([result.levelDba, result.method]).toEqual([level, method]);
  });

  it('refuses a rating that no protector has by name', () => {
    expect(() => protectedLevel(95, 'A', 41)).toThrow(InputError);
    expect(() => protectedLevelDual(95, 'A', 20, -1)).toThrow(/^muffNrrDb/);
  });

  it('never protects less with a higher rating, nor with two protectors', () => {
    fc.assert(
      fc.property(fc.integer({ min: 80, max: 120 }), fc.integer({ min: 0, max: 40 }), fc.integer({ min: 0, max: 40 }), (twa, a, b) => {
        const higher = Math.max(a, b);
        expect(protectedLevel(twa, 'A', higher).levelDba).toBeLessThanOrEqual(protectedLevel(twa, 'A', Math.min(a, b)).levelDba);
        expect(protectedLevelDual(twa, 'A', a, b).levelDba).toBeLessThanOrEqual(protectedLevel(twa, 'A', higher).levelDba);
        expect(deratedLevel(twa, higher).levelDba).toBeGreaterThanOrEqual(protectedLevel(twa, 'A', higher).levelDba);
      }),
    );
  });
});
