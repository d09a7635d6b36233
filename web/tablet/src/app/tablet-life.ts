import { DestroyRef, effect, inject, Injectable, untracked } from '@angular/core';
import { Day } from './day/day';
import { Outbox } from './outbox/outbox';
import { Sender } from './outbox/sender';
import { Storage } from './outbox/storage';
import { KeptSheets } from './sheets/kept-sheets';

const askAgainMs = 60_000;

/** What goes on by itself while the tablet is open: reading what was kept, sending what waits, asking the office for news. */
@Injectable({ providedIn: 'root' })
export class TabletLife {
  private readonly outbox = inject(Outbox);
  private readonly sender = inject(Sender);
  private readonly day = inject(Day);
  private readonly sheets = inject(KeptSheets);
  private readonly storage = inject(Storage);
  private readonly destroyRef = inject(DestroyRef);

  constructor() {
    effect(() => {
      if (this.sender.deliveries() > 0) untracked(() => void this.day.refresh());
    });
  }

  /** Shows what the tablet keeps, then speaks with the office, and again whenever that may help. */
  async begin(): Promise<void> {
    const talk = (): void => void this.talk();
    const whenSeen = (): void => {
      if (document.visibilityState === 'visible') talk();
    };
    window.addEventListener('online', talk);
    document.addEventListener('visibilitychange', whenSeen);
    const timer = setInterval(whenSeen, askAgainMs);
    this.destroyRef.onDestroy(() => {
      window.removeEventListener('online', talk);
      document.removeEventListener('visibilitychange', whenSeen);
      clearInterval(timer);
    });
    // Storage that cannot be opened is said on the page (Storage.trouble); the office is asked all the same.
    await Promise.all([this.outbox.load(), this.day.load(), this.sheets.load()]).catch((error: unknown) => console.error(error));
    void this.storage.askToPersist();
    talk();
  }

  private async talk(): Promise<void> {
    await this.sender.sendNow();
    await this.day.refresh();
    await this.sheets.keepFor(this.day.day());
  }
}
