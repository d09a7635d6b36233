import * as z from 'zod';
import { checkCas } from '#compliance/hazcom/cas';
import { pictograms } from '#compliance/hazcom/ghs-hazards.data';
import { labelElements } from '#compliance/hazcom/label-elements';
import { auditSds } from '#compliance/hazcom/sds-audit';
import { readHazardCodes, statementText } from '#compliance/hazcom/statements';
import { calculation, day, unsaid, type Calculation } from './calculation';

const cas = calculation({
  name: 'cas',
  summary: 'form and check digit of CAS numbers',
  schema: z.strictObject({ casNumbers: z.array(z.string()).min(1) }),
  example: { casNumbers: ['101-68-8', '50-00-1'] },
  run: ({ casNumbers }) => ({ results: casNumbers.map((each) => checkCas(each)) }),
});

const statements = calculation({
  name: 'statements',
  summary: 'reads hazard statements: texts, signal word, pictograms after precedence; unknown codes are asked',
  schema: z.strictObject({ codes: z.array(z.string()).min(1).describe('for example "H302+H332", "H350i"') }),
  example: { codes: ['H334', 'H317', 'H302+H332', 'EUH204'] },
  run: ({ codes }) => {
    const read = readHazardCodes(codes);
    return { statements: read.codes.map((code) => ({ code, text: statementText(code) })), unknown: read.unknown, label: labelElements(read.codes.map((code) => ({ code, category: null }))) };
  },
});

const headings = (number: number, heading: string, text: string) => ({ number, heading, text });
const audit = calculation({
  name: 'sds-audit',
  summary: 'audits one revision of a safety data sheet: 16 sections, least content, statements against signal word and pictograms, CAS numbers, dates',
  schema: z.strictObject({
    asOf: day,
    kind: z.enum(['substance', 'mixture']),
    language: z.string().default('en').describe('BCP 47'),
    sections: z.array(z.strictObject({ number: z.number().int().min(1).max(16), heading: z.string(), text: z.string() })).describe('in the order of the sheet'),
    signalWords: unsaid(z.array(z.enum(['danger', 'warning', 'none']))),
    hazards: unsaid(z.array(z.strictObject({ code: z.string(), category: unsaid(z.string()) }))),
    pictograms: unsaid(z.array(z.enum(pictograms))),
    casNumbers: z.array(z.string()).default([]),
    revisedOn: unsaid(day),
    maxAgeYears: unsaid(z.number().positive().describe('the organization’s own limit of age, years; policy, not law')),
  }),
  example: {
    asOf: '2026-12-01',
    kind: 'mixture',
    sections: [headings(1, 'Identification', 'Product name: Quarrybond 40 Part B. Recommended use: floors.'), headings(2, 'Hazard(s) identification', 'Danger. H334 H317.')],
    signalWords: ['danger'],
    hazards: [{ code: 'H334', category: '1' }, { code: 'H317', category: '1' }],
    pictograms: ['GHS07', 'GHS08'],
    casNumbers: ['101-68-8'],
    revisedOn: '2025-03-01',
  },
  run: ({ asOf, ...sheet }) => {
    const lines = auditSds(sheet, asOf);
    return { counts: { met: lines.filter((l) => l.outcome === 'met').length, unmet: lines.filter((l) => l.outcome === 'unmet').length, undecided: lines.filter((l) => l.outcome === 'undecided').length }, lines };
  },
});

export const SHEET_CALCULATIONS: readonly Calculation[] = [cas, statements, audit];
