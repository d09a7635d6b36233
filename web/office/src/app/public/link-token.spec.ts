import { ChangeDetectionStrategy, Component } from '@angular/core';
import { Location } from '@angular/common';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { beforeEach, describe, expect, it } from '@jest/globals';
import { linkToken } from './link-token';

const token = 'a'.repeat(43);

@Component({ selector: 'kb-kept', template: '{{ token() }}', changeDetection: ChangeDetectionStrategy.OnPush })
class Kept {
  protected readonly token = linkToken('test-link');
}
@Component({ selector: 'kb-once', template: '{{ token() }}', changeDetection: ChangeDetectionStrategy.OnPush })
class Once {
  protected readonly token = linkToken();
}

describe('the secret of a link', () => {
  beforeEach(() => {
    sessionStorage.clear();
    TestBed.configureTestingModule({ providers: [provideRouter([{ path: 'kept', component: Kept }, { path: 'once', component: Once }])] });
  });

  async function open(url: string) {
    const harness = await RouterTestingHarness.create(url);
    await new Promise((resolve) => setTimeout(resolve));
    await harness.fixture.whenStable();
    return { shown: () => (harness.fixture.nativeElement as HTMLElement).textContent, address: () => TestBed.inject(Location).path(true), url: () => TestBed.inject(Router).url };
  }

  it.each(['/kept', '/once'])('is read from the fragment of %s and taken out of the address', async (path) => {
    const { shown, address, url } = await open(`${path}#${token}`);
    expect(shown()).toContain(token);
    expect([address(), url()]).toEqual([path, path]);
  });

  it('is there again after a reload where the page keeps it for its tab', async () => {
    sessionStorage.setItem('test-link', token);
    expect((await open('/kept')).shown()).toContain(token);
  });

  it('is not kept where the page does not ask for it', async () => {
    await open(`/once#${token}`);
    expect(JSON.stringify({ ...sessionStorage, ...localStorage })).not.toContain(token);
  });

  it('is nothing when the page was opened without a link', async () => {
    expect((await open('/once')).shown()).not.toContain('a');
  });
});
