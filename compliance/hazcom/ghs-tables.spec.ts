import { describe, expect, it } from '@jest/globals';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync } from 'node:fs';
import { HAZARD_ROWS } from './ghs-hazards.data';
import { STATEMENT_TEXTS } from './ghs-statements.data';
import { PRECAUTIONARY_ROWS } from './precautionary-ppe.data';

const tsv = (name: string) => {
  const path = new URL(`../../../shared/reference/${name}`, import.meta.url);
  if (!existsSync(path)) return null;
  return readFileSync(path, 'utf8').trimEnd().split('\n').slice(1).map((line) => line.split('\t'));
};
const english = new Map(STATEMENT_TEXTS.map(({ code, text }) => [code, text.en]));
const word = { danger: 'Danger', warning: 'Warning', none: 'none' };
const hazardLines = HAZARD_ROWS.map((row) => [row.code, english.get(row.code), row.hazardClass, row.category, word[row.signalWord], row.pictograms.join(',') || 'none']);
const precautionaryLines = PRECAUTIONARY_ROWS.map((row) => [row.id, row.text.en, row.topic, row.status, row.note]);
const digest = (lines: unknown) => createHash('sha256').update(JSON.stringify(lines)).digest('hex').slice(0, 16);

describe('[HAZ-07] GHS tables', () => {
  const hazards = tsv('ghs-hazard-statements.tsv');
  it(hazards === null ? 'hazard rows (not run: ../shared/reference absent)' : 'hold every hazard row of the reference, word for word', () => {
    if (hazards === null) console.warn('ghs-hazard-statements.tsv is absent: compared with the digest only');
    else expect(hazardLines).toEqual(hazards);
  });

  const precautionary = tsv('ghs-precautionary-ppe.tsv');
  it(precautionary === null ? 'precautionary rows (not run: ../shared/reference absent)' : 'hold every precautionary row of the reference, word for word', () => {
    if (precautionary === null) console.warn('ghs-precautionary-ppe.tsv is absent: compared with the digest only');
    else expect(precautionaryLines).toEqual(precautionary);
  });

  // Taken when both tables equalled the reference, so that a slip is noticed where the reference is not at hand.
  it('are unchanged since they were compared with the reference', () => {
    expect([digest(hazardLines), digest(precautionaryLines)]).toEqual(['32fac13588374658', 'ccf4800b107ec65e']);
  });

  it('hold each row once and a text for each code', () => {
    expect(new Set(HAZARD_ROWS.map((row) => row.id)).size).toBe(159);
    expect(HAZARD_ROWS).toHaveLength(159);
    expect(new Set(HAZARD_ROWS.map((row) => row.code))).toEqual(new Set(english.keys()));
    expect(PRECAUTIONARY_ROWS).toHaveLength(23);
  });

  it('mark corrected and uncertain rows as recalled', () => {
    const recalled = HAZARD_ROWS.filter((row) => row.source.verified === 'from-memory').map((row) => row.code);
    expect(new Set(recalled)).toEqual(new Set(['H209', 'H210', 'H211', 'H305', 'H313', 'H314', 'H317', 'H319', 'H334', 'H373']));
  });
});
