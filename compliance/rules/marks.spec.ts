import { describe, expect, it } from '@jest/globals';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const room = fileURLToPath(new URL('..', import.meta.url));
const files = readdirSync(room, { recursive: true, encoding: 'utf8' }).filter((name) => name.endsWith('.ts') && !name.endsWith('.spec.ts') && !name.endsWith('.cases.ts'));

/** Texts about a text: who read only these did not read the source that is cited. */
const SECOND_HAND = /training (text|slide)|trade (article|publisher)|summar|fact sheet|supplier texts?|supplier table|university program|abstract of|not the gazette|recalled/i;
/** Where the words themselves stood there, they were read. */
const WORD_FOR_WORD = /reproduction|quot|word for word|same words|law-firm|notices of/i;
/** `usFederal('x', 'read', { … note: '…' })` and `sourced('x', 'read', { … note: '…' })`, as written. */
const READ_WITH_NOTE = /(?:usFederal|sourced)\((?:'[^']*'|section), 'read', \{[^}]*?note: '((?:[^'\\]|\\.)*)'/g;

describe('the mark "read" (source.ts: the text of the cited source was read)', () => {
  it.each(files.map((name) => [name]))('%s: is not given on the strength of a training text, a summary or memory', (name) => {
    const notes = [...readFileSync(join(room, name), 'utf8').matchAll(READ_WITH_NOTE)].map((match) => match[1]!);
    expect(notes.filter((note) => SECOND_HAND.test(note) && !WORD_FOR_WORD.test(note))).toEqual([]);
  });

  it('looks at notes at all', () => {
    const count = files.reduce((sum, name) => sum + [...readFileSync(join(room, name), 'utf8').matchAll(READ_WITH_NOTE)].length, 0);
    expect(count).toBeGreaterThan(20);
  });
});
