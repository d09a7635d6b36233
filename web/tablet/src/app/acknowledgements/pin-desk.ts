import { inject, Injectable } from '@angular/core';
import { sha256Hex } from '../checklists/opened-text';
import { Connection } from '../connection/connection';
import { CallFailed, TabletApi } from '../connection/tablet-api';
import { Day } from '../day/day';
import { answersText, pinSetText, sealPin } from '#shared/pin-sealing';

/** A PIN shut away to the server's key; the tablet cannot open it again. */
export interface SealedPin {
  readonly sealedPin: string;
  readonly nonce: string;
}

/** unchecked: no answer from the office, the PIN is looked at when the envelope arrives. */
export type PinAnswer =
  | { readonly outcome: 'right' | 'unchecked' }
  | { readonly outcome: 'wrong'; readonly detail: string | null }
  | { readonly outcome: 'paused'; readonly seconds: number };

const pauseWhenUnsaidSeconds = 60;

/** Seals PINs as they are typed and, with signal, asks whether they are right. Keeps none. */
@Injectable({ providedIn: 'root' })
export class PinDesk {
  private readonly api = inject(TabletApi);
  private readonly day = inject(Day);
  private readonly connection = inject(Connection);

  /** @throws Error when no day was ever heard: without the server's key nothing can be sealed */
  async seal(pin: string, textSha256: string): Promise<SealedPin> {
    const day = this.day.day();
    if (!day) throw new Error('no sealing key on this tablet');
    const nonce = randomNonce();
    return { sealedPin: await sealPin({ pin, textHash: textSha256, nonce }, day.sealingKey), nonce };
  }

  /** Stands in the seal where a signature's text hash would: a PIN being set belongs to its owner, not to a text. */
  pinSetHash(ownerPersonId: string): Promise<string> {
    return sha256Hex(pinSetText(ownerPersonId));
  }

  /** Stands there for answers: the PIN proves these and no others. */
  answersHash(kind: 'briefing' | 'start-check', versionId: string, taskId: string | null, answers: Parameters<typeof answersText>[3]): Promise<string> {
    return sha256Hex(answersText(kind, versionId, taskId, answers));
  }

  async check(personId: string, textSha256: string, sealed: SealedPin, kind: 'pin' | 'start-pin' = 'pin'): Promise<PinAnswer> {
    if (this.connection.state() === 'no-signal') return { outcome: 'unchecked' };
    try {
      await this.api.checkPin({ kind, personId, textSha256, ...sealed });
      return { outcome: 'right' };
    } catch (error) {
      if (!(error instanceof CallFailed)) throw error;
      if (error.status === 422) return { outcome: 'wrong', detail: error.problem?.detail ?? error.problem?.title ?? null };
      if (error.status === 429) return { outcome: 'paused', seconds: error.problem?.retryAfterSeconds ?? pauseWhenUnsaidSeconds };
      return { outcome: 'unchecked' };
    }
  }
}

/** 128 bits, hex. */
function randomNonce(): string {
  return Array.from(crypto.getRandomValues(new Uint8Array(16)), (byte) => byte.toString(16).padStart(2, '0')).join('');
}
