import { firstValueFrom } from 'rxjs';
import { parseChecklistText, type ChecklistText } from '#compliance';
import { type ContractClient } from '../contract/contract-client';
import { sha256Hex } from '../pieces/sha256';

/** The bytes of a published text as they came, and what they are. */
export interface ExactText {
  readonly text: string;
  /** Null where the bytes are not a text this page can set; they are then shown as they are. */
  readonly checklist: ChecklistText | null;
  readonly byteLength: number;
  /** Computed in this browser; null where it may not (plain http). */
  readonly sha256: string | null;
}

export async function readExactText(client: ContractClient, versionId: string, language: string): Promise<ExactText> {
  const bytes = await firstValueFrom(client.bytes('readText', { versionId, language }));
  const text = new TextDecoder().decode(bytes);
  return { text, checklist: checklistIn(text), byteLength: bytes.byteLength, sha256: await sha256Hex(bytes) };
}

function checklistIn(text: string): ChecklistText | null {
  try {
    return parseChecklistText(text);
  } catch {
    return null;
  }
}
