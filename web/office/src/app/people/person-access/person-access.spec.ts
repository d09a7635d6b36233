import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { signal } from '@angular/core';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { beforeEach, describe, expect, it } from '@jest/globals';
import { type Role } from '#shared/common';
import { type Person } from '#shared/people';
import { SessionApi } from '../../session/session-api';
import { PersonAccess } from './person-access';

const id = '0190a0a0-0000-7000-8000-000000000003';
const dov: Person = { id, name: 'Dov Lindqvist', language: 'en', employer: null, isAdultConfirmed: true, isKeptFromIsocyanates: false, silicaTrainedOn: null, hazcomTrainedOn: null, respirators: [], isActive: true, version: 1, hasPin: false, pinProof: null, startPin: null, login: null };

describe('how a person gets in', () => {
  let fixture: ComponentFixture<PersonAccess>;
  let server: HttpTestingController;
  const text = (): string => (fixture.nativeElement as HTMLElement).textContent?.replace(/\s+/g, ' ') ?? '';
  const button = (words: string) => [...(fixture.nativeElement as HTMLElement).querySelectorAll('button')].find((each) => each.textContent?.trim() === words);

  async function show(person: Person, role: Role = 'safety-officer'): Promise<void> {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), { provide: SessionApi, useValue: { session: signal({ person: { id, name: 'Ines Halloran' }, role, organisation: { id, name: 'Marrow & Slate Floors' } }) } }] });
    server = TestBed.inject(HttpTestingController);
    fixture = TestBed.createComponent(PersonAccess);
    fixture.componentInstance.changed.subscribe((changed) => fixture.componentRef.setInput('person', changed));
    fixture.componentRef.setInput('person', person);
    await fixture.whenStable();
  }
  beforeEach(() => TestBed.resetTestingModule());

  it('gives a start PIN, shows it once, and forgets it with the next person', async () => {
    await show(dov);
    expect(text()).toContain('not set yet');
    button('Give a start PIN')?.click();
    server.expectOne({ method: 'POST', url: `/api/people/${id}/start-pin` }).flush({ pin: '40712298', expiresAt: '2026-12-15T12:00:00Z', person: { ...dov, startPin: { givenBy: 'Ines Halloran', givenAt: '2026-12-01T12:00:00Z', expiresAt: '2026-12-15T12:00:00Z' } } });
    await fixture.whenStable();
    expect(text()).toContain('4071 2298');
    expect(text()).toContain('A start PIN from Ines Halloran is good until 15 Dec 2026.');
    fixture.componentRef.setInput('person', { ...dov, id: '0190a0a0-0000-7000-8000-000000000004', name: 'Abe Kowalczyk' });
    await fixture.whenStable();
    expect(text()).not.toContain('4071 2298');
  });

  it('marks a PIN that nobody witnessed, and lets the office give a start PIN for it; not for one that is proven', async () => {
    await show({ ...dov, hasPin: true, pinProof: 'none' });
    expect(text()).toContain('set without a witness');
    expect(button('Give a start PIN')).toBeDefined();
    fixture.componentRef.setInput('person', { ...dov, hasPin: true, pinProof: 'lead' });
    await fixture.whenStable();
    expect(text()).toContain('before a witness');
    expect(button('Give a start PIN')).toBeUndefined();
    expect(button('Reset PIN')).toBeDefined();
  });

  it('lists what happened to the PIN, and marks where nobody vouched', async () => {
    await show({ ...dov, hasPin: true, pinProof: 'none' }, 'auditor');
    expect(button('Give a start PIN')).toBeUndefined();
    button('What happened to this PIN')?.click();
    await fixture.whenStable();
    const event = { personId: id, personName: 'Dov Lindqvist', tabletName: 'Tablet 2', capturedAt: '2026-12-01T12:00:00Z', at: '2026-12-01T12:00:05Z' };
    server.expectOne((request) => request.url === '/api/pin-events' && request.params.get('personId') === id).flush({
      items: [
        { ...event, id: '0190a0a0-0000-7000-8000-00000000000a', event: 'set', proof: 'none', byName: null, entryIndex: 12 },
        { ...event, id: '0190a0a0-0000-7000-8000-00000000000b', event: 'set', proof: 'lead', byName: 'Ines Halloran', entryIndex: 7 },
        { ...event, id: '0190a0a0-0000-7000-8000-00000000000c', event: 'reset', proof: null, byName: 'Hazel Marrow', tabletName: null, entryIndex: 5 },
      ],
      next: null,
    });
    await fixture.whenStable();
    expect(text()).toContain('Dov Lindqvist set a PIN on Tablet 2, without a witness');
    expect(text()).toContain('Dov Lindqvist set a PIN on Tablet 2, witnessed by Ines Halloran');
    expect(text()).toContain('PIN of Dov Lindqvist reset by Hazel Marrow');
    expect((fixture.nativeElement as HTMLElement).querySelectorAll('kb-pin-events kb-state')).toHaveLength(1);
  });
});
