import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { afterEach, describe, expect, it } from '@jest/globals';
import { SendSheet } from './send-sheet';

const token = 'b'.repeat(43);
const request = { organisationName: 'Marrow & Slate Floors', productName: 'Quarrybond 40 Part C', supplier: 'Northlode Resins', message: 'Please send the newest one.', expiresAt: '2026-12-31T12:00:00Z' };
const gone = { type: 'about:blank', title: 'There is no such open link.', status: 404 };

describe("the supplier's page", () => {
  afterEach(() => TestBed.inject(HttpTestingController).verify());

  async function open(url = `/send-sheet#${token}`) {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([{ path: 'send-sheet', component: SendSheet }])] });
    const server = TestBed.inject(HttpTestingController);
    const harness = await RouterTestingHarness.create(url);
    const element = harness.fixture.nativeElement as HTMLElement;
    const settle = async () => {
      await new Promise((resolve) => setTimeout(resolve));
      await harness.fixture.whenStable();
    };
    await settle();
    const text = () => element.textContent?.replace(/\s+/g, ' ') ?? '';
    const choose = async (name = 'part-c.pdf') => {
      const picker = element.querySelector<HTMLInputElement>('input[type=file]');
      Object.defineProperty(picker, 'files', { value: [new File(['%PDF-1.7'], name, { type: 'application/pdf' })], configurable: true });
      picker?.dispatchEvent(new Event('change'));
      await settle();
      return server.expectOne('/api/open-requests/sheet');
    };
    const press = async (words: string) => {
      [...element.querySelectorAll('button')].find((one) => one.textContent?.trim() === words)?.click();
      await settle();
    };
    return { server, text, element, choose, settle, press };
  }
  type Page = Awaited<ReturnType<typeof open>>;
  async function openRequest(page: Page): Promise<void> {
    const asked = page.server.expectOne('/api/open-requests');
    expect(asked.request.body).toEqual({ token });
    asked.flush(request);
    await page.settle();
  }

  it('shows who asks for which product, and nothing of the office', async () => {
    const page = await open();
    await openRequest(page);
    expect(page.text()).toContain('Marrow & Slate Floors asks you for the current safety data sheet ofQuarrybond 40 Part C');
    expect(page.element.querySelectorAll('nav, a').length).toBe(0);
  });

  it('sends the secret in the header and says that the sheet arrived; the link is used up', async () => {
    const page = await open();
    await openRequest(page);
    const sent = await page.choose();
    expect(sent.request.headers.get('X-Kneeboard-Link')).toBe(token);
    expect(sent.request.url).not.toContain(token);
    expect((sent.request.body as FormData).get('file')).toBeInstanceOf(File);
    sent.flush(null, { status: 204, statusText: 'No Content' });
    await page.settle();
    expect(page.text()).toContain('The sheet has arrived.');
    expect(page.element.querySelector('input[type=file]')).toBeNull();
  });

  it('says why a file was refused, and lets another be chosen', async () => {
    const page = await open();
    await openRequest(page);
    (await page.choose('notes.pdf')).flush({ type: 'about:blank', title: 'This is not a PDF.', status: 422 }, { status: 422, statusText: 'No' });
    await page.settle();
    expect(page.text()).toContain('The file was not taken. This is not a PDF.');
    expect(page.element.querySelector('input[type=file]')).not.toBeNull();
  });

  it.each(['used', 'expired'])('says one thing about a link that does not open (%s)', async () => {
    const page = await open();
    page.server.expectOne('/api/open-requests').flush(gone, { status: 404, statusText: 'No' });
    await page.settle();
    expect(page.text()).toContain('This link does not open any more.It was used, withdrawn, or its date has passed.');
    expect(page.text()).not.toContain('Marrow');
  });

  it('asks the server nothing for a link that is not complete, or for no link', async () => {
    expect((await open('/send-sheet#short')).text()).toContain('This link does not open any more.');
    TestBed.resetTestingModule();
    expect((await open('/send-sheet')).text()).toContain('Open this page from the link in the e-mail.');
  });

  it('speaks Spanish when asked', async () => {
    const page = await open();
    await openRequest(page);
    await page.press('Español');
    expect(page.text()).toContain('Marrow & Slate Floors le pide la hoja de datos de seguridad vigente de');
    expect(document.documentElement.lang).toBe('es');
  });
});
