import { type RuleCase } from '../rule';
import { casesOf, type RuleCases } from '../rules/case';
import { sourced, usFederal, type Source } from '../source';
import { averageWithinLimit, collectorAirflow, dilutionEnough, mixtureWithinLimits, type AirflowFacts, type AverageFacts, type DilutionFacts } from './air-rules';
import { monitoringDue, reassessOnChange, type ChangeFacts, type MonitoringFacts } from './monitoring-rules';
import { noticeOfAssessment, type NoticeFacts } from './notice-rule';
import { MM_PER_INCH, m3PerHFromCfm } from '../quantities/units';

const DAY = '2026-12-01';
const DERIVED = (what: string): Source => sourced(what, 'derived');
const A1 = usFederal('1910.1000', 'read', { paragraph: '(d)(1)(ii)' });
const B2 = usFederal('1926.1153', 'derived', { paragraph: '(d)(2)(iii)' });

const average = (changes: Partial<AverageFacts>): AverageFacts => ({ substanceId: 'rcs', jurisdictionId: 'us-federal', shiftMinutes: 480, periods: [{ concentrationMgPerM3: 0.05, minutes: 480 }], ...changes });
const averageCase = (name: string, changes: Partial<AverageFacts>, expected: RuleCase<AverageFacts>['expected'], source: Source): RuleCase<AverageFacts> => ({ name, facts: average(changes), asOf: DAY, expected, source });

const monitoring = (name: string, results: [string, number][], expected: RuleCase<MonitoringFacts>['expected'], expectedDueOn: string | null, asOf = DAY): RuleCase<MonitoringFacts> => ({
  name,
  facts: { results: results.map(([sampledOn, twaMicrogramsPerM3]) => ({ sampledOn, twaMicrogramsPerM3 })), limits: { actionLevelMicrogramsPerM3: 25, limitMicrogramsPerM3: 50 } },
  asOf,
  expected,
  expectedDueOn,
  source: B2,
});

const notice = (name: string, changes: Partial<NoticeFacts>, expected: RuleCase<NoticeFacts>['expected'], asOf: string): RuleCase<NoticeFacts> => ({
  name,
  facts: { assessmentCompletedOn: '2026-12-04', scope: 'construction', holidays: ['2026-12-25'], toldOn: null, isAboveLimit: false, namesCorrectiveAction: null, ...changes },
  asOf,
  expected,
  expectedDueOn: '2026-12-11',
  source: usFederal('1926.1153', 'derived', { paragraph: '(d)(2)(vi)', note: 'B5: Friday 4 December 2026.' }),
});

const changed = (name: string, canRaiseExposure: boolean | null, expected: RuleCase<ChangeFacts>['expected']): RuleCase<ChangeFacts> => ({
  name,
  facts: { lastAssessedOn: '2026-06-01', changes: [{ on: '2026-09-01', kind: 'control', canRaiseExposure }] },
  asOf: DAY,
  expected,
  source: usFederal('1926.1153', 'read', { paragraph: '(d)(2)(iv)' }),
});

const airflow = (name: string, changes: Partial<AirflowFacts>, expected: RuleCase<AirflowFacts>['expected'], source: Source): RuleCase<AirflowFacts> => ({
  name,
  facts: { isHandheldGrinder: true, wheelDiameterMm: 5 * MM_PER_INCH, makerAirflowM3PerH: null, measuredM3PerH: m3PerHFromCfm(125), ...changes },
  asOf: DAY,
  expected,
  source,
});
const ROW_XII = usFederal('1926.1153', 'read', { paragraph: '(c)(1) Table 1 row (xii)' });
const ROW_XIII = usFederal('1926.1153', 'read', { paragraph: '(c)(1) Table 1 row (xiii)' });

const dilution = (name: string, changes: Partial<DilutionFacts>, expected: RuleCase<DilutionFacts>['expected'], source: Source): RuleCase<DilutionFacts> => ({
  name,
  facts: { form: 'vapor', hazardCodes: ['H336'], evaporationGPerH: 936.9, molarMassGPerMol: 133.4, targetPpm: 350, mixingFactor: 5, suppliedM3PerH: 2460, ...changes },
  asOf: DAY,
  expected,
  source,
});
const A15 = sourced('Industrial ventilation manual, example of methyl chloroform', 'from-memory');
const UNSUITABLE = sourced('Industrial ventilation practice', 'from-memory');

