import { casesOf, type RuleCases } from '../rules/case';
import { sourced, usFederal } from '../source';
import { type SdsForAudit } from './sds-audit';
import { SDS_SECTIONS } from './sds-sections.data';
import { sheetAudit, sheetMatchesProduct, trainingAtNewHazard } from './sheet-rules';

const DAY = '2026-12-01';
const READ = (paragraph: string) => usFederal('1910.1200', 'read', { paragraph });

/** A sheet that says every least thing in one line a section; used as the example of the audit. */
export const EXAMPLE_SHEET: SdsForAudit = {
  kind: 'mixture',
  language: 'en',
  sections: SDS_SECTIONS.map(({ number, heading }) => ({ number, heading: heading.en, text: EXAMPLE_TEXT(number) })),
  signalWords: ['danger'],
  hazards: [{ code: 'H334', category: '1' }, { code: 'H317', category: '1' }],
  pictograms: ['GHS08'],
  casNumbers: ['101-68-8'],
  revisedOn: '2025-03-01',
  maxAgeYears: null,
};

function EXAMPLE_TEXT(section: number): string {
  const texts: Record<number, string> = {
    1: 'Product name Quarrybond 40 Part B. Recommended use: floors. Northlode Resins, 1 Quarry Road, Superior, WI 54880, (715) 555-0100. Emergency phone, 24 h.',
    2: 'Classification: category 1. P280. Hazards not otherwise classified: none.',
    3: 'MDI 101-68-8, 40-60 %',
    4: 'Inhalation: fresh air. Symptoms: cough.',
    5: 'Extinguishing media: foam.',
    6: 'Personal precautions: gloves. Contain and clean up.',
    7: 'Handling: ventilate. Storage: dry.',
    8: 'OSHA PEL. Engineering controls. Gloves.',
    9: 'Flash point 200 °C. pH none.',
    10: 'Conditions to avoid: water.',
    11: 'LD50 oral. IARC: not listed.',
    16: 'Date of revision 2025-03-01',
  };
  return texts[section] ?? '-';
}

export const SHEET_CASES: readonly RuleCases[] = [
  casesOf(sheetAudit, [
    { name: 'a whole sheet', facts: EXAMPLE_SHEET, asOf: DAY, expected: 'met', source: READ('App. D') },
    { name: 'section 14 missing', facts: { ...EXAMPLE_SHEET, sections: EXAMPLE_SHEET.sections.filter((each) => each.number !== 14) }, asOf: DAY, expected: 'unmet', source: READ('App. D') },
    { name: 'Warning beside H334', facts: { ...EXAMPLE_SHEET, signalWords: ['warning'] }, asOf: DAY, expected: 'unmet', source: READ('App. C.2.1') },
    { name: 'a CAS number with a wrong digit', facts: { ...EXAMPLE_SHEET, casNumbers: ['50-00-1'] }, asOf: DAY, expected: 'unmet', source: sourced('trade note on CAS numbers', 'read') },
    { name: 'pictograms not read', facts: { ...EXAMPLE_SHEET, pictograms: null }, asOf: DAY, expected: 'undecided', source: READ('App. C') },
    { name: 'older than policy allows: no fault in law', facts: { ...EXAMPLE_SHEET, revisedOn: '2019-01-01', maxAgeYears: 5 }, asOf: DAY, expected: 'met', source: READ('(g)(5)') },
  ]),
  casesOf(sheetMatchesProduct, [
    { name: 'the same date', facts: { productName: 'Quarrybond 40', confirmedRevisedOn: '2025-03-01', receivedRevisedOn: '2025-03-01' }, asOf: DAY, expected: 'met', source: READ('(g)(1)') },
    { name: 'no confirmed sheet', facts: { productName: 'Quarrybond 40', confirmedRevisedOn: null, receivedRevisedOn: null }, asOf: DAY, expected: 'unmet', source: READ('(g)(1)') },
    { name: 'a newer one came with the product', facts: { productName: 'Quarrybond 40', confirmedRevisedOn: '2025-03-01', receivedRevisedOn: '2026-09-01' }, asOf: DAY, expected: 'unmet', source: usFederal('1910.1200', 'from-memory', { paragraph: '(g)(6)-(7)' }) },
    { name: 'not compared', facts: { productName: 'Quarrybond 40', confirmedRevisedOn: '2025-03-01', receivedRevisedOn: null }, asOf: DAY, expected: 'undecided', source: usFederal('1910.1200', 'from-memory', { paragraph: '(g)(6)-(7)' }) },
  ]),
  casesOf(trainingAtNewHazard, [
    { name: 'a new class', facts: { jobCodes: ['H334'], trainedClasses: ['Skin sensitization'] }, asOf: DAY, expected: 'unmet', source: READ('(h)(1)') },
    { name: 'another product of a known class', facts: { jobCodes: ['H317'], trainedClasses: ['Skin sensitization'] }, asOf: DAY, expected: 'met', source: READ('(h)(1)') },
    { name: 'a code nobody knows', facts: { jobCodes: ['H999'], trainedClasses: [] }, asOf: DAY, expected: 'undecided', source: sourced('trap 18 of the reference: ask, never drop', 'derived') },
    { name: 'no statements', facts: { jobCodes: [], trainedClasses: [] }, asOf: DAY, expected: 'not-applicable', source: READ('(h)(1)') },
  ]),
];
