import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { type SearchAnswer } from '#shared/library';
import { Empty } from '#ui/empty';
import { Note } from '#ui/note';
import { State } from '#ui/state';
import { Unready } from '../../pieces/unready';
import { datedWords, revisionState } from '../sheet-words';
import { SearchApi, type SheetSearch } from './search-api';
import { SearchFilters } from './search-filters';
import { closestWords, countSaid, filterNames, snippetPieces, type FilterName } from './search-words';

const [few, many] = [20, 50];

/** What a search found: name, supplier, state, and by what; for words of the text the place where they stand. */
@Component({
  selector: 'kb-search-results',
  imports: [Empty, MatButton, Note, RouterLink, SearchFilters, State, Unready],
  templateUrl: './search-results.html',
  styleUrl: './search-results.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SearchResults {
  readonly search = input.required<SheetSearch>();
  /** What changes in the address. */
  readonly changed = output<Partial<Record<FilterName | 'q', string | null>>>();

  protected readonly limit = linkedSignal({ source: this.search, computation: () => few });
  protected readonly many = many;
  protected readonly answer = inject(SearchApi).resource(computed(() => ({ ...this.search(), limit: this.limit() })));
  /** What was found last stays while the next letter is looked up. */
  private readonly shown = linkedSignal<SearchAnswer | null, SearchAnswer | null>({
    source: () => (this.answer.hasValue() ? this.answer.value() : null),
    computation: (value, before) => value ?? before?.value ?? null,
  });
  protected readonly found = computed(() => (this.answer.error() ? null : this.shown()));
  protected readonly rows = computed(() =>
    (this.found()?.items ?? []).map(({ revision, matched, snippet }) => ({
      revision,
      matched,
      pieces: snippet === null ? [] : snippetPieces(snippet),
      state: revisionState(revision),
      date: datedWords(revision),
    })),
  );
  protected readonly said = computed(() => {
    const found = this.found();
    return found ? countSaid(found) : '';
  });
  protected readonly closest = computed(() => {
    const found = this.found();
    return found ? closestWords(found) : null;
  });
  protected readonly isFiltered = computed(() => filterNames.some((name) => Boolean(this.search()[name])));
  protected readonly noFilters = { state: null, language: null, signalWord: null, isInUse: null };
}
