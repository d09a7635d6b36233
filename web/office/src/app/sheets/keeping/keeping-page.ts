import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom, of } from 'rxjs';
import { type LibraryTask, type SheetRequest } from '#shared/library';
import { Empty } from '#ui/empty';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { problemOf, problemWords } from '#ui/problem';
import { State } from '#ui/state';
import { Access } from '../../contract/access';
import { PagedList } from '../../contract/paged-list';
import { Unready } from '../../pieces/unready';
import { ProductsApi } from '../../products/products-api';
import { LibraryApi } from '../library-api';
import { AskTheSupplier } from '../requests/ask-supplier-dialog';
import { RequestRows } from '../requests/request-rows';
import { PolicyForm } from './policy-form';

const labels: Readonly<Record<LibraryTask['kind'], string>> = { 'no-sheet': 'No sheet', 'to-check': 'Check', 'review-overdue': 'Old', 'old-format': 'Old format', 'no-spanish': 'No Spanish', 'request-open': 'No answer' };
type Filter = SheetRequest['state'] | '';
const filters: readonly { readonly value: Filter; readonly label: string }[] = [
  { value: '', label: 'all' },
  { value: 'open', label: 'waiting' },
  { value: 'answered', label: 'answered' },
  { value: 'expired', label: 'no answer' },
  { value: 'withdrawn', label: 'withdrawn' },
];

/** What the library wants next, worst first, each with its next step; below it what suppliers were asked. */
@Component({
  selector: 'kb-keeping-page',
  imports: [Empty, MatButton, Note, PageHeader, PolicyForm, RequestRows, RouterLink, State, Unready],
  templateUrl: './keeping-page.html',
  styleUrl: './keeping-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class KeepingPage {
  private readonly api = inject(LibraryApi);
  private readonly products = inject(ProductsApi);
  private readonly access = inject(Access);
  private readonly asking = inject(AskTheSupplier);
  private readonly router = inject(Router);

  /** Which requests are shown, from the address. */
  readonly requests = input<Filter, string | undefined>('', { transform: (value) => filters.find((filter) => filter.value === value)?.value ?? '' });

  protected readonly mayRead = computed(() => this.access.may('listLibraryTasks'));
  protected readonly mayAsk = computed(() => this.access.may('askSupplier'));
  protected readonly tasks = new PagedList(this.mayRead, (mayRead: boolean, after) => (mayRead ? this.api.tasks(after) : of({ items: [], next: null })));
  protected readonly asked = new PagedList(
    computed(() => ({ mayRead: this.mayRead(), state: this.requests() || undefined })),
    ({ mayRead, state }: { mayRead: boolean; state: SheetRequest['state'] | undefined }, after) => (mayRead ? this.api.requests({ state }, after) : of({ items: [], next: null })),
  );
  protected readonly notice = signal<{ readonly kind: 'done' | 'stop'; readonly words: string } | null>(null);
  protected readonly labels = labels;
  protected readonly filters = filters;

  protected choose(value: string): void {
    void this.router.navigate([], { queryParams: { requests: value || null }, queryParamsHandling: 'merge', replaceUrl: true });
  }

  protected reload(): void {
    this.tasks.refresh({ isWhole: true });
    this.asked.refresh({ isWhole: true });
  }

  protected async ask({ productId, kind }: LibraryTask): Promise<void> {
    if (productId === null) return;
    this.notice.set(null);
    try {
      const { name, supplier } = await firstValueFrom(this.products.read(productId));
      const request = await this.asking.ask({ productId, productName: name, supplier, wants: kind === 'no-spanish' ? 'spanish' : 'sheet' });
      if (!request) return;
      this.notice.set({ kind: 'done', words: `${request.email} is asked for ${request.productName}.` });
      this.reload();
    } catch (error) {
      this.notice.set({ kind: 'stop', words: problemWords(problemOf(error)) });
    }
  }
}
