import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { type CallTrouble } from './tablet-api';

/** checking: nothing was asked yet since the page opened. */
export type ConnectionState = 'checking' | 'online' | Exclude<CallTrouble, 'refused'>;

/** Whether the office can be reached, by what the last call found: the browser's own "online" only says that some network is there. */
@Injectable({ providedIn: 'root' })
export class Connection {
  private readonly stateNow = signal<ConnectionState>('checking');
  readonly state = this.stateNow.asReadonly();

  constructor() {
    const onOffline = (): void => this.stateNow.set('no-signal');
    window.addEventListener('offline', onOffline);
    inject(DestroyRef).onDestroy(() => window.removeEventListener('offline', onOffline));
  }

  heard(): void {
    this.stateNow.set('online');
  }

  /** The service is there. A pairing code it does not take leaves the tablet as unpaired as it was. */
  refused(): void {
    if (this.stateNow() !== 'not-paired') this.stateNow.set('online');
  }

  lost(trouble: Exclude<CallTrouble, 'refused'>): void {
    this.stateNow.set(trouble);
  }
}
