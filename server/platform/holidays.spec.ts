import { describe, expect, it } from '@jest/globals';
import { publicHolidays } from './holidays';

const isHoliday = publicHolidays('US')!;

describe('public holidays', () => {
  // Federal holidays of 2026 that fall on their own day (5 USC 6103).
  it.each(['2026-01-01', '2026-01-19', '2026-02-16', '2026-05-25', '2026-06-19', '2026-09-07', '2026-10-12', '2026-11-11', '2026-11-26', '2026-12-25'])('%s is one, whatever the zone of the machine', (day) => {
    expect(isHoliday(day)).toBe(true);
  });

  it.each(['2026-12-24', '2026-12-26', '2026-11-25', '2026-11-27', '2026-12-04'])('%s is none', (day) => {
    expect(isHoliday(day)).toBe(false);
  });

  it('has no calendar for a country that is none', () => {
    expect(publicHolidays('ZZ')).toBeNull();
  });
});
