import { inject, Injectable } from '@angular/core';
import { type Observable } from 'rxjs';
import { type Page } from '#shared/common';
import { type Kit, type KitEdit, type Product } from '#shared/products';
import { allPages } from '../contract/all-pages';
import { ContractClient } from '../contract/contract-client';

/** Products and the kits they come in. */
@Injectable({ providedIn: 'root' })
export class ProductsApi {
  private readonly client = inject(ContractClient);

  list(q: string, after?: string): Observable<Page<Product>> {
    return this.client.call('listProducts', { query: { q: q || undefined, after } });
  }

  /** The first products that match, for a search box. */
  find(q: string): Observable<Page<Product>> {
    return this.client.call('listProducts', { query: { q: q || undefined, limit: 12 } });
  }

  read(productId: string): Observable<Product> {
    return this.client.call('readProduct', { params: { productId } });
  }

  add(product: { readonly name: string; readonly supplier: string }): Observable<Product> {
    return this.client.call('addProduct', { body: product });
  }

  kits(after?: string): Observable<Page<Kit>> {
    return this.client.call('listKits', { query: { after } });
  }

  allKits(): Observable<readonly Kit[]> {
    return allPages((after) => this.client.call('listKits', { query: { after, limit: 100 } }));
  }

  kit(kitId: string): Observable<Kit> {
    return this.client.call('readKit', { params: { kitId } });
  }

  addKit(kit: KitEdit): Observable<Kit> {
    return this.client.call('addKit', { body: kit });
  }

  editKit(kitId: string, kit: KitEdit, version: number): Observable<Kit> {
    return this.client.call('editKit', { params: { kitId }, body: kit, version });
  }
}