export const AIR_CASES: readonly RuleCases[] = [
  casesOf(averageWithinLimit, [
    averageCase('exactly at the limit is not above it', {}, 'met', usFederal('1926.1153', 'read', { paragraph: '(d)(1)' })),
    averageCase('B3: 67.5 µg/m³', { periods: [{ concentrationMgPerM3: 0.18, minutes: 120 }, { concentrationMgPerM3: 0.04, minutes: 240 }, { concentrationMgPerM3: 0.01, minutes: 120 }] }, 'unmet', DERIVED('worked example B3')),
    averageCase('B3: ten hours at 45 divided by 8', { shiftMinutes: 600, periods: [{ concentrationMgPerM3: 0.045, minutes: 600 }] }, 'unmet', DERIVED('worked example B3')),
    averageCase('A1 in its own figures, carbon monoxide instead: 47.5 ppm', { substanceId: 'carbon-monoxide', periods: [{ concentrationMgPerM3: 54.4, minutes: 480 }] }, 'met', A1),
    averageCase('minutes without a figure', { periods: [{ concentrationMgPerM3: 0.05, minutes: 60 }] }, 'undecided', A1),
    averageCase('a place without a limit on file', { jurisdictionId: 'us-michigan' }, 'undecided', DERIVED('duty LOC-02')),
    averageCase('a limit that counts particles', { substanceId: 'portland-cement' }, 'undecided', usFederal('1926.55', 'read')),
  ]),
  casesOf(mixtureWithinLimits, [
    { name: 'A2: 0.925', facts: { members: [{ name: 'B', concentration: 500, limit: 1000 }, { name: 'C', concentration: 45, limit: 200 }, { name: 'D', concentration: 40, limit: 200 }] }, asOf: DAY, expected: 'met', source: usFederal('1910.1000', 'read', { paragraph: '(d)(2)(ii)' }) },
    { name: 'just above 1', facts: { members: [{ name: 'B', concentration: 500, limit: 1000 }, { name: 'C', concentration: 101, limit: 200 }] }, asOf: DAY, expected: 'unmet', source: DERIVED('Em > 1') },
    { name: 'one without a limit', facts: { members: [{ name: 'B', concentration: 1, limit: null }] }, asOf: DAY, expected: 'undecided', source: DERIVED('Em needs a limit for each') },
  ]),
  casesOf(monitoringDue, [
    monitoring('B2: 24.9 first', [['2026-06-01', 24.9]], 'met', null),
    monitoring('B2: 25.0 first, on the day', [['2026-06-01', 25]], 'met', '2026-12-01'),
    monitoring('B2: 25.0 first, a day late', [['2026-06-01', 25]], 'unmet', '2026-12-01', '2026-12-02'),
    monitoring('B2: 50.1, three months', [['2026-06-01', 50.1]], 'unmet', '2026-09-01'),
    monitoring('no sample', [], 'undecided', null),
  ]),
  casesOf(reassessOnChange, [changed('a change that can raise it', true, 'unmet'), changed('a change nobody judged', null, 'undecided'), changed('a change that cannot', false, 'met')]),
  casesOf(noticeOfAssessment, [
    notice('told on the last day', { toldOn: '2026-12-11' }, 'met', '2026-12-14'),
    notice('told a working day late', { toldOn: '2026-12-14' }, 'unmet', '2026-12-14'),
    notice('not told, still time', {}, 'undecided', '2026-12-11'),
    notice('not told, too late', {}, 'unmet', '2026-12-12'),
    notice('above the limit, corrective action named', { toldOn: '2026-12-07', isAboveLimit: true, namesCorrectiveAction: true }, 'met', '2026-12-07'),
    notice('above the limit, not named', { toldOn: '2026-12-07', isAboveLimit: true, namesCorrectiveAction: false }, 'unmet', '2026-12-07'),
    notice('above the limit, nobody looked', { toldOn: '2026-12-07', isAboveLimit: true }, 'undecided', '2026-12-07'),
  ]),
  casesOf(collectorAirflow, [
    airflow('A14: 125 cfm at a 5-inch wheel', {}, 'met', ROW_XII),
    airflow('124 cfm loses Table 1', { measuredM3PerH: m3PerHFromCfm(124) }, 'unmet', ROW_XII),
    airflow('not measured', { measuredM3PerH: null }, 'undecided', ROW_XII),
    airflow('walk-behind without the maker’s figure', { isHandheldGrinder: false }, 'undecided', ROW_XIII),
    airflow('walk-behind at the maker’s figure', { isHandheldGrinder: false, makerAirflowM3PerH: 212 }, 'met', ROW_XIII),
  ]),
  casesOf(dilutionEnough, [
    dilution('A15: 1,425 cfm is 2,421 m³/h, supplied 2,460', {}, 'met', A15),
    dilution('A15: too little', { suppliedM3PerH: 2300 }, 'unmet', A15),
    dilution('dust', { form: 'dust' }, 'unmet', UNSUITABLE),
    dilution('a sensitizer', { hazardCodes: ['H334'] }, 'unmet', UNSUITABLE),
    dilution('fans not known', { suppliedM3PerH: null }, 'undecided', A15),
    dilution('nothing evaporates', { evaporationGPerH: 0 }, 'not-applicable', DERIVED('the formula gives zero')),
  ]),
];
