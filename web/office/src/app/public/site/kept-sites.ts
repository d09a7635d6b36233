import { Injectable } from '@angular/core';
import { type DBSchema, type IDBPDatabase, openDB } from 'idb';
import { type SitePage } from '#shared/library';

/** What a code opened, as it was at the last contact. */
export interface KeptSite {
  /** The code's secret: the next contact asks with it whether the code is still in use. */
  readonly token: string;
  readonly page: SitePage;
  /** This phone's clock at the last contact, ISO. */
  readonly heardAt: string;
}

interface Schema extends DBSchema {
  sites: { key: string; value: KeptSite };
  sheets: { key: [token: string, revisionId: string]; value: ArrayBuffer };
}

/** A copy that nobody could ask the office about for longer is not shown any more: its code may have been withdrawn. */
export const keptForDays = 30;
const dayMs = 24 * 3600 * 1000;

/**
 * What a printed code opened on this phone, so that it opens again without signal. Where the browser keeps nothing
 * (a private window, a full phone) reading answers nothing and keeping answers false; nothing throws.
 */
@Injectable({ providedIn: 'root' })
export class KeptSites {
  private opened: Promise<IDBPDatabase<Schema>> | undefined;

  /** The copy of this code, or, without a code, the one that was heard of last. */
  async read(token: string | null, now: Date): Promise<KeptSite | null> {
    const sites = (await this.try(async (database) => database.getAll('sites'))) ?? [];
    for (const old of sites.filter(({ heardAt }) => now.getTime() - Date.parse(heardAt) > keptForDays * dayMs)) await this.drop(old.token);
    const standing = sites.filter(({ heardAt }) => now.getTime() - Date.parse(heardAt) <= keptForDays * dayMs);
    const newest = [...standing].sort((a, b) => (a.heardAt < b.heardAt ? 1 : -1))[0];
    return (token === null ? newest : standing.find((site) => site.token === token)) ?? null;
  }

  /** Replaces what was kept of this code; sheets that are no longer the job's go. */
  async keep(site: KeptSite): Promise<boolean> {
    const wanted = new Set(site.page.sheets.map(({ revisionId }) => revisionId));
    const done = await this.try(async (database) => {
      await database.put('sites', site);
      for (const key of await database.getAllKeys('sheets')) if (key[0] === site.token && !wanted.has(key[1])) await database.delete('sheets', key);
      return true;
    });
    return done ?? false;
  }

  async sheet(token: string, revisionId: string): Promise<ArrayBuffer | null> {
    return (await this.try((database) => database.get('sheets', [token, revisionId]))) ?? null;
  }

  async keepSheet(token: string, revisionId: string, bytes: ArrayBuffer): Promise<boolean> {
    return (await this.try(async (database) => (await database.put('sheets', bytes, [token, revisionId]), true))) ?? false;
  }

  /** All of it: the code is not in use any more. */
  async drop(token: string): Promise<void> {
    await this.try(async (database) => {
      await database.delete('sites', token);
      for (const key of await database.getAllKeys('sheets')) if (key[0] === token) await database.delete('sheets', key);
    });
  }

  private async try<T>(work: (database: IDBPDatabase<Schema>) => Promise<T>): Promise<T | undefined> {
    try {
      this.opened ??= openDB<Schema>('kneeboard-site', 1, {
        upgrade: (database) => {
          database.createObjectStore('sites', { keyPath: 'token' });
          database.createObjectStore('sheets');
        },
      });
      return await work(await this.opened);
    } catch {
      this.opened = undefined;
      return undefined;
    }
  }
}
