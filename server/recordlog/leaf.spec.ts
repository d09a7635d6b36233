import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { LEAF_KINDS, leafText, nextRecordedAt, parseLeaf, recordHash, type Leaf } from './leaf';
import { leafHash } from './merkle';

const HASH = 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad';
const LEAF: Leaf = { kind: 'acknowledgement', recordedAt: '2026-12-01T11:25:00.000Z', recordHash: HASH };
const TEXT = `{"format":"kneeboard-leaf/1","kind":"acknowledgement","recordedAt":"2026-12-01T11:25:00.000Z","recordHash":"${HASH}"}`;

describe('leaf text', () => {
  it('has its keys in one order, whatever order they come in, and reads back', () => {
    expect(leafText(LEAF)).toBe(TEXT);
    expect(leafText({ recordHash: HASH, recordedAt: LEAF.recordedAt, kind: LEAF.kind })).toBe(TEXT);
    expect(parseLeaf(TEXT)).toEqual(LEAF);
  });

  it('reads back for every kind and moment', () => {
    const at = fc.date({ min: new Date('0001-01-01T00:00:00Z'), max: new Date('9999-12-31T23:59:59.999Z'), noInvalidDate: true });
    fc.assert(fc.property(fc.constantFrom(...LEAF_KINDS), at, fc.uint8Array({ minLength: 32, maxLength: 32 }), (kind, date, hash) => {
      const leaf = { kind, recordedAt: date.toISOString(), recordHash: Buffer.from(hash).toString('hex') };
      expect(parseLeaf(leafText(leaf))).toEqual(leaf);
    }));
  });

  it.each([
    ['another format', TEXT.replace('leaf/1', 'leaf/2')],
    ['an unknown kind', TEXT.replace('acknowledgement', 'opinion')],
    ['local time', TEXT.replace('000Z', '000+01:00')],
    ['a day that does not exist', TEXT.replace('2026-12-01', '2026-02-30')],
    ['no milliseconds', TEXT.replace('.000Z', 'Z')],
    ['capital hex', TEXT.replace('ba78', 'BA78')],
    ['a space', TEXT.replace(',"kind"', ', "kind"')],
    ['one more key', TEXT.replace('}', ',"name":"x"}')],
    ['a line end', `${TEXT}\n`],
    ['nothing', ''],
  ])('refuses %s', (_what, text) => {
    expect(() => parseLeaf(text)).toThrow('not a leaf');
  });

  it('refuses to write a time or a hash of another form', () => {
    expect(() => leafText({ ...LEAF, recordedAt: '2026-12-01 11:25' })).toThrow('not a leaf');
    expect(() => leafText({ ...LEAF, recordHash: HASH.slice(1) })).toThrow('not a leaf');
  });
});

describe('record hash', () => {
  it('is SHA-256 over the salt and then the record', () => {
    // Source: FIPS 180-4 example "abcdbcdecdefdefg…nopq" (two blocks), csrc.nist.gov/projects/cryptographic-standards-and-guidelines/example-values
    const message = Buffer.from('abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq');
    expect(recordHash(message.subarray(0, 16), message.subarray(16))).toBe('248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1');
  });

  it('refuses a salt of another length, so that no byte can move between salt and record', () => {
    expect(() => recordHash(Buffer.alloc(15), Buffer.from('x'))).toThrow('16 bytes');
    expect(() => recordHash(Buffer.alloc(17), Buffer.from('x'))).toThrow('16 bytes');
  });

  it('is not the leaf hash of the same bytes', () => {
    const salt = Buffer.alloc(16, 7);
    expect(recordHash(salt, Buffer.alloc(0))).not.toBe(leafHash(salt).toString('hex'));
  });
});

describe('the time of the next leaf', () => {
  it('is now, and stands still while the clock is behind the entry before', () => {
    const now = new Date('2026-12-01T11:25:00.000Z');
    expect(nextRecordedAt(now, undefined)).toBe('2026-12-01T11:25:00.000Z');
    expect(nextRecordedAt(now, '2026-12-01T11:24:59.999Z')).toBe('2026-12-01T11:25:00.000Z');
    expect(nextRecordedAt(now, '2026-12-01T11:25:00.001Z')).toBe('2026-12-01T11:25:00.001Z');
  });
});
