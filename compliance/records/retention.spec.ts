import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { addDays } from '../iso-date';
import { accessDueOn, rightsNoticeDueOn } from './access';
import { missingInRegister, retention, type RecordFacts } from './retention';
import { RETENTION_ROWS, type RecordKind } from './retention.data';

const facts = (record: RecordKind, changes: Partial<RecordFacts> = {}): RecordFacts => ({ record, jurisdictionId: 'us-federal', madeOn: '2026-12-01', employmentEndedOn: null, isReplaced: false, hasSubstitute: false, ...changes });
const answer = (record: RecordKind, changes: Partial<RecordFacts> = {}, asOf = '2026-12-01') => retention(facts(record, changes), asOf);

describe('[REC-01] retention, 29 CFR 1910.1020', () => {
  it.each<[string, RecordKind, Partial<RecordFacts>, object]>([
    ['exposure records 30 years, verified', 'exposure', {}, { outcome: 'keep-until', lastDay: '2056-12-01' }],
    ['work papers 1 year where results stay, verified', 'background-data', { hasSubstitute: true }, { lastDay: '2027-12-01' }],
    ['work papers 30 years where they do not, derived', 'background-data', {}, { lastDay: '2056-12-01' }],
    ['a sheet 30 years, OSHA letter 8 Nov 1985', 'sheet', {}, { lastDay: '2056-12-01' }],
    ['a sheet without period beside a register of use, verified', 'sheet', { hasSubstitute: true }, { outcome: 'no-period' }],
    ['an analysis 30 years, 1910.1020(d)(1)(iii), from memory', 'analysis', {}, { lastDay: '2056-12-01' }],
    ['that register 30 years, verified', 'register-of-use', {}, { lastDay: '2056-12-01' }],
    ['medical while employed', 'medical', {}, { outcome: 'keep' }],
    ['medical 30 years from the last day, verified', 'medical', { employmentEndedOn: '2030-06-30' }, { lastDay: '2060-06-30' }],
    ['fit test until the next, 1910.134(m)(2)(ii), verified', 'fit-test', {}, { outcome: 'keep' }],
    ['fit test once replaced', 'fit-test', { isReplaced: true }, { outcome: 'no-period' }],
    ['noise measurement 30 years in construction, 1910.1020 through 1926.33; the 2 years of 1910.95(m)(3) are general industry (letter of 11 May 1983, read)', 'noise-measurement', {}, { lastDay: '2056-12-01' }],
    ['audiogram as a medical record in construction, from memory', 'audiogram', { employmentEndedOn: '2030-06-30' }, { lastDay: '2060-06-30' }],
    ['training: no federal period, from memory', 'training', {}, { outcome: 'no-period' }],
    ['silica plan until the next', 'silica-plan', {}, { outcome: 'keep' }],
    ['a leap day', 'exposure', { madeOn: '2028-02-29' }, { lastDay: '2058-02-28' }],
  ])('%s', (_name, record, changes, expected) => {
    expect(answer(record, changes)).toMatchObject(expected);
  });

  it('lets nothing go on the last day, only after it', () => {
    expect(answer('exposure', {}, '2056-12-01')).toMatchObject({ mayDiscard: false });
    expect(answer('exposure', {}, '2056-12-02')).toMatchObject({ mayDiscard: true });
  });

  it('[LOC-02] keeps what a place’s table does not know, and follows the place’s own years', () => {
    expect(answer('exposure', { jurisdictionId: 'australia' })).toMatchObject({ outcome: 'undecided' });
    expect(answer('exposure', { jurisdictionId: 'great-britain' })).toMatchObject({ outcome: 'undecided' });
    // Northern Ireland 2003 regulations 10(5), read: 40 years for identifiable persons, 5 otherwise; extraction tests 5; health records from memory.
    const gb = (record: RecordKind) => answer(record, { jurisdictionId: 'great-britain' });
    expect(gb('monitoring-of-persons')).toMatchObject({ lastDay: '2066-12-01' });
    expect(gb('monitoring-other')).toMatchObject({ lastDay: '2031-12-01' });
    expect(gb('health-record')).toMatchObject({ lastDay: '2066-12-01' });
    expect(gb('extraction-test')).toMatchObject({ lastDay: '2031-12-01' });
  });

  it('never lets an exposure record go within 30 years', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 20000 }), fc.integer({ min: 0, max: 10957 }), (made, age) => {
        const madeOn = addDays('1980-01-01', made);
        expect(answer('exposure', { madeOn }, addDays(madeOn, age))).toMatchObject({ mayDiscard: false });
      }),
    );
  });

  it('names what a register entry lacks before it stands in for a sheet (trap 16)', () => {
    expect(missingInRegister({ chemicalName: '4,4’-MDI', where: 'Superior, hall 2', usedFrom: '2026-11-02', usedUntil: '2026-11-20' })).toEqual([]);
    expect(missingInRegister({ chemicalName: ' ', where: 'Superior' })).toEqual(['chemicalName', 'usedFrom', 'usedUntil']);
    expect(missingInRegister({ chemicalName: 'x', where: 'y', usedFrom: '2026-11-02', usedUntil: null })).toEqual(['usedUntil']);
  });

  it('refuses a date that does not exist by name, and lists each kind once', () => {
    expect(() => answer('exposure', { madeOn: '2026-02-30' })).toThrow(InputError);
    expect(() => answer('medical', { employmentEndedOn: 'never' })).toThrow(/^employmentEndedOn/);
    expect(new Set(RETENTION_ROWS.map((row) => row.id)).size).toBe(RETENTION_ROWS.length);
  });
});

describe('[REC-02] access, 29 CFR 1910.1020(e)(1), verified', () => {
  it('is due within 15 working days', () => {
    // From Tuesday 1 December 2026, Christmas on Friday the 25th, counted by hand.
    const isHoliday = (day: string) => day === '2026-12-25';
    expect(accessDueOn('2026-12-01', isHoliday)).toEqual({ dueOn: '2026-12-22', earlierDueOn: '2026-12-22' });
    expect(accessDueOn('2026-12-08', isHoliday)).toEqual({ dueOn: '2026-12-30', earlierDueOn: '2026-12-29' });
  });
});

describe('[REC-05] notice of record rights, 29 CFR 1910.1020(g), verified', () => {
  it.each([
    ['never told: at hire', '2026-06-01', null, '2026-06-01'],
    ['told at hire: a year later', '2026-06-01', '2026-06-01', '2027-06-01'],
    ['told in an earlier employment only', '2026-06-01', '2024-06-01', '2026-06-01'],
  ])('%s', (_name, employedOn, lastToldOn, dueOn) => {
    expect(rightsNoticeDueOn(employedOn, lastToldOn)).toBe(dueOn);
  });
});
