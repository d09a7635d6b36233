import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { describe, expect, it } from '@jest/globals';
import { HistoryPage } from './history-page';

const personId = '0190a0a0-0000-7000-8000-000000000003';

describe('the history page', () => {
  async function open(url: string) {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([{ path: 'history', component: HistoryPage }], withComponentInputBinding())] });
    const server = TestBed.inject(HttpTestingController);
    const harness = await RouterTestingHarness.create(url);
    const settle = async () => {
      await new Promise((resolve) => setTimeout(resolve));
      await harness.fixture.whenStable();
    };
    await settle();
    for (const path of ['/api/jobs', '/api/people']) server.match((request) => request.url === path).forEach((request) => request.flush({ items: path === '/api/people' ? [person] : [], next: null }));
    await settle();
    const element = harness.fixture.nativeElement as HTMLElement;
    const asked = () => server.match((request) => request.url === '/api/acknowledgements');
    return { server, harness, settle, element, asked, router: TestBed.inject(Router) };
  }
  const person = { id: personId, name: 'Marisol Tena', language: 'es', employer: null, isAdultConfirmed: true, isKeptFromIsocyanates: false, silicaTrainedOn: null, hazcomTrainedOn: null, respirators: [], isActive: true, version: 1, hasPin: true, pinProof: 'lead', startPin: null, login: null };
  const empty = { items: [], next: null, total: 24118, found: 0, isFoundCapped: false };

  it('asks for what the address says, and exports the same', async () => {
    const { asked, element, settle } = await open(`/history?personId=${personId}&from=2026-12-01&kind=could-not-sign&nonsense=1`);
    const [request] = asked();
    expect(request?.request.params.toString()).toBe(`personId=${personId}&from=2026-12-01&kind=could-not-sign`);
    request?.flush(empty);
    await settle();
    expect(element.querySelector('a[download]')?.getAttribute('href')).toBe(`/api/acknowledgements.csv?personId=${personId}&from=2026-12-01&kind=could-not-sign`);
    expect(element.textContent).toContain('0 of 24,118');
    expect(element.textContent).toContain('Nothing matches these filters');
  });

  it('writes a chosen filter into the address and asks again; a kind that does not exist is no filter', async () => {
    const { asked, element, settle, router } = await open('/history?kind=invented');
    const [first] = asked();
    expect(first?.request.params.toString()).toBe('');
    first?.flush(empty);
    await settle();
    const select = element.querySelector<HTMLSelectElement>('#history-person');
    if (!select) throw new Error('no person filter');
    select.value = personId;
    select.dispatchEvent(new Event('change'));
    await settle();
    expect(router.url).toContain(`personId=${personId}`);
    expect(asked()[0]?.request.params.get('personId')).toBe(personId);
  });
});
