import { describe, expect, it } from '@jest/globals';
import { clock, hoursOf, lengthWords, minuteOfClock, moved, percentOf, rangeOf, rowsOf } from './shift-geometry';
import { type ShiftBlock, type ShiftLane } from './shift-lane';

function block(id: string, startMinute: number, endMinute: number): ShiftBlock {
  return { id, taskId: id, label: id, pattern: 'grinding', startMinute, endMinute, heldWords: null, isElsewhere: false };
}

function lane(...blocks: readonly ShiftBlock[]): ShiftLane {
  return { personId: 'p', name: 'Dov Lindqvist', note: '', alert: null, blocks, table1Minutes: 0, maskRuleChangesAtMinute: null };
}

describe('what the strip spans', () => {
  it('is the whole half hours around all blocks of all lanes', () => {
    expect(rangeOf([lane(block('a', 400, 552)), lane(block('b', 762, 881))])).toEqual({ startMinute: 390, endMinute: 900 });
  });

  it('is at least four hours, so that one short task is no whole width', () => {
    expect(rangeOf([lane(block('a', 420, 450))])).toEqual({ startMinute: 420, endMinute: 660 });
  });

  it('names full hours but none so near the edge that its words hang over', () => {
    expect(hoursOf({ startMinute: 390, endMinute: 605 }).map(clock)).toEqual(['07:00', '08:00', '09:00']);
  });

  // The drawn page puts 07:00 of a day from 06:30 to 15:00 at 30 of 510 minutes.
  it('places a minute by its share of the day', () => {
    expect(percentOf(420, { startMinute: 390, endMinute: 900 })).toBeCloseTo(5.88, 2);
  });
});

describe('moving a block', () => {
  const grinding = { startMinute: 420, endMinute: 550 };

  it.each([
    ['whole', 17, { startMinute: 435, endMinute: 565 }],
    ['whole', -2, { startMinute: 420, endMinute: 550 }],
    ['start', 30, { startMinute: 450, endMinute: 550 }],
    ['end', -30, { startMinute: 420, endMinute: 520 }],
    ['start', 500, { startMinute: 545, endMinute: 550 }],
    ['end', -500, { startMinute: 420, endMinute: 425 }],
    ['whole', -1000, { startMinute: 0, endMinute: 130 }],
    ['whole', 9000, { startMinute: 2750, endMinute: 2880 }],
    ['end', 9000, { startMinute: 420, endMinute: 2880 }],
  ] as const)('by its %s by %i minutes goes in steps of five and keeps within bounds', (grip, by, expected) => {
    expect(moved(grinding, grip, by)).toEqual(expected);
  });
});

describe('rows of a lane', () => {
  it('keeps work one after another in one row', () => {
    expect(rowsOf([block('a', 420, 480), block('b', 480, 540)]).count).toBe(1);
  });

  it('sets work at the same time under one another, and uses the first free row again', () => {
    const { rowById, count } = rowsOf([block('c', 540, 600), block('b', 450, 600), block('a', 420, 500)]);
    expect(count).toBe(2);
    expect([...rowById]).toEqual([
      ['a', 0],
      ['b', 1],
      ['c', 0],
    ]);
  });
});

describe('times in words', () => {
  it.each([
    [390, '06:30'],
    [0, '00:00'],
    [1500, '01:00'],
  ])('minute %i reads %s on the clock, also past midnight', (minute, expected) => {
    expect(clock(minute)).toBe(expected);
  });

  it.each([
    ['07:10', 420, 430],
    ['01:00', 1470, 1500],
    ['23:50', 1450, 1430],
    ['7.10', 420, 430],
    ['0710', 420, 430],
    ['', 420, null],
    ['24:00', 420, null],
    ['7:60', 420, null],
    ['soon', 420, null],
  ])('clock time "%s" near minute %i means minute %s', (time, near, expected) => {
    expect(minuteOfClock(time, near)).toBe(expected);
  });

  it.each([
    [45, '45 min'],
    [130, '2 h 10'],
    [240, '4 h'],
    [245, '4 h 05'],
  ])('%i minutes read "%s"', (minutes, expected) => {
    expect(lengthWords(minutes)).toBe(expected);
  });
});
