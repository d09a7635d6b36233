import { afterEach, beforeEach, describe, expect, it, jest } from '@jest/globals';
import { TestBed } from '@angular/core/testing';
import { Connection } from '../connection/connection';
import { setUpTabletBrowser } from '../../testing/tablet-browser';
import { cannotSign } from '../../testing/tablet-data';
import { Office } from '../../testing/office';
import { Outbox } from './outbox';
import { Sender } from './sender';

describe('Sender', () => {
  let office: Office;
  let outbox: Outbox;
  let sender: Sender;

  beforeEach(() => {
    setUpTabletBrowser();
    office = new Office();
    outbox = TestBed.inject(Outbox);
    sender = TestBed.inject(Sender);
  });
  afterEach(() => {
    jest.restoreAllMocks();
  });

  it('sends in the order of writing, word for word', async () => {
    const written = await outbox.add([cannotSign(), cannotSign(), cannotSign()]);
    expect(await sender.send()).toBe(true);
    expect(office.delivered.map(({ id }) => id)).toEqual(written.map(({ id }) => id));
    expect(office.delivered.map(({ bytes }) => bytes)).toEqual(outbox.posted().map(({ row }) => row.bytes));
    expect(outbox.waitingCount()).toBe(0);
  });

  it('runs once however often it is asked at the same time', async () => {
    await outbox.add([cannotSign()]);
    await Promise.all([sender.send(), sender.send(), sender.sendNow()]);
    await sender.send();
    expect(office.requests).toBe(1);
  });

  it('sends again what it got no answer for, and takes "duplicate" for an answer', async () => {
    await outbox.add([cannotSign()]);
    office.loseAnswers = true;
    expect(await sender.send()).toBe(false);
    expect(outbox.waitingCount()).toBe(1);
    office.loseAnswers = false;
    expect(await sender.send()).toBe(true);
    expect(office.delivered).toHaveLength(1);
    expect(outbox.posted()[0]?.row.receipt?.outcome).toBe('duplicate');
  });

  it('keeps everything when the tablet was withdrawn, and says so', async () => {
    await outbox.add([cannotSign()]);
    office.status = 401;
    expect(await sender.send()).toBe(false);
    expect(TestBed.inject(Connection).state()).toBe('not-paired');
    expect(outbox.waitingCount()).toBe(1);
  });

  it('tries again by itself, with longer pauses', async () => {
    await outbox.add([cannotSign()]);
    office.status = 503;
    const pauses = jest.spyOn(globalThis, 'setTimeout');
    // The 30 s are the limit on each request.
    const asked = (): number[] => pauses.mock.calls.map(([, wait]) => wait ?? 0).filter((wait) => wait >= 2000 && wait !== 30_000);
    await sender.send();
    await sender.send();
    await sender.send();
    expect(asked()).toEqual([2000, 4000, 8000]);
  });

  it('waits as long as the server asks', async () => {
    await outbox.add([cannotSign()]);
    office.status = 429;
    office.problem = { type: 'about:blank', title: 'Slow down.', status: 429, retryAfterSeconds: 45 };
    const pauses = jest.spyOn(globalThis, 'setTimeout');
    await sender.send();
    expect(pauses.mock.calls.map(([, wait]) => wait)).toContain(45_000);
  });

  it('lets one envelope that spoils a request hold up none of the others, and keeps it', async () => {
    jest.spyOn(console, 'error').mockImplementation(() => undefined);
    const written = await outbox.add([cannotSign(), cannotSign(), cannotSign(), cannotSign(), cannotSign()]);
    office.spoiled = written[2]?.id ?? '';
    expect(await sender.send()).toBe(true);
    expect(office.delivered.map(({ id }) => id)).toEqual(written.filter(({ id }) => id !== office.spoiled).map(({ id }) => id));
    expect(outbox.waitingCount()).toBe(1);
  });

  it('keeps waiting what the answer does not name', async () => {
    const [first] = await outbox.add([cannotSign(), cannotSign()]);
    office.unanswered = first?.id ?? '';
    await sender.send();
    expect(outbox.waitingCount()).toBe(1);
  });
});
