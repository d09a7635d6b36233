import { createHmac, timingSafeEqual } from 'node:crypto';

const MIN_PEPPER_BYTES = 32;

/**
 * HMAC-SHA-256 under the pepper over organisation id, person id and PIN, parted by "|", as 64 hex digits. A stolen
 * table cannot be tried against without the pepper, which comes from the environment; equal PINs of two persons differ.
 * Throws when the pepper is shorter than 32 bytes or an id holds a "|".
 */
export function pinDigest(pepper: string | Uint8Array, organisationId: string, personId: string, pin: string): string {
  const pepperBytes = Buffer.byteLength(pepper);
  if (pepperBytes < MIN_PEPPER_BYTES) throw new RangeError(`The pepper has at least ${MIN_PEPPER_BYTES} bytes, this has ${pepperBytes}.`);
  if (`${organisationId}${personId}`.includes('|')) throw new TypeError('An id has no "|".');
  return createHmac('sha256', pepper).update(`${organisationId}|${personId}|${pin}`).digest('hex');
}

/** Whether two digests are the same, in a time that does not tell where they differ. */
export function isSamePinDigest(left: string, right: string): boolean {
  const [a, b] = [Buffer.from(left, 'hex'), Buffer.from(right, 'hex')];
  return a.length === 32 && b.length === 32 && timingSafeEqual(a, b);
}
