import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { beforeEach, describe, expect, it, jest } from '@jest/globals';
import { type TaskAnswer } from '#compliance/answer';
import { PublishDialog, type PublishQuestion } from './publish-dialog';
import { shiftIds } from './shift-fixture';

const held = { taskId: shiftIds.task, state: 'may-not-start', label: { en: 'May not start', es: '' }, name: { en: 'Shot blasting', es: '' }, summary: { en: 'No air sample.', es: '' } } as unknown as TaskAnswer;
const question: PublishQuestion = { shiftId: shiftIds.shift, version: 7, day: 'Thursday 3 December', nextNumber: 2, asked: ['A', 'B', 'C', 'D', 'E', 'F'], signedBefore: 4, held: [held], holding: [], label: 'Publish version 2 with 1 task held' };

describe('publishing', () => {
  const close = jest.fn();
  const url = `/api/shifts/${shiftIds.shift}/publication`;

  async function open() {
    const fixture = TestBed.createComponent(PublishDialog);
    await fixture.whenStable();
    const button = await TestbedHarnessEnvironment.loader(fixture).getHarness(MatButtonHarness.with({ text: question.label }));
    const text = () => (fixture.nativeElement as HTMLElement).textContent?.replace(/\s+/g, ' ') ?? '';
    return { fixture, button, text, server: TestBed.inject(HttpTestingController) };
  }

  beforeEach(() => {
    close.mockReset();
    TestBed.configureTestingModule({
      providers: [provideHttpClient(), provideHttpClientTesting(), { provide: MAT_DIALOG_DATA, useValue: question }, { provide: MatDialogRef, useValue: { close } }],
    });
  });

  it('says first who is asked again and what stays held', async () => {
    const { text } = await open();
    expect(text()).toContain('6 people will be asked to sign again; 4 had signed version 1.');
    expect(text()).toContain('Shot blasting. No air sample.');
  });

  it('publishes the very version that was looked at', async () => {
    const { button, server } = await open();
    await button.click();
    const sent = server.expectOne(url);
    expect(sent.request.headers.get('If-Match')).toBe('"7"');
    const published = { id: shiftIds.job, number: 2, publishedAt: '2026-12-03T12:00:00Z', publishedBy: 'Ines Halloran', manifestSha256: 'a', texts: [], asked: [], answers: [] };
    sent.flush(published);
    await new Promise((resolve) => setTimeout(resolve));
    expect(close).toHaveBeenCalledWith(published);
  });

  it('stays open and says so when somebody changed the shift meanwhile', async () => {
    const { button, text, server, fixture } = await open();
    await button.click();
    server.expectOne(url).flush({ type: 'about:blank', title: 'Changed', status: 412 }, { status: 412, statusText: 'Precondition Failed' });
    await new Promise((resolve) => setTimeout(resolve));
    await fixture.whenStable();
    expect(text()).toContain('Somebody changed this shift meanwhile.');
    expect(close).not.toHaveBeenCalled();
  });
});
