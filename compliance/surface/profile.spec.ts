import { describe, expect, it } from '@jest/globals';
import { InputError } from '../input-error';
import { methodsFor, profileAnswer, profileForThickness } from './profile';
import { COATING_RANGES, METHOD_RANGES, PROFILE_CHIPS } from './profiles.data';

const exception = { writtenBy: 'Northlode Resins', reference: 'letter NR-114 of 2 Nov 2026', text: 'A coarse grind with primer is accepted under Quarrybond 40.' };

describe('surface profiles', () => {
  // Section 10.1 of the reference: ranges from memory.
  it.each([
    ['detergent-scrub', 1, 1], ['acid-etch', 1, 3], ['grinding', 1, 3], ['abrasive-blasting', 2, 5], ['shot-blasting', 2, 8],
    ['scarifying', 4, 7], ['needle-scaling', 2, 4], ['scabbling', 7, 9], ['water-jetting', 3, 10], ['milling', 7, 10],
  ])('%s gives CSP %d to %d', (method, min, max) => {
    const row = METHOD_RANGES.find((each) => each.method === method)!;
    expect([row.minProfile, row.maxProfile, row.source.verified]).toEqual([min, max, 'from-memory']);
  });

  it('has ten chips, named as read: 2 is grinding, 5 is medium shot blast', () => {
    expect(PROFILE_CHIPS.map((row) => row.profile)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
    expect(PROFILE_CHIPS[1]!.name.en).toBe('grinding');
    expect(PROFILE_CHIPS[4]!.name.en).toBe('medium shot blast');
    // Chips 1 to 6 in three sources, 7 to 10 in an instrument maker's list.
    expect(PROFILE_CHIPS.filter((row) => row.source.note!.includes('three sources')).map((row) => row.profile)).toEqual([1, 2, 3, 4, 5, 6]);
  });

  it('proposes methods for a target, the gentlest first', () => {
    expect(methodsFor(5).map((row) => row.method)).toEqual(['abrasive-blasting', 'scarifying', 'shot-blasting', 'water-jetting']);
    expect(methodsFor(2).map((row) => row.method)).toEqual(['acid-etch', 'grinding', 'needle-scaling', 'abrasive-blasting', 'shot-blasting']);
    for (let target = 1; target <= 10; target += 1) expect(methodsFor(target).length).toBeGreaterThan(0);
  });

  it('meets a profile that the last method reaches', () => {
    expect(profileAnswer(5, ['grinding', 'shot-blasting']).outcome).toBe('met');
    expect(profileAnswer(3, ['grinding']).outcome).toBe('met');
  });

  it('records a coarse grind for CSP 5 as the written exception it is, never "meets CSP 5" (conduct 4)', () => {
    const answer = profileAnswer(5, ['grinding'], exception);
    expect(answer.outcome).toBe('exception');
    expect(answer.reason.en).toContain('not 5');
    expect(answer.reason.en).toContain(exception.reference);
    const without = profileAnswer(5, ['grinding']);
    expect(without.outcome).toBe('unmet');
    expect('proposals' in without && without.proposals.map((row) => row.method)).toContain('shot-blasting');
  });

  it('says that grinding after blasting undoes it', () => {
    const answer = profileAnswer(5, ['shot-blasting', 'grinding']);
    expect(answer.outcome).toBe('unmet');
    expect(answer.reason.en).toMatch(/grind first, then blast/);
    expect(answer.reason.es).toMatch(/primero pulir/);
  });

  it('is undecided without a target or a method, and does not let an exception excuse too much', () => {
    expect(profileAnswer(null, ['grinding']).outcome).toBe('undecided');
    expect(profileAnswer(5, []).outcome).toBe('undecided');
    expect(profileAnswer(2, ['milling'], exception).outcome).toBe('unmet');
  });

  // Guide from memory; 10 mil = 0.254 mm, 40 mil = 1.016 mm, 1/8 in = 3.175 mm, 1/4 in = 6.35 mm.
  it.each([
    [0.254, 1, 3], [0.255, 3, 5], [1.016, 3, 5], [1.017, 4, 6], [3.175, 4, 6], [3.176, 5, 9], [6.35, 5, 9], [6.351, 5, 10],
  ])('%d mm asks for CSP %d to %d', (thicknessMm, min, max) => {
    const row = profileForThickness(thicknessMm);
    expect([row.minProfile, row.maxProfile]).toEqual([min, max]);
    expect(COATING_RANGES).toContain(row);
  });

  it('refuses a profile that is none by name', () => {
    expect(() => methodsFor(0)).toThrow(InputError);
    expect(() => methodsFor(11)).toThrow(/^targetProfile/);
    expect(() => methodsFor(2.5)).toThrow(/whole number/);
    expect(() => profileForThickness(0)).toThrow(/^thicknessMm/);
  });
});
