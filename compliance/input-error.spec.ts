import { describe, expect, it } from '@jest/globals';
import { InputError, checkMinutes, checkNumber } from './input-error';

describe('checkNumber', () => {
  it.each([
    ['NaN', Number.NaN, {}],
    ['infinity', Number.POSITIVE_INFINITY, {}],
    ['below the minimum', -1, { min: 0 }],
    ['at an exclusive bound', 0, { above: 0 }],
    ['above the maximum', 11, { max: 10 }],
  ])('refuses %s by the name of the field', (_name, value, bounds) => {
    expect(() => checkNumber('wheelDiameterIn', value, bounds)).toThrow(InputError);
    expect(() => checkNumber('wheelDiameterIn', value, bounds)).toThrow(/^wheelDiameterIn: /);
  });

  it('returns a value on its bounds', () => {
    expect(checkNumber('x', 10, { min: 10, max: 10 })).toBe(10);
  });
});

describe('checkMinutes', () => {
  it('accepts a whole day and refuses a minute more', () => {
    expect(checkMinutes('minutes', 1440)).toBe(1440);
    expect(() => checkMinutes('minutes', 1441)).toThrow('minutes: must be at most 1440');
    expect(() => checkMinutes('minutes', -0.1)).toThrow(InputError);
  });
});
