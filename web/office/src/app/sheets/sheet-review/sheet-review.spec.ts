import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { DeferBlockBehavior, TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { afterEach, describe, expect, it } from '@jest/globals';
import { type Role } from '#shared/common';
import { type Reach } from '#shared/library';
import { type SheetSuggestions } from '#shared/corrections';
import { type Revision } from '#shared/sheets';
import { SessionApi } from '../../session/session-api';
import { SheetReview } from './sheet-review';

const revisionId = '0190a0a0-0000-7000-8000-000000000009';
const place = { page: 1, box: null, quote: 'words' };
const sure = <T>(value: T) => ({ value, place, confidence: 0.95, because: null, origin: 'read' as const });
const doubtful = <T>(value: T, because: string) => ({ ...sure(value), confidence: 0.5, because });

const revision: Revision = {
  id: revisionId,
  fileName: 'part-c.pdf',
  sha256: 'a'.repeat(64),
  byteLength: 1000,
  pages: 3,
  state: 'read',
  readerState: 'read',
  pagesRead: null,
  productId: null,
  productName: 'Quarrybond 40 Part C',
  supplier: 'Northlode Resins',
  revisedOn: '2026-11-28',
  language: 'en',
  toLookAt: 2,
  isCurrent: false,
  uploadedAt: '2026-12-01T12:00:00Z',
  uploadedBy: 'Ines Halloran',
  confirmedAt: null,
  confirmedBy: null,
  version: 3,
  remarks: [],
  fields: {
    productName: sure('Quarrybond 40 Part C'),
    supplier: sure('Northlode Resins'),
    language: sure('en'),
    revisedOn: doubtful('2026-11-28', 'Two dates stand near each other.'),
    signalWord: sure('danger' as const),
    hazardCodes: [doubtful('H350', 'The code stands apart from its words.')],
    precautionaryCodes: [],
    ingredients: [],
    limits: [],
    protectionWords: [],
    sections: [],
  },
};

const reach: Reach = {
  previous: { revisionId, revisedOn: '2023-05-11', confirmedAt: '2023-06-01T12:00:00Z' },
  changes: [{ field: 'hazardCodes', added: ['H350'], removed: [], isNewHazard: true }],
  kits: [],
  shifts: [{ shiftId: revisionId, jobId: revisionId, jobName: 'Process hall floor', date: '2026-12-03', publishedVersion: 1, changesChecklist: true, signed: 5, asked: 6 }],
};

describe('checking what was read', () => {
  afterEach(() => document.body.replaceChildren());

  async function open(role: Role = 'safety-officer', stored: Revision = revision, suggestions: SheetSuggestions['items'] = []) {
    TestBed.configureTestingModule({ deferBlockBehavior: DeferBlockBehavior.Manual, providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])] });
    const server = TestBed.inject(HttpTestingController);
    const session = TestBed.inject(SessionApi).load();
    server.expectOne('/api/session').flush({ person: { id: revisionId, name: 'Ines Halloran' }, role, organisation: { id: revisionId, name: 'Marrow & Slate Floors' } });
    await session;
    const fixture = TestBed.createComponent(SheetReview);
    fixture.componentRef.setInput('revisionId', revisionId);
    document.body.append(fixture.nativeElement as HTMLElement);
    await fixture.whenStable();
    server.expectOne(`/api/sheets/${revisionId}`).flush(stored);
    const settle = async () => {
      await new Promise((resolve) => setTimeout(resolve));
      // The page counts as busy until it knows what the sheet reaches.
      TestBed.tick();
      server.match(({ url }) => url.endsWith('/reach')).forEach((asked) => asked.flush(reach));
      server.match(({ url }) => url.endsWith('/suggestions')).forEach((asked) => asked.flush({ items: suggestions }));
      server.match(({ url }) => url === '/api/sheet-requests').forEach((asked) => asked.flush({ items: [], next: null }));
      await fixture.whenStable();
    };
    await settle();
    await settle();
    const element = fixture.nativeElement as HTMLElement;
    const active = () => element.querySelector('[data-active] > span')?.textContent?.trim();
    const press = async (key: string, from: Element = document.body) => {
      from.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }));
      await settle();
    };
    const text = () => element.textContent?.replace(/\s+/g, ' ') ?? '';
    const button = (words: string) => [...element.querySelectorAll('button')].find((one) => one.textContent?.trim() === words);
    return { element, active, press, text, button, settle };
  }

  it('opens the first value that wants a look, with the reason', async () => {
    const { active, text } = await open();
    expect(active()).toBe('Revised');
    expect(text()).toContain('Two dates stand near each other.');
    expect(text()).toContain('2 of 11 want a look.');
  });

  it('Enter says it matches and goes to the next one that wants a look', async () => {
    const { active, press, text } = await open();
    await press('Enter');
    expect(active()).toBe('Hazards');
    await press('Enter');
    expect(text()).toContain('Nothing more wants a look.');
  });

  it('arrows move, E opens the field, and Enter in the field ends the change', async () => {
    const { element, active, press } = await open();
    await press('ArrowUp');
    expect(active()).toBe('Language');
    await press('ArrowUp');
    await press('e');
    const field = element.querySelector('kb-value-editor input');
    expect(field).toBeInstanceOf(HTMLInputElement);
    (field as HTMLInputElement).value = 'Northlode Resins, Inc.';
    field?.dispatchEvent(new Event('input'));
    if (field) await press('Enter', field);
    expect(element.querySelector('kb-value-editor')).toBeNull();
    expect(element.textContent).toContain('Northlode Resins, Inc.');
  });

  it('does not take letters for commands while somebody types', async () => {
    const { element, press, active } = await open();
    await press('e');
    const field = element.querySelector('kb-value-editor input');
    if (!field) throw new Error('no field');
    await press('ArrowDown', field);
    expect(active()).toBe('Revised');
  });

  it('does not confirm before everything doubtful was looked at', async () => {
    const { button, text, settle } = await open();
    button('Confirm sheet')?.click();
    await settle();
    expect(text()).toContain('First look at “Revised”');
  });

  it('gives an auditor the values and no buttons to change them', async () => {
    const { button, element, press, active } = await open('auditor');
    expect(button('Confirm sheet')).toBeUndefined();
    expect(button('Change it')).toBeUndefined();
    await press('e');
    expect(element.querySelector('kb-value-editor')).toBeNull();
    expect(active()).toBe('Revised');
  });

  it('says before confirming what the sheet adds and whom it reaches, and applies nothing', async () => {
    const { button, text } = await open();
    expect(text()).toContain('The new sheet adds H350. One open job uses it; 5 signatures were given on the older one. Once it is confirmed and applied, the crew is asked');
    expect(text()).toContain('new hazard');
    expect(button('Apply to open jobs')).toBeUndefined();
  });

  it.each([
    ['safety-officer', true],
    ['auditor', false],
  ] as const)('offers to apply the confirmed sheet: %s %s', async (role, isOffered) => {
    const { button } = await open(role, { ...revision, state: 'confirmed', isCurrent: true, productId: revisionId });
    expect(button('Apply to open jobs') !== undefined).toBe(isOffered);
  });

  describe('with a correction remembered', () => {
    const suggestion: SheetSuggestions['items'][number] = {
      field: 'productName',
      value: 'Quarrybond 40 Part C, grey',
      from: { id: revisionId, revisionId, fileName: 'part-a.pdf', field: 'productName', rule: { kind: 'label', label: 'Handelsname', where: 'same-line', isDayFirst: null }, readValue: 'Sheet', value: 'Quarrybond 40 Part A', supplier: 'Northlode Resins', correctedAt: '2026-12-03T12:00:00Z', correctedBy: 'Ines Halloran', isYours: true },
    };

    it('offers it with its reason beside what was read, and leaves the reading', async () => {
      const { active, text, button } = await open(undefined, undefined, [suggestion]);
      expect(active()).toBe('Product');
      expect(text()).toContain('3 of 11 want a look.');
      expect(text()).toContain('From your correction of 3 Dec 2026 on part-a.pdf: Quarrybond 40 Part C, grey');
      expect(text()).toContain('The product’s name stands after “Handelsname”.');
      expect(button('Quarrybond 40 Part C')).toBeDefined();
    });

    it('is taken over by a key or a button, or left by saying that the reading matches', async () => {
      const taken = await open(undefined, undefined, [suggestion]);
      await taken.press('u');
      expect(taken.button('Quarrybond 40 Part C, grey')).toBeDefined();
      expect(taken.active()).toBe('Revised');
      TestBed.resetTestingModule();
      document.body.replaceChildren();
      const left = await open(undefined, undefined, [suggestion]);
      await left.press('Enter');
      expect(left.button('Quarrybond 40 Part C')).toBeDefined();
      expect(left.active()).toBe('Revised');
    });
  });

  it('opens every value as a field when the sheet could not be read', async () => {
    const { element, text } = await open('safety-officer', { ...revision, state: 'needs-entry', readerState: 'no-text-layer' });
    expect(text()).toContain('This file is a picture of a sheet');
    expect(element.querySelectorAll('kb-value-editor').length).toBe(10);
  });
});
