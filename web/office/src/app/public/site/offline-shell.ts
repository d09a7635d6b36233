import { Injectable } from '@angular/core';

const lookEveryMs = 1000;
const patienceMs = 180_000;

/**
 * The page itself, kept by a service worker for `/site/` alone: the office's own pages are never served from it.
 * It holds the application's files only; what the code opens is kept apart (KeptSites).
 */
@Injectable({ providedIn: 'root' })
export class OfflineShell {
  private kept: Promise<boolean> | undefined;

  /** Whether every file of the page is kept, once it is known; false where the browser keeps none (plain http, a private window). */
  isKept(): Promise<boolean> {
    return (this.kept ??= this.keep().catch(() => false));
  }

  private async keep(): Promise<boolean> {
    if (!('serviceWorker' in navigator)) return false;
    await navigator.serviceWorker.register('/ngsw-worker.js', { scope: '/site/' });
    for (const until = Date.now() + patienceMs; Date.now() < until; ) {
      if (await areFilesKept()) return true;
      await new Promise((resolve) => setTimeout(resolve, lookEveryMs));
    }
    this.kept = undefined;
    return false;
  }
}

async function areFilesKept(): Promise<boolean> {
  const { assetGroups } = (await (await fetch('/ngsw.json')).json()) as { assetGroups: readonly { readonly urls: readonly string[] }[] };
  for (const url of assetGroups.flatMap(({ urls }) => urls)) if (!(await caches.match(url))) return false;
  return true;
}
