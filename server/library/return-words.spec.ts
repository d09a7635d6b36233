import { describe, expect, it } from '@jest/globals';
import { noFields, findingsOn } from '../sds/sheet-fields';
import { returnMessage } from './return-words';

const sections = [1, 2, 3].map((number) => ({ number, heading: ['Identification', 'Hazard(s) identification', 'Composition/information on ingredients'][number - 1] ?? '', page: 1 }));
const sheet = { productName: 'Quarrybond 40 Part C', fileName: 'part-c.pdf', revisedOn: '2014-02-01', readerState: 'read' as const, findings: findingsOn({ ...noFields(), sections }, '2026-12-03') };

describe('the mail that sends a sheet back', () => {
  it('names the sheet and lists what the audit found unmet, each with its source', () => {
    const said = returnMessage(sheet, 'en');
    expect(said).toContain('Quarrybond 40 Part C (revision of 2014-02-01, file part-c.pdf)');
    // Source: 29 CFR 1910.1200 App. D: sixteen sections; three of them are here.
    expect(said.match(/^- Section \d+ .* is missing/gm)).toHaveLength(13);
    expect(said).toContain('(29 CFR 1910.1200 (g)(2), App. D)');
    expect(said).toContain('Please send a corrected sheet');
  });

  it('says it in Spanish', () => {
    expect(returnMessage(sheet, 'es')).toMatch(/No podemos usar su hoja[\s\S]*- Falta la sección 4/);
  });

  it('names what is wrong with the file itself, and leaves a gap for a person where nothing was found', () => {
    expect(returnMessage({ ...sheet, readerState: 'encrypted', findings: [] }, 'en')).toContain('- The file asks for a password');
    expect(returnMessage({ ...sheet, findings: [] }, 'en')).toContain('What we found: (write it here)');
  });

  it('does not put to the supplier what the audit could not decide', () => {
    const undecided = sheet.findings.map((line) => ({ ...line, outcome: 'undecided' as const }));
    expect(returnMessage({ ...sheet, findings: undecided }, 'en')).not.toMatch(/^- /m);
  });
});
