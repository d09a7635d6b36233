import { HttpClient, provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Router, RouterOutlet, provideRouter } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { beforeEach, describe, expect, it } from '@jest/globals';
import { type Role } from '#shared/common';
import { SessionApi } from './session-api';
import { mayOpen, signedIn, toFirstPage } from './session-guards';
import { sessionInterceptor } from './session-interceptor';

@Component({ selector: 'kb-page', template: 'page', changeDetection: ChangeDetectionStrategy.OnPush })
class Page {}

@Component({ selector: 'kb-frame', imports: [RouterOutlet], template: '<router-outlet />', changeDetection: ChangeDetectionStrategy.OnPush })
class Frame {}

const nobody = { status: 401, statusText: 'Unauthorized' };
const someone = (role: Role) => ({
  person: { id: '0190a0a0-0000-7000-8000-000000000001', name: 'Ines Halloran' },
  role,
  organisation: { id: '0190a0a0-0000-7000-8000-000000000002', name: 'Marrow & Slate Floors' },
});

async function goTo(url: string, answer: Role | 'nobody') {
  const harness = await RouterTestingHarness.create();
  const server = TestBed.inject(HttpTestingController);
  const arrived = harness.navigateByUrl(url);
  // The guards ask in a microtask; the request is there after one turn.
  await new Promise((resolve) => setTimeout(resolve));
  const asked = server.expectOne('/api/session');
  if (answer === 'nobody') asked.flush({}, nobody);
  else asked.flush(someone(answer));
  await arrived;
  return { server, harness, router: TestBed.inject(Router) };
}

describe('the doors of the office', () => {
  beforeEach(() => {
    TestBed.resetTestingModule();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(withInterceptors([sessionInterceptor])),
        provideHttpClientTesting(),
        provideRouter([
          { path: 'sign-in', component: Page },
          {
            path: '',
            component: Frame,
            canActivate: [signedIn],
            children: [
              { path: '', pathMatch: 'full', redirectTo: toFirstPage },
              { path: 'today', canMatch: [mayOpen], component: Page },
              { path: 'history', canMatch: [mayOpen], component: Page },
              { path: '**', title: 'No such page', component: Page },
            ],
          },
        ]),
      ],
    });
  });

  it('lead somebody unknown to the sign-in page, with the way back', async () => {
    const { router } = await goTo('/history?job=7', 'nobody');
    expect(router.url).toBe('/sign-in?returnPath=%2Fhistory%3Fjob%3D7');
  });

  it.each([
    ['safety-officer', '/today'],
    ['auditor', '/history'],
    ['nobody', '/sign-in'],
  ] as const)('lead %s to the first page that is theirs, %s', async (role, url) => {
    const { router } = await goTo('/', role);
    expect(router.url).toBe(url);
  });

  it('show a subject that is not for the role as no such page', async () => {
    const { harness } = await goTo('/history', 'crew-lead');
    expect(TestBed.inject(Router).routerState.snapshot.root.firstChild?.firstChild?.title).toBe('No such page');
    expect(harness.fixture.nativeElement.textContent).toBe('page');
  });

  it('ask who is signed in only once', async () => {
    const { harness, server } = await goTo('/today', 'owner');
    await harness.navigateByUrl('/history');
    server.expectNone('/api/session');
  });

  it('lead out when the session has ended meanwhile, and forget who it was', async () => {
    const { server, harness, router } = await goTo('/today', 'owner');
    let seen: unknown;
    TestBed.inject(HttpClient)
      .get('/api/jobs')
      .subscribe({ error: (error: { status: number }) => (seen = error.status) });
    server.expectOne('/api/jobs').flush({}, nobody);
    await harness.fixture.whenStable();
    expect(seen).toBe(401);
    expect(TestBed.inject(SessionApi).session()).toBeNull();
    expect(router.url).toBe('/sign-in?returnPath=%2Ftoday');
  });
});
