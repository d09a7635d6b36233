import { describe, expect, it } from '@jest/globals';
import { checkCas } from '../hazcom/cas';
import { readHazardCodes } from '../hazcom/statements';
import { findLimit, inMgPerM3, limitsOf } from './limits';
import { LIMIT_ROWS } from './limits.data';
import { findSubstance, SUBSTANCES } from './substances.data';

const ASOF = '2026-12-01';
const printed = LIMIT_ROWS.map((row) => [row.id.replace('limit/', ''), row.value, row.unit]);

describe('[AIR-02] limits', () => {
  // The figures as the reference states them (sections 9 and 11), row by row, with how each was verified.
  it.each([
    ['rcs/us-federal/construction/twa-8h/respirable', 50, 'ug/m3', 'read'],
    ['rcs/us-federal/construction/action-level-8h/respirable', 25, 'ug/m3', 'read'],
    ['rcs/us-california/construction/twa-8h/respirable', 50, 'ug/m3', 'read'],
    ['rcs/us-california/construction/action-level-8h/respirable', 25, 'ug/m3', 'read'],
    ['rcs/us-oregon/construction/twa-8h/respirable', 50, 'ug/m3', 'read'],
    ['rcs/us-oregon/construction/action-level-8h/respirable', 25, 'ug/m3', 'read'],
    ['rcs/us-washington/construction/twa-8h/respirable', 50, 'ug/m3', 'read'],
    ['rcs/us-washington/construction/action-level-8h/respirable', 25, 'ug/m3', 'read'],
    ['rcs/great-britain/any-work/twa-8h/respirable', 0.1, 'mg/m3', 'partly'],
    ['rcs/european-union/any-work/twa-8h/respirable', 0.1, 'mg/m3', 'read'],
    ['rcs/canada-ontario/any-work/twa-8h/respirable', 0.1, 'mg/m3', 'read'],
    ['rcs/canada-british-columbia/any-work/twa-8h/respirable', 0.025, 'mg/m3', 'read'],
    ['rcs/canada-alberta/any-work/twa-8h/respirable', 0.025, 'mg/m3', 'read'],
    ['rcs/australia/any-work/twa-8h/respirable', 0.05, 'mg/m3', 'partly'],
    ['rcs/new-zealand/any-work/twa-8h/respirable', 0.025, 'mg/m3', 'read'],
    ['rcs/acgih/advice/twa-8h/respirable', 0.025, 'mg/m3', 'read'],
    ['rcs/niosh/advice/twa-10h/respirable', 0.05, 'mg/m3', 'read'],
    ['rcs/niosh/advice/idlh/respirable', 50, 'mg/m3', 'from-memory'],
    ['portland-cement/us-federal/construction/twa-8h', 50, 'mppcf', 'partly'],
    ['portland-cement/us-federal/general-industry/twa-8h/total', 15, 'mg/m3', 'partly'],
    ['portland-cement/us-federal/general-industry/twa-8h', 50, 'mppcf', 'read'],
    ['portland-cement/acgih/advice/twa-8h/respirable', 1, 'mg/m3', 'from-memory'],
    ['portland-cement/niosh/advice/twa-10h/total', 10, 'mg/m3', 'read'],
    ['portland-cement/niosh/advice/idlh', 5000, 'mg/m3', 'read'],
    ['calcium-hydroxide/us-federal/construction/twa-8h', null, 'mg/m3', 'partly'],
    ['calcium-hydroxide/us-federal/general-industry/twa-8h/total', 15, 'mg/m3', 'partly'],
    ['calcium-hydroxide/us-federal/general-industry/twa-8h/respirable', 5, 'mg/m3', 'partly'],
    ['calcium-hydroxide/acgih/advice/twa-8h', 5, 'mg/m3', 'read'],
    ['calcium-hydroxide/niosh/advice/twa-10h', 5, 'mg/m3', 'read'],
    ['mdi/us-federal/construction/ceiling/vapor', 0.02, 'ppm', 'read'],
    ['mdi/us-federal/general-industry/ceiling/vapor', 0.02, 'ppm', 'read'],
    ['mdi/acgih/advice/twa-8h/vapor', 0.005, 'ppm', 'read'],
    ['mdi/niosh/advice/twa-10h/vapor', 0.005, 'ppm', 'read'],
    ['mdi/niosh/advice/ceiling-10-min/vapor', 0.02, 'ppm', 'read'],
    ['mdi/niosh/advice/idlh', 75, 'mg/m3', 'read'],
    ['polymeric-mdi/us-federal/construction/twa-8h', null, 'ppm', 'read'],
    ['badge/us-federal/construction/twa-8h', null, 'mg/m3', 'from-memory'],
    ['bisphenol-f-resin/us-federal/construction/twa-8h', null, 'mg/m3', 'from-memory'],
    ['ipda/us-federal/construction/twa-8h', null, 'ppm', 'from-memory'],
    ['benzyl-alcohol/us-federal/construction/twa-8h', null, 'ppm', 'from-memory'],
    ['benzyl-alcohol/aiha/advice/twa-8h/vapor', 10, 'ppm', 'from-memory'],
    ['mda/us-federal/construction/twa-8h', 10, 'ppb', 'partly'],
    ['mda/us-federal/construction/stel-15-min', 100, 'ppb', 'partly'],
    ['mda/us-federal/construction/action-level-8h', 5, 'ppb', 'partly'],
    ['carbon-monoxide/us-federal/construction/twa-8h/vapor', 50, 'ppm', 'from-memory'],
  ])('%s: %d %s (%s)', (id, value, unit, verified) => {
    const row = LIMIT_ROWS.find((each) => each.id === `limit/${id}`)!;
    expect([row.value, row.unit, row.source.verified]).toEqual([value, unit, verified]);
  });

  it('holds no row beyond those above, and none twice', () => {
    expect(printed).toHaveLength(45);
    expect(new Set(LIMIT_ROWS.map((row) => row.id)).size).toBe(45);
  });

  it('answers with the construction figure, never general industry’s', () => {
    expect(findLimit('portland-cement', 'us-federal', 'twa-8h', ASOF)).toMatchObject({ isDecided: true, row: { value: 50, unit: 'mppcf' } });
    // OSHA's page lists calcium hydroxide for general industry and maritime only, verified.
    expect(findLimit('calcium-hydroxide', 'us-federal', 'twa-8h', ASOF)).toMatchObject({ isDecided: false });
  });

  it('[LOC-02] never lends one place the figure of another', () => {
    expect(findLimit('rcs', 'great-britain', 'twa-8h', ASOF)).toMatchObject({ row: { value: 0.1, unit: 'mg/m3' } });
    // Great Britain has no action level, verified.
    expect(findLimit('rcs', 'great-britain', 'action-level-8h', ASOF)).toMatchObject({ isDecided: false });
    expect(findLimit('mdi', 'great-britain', 'ceiling', ASOF)).toMatchObject({ isDecided: false });
    expect(findLimit('rcs', 'atlantis', 'twa-8h', ASOF)).toMatchObject({ isDecided: false });
    expect(findLimit('rcs', 'acgih', 'twa-8h', ASOF)).toMatchObject({ isDecided: false });
  });

  it('asks for the value in force on the day', () => {
    expect(findLimit('rcs', 'us-federal', 'twa-8h', '2017-06-22')).toMatchObject({ isDecided: false });
    expect(findLimit('rcs', 'us-federal', 'twa-8h', '2017-06-23')).toMatchObject({ isDecided: true });
  });

  it('converts explicitly: ppm, ppb, µg and mg, and refuses to convert particle counts (trap 23)', () => {
    expect(inMgPerM3(50, 'ug/m3', null)).toBe(0.05);
    expect(inMgPerM3(0.02, 'ppm', 250.26)).toBeCloseTo(0.2047, 4);
    // Derived: 10 ppb of MDA (198.26 g/mol) = 0.0811 mg/m³.
    expect(inMgPerM3(10, 'ppb', 198.26)).toBeCloseTo(0.0811, 4);
    expect(inMgPerM3(50, 'mppcf', null)).toBeNull();
    expect(inMgPerM3(1, 'ppm', null)).toBeNull();
  });
});

