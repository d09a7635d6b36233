import { afterEach, beforeEach, describe, expect, it, jest } from '@jest/globals';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { type Envelope } from '#shared/envelopes';
import { answersText } from '#shared/pin-sealing';
import { ids, tabletDay } from '../../testing/tablet-data';
import { Office } from '../../testing/office';
import { sealingKeys } from '../../testing/seals';
import { setUpTabletBrowser } from '../../testing/tablet-browser';
import { sha256Hex } from '../checklists/opened-text';
import { Day } from '../day/day';
import { Outbox } from '../outbox/outbox';
import { StartCheck } from './start-check';

/** The lines of the invented text: shroud (critical), seal (critical), gloves. */
describe('StartCheck', () => {
  let office: Office;
  let keys: Awaited<ReturnType<typeof sealingKeys>>;
  let fixture: ComponentFixture<StartCheck>;
  const host = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const button = (words: string): HTMLButtonElement => {
    const found = [...host().querySelectorAll('button')].find((each) => each.textContent?.trim() === words);
    if (!found) throw new Error(`no button says "${words}"`);
    return found;
  };
  const shown = (): string => host().querySelector('#live-line')?.textContent ?? '';
  const written = (): readonly Envelope[] => TestBed.inject(Outbox).posted().flatMap(({ envelope }) => envelope ?? []);
  const shows = async (words: string): Promise<void> => {
    for (let turn = 0; turn < 500 && !host().textContent?.includes(words); turn += 1) await wait(10);
    expect(host().textContent).toContain(words);
  };
  const typePin = async (digits: string): Promise<void> => {
    for (const digit of digits) button(digit).click();
    button('OK').click();
    await wait(0);
  };
  const wait = async (ms: number): Promise<void> => {
    await new Promise((resolve) => setTimeout(resolve, ms));
    await fixture.whenStable();
  };

  beforeEach(async () => {
    setUpTabletBrowser();
    TestBed.configureTestingModule({ providers: [provideRouter([])] });
    office = new Office();
    keys = await sealingKeys();
    office.day = await tabletDay(keys.spki);
    await TestBed.inject(Day).refresh();
    fixture = TestBed.createComponent(StartCheck);
    fixture.componentRef.setInput('shiftId', ids.shift);
    fixture.componentRef.setInput('taskId', ids.mixing);
    await wait(600);
  });
  afterEach(() => {
    jest.restoreAllMocks();
  });

  it('takes one answer a line: a finger that bounces answers no line that nobody saw', async () => {
    expect(shown()).toBe('Text of shroud');
    for (let tap = 0; tap < 3; tap += 1) button('Yes').click();
    await wait(0);
    expect(shown()).toBe('Text of seal');
    expect(button('Yes').getAttribute('aria-disabled')).toBe('true');
    await wait(600);
    button('Yes').click();
    await wait(600);
    expect(shown()).toBe('Text of gloves');
    for (let tap = 0; tap < 3; tap += 1) button('Yes').click();
    await shows('Dov Lindqvist, type your PIN');
    expect(written()).toEqual([]);
    await typePin('5820');
    await shows('may start');
    // "May start" is not the whole of it while somebody on the task has not signed.
    expect(host().textContent).toMatch(/Not signed on this tablet: .+\. Everyone signs before the task starts\./);
    const [check] = written();
    if (check?.kind !== 'start-check') throw new Error('no start check');
    expect(check).toMatchObject({ personId: ids.dov, answers: [{ lineId: 'shroud' }, { lineId: 'seal' }, { lineId: 'gloves' }] });
    expect(await keys.open(check.sealedPin ?? '')).toEqual({ pin: '5820', textHash: await sha256Hex(answersText('start-check', ids.version, ids.mixing, check.answers)), nonce: check.nonce });
  });

  it('stops the task once on a critical No', async () => {
    for (let tap = 0; tap < 3; tap += 1) button('No, not yet').click();
    await wait(100);
    expect(written()).toMatchObject([{ kind: 'start-check', answers: [{ lineId: 'shroud', answer: 'no' }] }]);
    expect(host().textContent).toContain('is stopped');
  });

  it('does not start on a wrong PIN, and can go back to the lines', async () => {
    office.pinAnswer = { status: 422, body: { type: 'about:blank', title: 'Not right.', status: 422, detail: 'This is not the right PIN. 4 tries are left before a pause.' } };
    for (const line of ['shroud', 'seal', 'gloves']) {
      expect(shown()).toBe(`Text of ${line}`);
      button('Yes').click();
      await wait(600);
    }
    await typePin('1111');
    await shows('4 tries are left');
    expect(written()).toEqual([]);
    button('Back').click();
    await wait(600);
    expect(shown()).toBe('Text of gloves');
  });

  it('begins anew when a newer version arrives between two lines', async () => {
    button('Yes').click();
    await wait(600);
    expect(shown()).toBe('Text of seal');
    const { day } = office;
    if (!day) throw new Error('no day');
    const [job] = day.jobs;
    office.day = { ...day, jobs: job ? [{ ...job, version: { ...job.version, id: ids.nobody, number: 3 } }] : [] };
    await TestBed.inject(Day).refresh();
    await wait(600);
    expect(shown()).toBe('Text of shroud');
  });

  it('keeps what was typed when the day is heard again meanwhile', async () => {
    button('Add a number or a note').click();
    await wait(0);
    const field = host().querySelector<HTMLInputElement>('input.kb-field');
    if (!field) throw new Error('no field for a note');
    field.value = 'gauge 14';
    field.dispatchEvent(new Event('input'));
    await TestBed.inject(Day).refresh();
    await wait(0);
    expect(host().querySelector<HTMLInputElement>('input.kb-field')?.value).toBe('gauge 14');
    button('No, not yet').click();
    await wait(100);
    expect(written()).toMatchObject([{ answers: [{ lineId: 'shroud', answer: 'no', note: 'gauge 14' }] }]);
  });
});
