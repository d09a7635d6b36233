import { describe, expect, it } from '@jest/globals';
import { isSamePinDigest, pinDigest } from './pin-digest';

const PEPPER = Buffer.alloc(32, 0x0b);
const [ORGANISATION, PERSON, OTHER] = ['0195d4e0-0000-7000-8000-000000000001', '0195d4e0-0000-7000-8000-000000000002', '0195d4e0-0000-7000-8000-000000000003'];

describe('the digest of a PIN', () => {
  it('is HMAC-SHA-256 over organisation, person and PIN', () => {
    // Source: openssl 3.0, printf '%s' 'ORGANISATION|PERSON|4071' | openssl dgst -sha256 -mac HMAC -macopt hexkey:0b0b…(32 times)
    expect(pinDigest(PEPPER, ORGANISATION, PERSON, '4071')).toBe('2e0cd97d5f0f79fd04412db6050ed76970b8ca9f07a8d64247fbc37b1692c1a3');
  });

  it('takes the pepper as text too', () => {
    const text = PEPPER.toString('latin1');
    expect(pinDigest(text, ORGANISATION, PERSON, '4071')).toBe(pinDigest(PEPPER, ORGANISATION, PERSON, '4071'));
  });

  it('differs with pepper, organisation, person and PIN', () => {
    const digests = [
      pinDigest(PEPPER, ORGANISATION, PERSON, '4071'), pinDigest(PEPPER, ORGANISATION, PERSON, '4072'), pinDigest(PEPPER, ORGANISATION, OTHER, '4071'),
      pinDigest(PEPPER, OTHER, PERSON, '4071'), pinDigest(Buffer.alloc(32, 1), ORGANISATION, PERSON, '4071'), pinDigest(PEPPER, PERSON, ORGANISATION, '4071'),
    ];
    expect(new Set(digests).size).toBe(digests.length);
  });

  it('is refused with a short pepper, or an id that could stand for two', () => {
    expect(() => pinDigest(Buffer.alloc(31), ORGANISATION, PERSON, '4071')).toThrow('at least 32 bytes');
    expect(() => pinDigest('short', ORGANISATION, PERSON, '4071')).toThrow('this has 5');
    expect(() => pinDigest(PEPPER, 'a|b', PERSON, '4071')).toThrow('no "|"');
  });

  it('is compared whole', () => {
    const digest = pinDigest(PEPPER, ORGANISATION, PERSON, '4071');
    expect(isSamePinDigest(digest, digest)).toBe(true);
    expect(isSamePinDigest(digest, pinDigest(PEPPER, ORGANISATION, PERSON, '4072'))).toBe(false);
    expect(isSamePinDigest(digest, digest.slice(0, 62))).toBe(false);
    expect(isSamePinDigest(digest.slice(0, 62), digest)).toBe(false);
    expect(isSamePinDigest('', '')).toBe(false);
    expect(isSamePinDigest('not hex', 'not hex')).toBe(false);
  });
});
