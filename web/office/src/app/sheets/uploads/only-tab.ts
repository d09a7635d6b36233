import { signal, type Signal } from '@angular/core';

/** Turns true once this is the only tab that holds the name: at once for the first, for another when that one is closed. */
export function onlyTab(name: string): Signal<boolean> {
  // Typed as always there, but left out over plain http and in older browsers.
  const locks = (globalThis.navigator as { readonly locks?: LockManager }).locks;
  const isOnly = signal(locks === undefined);
  // Held as long as the tab lives: the promise never ends.
  void locks?.request(name, () => new Promise<never>(() => isOnly.set(true)));
  return isOnly.asReadonly();
}
