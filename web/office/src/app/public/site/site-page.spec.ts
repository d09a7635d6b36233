import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { DeferBlockBehavior, TestBed } from '@angular/core/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { beforeEach, describe, expect, it } from '@jest/globals';
import { type SitePage as Answer } from '#shared/library';
import { SitePage } from './site-page';
import { siteProducts } from './site-products';

const token = 'c'.repeat(43);
const id = (last: number) => `0190a0a0-0000-7000-8000-00000000000${last}`;
const sheet = (over: Partial<Answer['sheets'][number]>): Answer['sheets'][number] => ({ revisionId: id(1), productName: 'Quarrybond 40 Part C', supplier: 'Northlode Resins', language: 'en', revisedOn: '2023-05-11', signalWord: 'danger', hazardCodes: ['H318'], pictograms: ['GHS05'], ...over });
const page: Answer = {
  organisationName: 'Marrow & Slate Floors',
  jobName: 'Process hall floor',
  siteName: 'Tollgate Creamery',
  emergencyNumber: '911',
  address: '412 Tollgate Road, gate 2',
  firstAiderName: 'Dov Lindqvist',
  hostHazards: null,
  competentPersonName: 'Dov Lindqvist',
  checklist: null,
  sheets: [sheet({ revisionId: id(3), productName: 'Millrace cleaner', signalWord: 'warning' }), sheet({}), sheet({ revisionId: id(2), language: 'es' })],
  productsWithoutSheet: ['Northlode Primer 12'],
};

describe("the page behind a job's printed code", () => {
  beforeEach(() => sessionStorage.clear());

  async function open(url = `/site#${token}`) {
    TestBed.configureTestingModule({ deferBlockBehavior: DeferBlockBehavior.Manual, providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([{ path: 'site', component: SitePage }], withComponentInputBinding())] });
    const server = TestBed.inject(HttpTestingController);
    const harness = await RouterTestingHarness.create(url);
    const element = harness.fixture.nativeElement as HTMLElement;
    const settle = async () => {
      await new Promise((resolve) => setTimeout(resolve));
      await harness.fixture.whenStable();
      await new Promise((resolve) => setTimeout(resolve));
    };
    await settle();
    const answer = async (body: Answer = page) => {
      const asked = server.expectOne('/api/site');
      expect(asked.request.body).toEqual({ token });
      asked.flush(body);
      await settle();
    };
    const text = () => element.textContent?.replace(/\s+/g, ' ') ?? '';
    const press = async (words: string) => {
      [...element.querySelectorAll('button')].find((one) => (one.getAttribute('aria-label') ?? one.textContent?.trim()) === words)?.click();
      await settle();
    };
    return { server, element, settle, answer, text, press };
  }

  it('names the emergency number and place first, then every sheet, then what has none', async () => {
    const { answer, text } = await open();
    await answer();
    expect(text()).toContain('Emergency: 911.');
    expect(text()).toContain('412 Tollgate Road, gate 2');
    expect(text()).toContain('No confirmed sheet for: Northlode Primer 12.');
    expect(text().indexOf('Emergency')).toBeLessThan(text().indexOf('Safety data sheets'));
  });

  it('opens a sheet with the secret in the header, not in the address', async () => {
    const { answer, press, server } = await open();
    await answer();
    await press('Open the sheet of Quarrybond 40 Part C, English');
    const asked = server.expectOne(`/api/site/sheets/${id(1)}/file`);
    expect(asked.request.headers.get('X-Kneeboard-Link')).toBe(token);
    asked.flush(new ArrayBuffer(4));
  });

  it('opens again after a reload of the same tab', async () => {
    sessionStorage.setItem('kneeboard-site-code', token);
    const { answer, text } = await open('/site');
    await answer();
    expect(text()).toContain('Process hall floor');
  });

  it.each([
    { status: 404, says: 'This code is not in use any more.', next: 'or ask for the lead\'s tablet, then the binder' },
    { status: 0, says: 'There is no signal, so this code cannot open now.', next: "Ask for the lead's tablet; if that is not at hand, open the binder." },
  ])('says what to do instead when it does not open ($status)', async ({ status, says, next }) => {
    const { server, settle, text } = await open();
    const asked = server.expectOne('/api/site');
    if (status === 0) asked.error(new ProgressEvent('error'));
    else asked.flush({ type: 'about:blank', title: 'No', status }, { status, statusText: 'No' });
    await settle();
    expect(text()).toContain(says);
    expect(text()).toContain(next);
  });

  it('does not show a checklist whose bytes are not the published ones', async () => {
    const { answer, text } = await open();
    await answer({ ...page, checklist: { date: '2026-12-03', number: 1, texts: [{ language: 'en', sha256: 'd'.repeat(64), text: '{}' }] } });
    expect(text()).toContain("Today's list arrived damaged");
  });

  it('puts danger before warning, and the reader\'s language first', () => {
    const products = siteProducts(page.sheets, 'es');
    expect(products.map(({ name }) => name)).toEqual(['Quarrybond 40 Part C', 'Millrace cleaner']);
    expect(products[0]?.sheets.map(({ language }) => language)).toEqual(['es', 'en']);
    expect(siteProducts(page.sheets, 'en')[0]?.sheets.map(({ language }) => language)).toEqual(['en', 'es']);
  });
});
