import { describe, expect, it } from '@jest/globals';
import { InputError } from '../input-error';
import { auditSds, type SdsForAudit } from './sds-audit';
import { acceptedTexts } from './sds-phase-in.data';
import { SDS_CONTENT, SDS_SECTIONS } from './sds-sections.data';

const TEXT: Record<number, string> = {
  1: 'Product name: Quarrybond 40 Part B. Recommended use: floor coating. Northlode Resins, 1 Quarry Road, Superior, WI 54880, (715) 555-0100. Emergency phone 24 h.',
  2: 'Classification: Skin sensitizer category 1. P280. Hazards not otherwise classified: none.',
  3: 'Diphenylmethane diisocyanate 101-68-8 40-60 %',
  4: 'Inhalation: fresh air. Symptoms: cough.',
  5: 'Suitable extinguishing media: foam.',
  6: 'Personal precautions: gloves. Contain and clean up with absorbent.',
  7: 'Handling: ventilate. Storage: dry.',
  8: 'OSHA PEL ceiling 0.02 ppm. Engineering controls: ventilation. Gloves.',
  9: 'Flash point 200 °C. pH not applicable.',
  10: 'Conditions to avoid: water.',
  11: 'LD50 oral > 2000 mg/kg. IARC: not listed.',
  12: '-', 13: '-', 14: '-', 15: '-',
  16: 'Date of last revision 2025-03-01',
};
const sheet = (changes: Partial<SdsForAudit> = {}): SdsForAudit => ({
  kind: 'mixture',
  language: 'en',
  sections: SDS_SECTIONS.map(({ number, heading }) => ({ number, heading: heading.en, text: TEXT[number]! })),
  signalWords: ['danger'],
  hazards: [
    { code: 'H334', category: '1' },
    { code: 'H317', category: '1' },
  ],
  pictograms: ['GHS08'],
  casNumbers: ['101-68-8'],
  revisedOn: '2025-03-01',
  maxAgeYears: null,
  ...changes,
});
const open = (changes: Partial<SdsForAudit> = {}, asOf = '2026-12-01') =>
  auditSds(sheet(changes), asOf).filter((line) => line.outcome === 'unmet' || line.outcome === 'undecided').map((line) => `${line.id} ${line.outcome}`);

describe('[HAZ-06] SDS audit, 29 CFR 1910.1200 App. D', () => {
  it('finds nothing on a whole 2012-style mixture sheet in December 2026', () => {
    expect(open()).toEqual([]);
  });

  it('names a missing, a misnamed, an empty and a misplaced section', () => {
    const sections = sheet().sections;
    expect(open({ sections: sections.filter((each) => each.number !== 13) })).toEqual(['section-13 unmet']);
    expect(open({ sections: sections.map((each) => (each.number === 12 ? { ...each, heading: 'Notes' } : each)) })).toEqual(['section-12 unmet']);
    expect(open({ sections: sections.map((each) => (each.number === 9 ? { ...each, text: ' ' } : each)) })).toContain('section-9 unmet');
    expect(open({ sections: sections.map((each) => (each.number === 12 ? { ...each, text: '' } : each)) })).toEqual([]);
    expect(open({ sections: [...sections].reverse() })).toEqual(['section-order unmet']);
  });

  it('asks for content it does not find, and never calls it absent', () => {
    const sections = sheet().sections.map((each) => (each.number === 1 ? { ...each, text: 'Product name: Quarrybond 40. Use: floors. Emergency 24 h.' } : each));
    expect(open({ sections })).toEqual(['content-1.address undecided', 'content-1.phone undecided']);
  });

  it('has minimum content for each enforced section', () => {
    expect(new Set(SDS_CONTENT.map((row) => row.section))).toEqual(new Set([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 16]));
    expect(new Set(SDS_CONTENT.map((row) => row.id)).size).toBe(SDS_CONTENT.length);
  });

  // Common practice, no source: the ways sheets write these; CAS numbers have two to seven, two and one digits (CAS).
  it.each<[string, string, readonly string[], readonly string[]]>([
    ['an emergency telephone', 'sds-content/1.emergency-phone', ['Call us 24 h a day', 'emergency'], ['Call us 23 h a day']],
    ['precautionary codes', 'sds-content/2.precautionary', ['P280'], ['P28', 'P2800']],
    ['CAS numbers', 'sds-content/3.ingredients', ['50-00-0', '1317-65-3'], ['5-00-0', '50-0-0']],
    ['lethal doses', 'sds-content/11.routes', ['LD50 rat', 'LC50 rat', 'LD 50 rat', 'DL50 rata'], ['LD 101 rat']],
  ])('knows %s as they are written', (_name, id, written, others) => {
    const marks = SDS_CONTENT.find((row) => row.id === id)!.marks;
    for (const text of written) expect([text, marks.test(text)]).toEqual([text, true]);
    for (const text of others) expect([text, marks.test(text)]).toEqual([text, false]);
  });

  it('asks for the date, flags one still to come, and keeps age policy apart from law', () => {
    expect(open({ revisedOn: null })).toEqual(['revised-on undecided']);
    expect(open({ revisedOn: '2026-12-02' })).toEqual(['revised-on undecided']);
    const old = auditSds(sheet({ revisedOn: '2021-12-01', maxAgeYears: 5 }), '2026-12-02').filter((line) => line.id.startsWith('age'));
    expect(old.map((line) => [line.id, line.outcome, line.basis])).toEqual([
      ['age-law', 'not-applicable', 'law'],
      ['age-policy', 'unmet', 'policy'],
    ]);
    expect(open({ revisedOn: '2021-12-01', maxAgeYears: 5 }, '2026-12-01')).toEqual([]);
    expect(() => auditSds(sheet({ revisedOn: '2021-13-01' }), '2026-12-01')).toThrow(InputError);
  });

  it('asks for the English sheet beside one in Spanish', () => {
    expect(open({ language: 'es' })).toEqual(['language undecided']);
  });
});

