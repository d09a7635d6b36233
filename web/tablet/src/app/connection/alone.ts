let last: Promise<unknown> = Promise.resolve();

/**
 * Runs work when no other tab of this tablet runs work of that name. Where the browser has no locks
 * (plain http, old browsers) it runs in turn within this tab; the server links what two tabs sent twice.
 */
export async function alone<T>(name: string, work: () => Promise<T>): Promise<T> {
  const locks = typeof navigator === 'undefined' ? undefined : navigator.locks;
  if (locks) return (await locks.request(name, work)) as T;
  const turn = last.then(work, work);
  last = turn.catch(() => undefined);
  return turn;
}
