import { describe, expect, it } from '@jest/globals';
import { applyRule, isSameLayout, learnRule, type Correction } from './correction-rules';

/** Invented, in a layout that puts its labels above or before the values. */
const sheet = (name: string, date: string) => `Sicherheitsdatenblatt\n1. Bezeichnung des Stoffs\nHandelsname: ${name}\nHersteller\nNorthlode Resins, Inc.\nStand ${date}\nDruckdatum 09.09.2026\n`;
const corrected = (change: Partial<Correction>): Correction => ({ field: 'productName', readValue: 'Sicherheitsdatenblatt', value: 'Quarrybond 40 Part C', text: sheet('Quarrybond 40 Part C', '03.04.2026'), language: 'de', ...change });

describe('what a correction teaches', () => {
  it('the words before the value, and what stands after them on the next sheet', () => {
    const rule = learnRule(corrected({}));
    expect(rule).toEqual({ kind: 'label', label: 'Handelsname', where: 'same-line', isDayFirst: null });
    expect(rule && applyRule(rule, corrected({ text: sheet('Millrace cleaner', '01.02.2027') }))).toBe('Millrace cleaner');
  });

  it('the line above the value', () => {
    const rule = learnRule(corrected({ field: 'supplier', readValue: null, value: 'Northlode Resins, Inc.' }));
    expect(rule).toMatchObject({ kind: 'label', label: 'Hersteller', where: 'next-line' });
  });

  it('how a supplier is written, when the reader takes its name otherwise', () => {
    const rule = learnRule(corrected({ field: 'supplier', readValue: 'Northlode Resins Inc Tel', value: 'Northlode Resins, Inc.' }));
    expect(rule).toEqual({ kind: 'spelling', readValue: 'Northlode Resins Inc Tel', value: 'Northlode Resins, Inc.' });
    expect(rule && applyRule(rule, corrected({ field: 'supplier', readValue: 'NORTHLODE RESINS INC TEL' }))).toBe('Northlode Resins, Inc.');
    expect(rule && applyRule(rule, corrected({ field: 'supplier', readValue: 'Another maker' }))).toBeNull();
  });

  it('which date is the one that counts, and whether the day comes first', () => {
    const rule = learnRule(corrected({ field: 'revisedOn', readValue: '2026-09-09', value: '2026-04-03' }));
    expect(rule).toEqual({ kind: 'label', label: 'Stand', where: 'same-line', isDayFirst: true });
    expect(rule && applyRule(rule, corrected({ field: 'revisedOn', text: sheet('Millrace cleaner', '01.02.2027') }))).toBe('2027-02-01');
    const american = 'SAFETY DATA SHEET\nRevised on 03/04/2026\nPrinted 09/09/2026\n';
    const monthFirst = learnRule(corrected({ field: 'revisedOn', readValue: '2026-04-03', value: '2026-03-04', text: american, language: 'en' }));
    expect(monthFirst).toMatchObject({ label: 'Revised on', isDayFirst: false });
  });

  it('nothing where no rule explains it', () => {
    expect(learnRule(corrected({ readValue: null, value: 'A name that stands nowhere' }))).toBeNull();
    expect(learnRule(corrected({ field: 'revisedOn', readValue: '2026-09-09', value: '2020-01-01' }))).toBeNull();
  });

  it('offers nothing where its words lead to two different values, or go on as another word', () => {
    const rule = { kind: 'label', label: 'Handelsname', where: 'same-line', isDayFirst: null } as const;
    expect(applyRule(rule, corrected({ text: 'Handelsname: A-1\nHandelsname: B-2\n' }))).toBeNull();
    expect(applyRule(rule, corrected({ text: 'Handelsnamen: A-1\n' }))).toBeNull();
    expect(applyRule(rule, corrected({ text: 'Handelsname: A-1\nSeite 2\nHandelsname: A-1\n' }))).toBe('A-1');
  });

  it('holds for the same supplier in the same layout only', () => {
    const rule = { supplier: 'Northlode Resins, Inc.', readSupplier: 'Northlode Tel', language: 'de', heading: '1. Bezeichnung des Stoffs' };
    const like = (change: object) => isSameLayout(rule, { supplier: 'Northlode Resins Inc', language: 'de', heading: '1 BEZEICHNUNG DES STOFFS', ...change }, sheet('x', '01.01.2026'));
    expect(like({})).toBe(true);
    expect(like({ supplier: 'Northlode Tel' })).toBe(true);
    expect(like({ supplier: null })).toBe(true);
    expect([like({ supplier: 'Another maker' }), like({ language: 'en' }), like({ heading: '1. Identification' })]).toEqual([false, false, false]);
  });
});
