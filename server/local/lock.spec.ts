import { describe, expect, it } from '@jest/globals';
import { spawn } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { fileURLToPath } from 'node:url';
import { tryLock, underLock } from './lock.mjs';

describe('tryLock', () => {
  it('tells the second what the first says about itself, and lets it in afterwards', async () => {
    const name = randomUUID();
    const first = await tryLock(name, () => 'the first');
    expect(await tryLock(name, () => 'the second')).toEqual({ heldBy: 'the first' });
    expect(await tryLock(`${name}-other`, () => '')).toHaveProperty('release');
    if (!('release' in first)) throw new Error('the first was not let in');
    await first.release();
    expect(await tryLock(name, () => '')).toHaveProperty('release');
  });

  it('is free again when its holder was killed', async () => {
    const name = randomUUID();
    const module = new URL('lock.mjs', import.meta.url).href;
    const holder = spawn(process.execPath, ['--input-type=module', '-e', `const { tryLock } = await import(${JSON.stringify(module)}); await tryLock(${JSON.stringify(name)}, () => 'holder'); console.log('held'); setInterval(() => 0, 1000);`], { cwd: fileURLToPath(new URL('.', import.meta.url)) });
    await new Promise((resolve) => holder.stdout.once('data', resolve));
    expect(await tryLock(name, () => '')).toEqual({ heldBy: 'holder' });
    const gone = new Promise((resolve) => holder.once('exit', resolve));
    holder.kill('SIGKILL');
    await gone;
    expect(await tryLock(name, () => '')).toHaveProperty('release');
  });
});

describe('underLock', () => {
  it('lets one work after the other', async () => {
    const name = randomUUID();
    const events: string[] = [];
    const work = (label: string) => async () => {
      events.push(`${label} begins`);
      await new Promise((resolve) => setTimeout(resolve, 30));
      events.push(`${label} ends`);
    };
    let said = '';
    const write = (text: string) => void (said += text);
    await Promise.all([underLock(name, work('a'), write), underLock(name, work('b'), write)]);
    expect(said).toBe(`Waiting for another one at work in this folder (process ${process.pid})\n`);
    const [first, second] = events[0] === 'a begins' ? ['a', 'b'] : ['b', 'a'];
    expect(events).toEqual([`${first} begins`, `${first} ends`, `${second} begins`, `${second} ends`]);
  });

  it('is free again after work that failed', async () => {
    const name = randomUUID();
    await expect(underLock(name, () => Promise.reject(new Error('broken')))).rejects.toThrow('broken');
    expect(await underLock(name, () => Promise.resolve(7))).toBe(7);
  });
});
