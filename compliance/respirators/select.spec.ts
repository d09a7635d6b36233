import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { APF_ROWS, apfOf, apfRowsOf, type FacePiece, type RespiratorDevice } from './apf.data';
import { hazardRatio, maximumUseConcentration, selectForAll, selectRespirator, type RespiratorNeed } from './select';

const need = (changes: Partial<RespiratorNeed> = {}): RespiratorNeed => ({ jurisdictionId: 'us-federal', exposureMgPerM3: 0.6, limitMgPerM3: 0.05, idlhMgPerM3: 50, form: 'particles', hasHoodEvidence: false, ...changes });
const leastApf = (changes: Partial<RespiratorNeed>) => {
  const choice = selectRespirator(need(changes));
  return choice.outcome === 'required' ? choice.leastApf : choice.outcome;
};

describe('[RES-01] assigned protection factors', () => {
  // 29 CFR 1910.134(d)(3)(i)(A) Table 1, whole table read in a reproduction: type, quarter, half, full, hood, loose.
  it.each<[RespiratorDevice, (number | null)[]]>([
    ['air-purifying', [5, 10, 50, null, null]],
    ['powered-air-purifying', [null, 50, 1000, 25, 25]],
    ['supplied-air-demand', [null, 10, 50, null, null]],
    ['supplied-air-continuous-flow', [null, 50, 1000, 25, 25]],
    ['supplied-air-pressure-demand', [null, 50, 1000, null, null]],
    ['scba-demand', [null, 10, 50, 50, null]],
    ['scba-pressure-demand', [null, null, 10000, 10000, null]],
  ])('US, %s: %j', (device, expected) => {
    const faces: FacePiece[] = ['quarter-mask', 'half-mask', 'full-facepiece', 'hood', 'loose-fitting'];
    expect(faces.map((face) => apfRowsOf('us-federal').find((row) => row.device === device && row.facePiece === face)?.apf ?? null)).toEqual(expected);
  });

  it('counts a filtering facepiece as a half mask (note 3)', () => {
    expect(APF_ROWS.find((row) => row.id === 'apf/us-federal/air-purifying/filtering-facepiece')?.apf).toBe(10);
  });

  it('gives a hood 25 unless the maker’s evidence for 1,000 is on file (note 4, trap 8)', () => {
    for (const device of ['powered-air-purifying', 'supplied-air-continuous-flow']) {
      const hood = APF_ROWS.find((row) => row.id === `apf/us-federal/${device}/hood`)!;
      expect([apfOf(hood, false), apfOf(hood, true)]).toEqual([25, 1000]);
    }
    const loose = APF_ROWS.find((row) => row.id === 'apf/us-federal/powered-air-purifying/loose-fitting')!;
    expect(apfOf(loose, true)).toBe(25);
  });

  // UK: university and catalogue for FFP, supplier tables for masks and TH, the rest from memory.
  it.each([
    ['FFP1', 4], ['FFP2', 10], ['FFP3', 20], ['TH1', 10], ['TH2', 20], ['TH3', 40], ['TM1', 10], ['TM2', 20], ['TM3', 40],
  ])('[LOC-02] Great Britain, %s: %d', (filterClass, apf) => {
    expect(apfRowsOf('great-britain').filter((row) => row.filterClass === filterClass).map((row) => row.apf)).toEqual([apf]);
  });
  it.each([
    ['half-mask', [['P1', 4], ['P2', 10], ['P3', 20], ['gas', 10]]],
    ['full-facepiece', [['P2', 10], ['P3', 40], ['gas', 20]]],
  ])('[LOC-02] Great Britain, %s: %j', (face, expected) => {
    expect(apfRowsOf('great-britain').filter((row) => row.device === 'air-purifying' && row.facePiece === face).map((row) => [row.filterClass, row.apf])).toEqual(expected);
  });
  it('[LOC-02] Great Britain, air line and SCBA, from memory', () => {
    expect(apfRowsOf('great-britain').filter((row) => row.filterClass === null).map((row) => [row.device, row.apf, row.source.verified])).toEqual([
      ['supplied-air-continuous-flow', 40, 'from-memory'],
      ['scba-pressure-demand', 2000, 'from-memory'],
    ]);
  });

  it('stands once for each place, device, face piece and class', () => {
    expect(new Set(APF_ROWS.map((row) => row.id)).size).toBe(APF_ROWS.length);
    expect(APF_ROWS).toHaveLength(39);
  });
});

