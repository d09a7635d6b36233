import { afterEach, beforeEach, describe, expect, it, jest } from '@jest/globals';
import { step, Stopped, tookText } from './progress.mjs';

describe('tookText', () => {
  it.each([
    [0, ''],
    [1999, ''],
    [2000, ' 2 s'],
    [59_400, ' 59 s'],
    [60_000, ' 1 min 0 s'],
    [125_000, ' 2 min 5 s'],
  ])('%d ms', (elapsedMs, text) => expect(tookText(elapsedMs)).toBe(text));
});

describe('step', () => {
  beforeEach(() => void jest.useFakeTimers());
  afterEach(() => void jest.useRealTimers());
  const lines: string[] = [];
  const write = (text: string) => void lines.push(text);
  const printed = () => lines.splice(0).join('');

  it('prints the label at once, a dot every two seconds, and the time at the end', async () => {
    const done = step('Building', () => new Promise<number>((resolve) => setTimeout(() => resolve(5), 7000)), write);
    expect(printed()).toBe('Building');
    await jest.advanceTimersByTimeAsync(7000);
    expect(await done).toBe(5);
    expect(printed()).toBe('... 7 s\n');
  });

  it('says that it failed and hands the error on', async () => {
    await expect(step('Building', () => Promise.reject(new Error('no disk')), write)).rejects.toThrow('no disk');
    expect(printed()).toBe('Building failed\n');
  });

  it('does not call a stop a failure', async () => {
    await expect(step('Building', () => Promise.reject(new Stopped()), write)).rejects.toThrow(Stopped);
    expect(printed()).toBe('Building\n');
  });
});
