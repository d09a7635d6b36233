import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Title } from '@angular/platform-browser';
import { Router, TitleStrategy, provideRouter } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { beforeEach, describe, expect, it } from '@jest/globals';
import { type Role } from '#shared/common';
import { SessionApi } from '../session/session-api';
import { PageTitle } from './page-title';
import { Shell } from './shell';

@Component({ selector: 'kb-page', template: '<h1>Page</h1>', changeDetection: ChangeDetectionStrategy.OnPush })
class Page {}

async function open(role: Role) {
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(),
      provideHttpClientTesting(),
      { provide: TitleStrategy, useClass: PageTitle },
      provideRouter([
        { path: 'sign-in', component: Page },
        {
          path: '',
          component: Shell,
          children: [
            { path: 'today', title: 'Today', component: Page },
            { path: 'jobs', title: 'Jobs', component: Page },
            { path: 'history', title: 'History', component: Page },
          ],
        },
      ]),
    ],
  });
  const server = TestBed.inject(HttpTestingController);
  const loaded = TestBed.inject(SessionApi).load();
  server.expectOne('/api/session').flush({
    person: { id: '0190a0a0-0000-7000-8000-000000000001', name: 'Ines Halloran' },
    role,
    organisation: { id: '0190a0a0-0000-7000-8000-000000000002', name: 'Marrow & Slate Floors' },
  });
  await loaded;
  const harness = await RouterTestingHarness.create('/jobs');
  const element = harness.fixture.nativeElement as HTMLElement;
  document.body.append(element);
  const settle = async () => {
    await new Promise((resolve) => setTimeout(resolve));
    await harness.fixture.whenStable();
  };
  const button = (words: string): HTMLButtonElement => {
    const found = [...element.querySelectorAll('button')].find((one) => one.textContent?.trim() === words);
    if (!found) throw new Error(`no button "${words}"`);
    return found;
  };
  const links = () => [...element.querySelectorAll('nav a')].map((link) => (link.textContent ?? '').replace(/\s+/g, ' ').trim());
  return { server, harness, element, settle, button, links };
}

describe('the office frame', () => {
  beforeEach(() => {
    TestBed.resetTestingModule();
  });

  it.each([
    ['owner', ['Today', 'Jobs', 'History']],
    ['crew-lead', ['Today', 'Jobs']],
    ['auditor', ['Jobs', 'History']],
  ] as const)('shows a %s what exists and is theirs: %s', async (role, expected) => {
    const { links } = await open(role);
    expect(links()).toEqual(expected);
  });

  it('marks the current place for eyes and for screen readers, and names the page in the title', async () => {
    const { element } = await open('owner');
    const current = [...element.querySelectorAll('nav a[aria-current="page"]')];
    expect(current.map((link) => link.textContent?.trim())).toEqual(['Jobs']);
    expect(TestBed.inject(Title).getTitle()).toBe('Jobs, Kneeboard');
  });

  it('says who is signed in, and in which role', async () => {
    const { element } = await open('safety-officer');
    expect(element.querySelector('.me')?.textContent).toContain('Ines Halloran');
    expect(element.querySelector('.me')?.textContent).toContain('Safety officer');
  });

  it('counts what waits, stops only, and leaves the counts away when the server does not answer', async () => {
    const { server, harness, settle, links } = await open('owner');
    await harness.navigateByUrl('/today');
    const item = { id: 'a', label: '', text: '', detail: '', aside: '', link: '', linkText: '' };
    server.match('/api/today').at(-1)?.flush({
      items: [{ ...item, level: 'stop' }, { ...item, level: 'caution' }],
      onSite: [],
      library: { sheetsInUse: 41, waitingForYou: 3, beingRead: 0 },
    });
    await settle();
    expect(links()).toEqual(['Today, 1 waiting', 'Jobs', 'History']);
  });

  it('puts the reader at the beginning of the next page', async () => {
    const { harness, element } = await open('owner');
    await harness.navigateByUrl('/history');
    expect(document.activeElement).toBe(element.querySelector('main'));
  });

  it('leaves the reader on the row that opened something beside its list', async () => {
    const { harness, element } = await open('owner');
    const row = document.createElement('button');
    element.querySelector('main')?.append(row);
    row.focus();
    await harness.navigateByUrl('/history');
    expect(document.activeElement).toBe(row);
  });

  it('opens and closes the menu of narrow screens, with Escape too, and gives the focus back', async () => {
    const { button, settle, element } = await open('owner');
    const menu = button('Menu');
    menu.click();
    await settle();
    expect(menu.getAttribute('aria-expanded')).toBe('true');
    element.querySelector('nav a')?.dispatchEvent(new KeyboardEvent('keydown', { key: 'Escape', bubbles: true }));
    await settle();
    expect(menu.getAttribute('aria-expanded')).toBe('false');
    expect(document.activeElement).toBe(menu);
  });

  it('says that one is still signed in when signing out did not reach the server, and leaves when it did', async () => {
    const { button, server, settle, element } = await open('owner');
    button('Sign out').click();
    server.expectOne({ method: 'DELETE', url: '/api/session' }).error(new ProgressEvent('error'));
    await settle();
    expect(element.querySelector('[role="alert"]')?.textContent).toContain('Still signed in');
    button('Sign out').click();
    server.expectOne({ method: 'DELETE', url: '/api/session' }).flush(null, { status: 204, statusText: 'No Content' });
    await settle();
    expect(TestBed.inject(Router).url).toBe('/sign-in');
    expect(TestBed.inject(SessionApi).session()).toBeNull();
  });
});
