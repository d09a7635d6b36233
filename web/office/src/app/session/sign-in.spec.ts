import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { Router, provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { afterEach, beforeEach, describe, expect, it, jest } from '@jest/globals';
import { type Session } from '#shared/session';
import { SessionApi } from './session-api';
import { SignIn } from './sign-in';

const session: Session = {
  person: { id: '0190a0a0-0000-7000-8000-000000000001', name: 'Ines Halloran' },
  role: 'safety-officer',
  organisation: { id: '0190a0a0-0000-7000-8000-000000000002', name: 'Marrow & Slate Floors' },
};

@Component({ selector: 'kb-elsewhere', template: 'elsewhere', changeDetection: ChangeDetectionStrategy.OnPush })
class Elsewhere {}

function problem(status: number, extra: object = {}) {
  return [{ type: 'about:blank', title: 'No', status, ...extra }, { status, statusText: 'No' }] as const;
}

/** Lets promises of the page run out, then the view. */
async function settle(fixture: ComponentFixture<unknown>): Promise<void> {
  await new Promise((resolve) => setTimeout(resolve));
  await fixture.whenStable();
}

async function open(url = '/sign-in', firstAnswer: 'nobody' | 'gone' | 'signed in' = 'nobody') {
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(),
      provideHttpClientTesting(),
      provideRouter(
        [
          { path: 'sign-in', component: SignIn },
          { path: '**', component: Elsewhere },
        ],
        withComponentInputBinding(),
      ),
    ],
  });
  const server = TestBed.inject(HttpTestingController);
  const router = await RouterTestingHarness.create(url);
  const asked = server.expectOne('/api/session');
  if (firstAnswer === 'nobody') asked.flush(...problem(401));
  if (firstAnswer === 'gone') asked.error(new ProgressEvent('error'));
  if (firstAnswer === 'signed in') asked.flush(session);
  await settle(router.fixture);
  const loader = TestbedHarnessEnvironment.loader(router.fixture);
  const element = router.fixture.nativeElement as HTMLElement;
  const fill = async (email: string, password: string) => {
    const [emailInput, passwordInput] = await loader.getAllHarnesses(MatInputHarness);
    await emailInput?.setValue(email);
    await passwordInput?.setValue(password);
    await (await loader.getHarness(MatButtonHarness.with({ text: /Sign in/ }))).click();
  };
  const words = () => (element.querySelector('kb-note')?.textContent ?? '').replace(/\s+/g, ' ').trim();
  return { server, fixture: router.fixture, loader, element, fill, words, router: TestBed.inject(Router) };
}

describe('the sign-in page', () => {
  beforeEach(() => {
    TestBed.resetTestingModule();
  });
  afterEach(() => {
    jest.useRealTimers();
  });

  it('signs in and goes back to where the person wanted to be', async () => {
    const { server, fill, fixture, router } = await open('/sign-in?returnPath=%2Fjobs%3Fopen%3D1');
    await fill('ines@marrow-slate.example', 'chalk line and trowel');
    const request = server.expectOne({ method: 'POST', url: '/api/session' });
    expect(request.request.body).toEqual({ email: 'ines@marrow-slate.example', password: 'chalk line and trowel' });
    request.flush(session);
    await settle(fixture);
    expect(router.url).toBe('/jobs?open=1');
    expect(TestBed.inject(SessionApi).session()).toEqual({ ...session, units: {} });
  });

  it.each(['https://elsewhere.example/', '//elsewhere.example', '/\\elsewhere.example', 'jobs'])('does not follow the return path %s: it is no path of this application', async (path) => {
    const { server, fill, fixture, router } = await open(`/sign-in?returnPath=${encodeURIComponent(path)}`);
    await fill('ines@marrow-slate.example', 'chalk line and trowel');
    server.expectOne({ method: 'POST', url: '/api/session' }).flush(session);
    await settle(fixture);
    expect(router.url).toBe('/');
  });

  it('sends nothing while a field is empty or no address, and says so on the field', async () => {
    const { server, fill, element } = await open();
    await fill('ines', '');
    server.expectNone({ method: 'POST', url: '/api/session' });
    expect([...element.querySelectorAll('mat-error')].map((error) => error.textContent?.trim())).toEqual(['Write an e-mail address.', 'Fill this in.']);
  });

  it('says that address or password is wrong, without saying which, and empties the password', async () => {
    const { server, fill, fixture, words, loader } = await open();
    await fill('ines@marrow-slate.example', 'wrong');
    server.expectOne({ method: 'POST', url: '/api/session' }).flush(...problem(401));
    await settle(fixture);
    expect(words()).toContain('E-mail address or password is wrong.');
    const [email, password] = await loader.getAllHarnesses(MatInputHarness);
    expect([await email?.getValue(), await password?.getValue()]).toEqual(['ines@marrow-slate.example', '']);
  });

  it('says how long to wait after too many tries, holds the button, and lets go when the time is over', async () => {
    const { server, fill, fixture, words, loader } = await open();
    jest.useFakeTimers({ advanceTimers: true, doNotFake: ['requestAnimationFrame', 'queueMicrotask', 'nextTick', 'setTimeout', 'setImmediate'] });
    await fill('ines@marrow-slate.example', 'wrong');
    server.expectOne({ method: 'POST', url: '/api/session' }).flush(...problem(429, { retryAfterSeconds: 3 }));
    await settle(fixture);
    expect(words()).toBe('Too many tries. Wait 3 seconds, then try again.');
    const button = await loader.getHarness(MatButtonHarness);
    expect(await button.isDisabled()).toBe(true);
    jest.advanceTimersByTime(2000);
    await settle(fixture);
    expect(words()).toBe('Too many tries. Wait 1 second, then try again.');
    jest.advanceTimersByTime(1000);
    await settle(fixture);
    expect(words()).toBe('');
    expect(await button.isDisabled()).toBe(false);
  });

  it('says that the server cannot be reached, on arrival and on sending', async () => {
    const { server, fill, fixture, words } = await open('/sign-in', 'gone');
    expect(words()).toContain('Kneeboard cannot be reached.');
    await fill('ines@marrow-slate.example', 'chalk line and trowel');
    expect(words()).toBe('');
    server.expectOne({ method: 'POST', url: '/api/session' }).flush('', { status: 502, statusText: 'Bad Gateway' });
    await settle(fixture);
    expect(words()).toContain('Kneeboard cannot be reached.');
  });

  it('goes straight on when somebody is signed in already', async () => {
    const { router } = await open('/sign-in?returnPath=/history', 'signed in');
    expect(router.url).toBe('/history');
  });
});