describe('[AIR-02] substances', () => {
  it('carry CAS numbers with a right check digit and statements that exist', () => {
    for (const substance of SUBSTANCES) {
      expect(substance.casNumbers.filter((each) => !checkCas(each).isValid)).toEqual([]);
      expect(readHazardCodes(substance.usualCodes).unknown).toEqual([]);
    }
    expect(findSubstance('9016-87-9')?.id).toBe('polymeric-mdi');
    expect(findSubstance('50-00-0')).toBeNull();
  });

  it('have a limit or a stated absence of one each', () => {
    for (const { id } of SUBSTANCES) expect(limitsOf(id).length).toBeGreaterThan(0);
    expect(new Set(LIMIT_ROWS.map((row) => row.substanceId))).toEqual(new Set(SUBSTANCES.map((each) => each.id)));
  });

  // Molar masses by formula (IUPAC atomic weights): Ca(OH)2, C15H10N2O2, C7H8O, C10H22N2, C13H14N2, CO.
  it.each([
    ['calcium-hydroxide', 74.09],
    ['mdi', 250.26],
    ['benzyl-alcohol', 108.14],
    ['ipda', 170.3],
    ['mda', 198.26],
    ['carbon-monoxide', 28.01],
  ])('%s weighs %d g/mol', (id, molarMass) => {
    expect(SUBSTANCES.find((each) => each.id === id)?.molarMassGPerMol).toBe(molarMass);
  });
});
