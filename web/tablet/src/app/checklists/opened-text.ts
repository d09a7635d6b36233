import { type Language } from '#compliance/outcome';
import { type ChecklistText, parseChecklistText } from '#compliance/checklists/text';

/** damaged: the bytes are not those that were published; unreadable: they are, but this app version cannot read them. */
export type OpenedText = { readonly state: 'good'; readonly language: Language; readonly sha256: string; readonly text: ChecklistText } | { readonly state: 'damaged' | 'unreadable'; readonly language: Language; readonly sha256: string };

const hex = (bytes: ArrayBuffer): string => Array.from(new Uint8Array(bytes), (byte) => byte.toString(16).padStart(2, '0')).join('');

/** SHA-256 of the text's UTF-8 bytes, lower-case hex. */
export async function sha256Hex(text: string): Promise<string> {
  return hex(await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text)));
}

/** Reads a published text only if its bytes are the ones that were published. */
export async function openText(stored: { readonly language: Language; readonly sha256: string; readonly text: string }): Promise<OpenedText> {
  const { language, sha256 } = stored;
  if ((await sha256Hex(stored.text)) !== sha256) return { state: 'damaged', language, sha256 };
  try {
    return { state: 'good', language, sha256, text: parseChecklistText(stored.text) };
  } catch (error) {
    console.error(error);
    return { state: 'unreadable', language, sha256 };
  }
}
