import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { firstValueFrom, of } from 'rxjs';
import { type Problem } from '#shared/common';
import { type SheetRequest } from '#shared/library';
import { type Product } from '#shared/products';
import { type RevisionSummary } from '#shared/sheets';
import { Empty } from '#ui/empty';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { Pictogram } from '#ui/pictogram';
import { problemOf, problemWords } from '#ui/problem';
import { State } from '#ui/state';
import { Access } from '../../contract/access';
import { allPages } from '../../contract/all-pages';
import { PagedList } from '../../contract/paged-list';
import { dayOf, momentShort } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { LibraryApi } from '../../sheets/library-api';
import { AskTheSupplier, type AskQuestion } from '../../sheets/requests/ask-supplier-dialog';
import { RequestRows } from '../../sheets/requests/request-rows';
import { languageNames, revisionState } from '../../sheets/sheet-words';
import { SheetsApi } from '../../sheets/sheets-api';
import { ProductsApi } from '../products-api';
import { sheetsByLanguage } from './sheets-by-language';

/** One product: its sheet in use in each language, older revisions, where it was used, what its supplier was asked. */
@Component({
  selector: 'kb-product-page',
  imports: [Empty, MatButton, Note, PageHeader, Pictogram, RequestRows, RouterLink, State, Unready],
  templateUrl: './product-page.html',
  styleUrl: './product-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProductPage {
  private readonly products = inject(ProductsApi);
  private readonly sheets = inject(SheetsApi);
  private readonly library = inject(LibraryApi);
  private readonly access = inject(Access);
  private readonly asking = inject(AskTheSupplier);

  readonly productId = input.required<string>();

  protected readonly product = signal<Product | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  private readonly revisions = signal<readonly RevisionSummary[]>([]);
  protected readonly mayAsk = computed(() => this.access.may('askSupplier'));
  private readonly mayReadRequests = computed(() => this.access.may('listRequests'));
  protected readonly uses = new PagedList(this.productId, (id: string, after) => this.library.uses(id, after));
  protected readonly requests = new PagedList(
    computed(() => ({ id: this.productId(), mayRead: this.mayReadRequests() })),
    ({ id, mayRead }: { id: string; mayRead: boolean }, after) => (mayRead ? this.library.requests({ productId: id }, after) : of({ items: [] as SheetRequest[], next: null })),
  );
  protected readonly languages = computed(() => sheetsByLanguage(this.revisions().filter(({ state }) => state === 'confirmed')));
  protected readonly older = computed(() => this.revisions().filter(({ state, isCurrent }) => state === 'confirmed' && !isCurrent));
  protected readonly notice = signal<{ readonly kind: 'done' | 'stop'; readonly words: string } | null>(null);
  protected readonly dayOf = dayOf;
  protected readonly momentShort = momentShort;
  protected readonly revisionState = revisionState;
  protected readonly languageNames = languageNames;

  constructor() {
    effect(() => {
      const id = this.productId();
      untracked(() => void this.load(id));
    });
  }

  protected async load(id: string): Promise<void> {
    this.problem.set(null);
    try {
      const [product, revisions] = await Promise.all([firstValueFrom(this.products.read(id)), firstValueFrom(allPages((after) => this.sheets.ofProduct(id, after)))]);
      this.product.set(product);
      this.revisions.set(revisions);
    } catch (error) {
      this.product.set(null);
      this.problem.set(problemOf(error));
    }
  }

  protected async ask(wants: AskQuestion['wants']): Promise<void> {
    const product = this.product();
    if (!product) return;
    this.notice.set(null);
    try {
      const request = await this.asking.ask({ productId: product.id, productName: product.name, supplier: product.supplier, wants });
      if (!request) return;
      this.notice.set({ kind: 'done', words: `${request.email} is asked for the sheet.` });
      this.requests.refresh({ isWhole: true });
    } catch (error) {
      this.notice.set({ kind: 'stop', words: problemWords(problemOf(error)) });
    }
  }
}
