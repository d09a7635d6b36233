import { describe, expect, it } from '@jest/globals';
import { type FieldChange, type Reach } from '#shared/library';
import { countWords, countsOf, listWords, reachNote } from './reach-words';

type Shift = Reach['shifts'][number];
const previous = { revisionId: '0190a0a0-0000-7000-8000-000000000001', revisedOn: '2023-05-11', confirmedAt: '2023-06-01T12:00:00Z' };
const addsH350: FieldChange = { field: 'hazardCodes', added: ['H350'], removed: [], isNewHazard: true };
const shift = (job: number, over: Partial<Shift> = {}): Shift => ({ shiftId: `shift ${job} ${over.date ?? ''}`, jobId: `job ${job}`, jobName: `Job ${job}`, date: '2026-12-03', publishedVersion: 1, changesChecklist: true, signed: 5, asked: 6, ...over });
const reachOf = (over: Partial<Reach>): Reach => ({ previous, changes: [addsH350], kits: [], shifts: [], ...over });

describe('what a revision reaches, in words', () => {
  it('says it as the drawn review page does', () => {
    // design/look/review.png: "The new sheet adds H350. Two open jobs use it; 11 signatures were given on the older one. … both crews to be briefed and sign again."
    const note = reachNote(reachOf({ shifts: [shift(1, { signed: 5 }), shift(2, { signed: 6 })] }), true);
    expect(note).toEqual({ kind: 'stop', lead: 'The new sheet adds H350.', rest: 'Two open jobs use it; 11 signatures were given on the older one. Applying it asks both crews to be briefed and sign again.' });
  });

  it.each([
    { name: 'one job, one signature', shifts: [shift(1, { signed: 1 })], rest: 'One open job uses it; 1 signature was given on the older one. Applying it asks the crew to be briefed and sign again.' },
    { name: 'nobody signed', shifts: [shift(1, { signed: 0 })], rest: 'One open job uses it; nobody has signed there yet. Applying it asks the crew to be briefed and sign again.' },
    { name: 'two shifts of one job are one crew', shifts: [shift(1, { date: '2026-12-03' }), shift(1, { date: '2026-12-04' })], rest: 'One open job uses it; 10 signatures were given on the older one. Applying it asks the crew to be briefed and sign again.' },
    { name: 'three jobs', shifts: [shift(1), shift(2), shift(3)], rest: 'Three open jobs use it; 15 signatures were given on the older one. Applying it asks all 3 crews to be briefed and sign again.' },
    { name: 'not published anywhere', shifts: [shift(1, { publishedVersion: null, signed: 0 })], rest: 'One open job uses it; no published checklist changes. Brief the crews on the new hazard all the same: 29 CFR 1910.1200(h)(1).' },
    { name: 'published, but its text stays the same: its signatures are not counted', shifts: [shift(1), shift(2, { changesChecklist: false, signed: 9 })], rest: 'Two open jobs use it; 5 signatures were given on the older one. Applying it asks the crew to be briefed and sign again.' },
    { name: 'no job', shifts: [], rest: 'No open job uses it.' },
  ])('$name', ({ shifts, rest }) => expect(reachNote(reachOf({ shifts }), true)?.rest).toBe(rest));

  it('asks for no briefing when no hazard is new', () => {
    expect(reachNote(reachOf({ changes: [], shifts: [shift(1, { changesChecklist: false })] }), true)?.rest).toBe('One open job uses it; no published checklist changes.');
  });

  it('promises nothing before the sheet is confirmed', () => {
    expect(reachNote(reachOf({ shifts: [shift(1), shift(2)] }), false)?.rest).toContain('Once it is confirmed and applied, both crews are asked to be briefed and sign again.');
    expect(reachNote(reachOf({ shifts: [shift(1)] }), false)?.rest).toContain('Once it is confirmed and applied, the crew is asked');
  });

  it.each([
    { name: 'adds and drops', changes: [{ ...addsH350, removed: ['H315', 'H319'] }], lead: 'The new sheet adds H350 and no longer lists H315 and H319.' },
    { name: 'other fields only', changes: [{ field: 'supplier' as const, added: ['B'], removed: ['A'], isNewHazard: false }, { field: 'limits' as const, added: ['x'], removed: [], isNewHazard: false }], lead: 'The new sheet changes supplier and limits.' },
    { name: 'nothing', changes: [], lead: 'The new sheet says the same as the older one.' },
  ])('begins with what changed: $name', ({ changes, lead }) => expect(reachNote(reachOf({ changes }), false)?.lead).toBe(lead));

  it('is silent about a first sheet that nobody uses, and speaks when somebody does', () => {
    expect(reachNote(reachOf({ previous: null, changes: [] }), false)).toBeNull();
    expect(reachNote(reachOf({ previous: null, changes: [], kits: [{ id: 'k', name: 'Quarrybond 40' }] }), false)?.lead).toBe('The first sheet of this product in this language.');
  });

  it('counts jobs, crews and signatures apart', () => {
    expect(countsOf(reachOf({ shifts: [shift(1), shift(1, { date: '2026-12-04', changesChecklist: false }), shift(2, { publishedVersion: null })] }))).toEqual({ jobs: 2, published: 1, signed: 5, asked: 6, crews: 1 });
  });

  it('writes small counts and lists as people do', () => {
    expect([countWords(1, 'job', 'jobs'), countWords(12, 'job', 'jobs'), countWords(13, 'job', 'jobs')]).toEqual(['one job', 'twelve jobs', '13 jobs']);
    expect([listWords([]), listWords(['a']), listWords(['a', 'b']), listWords(['a', 'b', 'c'])]).toEqual(['', 'a', 'a and b', 'a, b and c']);
  });
});
