import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { AddProduct, type Kit } from '#shared/products';
import { Empty } from '#ui/empty';
import { PageHeader } from '#ui/page-header';
import { Pictogram } from '#ui/pictogram';
import { State } from '#ui/state';
import { Access } from '../../contract/access';
import { PagedList } from '../../contract/paged-list';
import { dayOf } from '../../pieces/dates';
import { TextField } from '../../pieces/fields/text-field';
import { FormSending } from '../../pieces/form-sending';
import { FormTrouble } from '../../pieces/form-trouble';
import { SearchField } from '../../pieces/search-field';
import { Unready } from '../../pieces/unready';
import { withUnit } from '../../pieces/units';
import { ExportLinks } from '../export-links';
import { ProductsApi } from '../products-api';

/** Kits first, because crews work with kits; then every product with its sheet in use. */
@Component({
  selector: 'kb-product-list',
  imports: [Empty, ExportLinks, FormTrouble, MatButton, PageHeader, Pictogram, ReactiveFormsModule, RouterLink, SearchField, State, TextField, Unready],
  templateUrl: './product-list.html',
  styleUrl: './product-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProductList {
  private readonly api = inject(ProductsApi);
  private readonly router = inject(Router);
  private readonly access = inject(Access);

  readonly q = input('', { transform: (value: string | undefined) => value ?? '' });

  protected readonly products = new PagedList(this.q, (q: string, after) => this.api.list(q, after));
  protected readonly kits = new PagedList(signal(null).asReadonly(), (_query: null, after) => this.api.kits(after));
  protected readonly mayAddKit = computed(() => this.access.may('addKit'));
  protected readonly mayAddProduct = computed(() => this.access.may('addProduct'));
  protected readonly isAdding = signal(false);
  protected readonly form = inject(NonNullableFormBuilder).group({ name: '', supplier: '' });
  protected readonly sending = new FormSending(this.form);
  protected readonly dayOf = dayOf;

  protected search(q: string): void {
    void this.router.navigate([], { queryParams: { q: q || null }, queryParamsHandling: 'merge', replaceUrl: true });
  }

  protected kitWords(kit: Kit): string {
    const minutes = `${kit.mixMinutesPerKit} min mixing`;
    return `${withUnit('mix', kit.volumeL)}, ${minutes}${kit.bucketMinutes === null ? '' : `, ${kit.bucketMinutes} min in the bucket`}`;
  }

  protected missingSheets(kit: Kit): string {
    return kit.parts
      .filter(({ hasSheet }) => !hasSheet)
      .map(({ part, productName }) => `${part}: ${productName}`)
      .join(', ');
  }

  protected partNames(kit: Kit): string {
    return kit.parts.map(({ part, productName }) => `${part} ${productName}`).join(', ');
  }

  protected async addProduct(): Promise<void> {
    const product = await this.sending.send(AddProduct, (request) => firstValueFrom(this.api.add(request)));
    if (!product) return;
    this.form.reset();
    this.isAdding.set(false);
    this.products.reload();
  }
}
