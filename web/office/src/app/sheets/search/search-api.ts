import { httpResource } from '@angular/common/http';
import { Injectable, type Signal } from '@angular/core';
import { type SearchAnswer, type SearchQuery } from '#shared/library';
import type * as z from 'zod';
import { answerOf, requestOf } from '../../contract/contract-request';

/** What the address of the library page says: words to look for, and filters. */
export type SheetSearch = Omit<z.input<typeof SearchQuery>, 'limit'>;

/** One search over names, suppliers, CAS numbers, codes and texts. */
@Injectable({ providedIn: 'root' })
export class SearchApi {
  /** Asks nothing while there is nothing to look for. */
  resource(search: Signal<SheetSearch & { readonly limit: number }>) {
    return httpResource<SearchAnswer>(() => (search().q === '' ? undefined : requestOf('searchSheets', { query: search() })), { parse: answerOf('searchSheets') });
  }
}
