import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { provideRouter } from '@angular/router';
import { beforeEach, describe, expect, it } from '@jest/globals';
import { Account } from './account';

async function open() {
  TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])] });
  const server = TestBed.inject(HttpTestingController);
  const fixture = TestBed.createComponent(Account);
  const loader = TestbedHarnessEnvironment.loader(fixture);
  const element = fixture.nativeElement as HTMLElement;
  const change = async (current: string, next: string) => {
    const [first, second] = await loader.getAllHarnesses(MatInputHarness);
    await first?.setValue(current);
    await second?.setValue(next);
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Change password' }))).click();
  };
  const settle = async () => {
    await new Promise((resolve) => setTimeout(resolve));
    await fixture.whenStable();
  };
  const errors = () => [...element.querySelectorAll('mat-error')].map((error) => error.textContent?.trim());
  return { server, loader, element, change, settle, errors };
}

describe('changing the password', () => {
  beforeEach(() => {
    TestBed.resetTestingModule();
  });

  it('sends both, says it is done, and empties the fields', async () => {
    const { server, change, settle, element, loader } = await open();
    await change('the old one', 'chalk line and trowel');
    const request = server.expectOne({ method: 'PUT', url: '/api/session/password' });
    expect(request.request.body).toEqual({ current: 'the old one', next: 'chalk line and trowel' });
    request.flush(null, { status: 204, statusText: 'No Content' });
    await settle();
    expect(element.querySelector('[role="status"]')?.textContent).toContain('Password changed.');
    const inputs = await loader.getAllHarnesses(MatInputHarness);
    expect(await Promise.all(inputs.map((input) => input.getValue()))).toEqual(['', '']);
  });

  it('asks for twelve characters before it sends anything', async () => {
    const { server, change, errors } = await open();
    await change('the old one', 'short');
    server.expectNone('/api/session/password');
    expect(errors()).toEqual(['Use at least 12 characters.']);
  });

  it("shows the server's refusal on the field it is about", async () => {
    const { server, change, settle, errors, element } = await open();
    await change('not mine', 'chalk line and trowel');
    server
      .expectOne('/api/session/password')
      .flush({ type: 'about:blank', title: 'The password was not changed.', status: 400, errors: [{ path: 'current', message: 'This is not your present password.' }] }, { status: 400, statusText: 'Bad Request' });
    await settle();
    expect(errors()).toEqual(['This is not your present password.']);
    expect(element.querySelector('kb-note')).toBeNull();
  });
});
