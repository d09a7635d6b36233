import { addDays } from '../iso-date';
import { casesOf, type RuleCases } from '../rules/case';
import { usFederal } from '../source';
import { type Wearer } from './fit-test';
import { medicalSurveillance, respiratorByRatio, respiratorProgramEvaluation, wearerReady, type ChosenRespiratorFacts } from './respirator-rules';

const DAY = '2026-12-01';
const READ = (paragraph: string) => usFederal('1910.134', 'read', { paragraph });
const chosen = (changes: Partial<ChosenRespiratorFacts> = {}): ChosenRespiratorFacts => ({
  jurisdictionId: 'us-federal',
  exposureMgPerM3: 0.6,
  limitMgPerM3: 0.05,
  idlhMgPerM3: 50,
  form: 'particles',
  hasHoodEvidence: false,
  plannedApf: 25,
  areControlsFirst: true,
  hasChangeSchedule: null,
  usesCartridge: false,
  ...changes,
});
const model = { maker: 'Harrow', model: 'H6', style: 'half mask', size: 'M' };
const wearer = (changes: Partial<Wearer> = {}): Wearer => ({
  facePiece: 'half-mask',
  isNegativePressure: true,
  wears: model,
  clearedOn: '2026-03-01',
  fitTests: [{ ...model, testedOn: '2026-03-02', kind: 'quantitative', isPassed: true, fitFactor: 200 }],
  faceChangedOn: null,
  hasHairAtSeal: false,
  trainedOn: '2026-04-01',
  hazardRatio: null,
  ...changes,
});
const days = (count: number) => Array.from({ length: count }, (_, i) => ({ on: addDays('2026-06-01', i), basis: 'silica-table-1' as const }));

export const RESPIRATOR_CASES: readonly RuleCases[] = [
  casesOf(respiratorByRatio, [
    { name: 'B3: ratio 12, factor 25', facts: chosen(), asOf: DAY, expected: 'met', source: usFederal('1910.134', 'derived', { paragraph: '(d)(3)(i)(B)' }) },
    { name: 'B3: ratio 12, factor 10', facts: chosen({ plannedApf: 10 }), asOf: DAY, expected: 'unmet', source: usFederal('1910.134', 'derived', { paragraph: '(d)(3)(i)(B)' }) },
    { name: 'nothing planned', facts: chosen({ plannedApf: null }), asOf: DAY, expected: 'unmet', source: READ('(d)(1)') },
    { name: 'exposure unknown', facts: chosen({ exposureMgPerM3: null }), asOf: DAY, expected: 'undecided', source: READ('(d)(1)(iii)') },
    { name: 'not above the limit', facts: chosen({ exposureMgPerM3: 0.05 }), asOf: DAY, expected: 'not-applicable', source: usFederal('1926.1153', 'read', { paragraph: '(d)(1)' }) },
    { name: 'controls not named', facts: chosen({ areControlsFirst: null }), asOf: DAY, expected: 'undecided', source: usFederal('1926.1153', 'partly', { paragraph: '(d)(3)(i)' }) },
    { name: 'cartridge without a change schedule', facts: chosen({ form: 'gas-or-vapor', usesCartridge: true, hasChangeSchedule: false }), asOf: DAY, expected: 'unmet', source: READ('(d)(3)(iii)') },
    { name: 'cartridge, schedule not looked for', facts: chosen({ form: 'gas-or-vapor', usesCartridge: true }), asOf: DAY, expected: 'undecided', source: READ('(d)(3)(iii)') },
    { name: 'a place without factors', facts: chosen({ jurisdictionId: 'australia' }), asOf: DAY, expected: 'undecided', source: usFederal('1910.134', 'derived', { note: 'Factors are not transferable.' }) },
  ]),
  casesOf(wearerReady, [
    { name: 'all in order: good until the fit test ends', facts: wearer(), asOf: DAY, expected: 'met', expectedDueOn: '2027-03-02', source: READ('(f)(2)') },
    { name: 'not cleared', facts: wearer({ clearedOn: null }), asOf: DAY, expected: 'unmet', source: READ('(e)(1)') },
    { name: 'another size', facts: wearer({ wears: { ...model, size: 'L' } }), asOf: DAY, expected: 'unmet', source: READ('(f)(2)') },
    { name: 'hair at the seal', facts: wearer({ hasHairAtSeal: true }), asOf: DAY, expected: 'unmet', source: READ('(g)(1)(i)') },
    { name: 'nobody looked at the seal', facts: wearer({ hasHairAtSeal: null }), asOf: DAY, expected: 'undecided', source: READ('(g)(1)(i)') },
    { name: 'training ran out', facts: wearer({ trainedOn: '2025-11-30' }), asOf: DAY, expected: 'unmet', source: READ('(k)(5)') },
  ]),
  casesOf(medicalSurveillance, [
    { name: '29 days', facts: { days: days(29), assignedOn: '2026-06-01', lastExamOn: null, clinicianWantsBy: null }, asOf: DAY, expected: 'not-applicable', source: usFederal('1926.1153', 'parallel-text', { paragraph: '(h)(1)(i)' }) },
    { name: '30 days, no exam', facts: { days: days(30), assignedOn: '2026-06-01', lastExamOn: null, clinicianWantsBy: null }, asOf: DAY, expected: 'unmet', expectedDueOn: '2026-07-01', source: usFederal('1926.1153', 'parallel-text', { paragraph: '(h)(1)(i), (h)(2)' }) },
    { name: '30 days, examined last year', facts: { days: days(30), assignedOn: '2026-06-01', lastExamOn: '2025-06-01', clinicianWantsBy: null }, asOf: DAY, expected: 'met', expectedDueOn: '2028-06-01', source: usFederal('1926.1153', 'partly', { paragraph: '(h)(3)' }) },
  ]),
  casesOf(respiratorProgramEvaluation, [
    { name: 'this year', facts: { lastDoneOn: '2026-01-15' }, asOf: DAY, expected: 'met', expectedDueOn: '2027-01-15', source: usFederal('1910.134', 'from-memory', { paragraph: '(l)' }) },
    { name: 'never', facts: { lastDoneOn: null }, asOf: DAY, expected: 'unmet', source: usFederal('1910.134', 'from-memory', { paragraph: '(l)' }) },
  ]),
];
