import { afterEach, beforeEach, describe, expect, it, jest } from '@jest/globals';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { openDB } from 'idb';
import { type Envelope } from '#shared/envelopes';
import { checklistText, dayJob, ids, tabletDay } from '../../testing/tablet-data';
import { Office } from '../../testing/office';
import { sealingKeys } from '../../testing/seals';
import { SignSheetHarness } from '../../testing/sign-sheet-harness';
import { setUpTabletBrowser } from '../../testing/tablet-browser';
import { sha256Hex } from '../checklists/opened-text';
import { Day } from '../day/day';
import { Outbox } from '../outbox/outbox';
import { databaseName } from '../outbox/tablet-database';
import { InkBox } from './ink';
import { SignSheet } from './sign-sheet';

const stroke = [{ points: [{ x: 1, y: 2, time: 3, pressure: 0.5 }, { x: 4, y: 5, time: 6, pressure: 0.5 }] }];

describe('SignSheet', () => {
  let office: Office;
  let fixture: ComponentFixture<SignSheet>;
  let page: SignSheetHarness;
  let keys: Awaited<ReturnType<typeof sealingKeys>>;

  beforeEach(async () => {
    setUpTabletBrowser();
    TestBed.configureTestingModule({ providers: [provideRouter([])] });
    keys = await sealingKeys();
    office = new Office();
    office.day = await tabletDay(keys.spki);
    await TestBed.inject(Day).refresh();
    fixture = TestBed.createComponent(SignSheet);
    fixture.componentRef.setInput('shiftId', ids.shift);
    page = await TestbedHarnessEnvironment.harnessForFixture(fixture, SignSheetHarness);
  });
  afterEach(() => {
    jest.restoreAllMocks();
  });

  /** jsdom has no canvas: the drawing itself is tried in a browser. */
  const draw = (): void => void jest.spyOn(InkBox.prototype, 'strokes').mockReturnValue(stroke);
  const written = (): readonly Envelope[] => TestBed.inject(Outbox).posted().flatMap(({ envelope }) => envelope ?? []);
  const dropSignal = (): void => {
    office.status = 503;
    window.dispatchEvent(new Event('offline'));
  };
  const abeSigns = async (pin: string): Promise<void> => {
    await page.press('Abe');
    await page.press('Yes, matches');
    draw();
    await page.press('Done');
    await page.typePin(pin);
  };

  it('signs the bytes of the language that was shown, with a PIN sealed to that text', async () => {
    await abeSigns('4827');
    const textSha256 = await sha256Hex(JSON.stringify(checklistText('en')));
    const [envelope] = written();
    expect(envelope).toMatchObject({ kind: 'signed', versionId: ids.version, personId: ids.abe, language: 'en', textSha256, strokes: stroke });
    if (envelope?.kind !== 'signed') throw new Error('not a signature');
    expect(await keys.open(envelope.sealedPin)).toEqual({ pin: '4827', textHash: textSha256, nonce: envelope.nonce });
    expect(await page.text()).toContain('Abe Kowalczyk signed at');
    expect(await page.text()).toContain('Sent.');
  });

  it('asks with one seal and keeps another', async () => {
    await abeSigns('4827');
    const [envelope] = written();
    const asked = JSON.parse(office.pinChecks[0] ?? '{}') as { readonly nonce: string };
    expect(envelope?.kind === 'signed' && envelope.nonce).not.toBe(asked.nonce);
  });

  it('starts in the person’s language and signs in the one they switch to', async () => {
    await page.press('Marisol');
    expect(await page.language()).toBe('es');
    expect(await page.text()).toContain('Me explicaron el trabajo');
    await page.press('English');
    expect(await page.language()).toBe('en');
    expect(await page.text()).toContain('I was briefed in a language I understand.');
  });

  it('keeps nothing with a wrong PIN and says how many tries are left', async () => {
    office.pinAnswer = { status: 422, body: { type: 'about:blank', title: 'Wrong PIN.', status: 422, detail: 'This is not Abe’s PIN. 3 tries left.' } };
    await abeSigns('1111');
    expect(written()).toEqual([]);
    expect(await page.text()).toContain('This is not Abe’s PIN. 3 tries left.');
    office.pinAnswer = { status: 204, body: null };
    await page.typePin('4827');
    expect(written()).toHaveLength(1);
  });

  it('pauses the keypad as long as the server says', async () => {
    office.pinAnswer = { status: 429, body: { type: 'about:blank', title: 'Paused.', status: 429, retryAfterSeconds: 40 } };
    await abeSigns('1111');
    expect(await page.text()).toContain('Wait 40 seconds.');
    office.pinAnswer = { status: 204, body: null };
    await page.typePin('4827');
    expect(written()).toEqual([]);
  });

  it('goes on without signal, asks nobody about the PIN and calls nothing sent', async () => {
    dropSignal();
    await abeSigns('4827');
    expect(written()).toHaveLength(1);
    expect(office.pinChecks).toEqual([]);
    const text = await page.text();
    expect(text).toContain('Kept on this tablet, waiting to send.');
    expect(text).not.toContain('Sent.');
  });

  it('has a first PIN typed twice and witnessed by the lead, then keeps PIN and signature in one go', async () => {
    await page.press('Marisol');
    await page.press('Sí, coincide');
    draw();
    await page.press('Listo');
    await page.typePin('7391');
    await page.typePin('7391');
    expect(await page.text()).toContain('Dov Lindqvist, escriba su propio PIN');
    expect(written()).toEqual([]);
    await page.typePin('5820');
    const [pinSet, signed] = written();
    expect([pinSet?.kind, signed?.kind]).toEqual(['pin-set', 'signed']);
    if (pinSet?.kind !== 'pin-set') throw new Error('no new PIN');
    const textHash = await sha256Hex(`pin-set ${pinSet.personId}`);
    expect(await keys.open(pinSet.sealedPin)).toEqual({ pin: '7391', textHash, nonce: pinSet.nonce });
    expect(await keys.open(pinSet.witnessSealedPin ?? '')).toEqual({ pin: '5820', textHash, nonce: pinSet.witnessNonce });
    expect(pinSet.witnessPersonId).toBe(ids.dov);
  });

  /** Marisol, who has no PIN, draws and chooses one; then somebody must vouch. */
  async function marisolChooses(): Promise<void> {
    await page.press('Marisol');
    await page.press('Sí, coincide');
    draw();
    await page.press('Listo');
    await page.typePin('7391');
    await page.typePin('7391');
  }

  it('takes the start PIN from the office where no lead can witness', async () => {
    await marisolChooses();
    await page.press('Tengo un PIN de inicio');
    await page.typePin('4071');
    expect(await page.text()).toContain('El PIN de inicio tiene 8 números.');
    await page.typePin('22981');
    const [pinSet, signed] = written();
    expect([pinSet?.kind, signed?.kind]).toEqual(['pin-set', 'signed']);
    if (pinSet?.kind !== 'pin-set') throw new Error('no new PIN');
    expect(pinSet).toMatchObject({ witnessPersonId: null });
    expect(await keys.open(pinSet.startSealedPin ?? '')).toMatchObject({ pin: '40712298', nonce: pinSet.startNonce });
    expect(JSON.parse(office.pinChecks[0] ?? '{}')).toMatchObject({ kind: 'start-pin', personId: ids.marisol });
  });

  it('goes on without anybody, and says on the spot that it does not count', async () => {
    dropSignal();
    await marisolChooses();
    expect(await page.text()).toContain('no cuenta hasta que elija el PIN delante de un líder');
    await page.press('Ahora no hay testigo');
    expect(written().map(({ kind }) => kind)).toEqual(['pin-set', 'signed']);
    expect(written()[0]).toMatchObject({ witnessPersonId: null });
    expect(written()[0]).not.toHaveProperty('startSealedPin');
    // The list is in the tablet's own language.
    expect(await page.text()).toContain('PIN not witnessed');
  });

  it('is witnessed by another lead or officer than the day’s lead', async () => {
    office.day = { ...(await tabletDay(keys.spki)), witnesses: [{ id: ids.dov, name: 'Dov Lindqvist' }, { id: ids.nobody, name: 'Ines Halloran' }] };
    await TestBed.inject(Day).refresh();
    await marisolChooses();
    await page.press('Ines Halloran es testigo');
    expect(await page.text()).toContain('Ines Halloran, escriba su propio PIN');
    await page.typePin('8642');
    expect(written()[0]).toMatchObject({ kind: 'pin-set', witnessPersonId: ids.nobody });
  });

  it('asks nobody without a mask whether it fits', async () => {
    await page.press('Abe');
    expect(await page.text()).toContain('does the mask fit?');
    await page.press('Not me');
    const bare = checklistText();
    const text = JSON.stringify({ ...bare, tasks: bare.tasks.map((task) => ({ ...task, protection: [] })) });
    const day = await tabletDay(keys.spki);
    const [job] = day.jobs;
    if (!job) throw new Error('no job');
    office.day = { ...day, jobs: [{ ...job, version: { ...job.version, texts: [{ language: 'en', text, sha256: await sha256Hex(text) }] } }] };
    await TestBed.inject(Day).refresh();
    await page.press('Abe');
    expect(await page.text()).not.toContain('does the mask fit?');
    expect(await page.text()).toContain('do you know what to wear for them?');
  });

  it('starts a new PIN over when the second differs, and takes no run or repeat', async () => {
    dropSignal();
    await page.press('Marisol');
    await page.press('Sí, coincide');
    draw();
    await page.press('Listo');
    await page.typePin('1234');
    expect(await page.text()).toContain('Es muy fácil de adivinar');
    await page.typePin('7391');
    await page.typePin('7392');
    expect(await page.text()).toContain('Los dos PIN no son iguales');
    expect(await page.text()).toContain('elija un PIN');
    expect(written()).toEqual([]);
  });

  it('leaves no PIN in the tablet’s storage', async () => {
    dropSignal();
    await abeSigns('482793');
    const database = await openDB(databaseName);
    const everything = JSON.stringify([await database.getAll('outbox'), await database.getAll('kept')]);
    expect(everything).toContain('sealedPin');
    expect(everything).not.toContain('482793');
  });

  it('takes a reason off the shared screen again', async () => {
    await page.press('Abe');
    await page.press('I can’t sign yet');
    const reason = fixture.nativeElement.querySelectorAll('input[type=radio]')[1] as HTMLInputElement;
    reason.click();
    await page.press('Tell them');
    expect(written()[0]).toMatchObject({ kind: 'could-not-sign', reason: 'missing-gear', note: null, personId: ids.abe });
    const text = await page.text();
    expect(text).toContain('Talk to your lead now');
    expect(text).not.toContain('Gear is missing');
  });

  it('writes a reason once, however often a gloved finger bounces', async () => {
    await page.press('Abe');
    await page.press('I can’t sign yet');
    const host = fixture.nativeElement as HTMLElement;
    host.querySelector<HTMLInputElement>('input[type="radio"]')?.click();
    const tell = [...host.querySelectorAll('button')].find((button) => button.textContent?.trim() === 'Tell them');
    for (let tap = 0; tap < 3; tap += 1) tell?.click();
    await page.settle();
    expect(written().map(({ kind }) => kind)).toEqual(['could-not-sign']);
  });

  it('offers no way off the page while somebody signs', async () => {
    expect(await page.hasWayOut()).toBe(true);
    await page.press('Abe');
    expect(await page.hasWayOut()).toBe(false);
    expect(fixture.componentInstance.canLeave()).toBe(false);
    await page.press('Not me');
    expect(fixture.componentInstance.canLeave()).toBe(true);
  });

  it('signs what was read even when a newer list arrives meanwhile, and then asks again', async () => {
    await page.press('Abe');
    await page.press('Yes, matches');
    office.day = await tabletDay(keys.spki, dayJob({ version: { id: ids.earlierVersion, number: 3, publishedAt: '2026-12-03T12:30:00Z', texts: [] } }));
    await TestBed.inject(Day).refresh();
    draw();
    await page.press('Done');
    await page.typePin('4827');
    expect(written()[0]).toMatchObject({ versionId: ids.version });
    expect(await page.text()).toContain('sign again');
  });

  it('says plainly that a signature was not kept, and leaves the strokes for paper or another try', async () => {
    await page.press('Abe');
    await page.press('Yes, matches');
    draw();
    await page.press('Done');
    const add = IDBObjectStore.prototype.add;
    IDBObjectStore.prototype.add = () => {
      throw new DOMException('no room', 'QuotaExceededError');
    };
    await page.typePin('4827');
    IDBObjectStore.prototype.add = add;
    expect(await page.text()).toContain('NOT kept');
    expect(await page.isOpen('kb-sign-pane')).toBe(true);
  });
});
