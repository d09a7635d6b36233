/** SHA-256 of bytes, or of a text's UTF-8 bytes, lower-case hex; null where the browser may not compute it (plain http). */
export async function sha256Hex(content: string | ArrayBuffer): Promise<string | null> {
  // Typed as always there, but left out over plain http.
  const subtle = (globalThis.crypto as Crypto | undefined)?.subtle as SubtleCrypto | undefined;
  if (!subtle) return null;
  const digest = await subtle.digest('SHA-256', typeof content === 'string' ? new TextEncoder().encode(content) : content);
  return Array.from(new Uint8Array(digest), (byte) => byte.toString(16).padStart(2, '0')).join('');
}
