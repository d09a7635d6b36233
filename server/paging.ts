import { InputError } from './errors';

/** Opaque keyset cursor over sort keys. */
export const writeCursor = (keys: readonly (string | number)[]): string => Buffer.from(JSON.stringify(keys)).toString('base64url');

export function readCursor(cursor: string | undefined, length: number): (string | number)[] | undefined {
  if (cursor === undefined) return undefined;
  try {
    const keys: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString());
    if (Array.isArray(keys) && keys.length === length && keys.every((key) => typeof key === 'string' || typeof key === 'number')) return keys as (string | number)[];
  } catch {
    // answered below like any other unreadable cursor
  }
  throw new InputError('The place in the list is not readable: start again from the first page.', [{ path: 'after', message: 'Use the value of `next` as it was given.' }]);
}

/** From limit + 1 rows to a page: the extra row only tells that there is a next page. */
export function toPage<Row, Item>(rows: readonly Row[], limit: number, keysOf: (row: Row) => readonly (string | number)[], toItem: (row: Row) => Item): { items: Item[]; next: string | null } {
  const shown = rows.slice(0, limit);
  const last = shown.at(-1);
  return { items: shown.map(toItem), next: rows.length > limit && last !== undefined ? writeCursor(keysOf(last)) : null };
}
