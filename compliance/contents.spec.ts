import { describe, expect, it } from '@jest/globals';
import { contentsRule, yearlyRule } from './contents';
import { InputError } from './input-error';
import { commonPractice } from './source';
import { words } from './words';

const described = { id: 'test', title: words('Test', 'Prueba'), source: commonPractice('test of the shape'), duties: [] };
const rule = contentsRule({ ...described, items: [{ id: 'a', name: words('first', 'primero') }, { id: 'b', name: words('second', 'segundo') }] });

describe('a rule about contents', () => {
  it.each([
    ['all there', { a: true, b: true }, 'met'],
    ['one missing', { a: true, b: false }, 'unmet'],
    ['one not looked for', { a: true, b: null }, 'undecided'],
    ['one not said', { a: true }, 'undecided'],
    ['missing beats not looked for', { a: false, b: null }, 'unmet'],
  ])('%s', (_name, present, outcome) => {
    expect(rule.evaluate({ present }, '2026-12-01').outcome).toBe(outcome);
  });

  it('names what is missing in both languages, and who decides', () => {
    expect(rule.evaluate({ present: { a: true, b: false } }, '2026-12-01').reason).toEqual({ en: 'Missing: second.', es: 'Falta: segundo.' });
    expect(rule.evaluate({ present: {} }, '2026-12-01').whoDecides?.en).toBe('the safety officer');
  });

  it('refuses an item it does not know by name', () => {
    expect(() => rule.evaluate({ present: { a: true, b: true, c: true } }, '2026-12-01')).toThrow(InputError);
    expect(() => rule.evaluate({ present: { c: true } }, '2026-12-01')).toThrow(/^present\.c/);
  });
});

describe('a yearly rule', () => {
  const yearly = yearlyRule(described);
  it.each([
    ['never done', null, '2026-12-01', 'unmet', '2026-12-01'],
    ['done today', '2026-12-01', '2026-12-01', 'met', '2027-12-01'],
    ['on the day', '2025-12-01', '2026-12-01', 'met', '2026-12-01'],
    ['the day after', '2025-12-01', '2026-12-02', 'unmet', '2026-12-01'],
  ])('%s', (_name, lastDoneOn, asOf, outcome, dueOn) => {
    expect(yearly.evaluate({ lastDoneOn }, asOf)).toMatchObject({ outcome, dueOn });
  });

  it('refuses a day that is still to come', () => {
    expect(() => yearly.evaluate({ lastDoneOn: '2026-12-02' }, '2026-12-01')).toThrow(/^lastDoneOn/);
  });
});
