import { LocalDate } from '#shared/common';
import { InputError } from './errors';

/** Opaque keyset cursor over sort keys. */
export const writeCursor = (keys: readonly (string | number)[]): string => Buffer.from(JSON.stringify(keys)).toString('base64url');

/** The forms of sort keys: a forged one would reach the database and fail there. */
const forms = {
  id: (key: unknown) => typeof key === 'string' && /^[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i.test(key),
  text: (key: unknown) => typeof key === 'string' && /^[^\p{Cc}\p{Cs}]*$/u.test(key),
  day: (key: unknown) => LocalDate.safeParse(key).success,
  instant: (key: unknown) => typeof key === 'string' && /^\d{4}-\d\d-\d\dT[\d:.]{12}Z$/.test(key) && key > '0001' && !Number.isNaN(Date.parse(key)),
  index: (key: unknown) => Number.isSafeInteger(key),
} as const;

export function readCursor(cursor: string | undefined, ...keyForms: readonly (keyof typeof forms)[]): (string | number)[] | undefined {
  if (cursor === undefined) return undefined;
  try {
    const keys: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString());
    if (Array.isArray(keys) && keys.length === keyForms.length && keyForms.every((form, at) => forms[form](keys[at]))) return keys as (string | number)[];
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
