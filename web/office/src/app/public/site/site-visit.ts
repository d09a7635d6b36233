import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { type Problem } from '#shared/common';
import { LinkToken, type SitePage } from '#shared/library';
import { problemOf } from '#ui/problem';
import { KeptSites } from './kept-sites';
import { OfflineShell } from './offline-shell';
import { SiteApi } from './site-api';

/** fresh: the office answered; asking: it has not yet; none: it cannot be reached, so what is shown may be old. */
export type Contact = 'asking' | 'fresh' | 'none';
export interface Keeping {
  readonly kept: number;
  readonly all: number;
  /** Null while nobody knows yet. */
  readonly opensOffline: boolean | null;
}

/** Longer without an answer, and the kept copy is shown meanwhile. */
const waitMs = 3000;
const askAgainMs = 5 * 60_000;
/** Sooner while there is no contact: that a browser calls itself online says little. */
const lookForContactMs = 15_000;

/**
 * One code on one phone: asks the office, keeps what it answers, shows the kept copy when the office cannot be reached,
 * and forgets everything as soon as the office says that the code is not in use any more.
 */
@Injectable()
export class SiteVisit {
  private readonly api = inject(SiteApi);
  private readonly copies = inject(KeptSites);
  private readonly shell = inject(OfflineShell);

  readonly token = signal<string | null>(null);
  readonly page = signal<SitePage | null>(null);
  /** This phone's clock at the last contact. */
  readonly heardAt = signal('');
  readonly contact = signal<Contact>('asking');
  readonly problem = signal<Problem | null>(null);
  readonly keeping = signal<Keeping | null>(null);
  private asking: Promise<void> | undefined;

  constructor() {
    const again = () => document.visibilityState === 'visible' && this.page() !== null && void this.ask();
    const timer = setInterval(() => (this.contact() === 'none' || Date.now() - Date.parse(this.heardAt()) > askAgainMs) && again(), lookForContactMs);
    window.addEventListener('online', again);
    document.addEventListener('visibilitychange', again);
    inject(DestroyRef).onDestroy(() => {
      clearInterval(timer);
      window.removeEventListener('online', again);
      document.removeEventListener('visibilitychange', again);
    });
  }

  /** Opens a scanned code, or without one the code that this phone heard of last. False when there is neither. */
  async open(scanned: string | null): Promise<boolean> {
    const token = scanned ?? (await this.copies.read(null, new Date()))?.token ?? null;
    this.token.set(token);
    if (token === null) return false;
    if (!LinkToken.safeParse(token).success) {
      this.problem.set({ type: 'about:blank', title: '', status: 404 });
      return true;
    }
    const asking = this.ask();
    await Promise.race([asking, new Promise((resolve) => setTimeout(resolve, waitMs))]);
    if (this.page() === null && this.problem() === null) await this.showKept();
    await asking;
    return true;
  }

  /** Asks the office; one question at a time. */
  ask(): Promise<void> {
    return (this.asking ??= this.askOnce().finally(() => (this.asking = undefined)));
  }

  /** A sheet of the job: the kept one, or the office's, which is then kept. */
  async sheet(revisionId: string): Promise<ArrayBuffer> {
    const token = this.token() ?? '';
    const kept = await this.copies.sheet(token, revisionId);
    if (kept) return kept;
    try {
      const bytes = await firstValueFrom(this.api.sheet(token, revisionId));
      await this.copies.keepSheet(token, revisionId, bytes);
      return bytes;
    } catch (error) {
      // Not there any more: perhaps the whole code is not.
      if (problemOf(error).status === 404) await this.ask();
      throw error;
    }
  }

  private async askOnce(): Promise<void> {
    const token = this.token();
    if (token === null) return;
    this.problem.set(null);
    if (this.page() === null) this.contact.set('asking');
    try {
      const page = await firstValueFrom(this.api.open(token));
      const heardAt = new Date().toISOString();
      this.page.set(page);
      this.heardAt.set(heardAt);
      this.contact.set('fresh');
      void this.keepAll(token, page, heardAt);
    } catch (error) {
      await this.fail(token, problemOf(error));
    }
  }

  private async fail(token: string, problem: Problem): Promise<void> {
    this.contact.set('none');
    if (problem.status === 404) {
      await this.copies.drop(token);
      this.page.set(null);
      this.keeping.set(null);
    } else if (this.page() === null) {
      await this.showKept();
    }
    // What is shown stays, with its time; only an empty page says what went wrong.
    if (this.page() === null) this.problem.set(problem);
  }

  private async showKept(): Promise<void> {
    const kept = await this.copies.read(this.token(), new Date());
    if (!kept) return;
    this.page.set(kept.page);
    this.heardAt.set(kept.heardAt);
  }

  /** One sheet after the other, so that a weak signal is left for what the person opens. */
  private async keepAll(token: string, page: SitePage, heardAt: string): Promise<void> {
    const all = page.sheets.length;
    let isKept = await this.copies.keep({ token, page, heardAt });
    let kept = 0;
    this.keeping.set({ kept, all, opensOffline: isKept ? null : false });
    for (const { revisionId } of isKept ? page.sheets : []) {
      isKept = (await this.hasSheet(token, revisionId)) && isKept;
      if (this.page() === null || this.heardAt() !== heardAt) return;
      this.keeping.set({ kept: (kept += isKept ? 1 : 0), all, opensOffline: null });
    }
    const opensOffline = isKept && (await this.shell.isKept());
    if (this.page() !== null && this.heardAt() === heardAt) this.keeping.set({ kept, all, opensOffline });
  }

  private async hasSheet(token: string, revisionId: string): Promise<boolean> {
    if (await this.copies.sheet(token, revisionId)) return true;
    try {
      return await this.copies.keepSheet(token, revisionId, await firstValueFrom(this.api.sheet(token, revisionId)));
    } catch {
      return false;
    }
  }
}
