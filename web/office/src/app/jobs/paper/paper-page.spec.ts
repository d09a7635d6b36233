import { webcrypto } from 'node:crypto';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { describe, expect, it, jest } from '@jest/globals';
import { of } from 'rxjs';
import { answerShift, checklistText, generateChecklist } from '#compliance';
import { assembleFacts, type PublishedVersion } from '#shared/jobs';
import { ContractClient } from '../../contract/contract-client';
import { sha256Hex } from '../../pieces/sha256';
import { shiftFixture } from '../shift/shift-fixture';
import { PaperPage } from './paper-page';

// A browser hashes over https; the stand-in browser of these specs has nothing to do it with.
Object.defineProperty(globalThis, 'crypto', { value: webcrypto, configurable: true });

const shift = shiftFixture();
const facts = assembleFacts(shift);
const bytesOf = (language: 'en' | 'es') => JSON.stringify(checklistText(generateChecklist(facts, answerShift(facts)), language));
const id = (last: number) => `0190a0a0-0000-7000-8000-0000000000${last}`;
async function version(number: number): Promise<PublishedVersion> {
  const texts = await Promise.all((['en', 'es'] as const).map(async (language) => ({ language, sha256: (await sha256Hex(bytesOf(language))) ?? '' })));
  return { id: id(70 + number), number, publishedAt: '2026-12-03T06:00:00.000Z', publishedBy: 'Ines Halloran', manifestSha256: 'f'.repeat(64), texts, asked: [] };
}

async function open(query: string, versions: readonly PublishedVersion[], send: (language: string) => string = (language) => bytesOf(language === 'es' ? 'es' : 'en')) {
  TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([{ path: 'jobs/:jobId/shifts/:shiftId/paper/:versionId', component: PaperPage }], withComponentInputBinding())] });
  const server = TestBed.inject(HttpTestingController);
  // The testing backend takes only this realm's ArrayBuffer, which no encoder here makes.
  jest.spyOn(TestBed.inject(ContractClient), 'bytes').mockImplementation((_, { language = '' }) => of(new TextEncoder().encode(send(language)).buffer));
  const harness = await RouterTestingHarness.create(`/jobs/${shift.jobId}/shifts/${shift.id}/paper/${id(71)}${query}`);
  const element = harness.fixture.nativeElement as HTMLElement;
  const words = () => element.textContent?.replace(/\s+/g, ' ') ?? '';
  // Hashing is done by another thread, in its own time.
  const settle = async (isDone: () => boolean) => {
    for (let turn = 0; turn < 1000 && !isDone(); turn += 1) {
      await new Promise((resolve) => setTimeout(resolve, 5));
      await harness.fixture.whenStable();
    }
  };
  await settle(() => server.match(`/api/shifts/${shift.id}`).some((request) => (request.flush({ ...shift, versions }), true)));
  await settle(() => !words().includes('Loading'));
  return { element, words };
}

describe('the page of the list on paper', () => {
  it('sets the published text with the sentence that is signed, word for word, and a row for each person', async () => {
    const { element, words } = await open('', [await version(1)]);
    const list = checklistText(generateChecklist(facts, answerShift(facts)), 'en');
    expect(words()).toContain(list.sentence);
    expect(words()).toContain(list.notice);
    // Nothing of the text is left out: the hazards of the place and where to send help stand in the reasons only.
    for (const { text, why } of [...list.morning, ...list.tasks.flatMap(({ live }) => live)]) for (const said of [text, why]) expect(words()).toContain(said);
    for (const { lines } of list.people) for (const line of lines) expect(words()).toContain(line);
    for (const { name } of list.people) expect([...element.querySelectorAll('.signing td')].map((cell) => cell.textContent)).toContain(name);
    expect(element.querySelector('kb-paper-list')?.getAttribute('lang')).toBe('en');
  });

  it('sets the Spanish text where it is asked for', async () => {
    const { element, words } = await open('?language=es', [await version(1)]);
    expect(element.querySelector('kb-paper-list')?.getAttribute('lang')).toBe('es');
    expect(words()).toContain('Firma');
  });

  it('refuses to set a text whose bytes are not those on record', async () => {
    const { element, words } = await open('', [await version(1)], () => bytesOf('en').replace('Table 1', 'Table 2'));
    expect(words()).toContain('These are not the bytes on record.');
    expect(element.querySelector('kb-paper-list')).toBeNull();
  });

  it('says when a newer version took its place, and when there is no such version', async () => {
    expect((await open('', [await version(1), await version(2)])).words()).toContain('Version 2 took its place');
    TestBed.resetTestingModule();
    expect((await open('', [await version(3)])).words()).toContain('No such version');
  });
});
