import { EMPTY, expand, map, reduce, type Observable } from 'rxjs';
import { type Page } from '#shared/common';

/** Every row of a short list (people, equipment, kits of one contractor), page after page. */
export function allPages<T>(load: (after?: string) => Observable<Page<T>>): Observable<readonly T[]> {
  return load().pipe(
    expand((page) => (page.next === null ? EMPTY : load(page.next))),
    map((page) => page.items),
    reduce<readonly T[], readonly T[]>((all, items) => [...all, ...items], []),
  );
}
