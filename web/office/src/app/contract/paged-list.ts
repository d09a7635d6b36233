import { DestroyRef, inject, signal, type Signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { Subject, catchError, distinctUntilChanged, map, merge, of, switchMap, tap, type Observable } from 'rxjs';
import { type Page, type Problem } from '#shared/common';
import { problemOf } from '#ui/problem';

export type ListStatus = 'loading' | 'ready' | 'failed';

interface Step<Q> {
  readonly query: Q;
  readonly after?: string;
  /** first: throw away what is shown; more: append; refresh: replace the newest rows, keep the older ones; whole: replace all quietly. */
  readonly how: 'first' | 'more' | 'refresh' | 'whole';
}

/** A keyset-paged list that a page shows and extends. Call where `inject()` may be called. */
export class PagedList<Q, P extends Page<{ readonly id: string }>> {
  readonly items = signal<P['items']>([]);
  readonly next = signal<string | null>(null);
  readonly status = signal<ListStatus>('loading');
  readonly problem = signal<Problem | null>(null);
  /** The newest first page as it came, with whatever it carries beside the rows. */
  readonly page = signal<P | null>(null);

  private readonly asked = new Subject<Step<Q>>();

  constructor(
    private readonly query: Signal<Q>,
    load: (query: Q, after?: string) => Observable<P>,
  ) {
    const changed = toObservable(query).pipe(
      distinctUntilChanged((a, b) => JSON.stringify(a) === JSON.stringify(b)),
      map((value): Step<Q> => ({ query: value, how: 'first' })),
    );
    merge(changed, this.asked)
      .pipe(
        tap((step) => this.begin(step)),
        switchMap((step) =>
          load(step.query, step.after).pipe(
            map((page) => ({ step, page })),
            catchError((error: unknown) => of({ step, error })),
          ),
        ),
        takeUntilDestroyed(inject(DestroyRef)),
      )
      .subscribe((result) => ('page' in result ? this.take(result.step, result.page) : this.fail(result.step, result.error)));
  }

  reload(): void {
    this.asked.next({ query: this.query(), how: 'first' });
  }

  /** Looks for news without disturbing what is read; a failure leaves the list as it is. `isWhole` lets rows leave the list too. */
  refresh({ isWhole = false } = {}): void {
    if (this.status() === 'ready') this.asked.next({ query: this.query(), how: isWhole ? 'whole' : 'refresh' });
  }

  more(): void {
    const after = this.next();
    if (after !== null) this.asked.next({ query: this.query(), after, how: 'more' });
  }

  private begin({ how }: Step<Q>): void {
    if (how === 'refresh' || how === 'whole') return;
    this.problem.set(null);
    this.status.set('loading');
    if (how === 'first') this.items.set([]);
  }

  private take({ how }: Step<Q>, page: P): void {
    const known = new Set(page.items.map((item) => item.id));
    const older = this.items().filter((item) => !known.has(item.id));
    if (how !== 'more') this.page.set(page);
    // After a refresh the older rows stay, so their "more" mark stays too.
    if (how !== 'refresh' || older.length === 0) this.next.set(page.next);
    this.items.set(how === 'first' || how === 'whole' ? page.items : how === 'more' ? [...older, ...page.items] : [...page.items, ...older]);
    this.status.set('ready');
  }

  private fail({ how }: Step<Q>, error: unknown): void {
    if (how === 'refresh' || how === 'whole') return;
    this.problem.set(problemOf(error));
    this.status.set('failed');
  }
}
