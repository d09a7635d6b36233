import { inject, Injectable, signal } from '@angular/core';
import { SwUpdate } from '@angular/service-worker';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';

/** A newer app is fetched in the background and offered where nobody is signing; the outbox is not touched by it. */
@Injectable({ providedIn: 'root' })
export class AppUpdate {
  private readonly worker = inject(SwUpdate);
  readonly isReady = signal(false);
  readonly isBroken = signal(false);

  constructor() {
    if (!this.worker.isEnabled) return;
    this.worker.versionUpdates.pipe(takeUntilDestroyed()).subscribe((event) => {
      if (event.type === 'VERSION_READY') this.isReady.set(true);
    });
    this.worker.unrecoverable.pipe(takeUntilDestroyed()).subscribe(() => this.isBroken.set(true));
  }

  async use(): Promise<void> {
    await this.worker.activateUpdate();
    this.reload();
  }

  reload(): void {
    document.location.reload();
  }
}
