import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { STATEMENT_TEXTS } from './ghs-statements.data';
import { findHazardCodes, hazardRowsOf, readHazardCode, readHazardCodes, singleCodes, statementText } from './statements';
import { SUPPLEMENTARY_STATEMENTS } from './supplementary-statements.data';

const known = (code: string) => ({ isKnown: true, code, parts: code.split('+') });

describe('[HAZ-07] reading statement codes', () => {
  it.each([
    ['H360FD', ['H360FD']],
    ['H360Fd', ['H360Fd']],
    ['H350i', ['H350i']],
    ['H350I', ['H350i']],
    ['h317', ['H317']],
    ['EUH066', ['EUH066']],
    ['euh 066', ['EUH066']],
    ['H302+H332', ['H302+H332']],
    ['H332 + H302', ['H302+H332']],
    ['H302 + H312 + H332', ['H302+H312+H332']],
    ['H315+H317', ['H315', 'H317']],
  ])('%s → %j (trap 18)', (text, codes) => {
    expect(readHazardCode(text)).toEqual(codes.map(known));
  });

  it.each(['H999', 'H360X', 'H360fD', 'R43', 'H3141', 'toxic'])('asks about %s with the text as found (trap 18: never dropped)', (text) => {
    const { codes, unknown } = readHazardCodes([text]);
    expect(codes).toEqual([]);
    expect(unknown[0]!.text).toBe(text);
    expect(unknown[0]!.question.en).toContain(text);
    expect(unknown[0]!.question.es).toContain(text);
  });

  it.each(['H302+H999', 'H999+H302'])('keeps the known part of %s and asks about the whole', (text) => {
    const { codes, unknown } = readHazardCodes([text]);
    expect(codes).toEqual(['H302']);
    expect(unknown.map((each) => each.text)).toEqual([text]);
  });

  it('finds codes in running text, with and without a space before the words', () => {
    const text = 'H314 Causes severe burns. H317May cause; H360Fd; H302 + H332 Harmful. EUH204 Contains isocyanates. Part H1234.';
    expect(findHazardCodes(text)).toEqual({ codes: ['H314', 'H317', 'H360Fd', 'H302+H332', 'EUH204'], unknown: [] });
  });

  it('takes combinations apart for protection', () => {
    expect(singleCodes(['H302+H332', 'H332', 'H317'])).toEqual(['H302', 'H332', 'H317']);
  });

  it('never loses an entry: each is known or asked', () => {
    fc.assert(
      fc.property(fc.array(fc.oneof(fc.string(), fc.constantFrom('H314', 'H360FD', 'H302+H332', 'H777'))), (texts) => {
        for (const text of texts) expect(readHazardCode(text).length).toBeGreaterThan(0);
      }),
    );
  });

  it('knows every code of the tables in both languages', () => {
    for (const { code } of [...STATEMENT_TEXTS, ...SUPPLEMENTARY_STATEMENTS]) {
      expect(readHazardCode(code)).toEqual([known(code)]);
      const text = statementText(code)!;
      expect(text.en.length).toBeGreaterThan(4);
      expect(text.es).not.toBe(text.en);
    }
    expect(statementText('H999')).toBeNull();
    expect(hazardRowsOf('EUH066')).toEqual([]);
  });
});
