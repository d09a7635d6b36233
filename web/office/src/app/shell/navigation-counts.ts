import { HttpClient } from '@angular/common/http';
import { Injectable, inject, signal } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { Today } from '#shared/today';

/** How many things wait behind an entry of the navigation, by its path. */
@Injectable({ providedIn: 'root' })
export class NavigationCounts {
  private readonly http = inject(HttpClient);
  private readonly current = signal<Readonly<Record<string, number>>>({});
  readonly counts = this.current.asReadonly();

  private askedAt = -Infinity;

  /** For every change of page: asks again when the counts are older than half a minute. */
  async refreshWhenOld(): Promise<void> {
    if (performance.now() - this.askedAt >= 30_000) await this.refresh();
  }

  /** After something was done: asks again. An unreachable server leaves the counts as they were, the pages say so themselves. */
  async refresh(): Promise<void> {
    this.askedAt = performance.now();
    try {
      this.show(Today.parse(await firstValueFrom(this.http.get('/api/today'))));
    } catch {
      return;
    }
  }

  /** Takes what a page has just read. */
  show(today: Today): void {
    this.current.set({ today: today.items.filter((item) => item.level === 'stop').length, sheets: today.library.waitingForYou });
  }
}
