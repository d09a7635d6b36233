import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { addDays } from '../iso-date';
import { countRespiratorDays, silicaExamDue, type RespiratorBasis } from './respirator-days';

const run = (from: string, count: number, basis: RespiratorBasis = 'silica-table-1', step = 1) => Array.from({ length: count }, (_, i) => ({ on: addDays(from, i * step), basis }));

// 29 CFR 1926.1153(h)(1)(i), parallel texts read.
describe('[SIL-20] respirator days: required by the silica standard, looked ahead (trap 14, conduct 12)', () => {
  it('trigger at 30, not at 29', () => {
    expect(countRespiratorDays(run('2026-06-01', 29), '2026-12-01')).toMatchObject({ inLast12Months: 29, isTriggered: false, reachedOn: null });
    expect(countRespiratorDays(run('2026-06-01', 30), '2026-12-01')).toMatchObject({ inLast12Months: 30, isTriggered: true, reachedOn: '2026-06-30' });
  });

  it('look ahead: scheduled days trigger before they are worked', () => {
    const days = [...run('2026-11-01', 20), ...run('2026-12-10', 10)];
    expect(countRespiratorDays(days, '2026-12-01')).toMatchObject({ inLast12Months: 20, inAny12Months: 30, isTriggered: true, reachedOn: '2026-12-19' });
  });

  it('count a day once, whatever the jobs and tasks', () => {
    const twice = [...run('2026-06-01', 20), ...run('2026-06-01', 20, 'silica-assessment')];
    expect(countRespiratorDays(twice, '2026-12-01')).toMatchObject({ inLast12Months: 20 });
  });

  it.each<RespiratorBasis>(['sheet', 'other-standard', 'host-rule', 'policy', 'voluntary'])('do not count a respirator on the basis of: %s', (basis) => {
    expect(countRespiratorDays(run('2026-06-01', 40, basis), '2026-12-01')).toMatchObject({ inLast12Months: 0, notCounted: 40, isTriggered: false });
  });

  it('run over any 12 months, with the calendar year beside', () => {
    const days = [...run('2025-12-10', 15), ...run('2026-02-01', 15)];
    expect(countRespiratorDays(days, '2026-12-01')).toMatchObject({ inAny12Months: 30, inCalendarYear: 15, isTriggered: true });
    // Fifteen days a year apart to the day never stand in one 12-month window together.
    expect(countRespiratorDays([...run('2025-03-01', 15), ...run('2026-03-15', 15)], '2026-12-01')).toMatchObject({ inAny12Months: 15, isTriggered: false });
    // The day a year after the first belongs to the next 12 months.
    expect(countRespiratorDays([...run('2026-01-05', 29), { on: '2027-01-05', basis: 'silica-table-1' }], '2026-12-01')).toMatchObject({ inAny12Months: 29, isTriggered: false });
    expect(countRespiratorDays([...run('2026-01-05', 29), { on: '2027-01-04', basis: 'silica-table-1' }], '2026-12-01')).toMatchObject({ inAny12Months: 30, reachedOn: '2027-01-04' });
    expect(countRespiratorDays([{ on: '2025-12-01', basis: 'silica-table-1' }, { on: '2025-12-02', basis: 'silica-table-1' }], '2026-12-01').inLast12Months).toBe(1);
  });

  it('refuse a day that does not exist by name', () => {
    expect(() => countRespiratorDays([{ on: '2026-02-29', basis: 'policy' }], '2026-12-01')).toThrow(InputError);
    expect(() => countRespiratorDays([{ on: '2026-02-29', basis: 'policy' }], '2026-12-01')).toThrow(/^days\[0\]\.on/);
  });

  it('never fall when a day is added, whatever the order', () => {
    const anyDay = fc.record({ offset: fc.integer({ min: 0, max: 500 }), basis: fc.constantFrom<RespiratorBasis>('silica-table-1', 'silica-assessment', 'sheet', 'voluntary') });
    fc.assert(
      fc.property(fc.array(anyDay, { maxLength: 60 }), anyDay, (some, more) => {
        const of = (list: typeof some) => countRespiratorDays(list.map(({ offset, basis }) => ({ on: addDays('2026-01-01', offset), basis })), '2026-12-01');
        const before = of(some);
        const after = of([...some, more]);
        expect(after.inAny12Months).toBeGreaterThanOrEqual(before.inAny12Months);
        expect(after.isTriggered || !before.isTriggered).toBe(true);
        expect(of([...some].reverse())).toEqual(before);
        expect(before.reachedOn !== null).toBe(before.isTriggered);
      }),
    );
  });
});

// 29 CFR 1926.1153(h)(2)-(3): initial timing read in Oregon and Washington texts, every three years in an OSHA fact sheet.
describe('[SIL-21] silica exam dates', () => {
  const due = (assignedOn: string, lastExamOn: string | null, clinicianWantsBy: string | null = null) => silicaExamDue({ assignedOn, lastExamOn, clinicianWantsBy }, '2026-12-01');
  it.each([
    ['never examined: 30 days after assignment', ['2026-11-20', null], { dueOn: '2026-12-20', kind: 'initial', isOverdue: false }],
    ['examined two years ago: three years after that', ['2026-11-20', '2024-11-20'], { dueOn: '2027-11-20', kind: 'repeat', isOverdue: false }],
    ['exactly three years before: still equivalent', ['2026-11-20', '2023-11-20'], { dueOn: '2026-11-20', kind: 'repeat', isOverdue: true }],
    ['more than three years ago: initial again', ['2026-11-20', '2023-11-19'], { dueOn: '2026-12-20', kind: 'initial', isOverdue: false }],
    ['overdue', ['2026-10-01', null], { dueOn: '2026-10-31', kind: 'initial', isOverdue: true }],
  ])('%s', (_name, [assignedOn, lastExamOn], expected) => {
    expect(due(assignedOn!, lastExamOn!)).toEqual(expected);
  });

  it('follows the clinician where that is sooner', () => {
    expect(due('2026-11-20', '2025-11-20', '2027-05-20').dueOn).toBe('2027-05-20');
    expect(due('2026-11-20', '2025-11-20', '2030-05-20').dueOn).toBe('2028-11-20');
  });
});
