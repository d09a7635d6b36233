import { casesOf, type RuleCases } from '../rules/case';
import { silicaPlanReview } from '../plans/silica-plan';
import { sourced, usFederal } from '../source';
import { accessInTime, mayDiscardRecord, rightsNotice, safetyMeetings } from './record-rules';
import { type RecordFacts } from './retention';

const DAY = '2026-12-01';
const READ = (paragraph: string) => usFederal('1910.1020', 'read', { paragraph });
const record = (changes: Partial<RecordFacts>): RecordFacts => ({ record: 'exposure', jurisdictionId: 'us-federal', madeOn: '1996-12-01', employmentEndedOn: null, isReplaced: false, hasSubstitute: false, ...changes });
const CAL = sourced('8 CCR 1509', 'read');

export const RECORD_CASES: readonly RuleCases[] = [
  casesOf(mayDiscardRecord, [
    { name: 'exposure record on its last day', facts: record({}), asOf: DAY, expected: 'unmet', expectedDueOn: '2026-12-01', source: READ('(d)(1)(ii)') },
    { name: 'exposure record the day after', facts: record({}), asOf: '2026-12-02', expected: 'met', source: READ('(d)(1)(ii)') },
    { name: 'sheet beside a register of use', facts: record({ record: 'sheet', hasSubstitute: true }), asOf: DAY, expected: 'not-applicable', source: READ('(d)(1)(ii)(B)') },
    { name: 'medical record of someone still employed', facts: record({ record: 'medical' }), asOf: DAY, expected: 'unmet', source: READ('(d)(1)(i)') },
    { name: 'a place without periods', facts: record({ jurisdictionId: 'australia' }), asOf: DAY, expected: 'undecided', source: sourced('duty LOC-02', 'derived') },
  ]),
  casesOf(accessInTime, [
    { name: 'on the last day', facts: { requestedOn: '2026-12-01', givenOn: '2026-12-22', holidays: ['2026-12-25'], isDelayExplained: false }, asOf: '2026-12-22', expected: 'met', expectedDueOn: '2026-12-22', source: READ('(e)(1)') },
    { name: 'not given, too late', facts: { requestedOn: '2026-12-01', givenOn: null, holidays: [], isDelayExplained: false }, asOf: '2026-12-23', expected: 'unmet', source: READ('(e)(1)') },
    { name: 'later, explained', facts: { requestedOn: '2026-12-01', givenOn: '2026-12-29', holidays: [], isDelayExplained: true }, asOf: '2026-12-29', expected: 'met', source: READ('(e)(1)') },
    { name: 'still time', facts: { requestedOn: '2026-12-01', givenOn: null, holidays: [], isDelayExplained: false }, asOf: '2026-12-02', expected: 'undecided', source: READ('(e)(1)') },
  ]),
  casesOf(rightsNotice, [
    { name: 'told within the year', facts: { employedOn: '2024-06-01', lastToldOn: '2026-06-01' }, asOf: DAY, expected: 'met', expectedDueOn: '2027-06-01', source: READ('(g)(1)') },
    { name: 'more than a year ago', facts: { employedOn: '2024-06-01', lastToldOn: '2025-06-01' }, asOf: DAY, expected: 'unmet', source: READ('(g)(1)') },
    { name: 'hired today, not told', facts: { employedOn: DAY, lastToldOn: null }, asOf: DAY, expected: 'unmet', expectedDueOn: DAY, source: READ('(g)(1)') },
  ]),
  casesOf(safetyMeetings, [
    { name: 'ten working days, on the day', facts: { everyWorkingDays: 10, lastHeldOn: '2026-11-17', holidays: [] }, asOf: DAY, expected: 'met', expectedDueOn: '2026-12-01', source: CAL },
    { name: 'a day late', facts: { everyWorkingDays: 10, lastHeldOn: '2026-11-16', holidays: [] }, asOf: DAY, expected: 'unmet', source: CAL },
    { name: 'none held', facts: { everyWorkingDays: 10, lastHeldOn: null, holidays: [] }, asOf: DAY, expected: 'unmet', source: CAL },
    { name: 'no interval here', facts: { everyWorkingDays: null, lastHeldOn: null, holidays: [] }, asOf: DAY, expected: 'not-applicable', source: usFederal('1926.21', 'from-memory') },
  ]),
  casesOf(silicaPlanReview, [
    { name: 'reviewed a year ago to the day', facts: { lastDoneOn: '2025-12-01' }, asOf: DAY, expected: 'met', expectedDueOn: DAY, source: usFederal('1926.1153', 'read', { paragraph: '(g)(2)' }) },
    { name: 'a day too long ago', facts: { lastDoneOn: '2025-11-30' }, asOf: DAY, expected: 'unmet', source: usFederal('1926.1153', 'read', { paragraph: '(g)(2)' }) },
    { name: 'never', facts: { lastDoneOn: null }, asOf: DAY, expected: 'unmet', source: usFederal('1926.1153', 'read', { paragraph: '(g)(2)' }) },
  ]),
];
