import { describe, expect, it } from '@jest/globals';
import { LIMIT_ROWS } from '../air/limits.data';
import { inMgPerM3 } from '../air/limits';
import { APF_ROWS } from '../respirators/apf.data';
import { coverageOf, findPack, listPlaces } from './pack';
import { packAreas, PACKS } from './packs.data';
import { PLACES_WITHOUT_PACK } from './places.data';

const packOf = (id: string) => {
  const found = findPack(id);
  if (found.kind !== 'pack') throw new Error(`no pack for ${id}`);
  return found;
};

describe('[LOC-01] coverage and gaps', () => {
  it('has one complete pack, US federal, with nothing to add on documents', () => {
    expect(PACKS.filter((pack) => findPack(pack.id).gap === null).map((pack) => pack.id)).toEqual(['us-federal']);
    expect(packOf('us-federal')).toMatchObject({ isComplete: true, gap: null });
  });

  it.each(['us-california', 'great-britain'])('%s says on every document what it lacks', (id) => {
    const { isComplete, gap, pack } = packOf(id);
    expect(isComplete).toBe(false);
    expect(gap!.en).toContain('incomplete');
    expect(gap!.es).toContain('incompletas');
    expect(coverageOf(pack).map((each) => each.area)).toEqual(packAreas);
    for (const each of coverageOf(pack)) if (each.state !== 'complete') expect(each.note!.en.length).toBeGreaterThan(5);
  });

  it('gives every complete area a source', () => {
    for (const pack of PACKS) for (const each of coverageOf(pack)) if (each.state === 'complete') expect(each.source).not.toBeNull();
  });
});

describe('[LOC-02] packs of places', () => {
  // Section 9 of the reference: 50 and 25 in the US, 0.1 mg/m³ and no action level in Great Britain, all verified.
  it.each([
    ['us-federal', 50, 25, 'all', 'us-federal'],
    ['us-california', 50, 25, ['i', 'ii', 'iii', 'iv', 'v'], null],
    ['great-britain', 100, null, [], 'great-britain'],
  ])('%s: limit %d µg/m³', (id, limit, actionLevel, table1Rows, apfJurisdictionId) => {
    const { pack } = packOf(id);
    expect(pack.silica).toMatchObject({ limitMicrogramsPerM3: limit, actionLevelMicrogramsPerM3: actionLevel, table1Rows });
    expect(pack.apfJurisdictionId).toBe(apfJurisdictionId);
  });

  it('says the same limits as the table of limits', () => {
    for (const { id, silica } of PACKS) {
      const of = (kind: string) => LIMIT_ROWS.find((row) => row.substanceId === 'rcs' && row.jurisdictionId === id && row.kind === kind);
      const limit = of('twa-8h')!;
      expect(inMgPerM3(limit.value!, limit.unit, null)! * 1000).toBeCloseTo(silica.limitMicrogramsPerM3, 9);
      expect(of('action-level-8h')?.value ?? null).toBe(silica.actionLevelMicrogramsPerM3);
    }
  });

  it('lends no place the factors of another', () => {
    for (const { id, apfJurisdictionId } of PACKS) if (apfJurisdictionId !== null) expect(apfJurisdictionId).toBe(id);
    for (const row of APF_ROWS) expect(PACKS.map((pack) => pack.id)).toContain(row.jurisdictionId);
  });

  it('shows a place without pack its own limit for orientation, and no other', () => {
    // New Zealand 0.025 mg/m³, MBIE, verified.
    expect(findPack('new-zealand')).toMatchObject({ kind: 'no-pack', orientation: [{ value: 0.025, unit: 'mg/m3' }] });
    expect(findPack('us-washington')).toMatchObject({ kind: 'no-pack', gap: { en: expect.stringContaining('federal text shown for orientation') } });
    expect(findPack('us-michigan')).toMatchObject({ kind: 'no-pack', orientation: [] });
    expect(findPack('australia')).toMatchObject({ kind: 'no-pack', gap: { en: expect.not.stringContaining('federal') } });
  });

  it('treats an unknown place as no pack, never as the US', () => {
    expect(findPack('atlantis')).toMatchObject({ kind: 'no-pack', place: null, orientation: [] });
    expect(findPack('us-texas')).toMatchObject({ kind: 'no-pack', place: null, gap: { en: expect.stringContaining('check the state') } });
    expect(findPack('')).toMatchObject({ kind: 'no-pack', place: null });
  });

  it('knows every place of section 9 once', () => {
    const ids = listPlaces().map((each) => each.id);
    expect(new Set(ids).size).toBe(ids.length);
    expect(ids).toEqual([
      'us-federal', 'us-california', 'great-britain', 'us-oregon', 'us-washington', 'us-michigan', 'us-other-state-plan',
      'european-union', 'canada-ontario', 'canada-british-columbia', 'canada-alberta', 'canada-other', 'australia', 'new-zealand',
    ]);
    for (const place of PLACES_WITHOUT_PACK) expect(place.points.length).toBeGreaterThan(0);
    expect(listPlaces().filter((each) => each.hasPack).map((each) => each.isComplete)).toEqual([true, false, false]);
  });

  it('[GATE-09] sets the interval of safety meetings only where the place does', () => {
    // California: every ten working days, 8 CCR 1509 as quoted by the state department.
    expect(PACKS.map((pack) => pack.meetingEveryWorkingDays)).toEqual([null, 10, null]);
  });
});
