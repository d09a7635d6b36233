import { describe, expect, it } from '@jest/globals';
import { pagesFrom } from '#test/support/sheet-text';
import { dateOrder, datesIn, monthsIn } from './dates';
import { readLines } from './read-sheet';
import { type Field } from './reading';

const monthFirst = { isDayFirst: false };
const dayFirst = { isDayFirst: true };

describe('dates as written', () => {
  it.each([
    ['Revision 2024-11-22', '2024-11-22'],
    ['2019/01/08', '2019-01-08'],
    ['22 April 2016', '2016-04-22'],
    ['May 29, 2021', '2021-05-29'],
    ['04-SEP-07', '2007-09-04'],
    ['16-May-2011', '2011-05-16'],
    ['9th March 2014', '2014-03-09'],
    ['6 Febrero 2026', '2026-02-06'],
    ['12 de junio de 2014', '2014-06-12'],
    ['1er mars 2015', '2015-03-01'],
    ['3. März 2015', '2015-03-03'],
    ['12.06.2014', '2014-06-12'],
    ['30-11-2015', '2015-11-30'],
    ['06/23/2020', '2020-06-23'],
    ['3/9/98', '1998-03-09'],
    ['Effective: 2022-Jul-02', '2022-07-02'],
    ['15/ENE/2024', '2024-01-15'],
  ])('%s is %s', (text, iso) => {
    expect(datesIn(text, monthFirst).map((date) => date.iso)).toEqual([iso]);
  });

  it.each(['00.00.0000', '31/02/2020', 'Version 12.01', '1-800-424-9300', '29 CFR 1910.1200', '64742-95-6', '1907/2006', '(412) 434-4515', '13/13/2020'])('%s is no date', (text) => {
    expect(datesIn(text, monthFirst)).toEqual([]);
  });

  it('knows a month without a day, and only that', () => {
    const months = (text: string) => monthsIn(text, dayFirst).map((month) => month.text);
    expect(['Revised March 2024', 'Stand: März 2024', 'octubre de 2021', '03/2024', 'Rev. 5-2019'].map(months)).toEqual([['March 2024'], ['März 2024'], ['octubre de 2021'], ['03/2024'], ['5-2019']]);
    for (const text of ['3 March 2024', 'March 3, 2024', '12/03/2024', '2024-03-12', 'UN 1263', '29/2024/08', 'Regulation 13/2024', '1910.1200']) expect({ text, months: months(text) }).toEqual({ text, months: [] });
  });

  it('keeps the other reading of a date that could be turned round', () => {
    expect(datesIn('06/04/2019', monthFirst)[0]).toMatchObject({ iso: '2019-06-04', other: '2019-04-06' });
    expect(datesIn('06/04/2019', dayFirst)[0]).toMatchObject({ iso: '2019-04-06', other: '2019-06-04' });
    expect(datesIn('06/06/2019', dayFirst)[0]?.other).toBeNull();
  });

  it('takes the order from other dates of the sheet, then from language and law', () => {
    expect(dateOrder('Revision 01/02/2015 Print 25/02/2015', 'en').isDayFirst).toBe(true);
    expect(dateOrder('Fecha 10/01/2023 Impresión 04/27/2025', 'es').isDayFirst).toBe(false);
    expect(dateOrder('Fecha 10/01/2023', 'es').isDayFirst).toBe(true);
    expect(dateOrder('29 CFR 1910.1200 OSHA', 'en').isDayFirst).toBe(false);
    expect(dateOrder('Regulation (EC) No 1907/2006', 'en').isDayFirst).toBe(true);
    expect(dateOrder('nothing', 'en').confidence).toBeLessThan(0.6);
  });
});

const filler = '\nSection 1. Identification\nProduct name: Quarrybond 40\nThis line only makes the sheet long enough to be read as text.\nSection 16. Other information\n';
const read = (before: string, after = ''): Field<string> | null => readLines(pagesFrom(before + filler + after)).revisionDate;

describe('the revision date among others', () => {
  it.each([
    ['Print date 16-May-2012   Revision date 16-May-2011   Supersedes date 02-Jan-2009', '2011-05-16'],
    ['Revision date: 6/8/2015          Revision: 2.0          Supersedes date: 9/1/2014', '2015-06-08'],
    ['Date of issue/Date of revision    22 April 2016    Date of previous issue   1 May 2017', '2016-04-22'],
    ['Supersedes date: - Revision date: 5 May 2018', '2018-05-05'],
    ['Version #: 02   Revision date: -   Issue date: 27-May-2015', '2015-05-27'],
    ['PRODUCT NUMBER     DATE OF PREPARATION     CODES\n\n1010               04-SEP-07', '2007-09-04'],
    ['Valid until 1 June 2030   Issue date 3 March 2020', '2020-03-03'],
    ['Druckdatum: 05.06.2020   überarbeitet am: 03.02.2020   Ersetzt Fassung vom 01.02.2018', '2020-02-03'],
    ['Fecha de     6 Febrero 2026     Fecha de      1 Enero 2020\nrevisión                        impresión', '2026-02-06'],
  ])('%s → %s', (before, iso) => {
    expect(read(before)?.value).toBe(iso);
  });

  it('takes the latest of numbered revisions', () => {
    expect(read('', 'Issue date: 11/07/2019\nRevision 1: 06/26/2023\nRevision 2: 11/22/2024\n')?.value).toBe('2024-11-22');
  });

  it('says nothing when only a print date or a cited rule is dated', () => {
    expect(read('Print date: 5 May 2018')).toBeNull();
    expect(read('Regulation (EC) No 1907/2006 of 18 December 2006')).toBeNull();
    expect(read('Hazard Communication Standard, revised 26 March 2012')).toBeNull();
  });

  it('is less sure of a date that could be turned round, and says why', () => {
    const unsure = read('Revision date: 03/04/2018');
    expect(unsure?.confidence).toBeLessThan(0.6);
    expect(unsure?.because).toMatch(/day or month/);
    expect(read('Revision date: 3 April 2018')?.confidence).toBeGreaterThan(0.9);
  });

  it('shows the place of the date, not of the whole line', () => {
    const field = read('Supersedes date 1 May 2009      Revision date 16 May 2011');
    expect(field).toMatchObject({ page: 1, quote: '16 May 2011' });
    expect(field?.box.x).toBeGreaterThan(200);
  });
});
