import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { addDays } from '../iso-date';
import { monitoringSchedule, reassessment } from './monitoring';

const LIMITS = { actionLevelMicrogramsPerM3: 25, limitMicrogramsPerM3: 50 };
const results = (...pairs: [on: string, value: number][]) => pairs.map(([sampledOn, twaMicrogramsPerM3]) => ({ sampledOn, twaMicrogramsPerM3 }));
const next = (asOf: string, ...pairs: [string, number][]) => monitoringSchedule(results(...pairs), LIMITS, asOf);

describe('[SIL-08] scheduled monitoring, 29 CFR 1926.1153(d)(2)(iii)', () => {
  // B2, derived from (d)(2)(iii)(B) to (E); the figures stand on the boundaries.
  it.each<[string, [string, number][], string, string | null, boolean]>([
    ['24.9, initial', [['2026-06-01', 24.9]], 'may-stop', null, false],
    ['25.0, initial', [['2026-06-01', 25]], 'repeat', '2026-12-01', false],
    ['50.0, initial', [['2026-06-01', 50]], 'repeat', '2026-12-01', false],
    ['50.1, initial', [['2026-06-01', 50.1]], 'repeat', '2026-09-01', true],
    ['50.1, repeat', [['2026-01-05', 40], ['2026-06-01', 50.1]], 'repeat', '2026-09-01', true],
    ['20 after 40', [['2026-01-05', 40], ['2026-06-01', 20]], 'repeat', '2026-12-01', false],
    ['20 then 22, 6 days apart', [['2026-01-05', 40], ['2026-06-01', 20], ['2026-06-07', 22]], 'repeat', '2026-12-07', false],
    ['20 then 22, 7 days apart', [['2026-01-05', 40], ['2026-06-01', 20], ['2026-06-08', 22]], 'may-stop', null, false],
    ['a high result opens it again', [['2026-01-05', 20], ['2026-06-01', 30]], 'repeat', '2026-12-01', false],
    ['a further low one keeps it ended', [['2026-01-05', 40], ['2026-05-01', 20], ['2026-05-08', 22], ['2026-05-09', 21]], 'may-stop', null, false],
  ])('%s (trap 13)', (_name, pairs, step, dueOn, needsCorrectiveAction) => {
    expect(next('2026-06-10', ...pairs)).toMatchObject({ step, dueOn, needsCorrectiveAction });
  });

  it('counts from the sampling day and clamps at the end of the month (convention)', () => {
    expect(next('2026-12-01', ['2026-11-30', 60]).dueOn).toBe('2027-02-28');
    expect(next('2027-12-01', ['2027-11-30', 60]).dueOn).toBe('2028-02-29');
    expect(next('2026-09-01', ['2026-08-31', 30]).dueOn).toBe('2027-02-28');
  });

  it('is overdue the day after, not on the day', () => {
    expect(next('2026-09-01', ['2026-06-01', 60]).isOverdue).toBe(false);
    expect(next('2026-09-02', ['2026-06-01', 60]).isOverdue).toBe(true);
  });

  it('takes the highest of a day, and starts with a first sample', () => {
    expect(next('2026-06-10', ['2026-06-01', 20], ['2026-06-01', 60], ['2026-06-01', 30])).toMatchObject({ dueOn: '2026-09-01' });
    expect(next('2026-06-10')).toMatchObject({ step: 'sample-first', dueOn: null });
  });

  it('follows the limits it is given, not those of the US', () => {
    const other = { actionLevelMicrogramsPerM3: 12.5, limitMicrogramsPerM3: 25 };
    expect(monitoringSchedule(results(['2026-06-01', 26]), other, '2026-06-10').needsCorrectiveAction).toBe(true);
  });

  it('refuses impossible values by name', () => {
    expect(() => next('2026-06-10', ['2026-06-31', 20])).toThrow(/^results\[0\]\.sampledOn/);
    expect(() => next('2026-06-10', ['2026-06-01', Number.NaN])).toThrow(/^results\[0\]\.twaMicrogramsPerM3/);
    expect(() => next('2026-06-10', ['2026-06-11', 20])).toThrow(InputError);
    expect(() => monitoringSchedule([], { actionLevelMicrogramsPerM3: 25, limitMicrogramsPerM3: 20 }, '2026-06-10')).toThrow(/^limitMicrogramsPerM3/);
  });

  const anyResults = fc.array(fc.record({ day: fc.integer({ min: 0, max: 900 }), value: fc.integer({ min: 0, max: 120 }) }), { minLength: 1, maxLength: 8 });
  it('changes with no permutation, and a higher latest result never gives more time', () => {
    const rank = (pairs: { day: number; value: number }[]) => {
      const schedule = monitoringSchedule(pairs.map(({ day, value }) => ({ sampledOn: addDays('2024-01-01', day), twaMicrogramsPerM3: value })), LIMITS, '2026-12-01');
      return schedule.dueOn ?? '9999';
    };
    fc.assert(
      fc.property(anyResults, fc.integer({ min: 0, max: 60 }), (pairs, more) => {
        expect(rank([...pairs].reverse())).toBe(rank(pairs));
        const last = Math.max(...pairs.map((each) => each.day));
        const raised = pairs.map((each) => (each.day === last ? { ...each, value: each.value + more } : each));
        expect(rank(raised) <= rank(pairs)).toBe(true);
      }),
    );
  });
});

describe('[SIL-09] reassessment on change, 29 CFR 1926.1153(d)(2)(iv)', () => {
  const change = (on: string, canRaiseExposure: boolean | null) => ({ on, kind: 'process' as const, canRaiseExposure });
  it.each([
    ['a change that can raise exposure', [change('2026-06-02', true)], 'needed'],
    ['a change nobody judged', [change('2026-06-02', null)], 'undecided'],
    ['a change judged harmless', [change('2026-06-02', false)], 'not-needed'],
    ['a change before the assessment', [change('2026-05-31', true)], 'not-needed'],
    ['one of each', [change('2026-06-02', null), change('2026-06-03', true)], 'needed'],
  ])('%s', (_name, changes, outcome) => {
    expect(reassessment('2026-06-01', changes).outcome).toBe(outcome);
  });
});
