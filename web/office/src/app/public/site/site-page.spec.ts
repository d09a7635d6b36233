import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { DeferBlockBehavior, TestBed } from '@angular/core/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { beforeEach, describe, expect, it } from '@jest/globals';
import { type DayPlan } from '#compliance/plans/day-plan';
import { type SitePage as Answer } from '#shared/library';
import { KeptSites, type KeptSite } from './kept-sites';
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
  hasFirstAider: true,
  hostHazards: null,
  asOf: '2026-12-03T12:00:00Z',
  plan: null,
  sheets: [sheet({ revisionId: id(3), productName: 'Millrace cleaner', signalWord: 'warning' }), sheet({}), sheet({ revisionId: id(2), language: 'es' })],
  productsWithoutSheet: ['Northlode Primer 12'],
};

const plan: DayPlan = {
  format: 'kneeboard-day-plan/1',
  date: '2026-12-03',
  packName: { en: 'US federal', es: 'Federal' },
  packVersion: '1',
  peopleCount: 3,
  isCompetentPersonNamed: true,
  place: [],
  tasks: [
    {
      name: { en: 'Grinding', es: 'Desbaste' },
      state: 'ready',
      heldBecause: null,
      span: '07:00–09:10',
      peopleCount: 1,
      controls: [{ text: { en: 'HEPA vacuum on.', es: 'Aspiradora HEPA prendida.' }, source: '29 CFR 1926.1153' }],
      access: [],
      housekeeping: [],
      respirator: { en: 'Half mask, P100', es: 'Media máscara, P100' },
      protection: [],
    },
  ],
  notice: { en: 'Follow the strictest.', es: 'Siga lo más estricto.' },
};

/** What a phone keeps, without its database. */
class Memory {
  readonly sites = new Map<string, KeptSite>();
  readonly sheets = new Map<string, ArrayBuffer>();
  read(wanted: string | null): Promise<KeptSite | null> {
    return Promise.resolve((wanted === null ? [...this.sites.values()].at(-1) : this.sites.get(wanted)) ?? null);
  }
  keep(site: KeptSite): Promise<boolean> {
    this.sites.set(site.token, site);
    return Promise.resolve(true);
  }
  sheet(of: string, revisionId: string): Promise<ArrayBuffer | null> {
    return Promise.resolve(this.sheets.get(`${of} ${revisionId}`) ?? null);
  }
  keepSheet(of: string, revisionId: string, bytes: ArrayBuffer): Promise<boolean> {
    this.sheets.set(`${of} ${revisionId}`, bytes);
    return Promise.resolve(true);
  }
  drop(of: string): Promise<void> {
    this.sites.delete(of);
    for (const key of [...this.sheets.keys()]) if (key.startsWith(of)) this.sheets.delete(key);
    return Promise.resolve();
  }
}

describe("the page behind a job's printed code", () => {
  beforeEach(() => sessionStorage.clear());

  async function open(url = `/site#${token}`, memory = new Memory()) {
    TestBed.configureTestingModule({ deferBlockBehavior: DeferBlockBehavior.Manual, providers: [{ provide: KeptSites, useValue: memory }, provideHttpClient(), provideHttpClientTesting(), provideRouter([{ path: 'site', component: SitePage }], withComponentInputBinding())] });
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
      await settle();
    };
    const text = () => element.textContent?.replace(/\s+/g, ' ') ?? '';
    const press = async (words: string) => {
      [...element.querySelectorAll('button')].find((one) => (one.getAttribute('aria-label') ?? one.textContent?.trim()) === words)?.click();
      await settle();
    };
    return { server, element, settle, answer, text, press, memory };
  }

  it('names the emergency number and place first, then every sheet, then what has none', async () => {
    const { answer, text } = await open();
    await answer();
    expect(text()).toContain('Emergency: 911.');
    expect(text()).toContain('412 Tollgate Road, gate 2');
    expect(text()).toContain('No confirmed sheet for: Northlode Primer 12.');
    expect(text().indexOf('Emergency')).toBeLessThan(text().indexOf('Safety data sheets'));
  });

  it('fetches each sheet with the secret in the header, not in the address, and opens it from what it kept', async () => {
    const { answer, press, server, settle, memory } = await open();
    await answer();
    for (const revisionId of [id(3), id(1), id(2)]) {
      const asked = server.expectOne(`/api/site/sheets/${revisionId}/file`);
      expect(asked.request.headers.get('X-Kneeboard-Link')).toBe(token);
      asked.flush(new ArrayBuffer(4));
      await settle();
      await settle();
    }
    expect(memory.sheets.size).toBe(3);
    await press('Open the sheet of Quarrybond 40 Part C, English');
    server.expectNone(`/api/site/sheets/${id(1)}/file`);
  });

  it('shows the plan task by task, controls before protection, and says for which day it is', async () => {
    const { answer, press, text, element } = await open();
    await answer({ ...page, plan: { date: '2026-12-03', isToday: false, number: 2, publishedAt: '2026-12-02T20:00:00Z', day: plan } });
    expect(element.querySelector('#plan')?.classList.contains('closed')).toBe(true);
    await press('Plan of the day');
    expect(element.querySelector('#plan')?.classList.contains('closed')).toBe(false);
    expect(text()).toContain('Plan of Thursday, December 3');
    expect(text()).toContain('Not for today');
    expect(text().indexOf('HEPA vacuum on.')).toBeLessThan(text().indexOf('Half mask, P100'));
  });

  it('without contact shows what was kept, with its time; the office back, it shows the newer', async () => {
    const memory = new Memory();
    memory.sites.set(token, { token, page: { ...page, jobName: 'Kept job' }, heardAt: '2026-12-03T12:00:00Z' });
    const { server, settle, text } = await open(undefined, memory);
    server.expectOne('/api/site').error(new ProgressEvent('error'));
    await settle();
    await settle();
    expect(text()).toContain('Kept job');
    expect(text()).toMatch(/As of Dec \d, \d\d:\d\d\. No signal/);
    window.dispatchEvent(new Event('online'));
    server.expectOne('/api/site').flush(page);
    await settle();
    expect(text()).toContain('Process hall floor');
    expect(text()).not.toContain('No signal: there');
  });

  it('opened without a code, shows what this phone kept; a withdrawn code is dropped with all that was kept of it', async () => {
    const memory = new Memory();
    memory.sites.set(token, { token, page, heardAt: '2026-12-03T12:00:00Z' });
    memory.sheets.set(`${token} ${id(1)}`, new ArrayBuffer(4));
    const { server, settle, text } = await open('/site', memory);
    await settle();
    server.expectOne('/api/site').flush({ type: 'about:blank', title: 'No', status: 404 }, { status: 404, statusText: 'No' });
    await settle();
    await settle();
    expect(text()).toContain('This code is not in use any more.');
    expect(text()).not.toContain('Process hall floor');
    expect([memory.sites.size, memory.sheets.size]).toEqual([0, 0]);
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

  it('puts danger before warning, and the reader\'s language first', () => {
    const products = siteProducts(page.sheets, 'es');
    expect(products.map(({ name }) => name)).toEqual(['Quarrybond 40 Part C', 'Millrace cleaner']);
    expect(products[0]?.sheets.map(({ language }) => language)).toEqual(['es', 'en']);
    expect(siteProducts(page.sheets, 'en')[0]?.sheets.map(({ language }) => language)).toEqual(['en', 'es']);
  });
});
