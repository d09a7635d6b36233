import { inject, signal, type Signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { ActivatedRoute, Router } from '@angular/router';

/**
 * The secret of a link, from the address's fragment: read once, then taken out of the address bar and the history,
 * so that nobody reads it over a shoulder. With `storedAs` it is kept for this tab, so that a reload still opens.
 * Null: this page was opened without a link. Call where `inject()` may be called.
 */
export function linkToken(storedAs?: string): Signal<string | null> {
  const [route, router] = [inject(ActivatedRoute), inject(Router)];
  const token = signal(storedAs === undefined ? null : stored(storedAs));
  route.fragment.pipe(takeUntilDestroyed()).subscribe((fragment) => {
    if (!fragment) return;
    token.set(fragment);
    if (storedAs !== undefined) keep(storedAs, fragment);
    // The navigation that brought the fragment is still under way.
    queueMicrotask(() => void router.navigate([], { relativeTo: route, replaceUrl: true }));
  });
  return token.asReadonly();
}

function stored(key: string): string | null {
  try {
    return sessionStorage.getItem(key);
  } catch {
    return null;
  }
}

function keep(key: string, token: string): void {
  try {
    sessionStorage.setItem(key, token);
  } catch {
    // Without storage a reload asks for the link again.
  }
}
