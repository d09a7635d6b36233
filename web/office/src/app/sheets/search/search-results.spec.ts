import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { afterEach, describe, expect, it } from '@jest/globals';
import { type SearchAnswer } from '#shared/library';
import { walkResults } from './result-keys';
import { SearchResults } from './search-results';
import { closestWords, countSaid, knownChoice, snippetPieces } from './search-words';

const id = (number: number) => `0190a0a0-0000-7000-8000-00000000000${number}`;
const hit = (number: number, productName: string, matched: string, snippet: string | null = null): SearchAnswer['items'][number] => ({
  revision: { id: id(number), fileName: 'sheet.pdf', sha256: 'a'.repeat(64), byteLength: 3, pages: 1, pagesRead: null, state: 'confirmed', readerState: 'read', productId: null, productName, supplier: 'Northlode Resins', revisedOn: '2024-03-18', language: 'en', toLookAt: 0, isCurrent: true, uploadedAt: '2026-12-03T12:00:00Z', uploadedBy: 'Ines Halloran', confirmedAt: '2026-12-03T13:00:00Z', confirmedBy: 'Ines Halloran', version: 2 },
  matched,
  snippet,
});

describe('what a search found', () => {
  afterEach(() => TestBed.inject(HttpTestingController).verify());

  async function open(search: Record<string, string>) {
    TestBed.configureTestingModule({ imports: [SearchResults], providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])] });
    const fixture = TestBed.createComponent(SearchResults);
    fixture.componentRef.setInput('search', search);
    const changes: unknown[] = [];
    fixture.componentInstance.changed.subscribe((change) => changes.push(change));
    TestBed.tick();
    const page = fixture.nativeElement as HTMLElement;
    const server = TestBed.inject(HttpTestingController);
    const next = () => server.expectOne(({ url }) => url === '/api/sheet-search');
    const settle = async () => {
      await fixture.whenStable();
      return page.textContent?.replace(/\s+/gu, ' ') ?? '';
    };
    return { page, fixture, changes, next, settle, button: (words: string) => [...page.querySelectorAll('button')].find((each) => each.textContent?.trim() === words) };
  }

  it('asks with the filters of the address, and shows by what and where each was found', async () => {
    const { page, next, settle } = await open({ q: 'dust', state: 'confirmed' });
    const request = next();
    expect(request.request.params.toString()).toBe('q=dust&state=confirmed&limit=20');
    request.flush({ items: [hit(1, 'Dust Off', 'Name'), hit(2, 'Quarrybond 40', 'Text of the sheet', 'Do not breathe \u2068dust\u2069, <b>mist</b>')], hasMore: false });
    const text = await settle();
    expect(text).toContain('2 sheets match.');
    expect(text).toContain('Text of the sheet: Do not breathe dust, <b>mist</b>');
    expect([...page.querySelectorAll('mark')].map((mark) => mark.textContent)).toEqual(['dust']);
    expect(page.querySelector('q b')).toBeNull();
    expect([...page.querySelectorAll('a')].map((link) => link.getAttribute('href'))).toEqual([`/${id(1)}`, `/${id(2)}`]);
  });

  it('says what was looked for instead, and offers it', async () => {
    const { changes, next, settle, button } = await open({ q: 'quarybond' });
    next().flush({ items: [hit(1, 'Quarrybond 40', 'Similar to what you typed: quarrybond')], hasMore: false });
    expect(await settle()).toContain('Nothing here is called “quarybond”.');
    button('quarrybond')?.click();
    expect(changes).toEqual([{ q: 'quarrybond' }]);
  });

  it('asks for more only while there is more', async () => {
    const { next, settle, button } = await open({ q: 'quarrybond' });
    next().flush({ items: [hit(1, 'Quarrybond 40', 'Name')], hasMore: true });
    await settle();
    button('Show more')?.click();
    TestBed.tick();
    const request = next();
    expect(request.request.params.get('limit')).toBe('50');
    request.flush({ items: [hit(1, 'Quarrybond 40', 'Name'), hit(2, 'Quarrybond 41', 'Name')], hasMore: true });
    expect(await settle()).toContain('Add a word, or use a filter above.');
    expect(button('Show more')).toBeUndefined();
  });

  it('offers ways out where nothing matches', async () => {
    const { changes, next, settle, button } = await open({ q: 'zz', language: 'es' });
    next().flush({ items: [], hasMore: false });
    expect(await settle()).toContain('No sheet matches');
    button('Look without filters')?.click();
    button('Show all sheets')?.click();
    expect(changes).toEqual([{ state: null, language: null, signalWord: null, isInUse: null }, { q: null }]);
  });

  it('says what failed, and tries again', async () => {
    const { next, settle, button } = await open({ q: 'dust' });
    next().flush({ type: 'about:blank', title: 'Something failed here', status: 500, detail: 'Try again.' }, { status: 500, statusText: 'Internal Server Error' });
    expect(await settle()).toContain('Something failed here');
    button('Try again')?.click();
    TestBed.tick();
    next().flush({ items: [hit(1, 'Dust Off', 'Name')], hasMore: false });
    expect(await settle()).toContain('1 sheet matches.');
  });
});

describe('the words of a search', () => {
  it('takes a snippet apart at its marks', () => {
    expect(snippetPieces('a \u2068b\u2069 c \u2068d\u2069')).toEqual([{ text: 'a ', isMatch: false }, { text: 'b', isMatch: true }, { text: ' c ', isMatch: false }, { text: 'd', isMatch: true }]);
  });
  it('counts, and says when there is more', () => {
    expect([countSaid({ items: [], hasMore: false }), countSaid({ items: [hit(1, 'A', 'Name')], hasMore: true })]).toEqual(['No sheet matches.', 'More than 1 match. The best are shown.']);
    expect(closestWords({ items: [hit(1, 'A', 'Name')], hasMore: false })).toBeNull();
  });
  it('takes from the address only what a filter knows', () => {
    expect([knownChoice('state', 'confirmed'), knownChoice('state', 'gone'), knownChoice('isInUse', undefined)]).toEqual(['confirmed', '', '']);
  });
});

describe('keys', () => {
  it('walk from the box through what was found and back', () => {
    const page = document.createElement('div');
    page.innerHTML = '<input type="search"><a class="kb-found" href="#1">1</a><a href="#other">x</a><a class="kb-found" href="#2">2</a>';
    document.body.append(page);
    page.addEventListener('keydown', (event) => walkResults(page, event));
    const press = (key: string) => document.activeElement?.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }));
    page.querySelector('input')?.focus();
    const at = () => document.activeElement?.getAttribute('href') ?? document.activeElement?.tagName;
    const way = ['ArrowDown', 'ArrowDown', 'ArrowDown', 'ArrowUp', 'Escape', 'ArrowUp'].map((key) => (press(key), at()));
    expect(way).toEqual(['#1', '#2', '#2', '#1', 'INPUT', 'INPUT']);
    page.remove();
  });
});
