import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { describe, expect, it } from '@jest/globals';
import { type Role } from '#shared/common';
import { type RevisionSummary } from '#shared/sheets';
import { SessionApi } from '../../session/session-api';
import { SheetRows } from './sheet-rows';

const id = '0190a0a0-0000-7000-8000-000000000001';
const hoursAgo = (hours: number) => new Date(Date.now() - hours * 3600 * 1000).toISOString();
const row = (change: Partial<RevisionSummary>): RevisionSummary => ({ id, fileName: 'part-b.pdf', sha256: 'a'.repeat(64), byteLength: 3, pages: null, pagesRead: null, state: 'needs-entry', readerState: 'unavailable', productId: null, productName: null, supplier: null, revisedOn: null, language: null, toLookAt: 0, isCurrent: false, uploadedAt: hoursAgo(1), uploadedBy: 'Ines Halloran', confirmedAt: null, confirmedBy: null, version: 1, ...change });

describe('a list of sheets', () => {
  async function open(revision: RevisionSummary, role: Role = 'safety-officer') {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])] });
    const server = TestBed.inject(HttpTestingController);
    const session = TestBed.inject(SessionApi).load();
    server.expectOne('/api/session').flush({ person: { id, name: 'Ines Halloran' }, role, organisation: { id, name: 'Marrow & Slate Floors' } });
    await session;
    const fixture = TestBed.createComponent(SheetRows);
    fixture.componentRef.setInput('label', 'To enter by hand');
    fixture.componentRef.setInput('revisions', [revision]);
    await fixture.whenStable();
    const element = fixture.nativeElement as HTMLElement;
    const steps = () => [...element.querySelectorAll('.steps > *')].map((step) => step.textContent?.split(':')[0]);
    return { fixture, element, server, steps, state: () => element.querySelector('kb-state')?.textContent };
  }

  it('names a sheet whose reading failed at every try, and offers to read it again or to enter it by hand', async () => {
    const { element, fixture, server, state, steps } = await open(row({}));
    expect(state()).toBe('reading failed');
    expect(steps()).toEqual(['Read again', 'Enter by hand']);
    let changes = 0;
    fixture.componentInstance.changed.subscribe(() => (changes += 1));
    element.querySelector('button')?.click();
    const asked = server.expectOne(`/api/sheets/${id}/reading`);
    asked.flush({ type: 'about:blank', title: 'This sheet was read already.', status: 422 }, { status: 422, statusText: 'No' });
    await fixture.whenStable();
    expect(element.textContent).toContain('This sheet was read already.');
    expect(changes).toBe(1);
  });

  it.each([
    [row({ readerState: 'not-a-pdf' }), 'not a PDF', []],
    [row({ readerState: 'too-slow' }), 'took too long to read', ['Read again', 'Enter by hand']],
    [row({ state: 'waiting', readerState: null }), 'being read', []],
    [row({ state: 'waiting', readerState: null, uploadedAt: hoursAgo(3) }), 'waits unusually long', ['Read again']],
    [row({ state: 'waiting', readerState: 'no-text-layer', pagesRead: 3, pages: 9, uploadedAt: hoursAgo(3) }), 'reading page 3 of 9', []],
  ] as const)('offers what can help, and nothing else (%#)', async (revision, words, offered) => {
    const { state, steps } = await open(revision);
    expect([state(), steps()]).toEqual([words, offered]);
  });

  it('offers an auditor nothing', async () => {
    expect((await open(row({}), 'auditor')).steps()).toEqual([]);
  });
});
