import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { describe, expect, it } from '@jest/globals';
import { type ContainerLabel } from '#shared/library';
import { LabelPage } from './label-page';

const label: ContainerLabel = {
  identifier: 'Quarrybond 40 Part A + Quarrybond 40 Part C',
  state: { en: 'being mixed', es: 'mezclándose' },
  signalWord: 'danger',
  statements: [{ code: 'H318', en: 'Causes serious eye damage', es: 'Provoca lesiones oculares graves' }],
  pictograms: ['GHS05'],
  effects: [{ en: 'Dust while the powder is dumped.', es: 'Polvo al vaciar el saco.' }],
  partsWithoutSheet: [],
  notice: { en: 'Follow the strictest.', es: 'Siga lo más estricto.' },
};

describe('labels for mixed and decanted containers', () => {
  async function open(answer: ContainerLabel, of: { kitId: string } | { productId: string } = { kitId: 'k' }) {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])] });
    const server = TestBed.inject(HttpTestingController);
    const fixture = TestBed.createComponent(LabelPage);
    for (const [name, value] of Object.entries(of)) fixture.componentRef.setInput(name, value);
    TestBed.tick();
    const asked = server.expectOne(({ url }) => url.endsWith('/label'));
    asked.flush(answer);
    await fixture.whenStable();
    const element = fixture.nativeElement as HTMLElement;
    return { asked: asked.request.urlWithParams, text: () => element.textContent?.replace(/\s+/g, ' ') ?? '', button: () => [...element.querySelectorAll('button')].find((one) => one.textContent?.includes('Print')), labels: () => element.querySelectorAll('article').length };
  }

  it('refuses to print with a part that has no sheet, and names it', async () => {
    const { text, button, labels } = await open({ ...label, partsWithoutSheet: ['Quarrybond 40 Part B', 'Northlode Primer 12'] });
    expect(text()).toContain('This label is not printed: no confirmed sheet for Quarrybond 40 Part B, Northlode Primer 12.');
    expect(button()).toBeUndefined();
    expect(labels()).toBe(0);
  });

  it('prints identifier, state, signal word, statements and effects in both languages, and the notice', async () => {
    const { text, button, labels, asked } = await open(label);
    expect(asked).toBe('/api/kits/k/label?state=mixing');
    for (const words of ['Quarrybond 40 Part A + Quarrybond 40 Part C', 'being mixed / mezclándose', 'DANGER / PELIGRO', 'Causes serious eye damage. Dust while the powder is dumped.', 'Provoca lesiones oculares graves. Polvo al vaciar el saco.', 'Follow the strictest. Siga lo más estricto.']) expect(text()).toContain(words);
    expect(button()?.textContent?.trim()).toBe('Print 6 labels');
    expect(labels()).toBe(6);
  });

  it('does not call a decanted product mixed', async () => {
    const { text, asked } = await open({ ...label, state: { en: 'mixed, wet', es: 'mezclado, húmedo' } }, { productId: 'p' });
    expect(asked).toBe('/api/products/p/label');
    expect(text()).toContain('decanted, not mixed');
    expect(text()).not.toContain('mixed, wet /');
  });
});