describe('[RES-02] maximum use concentration', () => {
  // A11: NIOSH recommendation block for a limit of 0.05 mg/m³, verified.
  it.each([
    [10, 0.5],
    [25, 1.25],
    [50, 2.5],
    [1000, 50],
    [2000, 100],
  ])('factor %d at 0.05 mg/m³ → %d mg/m³', (apf, expected) => {
    expect(maximumUseConcentration(apf, 0.05, null)).toBeCloseTo(expected, 12);
  });

  it('is capped where it would pass the immediately dangerous level', () => {
    expect(maximumUseConcentration(2000, 0.05, 50)).toBe(50);
    expect(maximumUseConcentration(10, 0.05, 50)).toBe(0.5);
  });
});

describe('[SIL-14] choice by hazard ratio', () => {
  it.each([
    ['B3, derived: 600 µg/m³, ratio 12', { exposureMgPerM3: 0.6 }, 25],
    ['B3, derived: 500 µg/m³, ratio exactly 10', { exposureMgPerM3: 0.5 }, 10],
    ['B3, derived: 67.5 µg/m³, ratio 1.35', { exposureMgPerM3: 0.0675 }, 10],
    ['exactly at the limit', { exposureMgPerM3: 0.05 }, 'none-required'],
    ['just above the limit', { exposureMgPerM3: 0.0501 }, 10],
    ['A12, supplier guidance, verified: wood dust 45 against 5 in Great Britain', { jurisdictionId: 'great-britain', exposureMgPerM3: 45, limitMgPerM3: 5, idlhMgPerM3: null }, 10],
    ['Great Britain, ratio exactly 10: the factor must be above it', { jurisdictionId: 'great-britain', exposureMgPerM3: 1, limitMgPerM3: 0.1 }, 20],
  ])('%s', (_name, changes, expected) => {
    expect(leastApf(changes)).toBe(expected);
  });

  it('computes the ratio of 9 in A12 and does not stumble over decimals', () => {
    expect(hazardRatio(45, 5)).toBe(9);
    expect(hazardRatio(0.7, 0.07)).toBe(10);
  });

  it('[RES-06] says which options need a fit test: tight-fitting ones, powered too', () => {
    const choice = selectRespirator(need());
    const options = choice.outcome === 'required' ? choice.options : [];
    const needsFit = new Map(options.map(({ row, needsFitTest }) => [row.id, needsFitTest]));
    expect(needsFit.get('apf/us-federal/powered-air-purifying/loose-fitting')).toBe(false);
    expect(needsFit.get('apf/us-federal/powered-air-purifying/hood')).toBe(false);
    expect(needsFit.get('apf/us-federal/powered-air-purifying/half-mask')).toBe(true);
    expect(needsFit.get('apf/us-federal/air-purifying/full-facepiece')).toBe(true);
  });

  it('[RES-03] asks for a change schedule against gas or vapor and never offers a paper mask', () => {
    const choice = selectRespirator(need({ form: 'gas-or-vapor', exposureMgPerM3: 0.3, limitMgPerM3: 0.2, idlhMgPerM3: 75 }));
    const options = choice.outcome === 'required' ? choice.options : [];
    expect(options.map(({ row }) => row.facePiece)).not.toContain('filtering-facepiece');
    expect(options.filter((each) => each.needsChangeSchedule).every(({ row }) => row.device.endsWith('air-purifying'))).toBe(true);
    expect(options.some((each) => each.needsChangeSchedule)).toBe(true);
    expect(options.some((each) => !each.needsChangeSchedule)).toBe(true);
  });

  it('[RES-04] treats an exposure nobody can estimate as immediately dangerous, 29 CFR 1910.134(d)(1)(iii)', () => {
    expect(selectRespirator(need({ exposureMgPerM3: null }))).toMatchObject({ outcome: 'immediately-dangerous', whoDecides: { en: 'an industrial hygienist' } });
  });

  it('[RES-02] calls an exposure above the immediately dangerous level so, whatever the factors', () => {
    expect(leastApf({ exposureMgPerM3: 50 })).toBe(1000);
    expect(leastApf({ exposureMgPerM3: 50.1 })).toBe('immediately-dangerous');
  });

  it('[LOC-02] is undecided without limit or factors of the place', () => {
    expect(leastApf({ limitMgPerM3: null })).toBe('undecided');
    expect(leastApf({ jurisdictionId: 'australia' })).toBe('undecided');
    expect(leastApf({ jurisdictionId: 'us-california' })).toBe('undecided');
  });

  it('[LOC-02] cites no US paragraph for a place outside the US, whatever comes out (conduct 9)', () => {
    for (const jurisdictionId of ['australia', 'great-britain', 'canada-ontario', 'nowhere', '']) {
      for (const changes of [{}, { exposureMgPerM3: null }, { exposureMgPerM3: 0.01 }, { exposureMgPerM3: 60 }, { limitMgPerM3: null }]) expect(selectRespirator(need({ jurisdictionId, ...changes })).source.citation).not.toContain('29 CFR');
    }
    expect(selectRespirator(need({ exposureMgPerM3: null })).source.citation).toContain('29 CFR');
  });

  it('takes the strictest of several contaminants (trap 10), and an undecided one holds all', () => {
    const silica = need({ exposureMgPerM3: 0.1 });
    const worse = need({ exposureMgPerM3: 0.6 });
    expect(selectForAll([silica, worse])).toMatchObject({ outcome: 'required', leastApf: 25 });
    expect(selectForAll([worse, silica])).toMatchObject({ outcome: 'required', leastApf: 25 });
    expect(selectForAll([worse, need({ limitMgPerM3: null })])).toMatchObject({ outcome: 'undecided' });
    expect(selectForAll([need({ limitMgPerM3: null }), need({ exposureMgPerM3: null })])).toMatchObject({ outcome: 'immediately-dangerous' });
    expect(selectForAll([need({ exposureMgPerM3: 0.01 }), need({ exposureMgPerM3: 0.02 })])).toMatchObject({ outcome: 'none-required' });
  });

  it('refuses impossible values by name', () => {
    expect(() => selectRespirator(need({ exposureMgPerM3: -1 }))).toThrow(InputError);
    expect(() => selectRespirator(need({ limitMgPerM3: 0 }))).toThrow(/^limit/);
  });

  it('never lowers the factor when the measured exposure is higher', () => {
    const rank = (exposureMgPerM3: number) => {
      const choice = selectRespirator(need({ exposureMgPerM3 }));
      return choice.outcome === 'none-required' ? 1 : choice.outcome === 'required' ? choice.leastApf : Number.POSITIVE_INFINITY;
    };
    fc.assert(
      fc.property(fc.double({ min: 0, max: 60, noNaN: true }), fc.double({ min: 0, max: 60, noNaN: true }), (exposure, more) => {
        expect(rank(exposure + more)).toBeGreaterThanOrEqual(rank(exposure));
      }),
    );
  });

  it('offers only options whose use concentration covers the exposure', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.051, max: 49, noNaN: true }), fc.boolean(), (exposureMgPerM3, hasHoodEvidence) => {
        const choice = selectRespirator(need({ exposureMgPerM3, hasHoodEvidence }));
        for (const option of choice.outcome === 'required' ? choice.options : []) expect(option.maximumUseConcentrationMgPerM3).toBeGreaterThanOrEqual(exposureMgPerM3 - 1e-9);
      }),
    );
  });
});
