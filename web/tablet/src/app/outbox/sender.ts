import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { formatISO } from 'date-fns';
import { alone } from '../connection/alone';
import { CallFailed, TabletApi } from '../connection/tablet-api';
import { Outbox } from './outbox';
import { type OutboxRow } from './tablet-database';

const firstPauseMs = 2_000;
const longestPauseMs = 60_000;

/** Sends the outbox in its order, one sender per tablet at a time, again and again until the server answered for every envelope. */
@Injectable({ providedIn: 'root' })
export class Sender {
  private readonly outbox = inject(Outbox);
  private readonly api = inject(TabletApi);
  private running: Promise<boolean> | null = null;
  private isAskedAgain = false;
  private pauseMs = firstPauseMs;
  private timer: ReturnType<typeof setTimeout> | undefined;
  /** Refused by the server as a whole request, one by one: kept and tried again when the page opens next. */
  private readonly refused = new Set<string>();

  readonly isSending = signal(false);
  /** Counts deliveries that got receipts, for those who then read the day again. */
  readonly deliveries = signal(0);

  constructor() {
    inject(DestroyRef).onDestroy(() => clearTimeout(this.timer));
  }

  /**
   * Sends what waits. Asked while sending, it runs once more afterwards. Never throws.
   * Resolves to whether nothing is left to send.
   */
  async send(): Promise<boolean> {
    if (this.running) {
      this.isAskedAgain = true;
      return this.running;
    }
    clearTimeout(this.timer);
    this.running = this.sendInTurn();
    try {
      return await this.running;
    } finally {
      this.running = null;
      if (this.isAskedAgain) {
        this.isAskedAgain = false;
        void this.send();
      }
    }
  }

  /** Signal came back or the page is looked at again: do not sit out the pause. */
  sendNow(): Promise<boolean> {
    this.pauseMs = firstPauseMs;
    return this.send();
  }

  private async sendInTurn(): Promise<boolean> {
    try {
      return await alone('kneeboard-send', async () => {
        for (;;) {
          const batch = await this.outbox.nextBatch(this.refused);
          if (batch.length === 0) return true;
          this.isSending.set(true);
          await this.deliver(batch);
          this.pauseMs = firstPauseMs;
        }
      });
    } catch (error) {
      this.tryLater(error);
      return false;
    } finally {
      this.isSending.set(false);
    }
  }

  /** A request refused as a whole is cut in halves, so that one envelope cannot keep the others from going. */
  private async deliver(batch: readonly OutboxRow[]): Promise<void> {
    try {
      const answer = await this.api.deliver({ sentAt: formatISO(new Date()), envelopes: batch.map(({ id, bytes }) => ({ id, bytes })) });
      const isAnswered = answer.receipts.some((receipt) => batch.some((row) => row.id === receipt.id));
      await this.outbox.settle(answer);
      if (!isAnswered) throw new CallFailed('no-answer', 200, null);
      this.deliveries.update((count) => count + 1);
    } catch (error) {
      const first = batch[0];
      if (!first || !(error instanceof CallFailed) || error.trouble !== 'refused' || error.status === 429) throw error;
      if (batch.length === 1) {
        console.error('the server refused an envelope; it stays on this tablet', first.id, error);
        this.refused.add(first.id);
        return;
      }
      const half = Math.ceil(batch.length / 2);
      await this.deliver(batch.slice(0, half));
      await this.deliver(batch.slice(half));
    }
  }

  private tryLater(error: unknown): void {
    const asked = error instanceof CallFailed ? (error.problem?.retryAfterSeconds ?? 0) * 1000 : 0;
    if (!(error instanceof CallFailed)) console.error(error);
    const waitMs = Math.max(asked, this.pauseMs);
    this.pauseMs = Math.min(this.pauseMs * 2, longestPauseMs);
    this.timer = setTimeout(() => void this.send(), waitMs);
  }
}
