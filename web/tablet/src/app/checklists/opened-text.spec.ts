import { beforeEach, describe, expect, it, jest } from '@jest/globals';
import { setUpTabletBrowser } from '../../testing/tablet-browser';
import { checklistText } from '../../testing/tablet-data';
import { openText, sha256Hex } from './opened-text';

describe('openText', () => {
  beforeEach(() => setUpTabletBrowser());

  it('hashes as FIPS 180-4 does', async () => {
    // FIPS 180-2 appendix B.1, "abc"; the second is UTF-8, from sha256sum: printf 'señal' | sha256sum
    expect(await sha256Hex('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
    expect(await sha256Hex('señal')).toBe('42c311b38af927c837a96d25130b8702b86d0ee72244db30e8489f0dba2e0352');
  });

  it('reads a text whose bytes are those that were published', async () => {
    const text = JSON.stringify(checklistText('es'));
    const opened = await openText({ language: 'es', sha256: await sha256Hex(text), text });
    expect(opened).toMatchObject({ state: 'good', text: { sentence: 'Me explicaron el trabajo en un idioma que entiendo.' } });
  });

  it('refuses a text of which one letter changed, and gives none of it', async () => {
    const text = JSON.stringify(checklistText());
    const opened = await openText({ language: 'en', sha256: await sha256Hex(text), text: text.replace('understand', 'understood') });
    expect(opened).toEqual({ state: 'damaged', language: 'en', sha256: await sha256Hex(text) });
  });

  it('refuses a true text of a format it does not know', async () => {
    const said = jest.spyOn(console, 'error').mockImplementation(() => undefined);
    const text = JSON.stringify({ ...checklistText(), format: 'kneeboard-checklist-text/9' });
    expect((await openText({ language: 'en', sha256: await sha256Hex(text), text })).state).toBe('unreadable');
    said.mockRestore();
  });
});
