import { describe, expect, it } from '@jest/globals';
import { commonPractice, sourceLine, sourced, usFederal } from './source';

describe('source', () => {
  it('prefixes a federal section and keeps the extra fields', () => {
    const source = usFederal('1926.1153', 'read', { paragraph: '(d)(1)', inForceFrom: '2017-09-23' });
    expect(source).toEqual({ citation: '29 CFR 1926.1153', verified: 'read', paragraph: '(d)(1)', inForceFrom: '2017-09-23' });
  });

  it('says in a line how the value was verified', () => {
    expect(sourceLine(usFederal('1926.1153', 'from-memory', { paragraph: '(d)(3)(ii)' }))).toBe('29 CFR 1926.1153 (d)(3)(ii) [from memory]');
    expect(sourceLine(sourced('WAC 296-307-63215', 'read'))).toBe('WAC 296-307-63215 [text read]');
    expect(sourceLine(commonPractice('two coats'))).toBe('common practice, no source [common practice]');
  });
});
