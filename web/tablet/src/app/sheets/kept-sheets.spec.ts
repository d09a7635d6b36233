import { beforeEach, describe, expect, it } from '@jest/globals';
import { TestBed } from '@angular/core/testing';
import { type TabletDay } from '#shared/envelopes';
import { Office } from '../../testing/office';
import { sealingKeys } from '../../testing/seals';
import { setUpTabletBrowser } from '../../testing/tablet-browser';
import { dayJob, tabletDay } from '../../testing/tablet-data';
import { KeptSheets } from './kept-sheets';

const text = (bytes: ArrayBuffer | null): string | null => (bytes === null ? null : Buffer.from(bytes).toString());

describe('[HAZ-05] sheets on the tablet open with no network: a link is a barrier (trap 17, conduct 11; 29 CFR 1910.1200(g)(8), read)', () => {
  let office: Office;
  let sheets: KeptSheets;
  const dayWith = async (...revisionIds: readonly string[]): Promise<TabletDay> => ({ ...(await tabletDay((await sealingKeys()).spki)), jobs: [dayJob({ sheets: revisionIds.map((revisionId) => ({ revisionId, productName: revisionId })) })] });

  beforeEach(() => {
    setUpTabletBrowser();
    office = new Office();
    office.files.set('a', '%PDF a').set('b', '%PDF b');
    sheets = TestBed.inject(KeptSheets);
  });

  it('keeps every sheet of the day and gives it back when nothing answers, also after a restart', async () => {
    await sheets.keepFor(await dayWith('a', 'b'));
    office.status = 504;
    expect([text(await sheets.read('a')), text(await sheets.read('b'))]).toEqual(['%PDF a', '%PDF b']);
    TestBed.resetTestingModule();
    const later = TestBed.inject(KeptSheets);
    await later.load();
    expect([...later.kept()].sort()).toEqual(['a', 'b']);
    expect(text(await later.read('a'))).toBe('%PDF a');
  });

  it('asks for each sheet once, and lets go of one that no job uses any more', async () => {
    await sheets.keepFor(await dayWith('a', 'b'));
    const asked = office.requests;
    await sheets.keepFor(await dayWith('b'));
    expect(office.requests).toBe(asked);
    expect([await sheets.read('a'), text(await sheets.read('b'))]).toEqual([null, '%PDF b']);
  });

  it('does not call a sheet kept that never came, keeps the others of the day, and tries again', async () => {
    await sheets.keepFor(await dayWith('gone', 'a'));
    expect([...sheets.kept()]).toEqual(['a']);
    office.files.set('gone', '%PDF back');
    await sheets.keepFor(await dayWith('gone', 'a'));
    expect([...sheets.kept()].sort()).toEqual(['a', 'gone']);
  });

  it('keeps what it has when the signal is gone', async () => {
    await sheets.keepFor(await dayWith('a'));
    office.status = 504;
    await sheets.keepFor(await dayWith('a', 'b'));
    expect([...sheets.kept()]).toEqual(['a']);
  });

  it('leaves room for signatures: nothing more is fetched on a tablet that is nearly full', async () => {
    Object.defineProperty(navigator, 'storage', { value: { estimate: async () => ({ usage: 81, quota: 100 }) }, configurable: true });
    await sheets.keepFor(await dayWith('a'));
    Object.defineProperty(navigator, 'storage', { value: undefined, configurable: true });
    expect([...sheets.kept()]).toEqual([]);
  });
});
