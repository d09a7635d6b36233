import { describe, expect, it } from '@jest/globals';
import { InputError } from '../input-error';
import { checkWearer, type FitTest, type Wearer } from './fit-test';

const model = { maker: 'Harrow', model: 'H6', style: 'half mask', size: 'M' };
const test = (changes: Partial<FitTest> = {}): FitTest => ({ ...model, testedOn: '2026-03-02', kind: 'quantitative', isPassed: true, fitFactor: 200, ...changes });
const wearer = (changes: Partial<Wearer> = {}): Wearer => ({
  facePiece: 'half-mask',
  isNegativePressure: true,
  wears: model,
  clearedOn: '2026-03-01',
  fitTests: [test()],
  faceChangedOn: null,
  hasHairAtSeal: false,
  trainedOn: '2026-03-02',
  hazardRatio: null,
  ...changes,
});
const open = (changes: Partial<Wearer> = {}, asOf = '2026-12-01') =>
  checkWearer(wearer(changes), asOf).filter((each) => each.outcome === 'unmet' || each.outcome === 'undecided').map((each) => `${each.id} ${each.outcome}`);

// 29 CFR 1910.134(e), (f), (g), (k): all read, section 2.4 of the reference.
describe('[RES-06] fit test', () => {
  it('lets a cleared, tested, shaved and trained wearer work', () => {
    expect(open()).toEqual([]);
  });

  it.each<[string, Partial<Wearer>, string[]]>([
    ['none', { fitTests: [] }, ['fit-test unmet']],
    ['another size', { fitTests: [test({ size: 'L' })] }, ['fit-test unmet']],
    ['another style', { fitTests: [test({ style: 'full face' })] }, ['fit-test unmet']],
    ['another model', { fitTests: [test({ model: 'H7' })] }, ['fit-test unmet']],
    ['another maker', { fitTests: [test({ maker: 'Other' })] }, ['fit-test unmet']],
    ['not passed', { fitTests: [test({ isPassed: false })] }, ['fit-test unmet']],
    ['passed, then failed', { fitTests: [test(), test({ testedOn: '2026-09-01', isPassed: false })] }, ['fit-test unmet']],
    ['after a change of the face', { faceChangedOn: '2026-05-01' }, ['fit-test unmet']],
    ['before a change of the face', { faceChangedOn: '2026-01-01' }, []],
    ['older than the clearance', { clearedOn: '2026-03-03' }, ['fit-test undecided']],
    ['fit factor under 100', { fitTests: [test({ fitFactor: 99 })] }, ['fit-factor unmet']],
    ['fit factor of 100', { fitTests: [test({ fitFactor: 100 })] }, []],
    ['full face under 500', { facePiece: 'full-facepiece', fitTests: [test({ fitFactor: 499 })] }, ['fit-factor unmet']],
    ['full face with 500', { facePiece: 'full-facepiece', fitTests: [test({ fitFactor: 500 })] }, []],
    ['fit factor not on file', { fitTests: [test({ fitFactor: null })] }, ['fit-factor undecided']],
    ['by taste, ratio above 10', { facePiece: 'full-facepiece', hazardRatio: 10.1, fitTests: [test({ kind: 'qualitative', fitFactor: null })] }, ['fit-factor unmet']],
    ['by taste, ratio 10', { facePiece: 'full-facepiece', hazardRatio: 10, fitTests: [test({ kind: 'qualitative', fitFactor: null })] }, []],
    ['by taste, tight powered, ratio 20', { isNegativePressure: false, hazardRatio: 20, fitTests: [test({ kind: 'qualitative', fitFactor: null })] }, []],
  ])('%s', (_name, changes, expected) => {
    expect(open(changes)).toEqual(expected);
  });

  it('runs a year from the test: good on the day, not the day after (trap 11)', () => {
    expect(open({ trainedOn: '2027-03-01' }, '2027-03-02')).toEqual([]);
    expect(open({ trainedOn: '2027-03-01' }, '2027-03-03')).toEqual(['fit-test unmet']);
  });

  it('asks none of a loose hood (trap 8), but still a clearance', () => {
    expect(open({ facePiece: 'loose-fitting', fitTests: [], hasHairAtSeal: true })).toEqual([]);
    expect(open({ facePiece: 'loose-fitting', fitTests: [], clearedOn: null })).toEqual(['clearance unmet']);
    expect(open({ facePiece: 'half-mask', isNegativePressure: false, fitTests: [] })).toEqual(['fit-test unmet']);
  });

  it('refuses a date that does not exist by name', () => {
    expect(() => open({ fitTests: [test({ testedOn: '2026-02-29' })] })).toThrow(InputError);
    expect(() => open({ clearedOn: 'soon' })).toThrow(/^clearedOn/);
  });
});

describe('[RES-05] medical clearance', () => {
  it('comes first and has no yearly repeat (trap 11)', () => {
    expect(open({ clearedOn: null })).toContain('clearance unmet');
    expect(open({ clearedOn: '2026-12-02' })).toContain('clearance unmet');
    expect(open({ clearedOn: '2020-01-01' })).toEqual([]);
  });
});

describe('[RES-07] facial hair', () => {
  it.each([
    [true, ['facial-hair unmet']],
    [null, ['facial-hair undecided']],
    [false, []],
  ])('hair at the seal: %s', (hasHairAtSeal, expected) => {
    expect(open({ hasHairAtSeal })).toEqual(expected);
  });
});

describe('[RES-08] respirator training', () => {
  it('is due before use and every year', () => {
    expect(open({ trainedOn: null })).toEqual(['training unmet']);
    expect(open({ trainedOn: '2025-12-01' })).toEqual([]);
    expect(open({ trainedOn: '2025-11-30' })).toEqual(['training unmet']);
  });
});
