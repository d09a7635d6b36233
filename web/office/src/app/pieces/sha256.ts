/** SHA-256 of the text's UTF-8 bytes, lower-case hex; null where the browser may not compute it (plain http). */
export async function sha256Hex(text: string): Promise<string | null> {
  // Typed as always there, but left out over plain http.
  const subtle = crypto.subtle as SubtleCrypto | undefined;
  if (!subtle) return null;
  const digest = await subtle.digest('SHA-256', new TextEncoder().encode(text));
  return Array.from(new Uint8Array(digest), (byte) => byte.toString(16).padStart(2, '0')).join('');
}