describe('[HAZ-07] SDS audit, 29 CFR 1910.1200 App. C', () => {
  it.each<[string, Partial<SdsForAudit>, string[]]>([
    ['Warning where the statements ask for Danger', { signalWords: ['warning'] }, ['signal-word unmet']],
    ['two signal words', { signalWords: ['danger', 'warning'] }, ['signal-word unmet']],
    ['no signal word', { signalWords: ['none'] }, ['signal-word unmet']],
    ['a signal word nobody read', { signalWords: null }, ['signal-word undecided']],
    ['an exclamation mark that gives way', { pictograms: ['GHS07', 'GHS08'] }, ['pictogram-GHS07 unmet']],
    ['a missing pictogram', { pictograms: [] }, ['pictogram-GHS08 unmet']],
    ['a pictogram without a statement', { pictograms: ['GHS02', 'GHS08'] }, ['pictogram-GHS02 unmet']],
    ['pictograms nobody read', { pictograms: null }, ['pictograms undecided']],
    ['statements nobody read', { hazards: null }, ['statements undecided']],
    ['an unknown code', { hazards: [{ code: 'H334', category: null }, { code: 'H999', category: null }] }, ['statement-H999 undecided']],
    ['a code that needs its category', { hazards: [{ code: 'H334', category: null }, { code: 'H242', category: null }], pictograms: ['GHS02', 'GHS08'] }, ['category-H242 undecided']],
    ['the environment pictogram, which the US does not demand', { hazards: [{ code: 'H334', category: '1' }, { code: 'H411', category: '2' }], pictograms: ['GHS08', 'GHS09'] }, []],
  ])('%s', (_name, changes, expected) => {
    expect(open(changes)).toEqual(expected);
  });

  it('[HAZ-11] checks every CAS number', () => {
    expect(open({ casNumbers: ['101-68-8', '101-68-9', '50-0-0'] })).toEqual(['cas-101-68-9 unmet', 'cas-50-0-0 unmet']);
  });
});

describe('[HAZ-10] phase-in, 91 FR 1695', () => {
  // Dates in force as read in several notices: 19 May 2026, 20 Nov 2026, 19 Nov 2027, 19 May 2028.
  it.each([
    ['manufacturer', 'substance', '2026-05-18', '2026-05-19', '2026-01-19'],
    ['employer', 'substance', '2026-11-19', '2026-11-20', '2026-07-20'],
    ['manufacturer', 'mixture', '2027-11-18', '2027-11-19', '2027-07-19'],
    ['employer', 'mixture', '2028-05-18', '2028-05-19', '2028-01-19'],
  ] as const)('%s, %s: either text on %s, 2024 only on %s', (party, kind, before, from, originally) => {
    expect(acceptedTexts(party, kind, before).texts).toEqual(['2012', '2024']);
    expect(acceptedTexts(party, kind, from).texts).toEqual(['2024']);
    expect(acceptedTexts(party, kind, from).row.originally).toBe(originally);
  });

  it('asks for 2024 content of a mixture only from 19 November 2027', () => {
    expect(open({}, '2027-11-18')).toEqual([]);
    expect(open({}, '2027-11-19')).toEqual(['content-2.changed-use undecided', 'content-9.particles undecided', 'content-11.interactive undecided']);
  });
});
