import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { map, type Observable } from 'rxjs';
import type * as z from 'zod';
import { ImportPreview, type ImportProducts, type ImportedProducts } from '#shared/library';
import { ContractClient } from '../../contract/contract-client';
import { pathOf } from '../../contract/contract-request';

export type Preview = z.infer<typeof ImportPreview>;
export type PreviewRow = Preview['rows'][number];

/** Products from a spreadsheet: looked at first, then added. */
@Injectable({ providedIn: 'root' })
export class ImportApi {
  private readonly client = inject(ContractClient);
  private readonly http = inject(HttpClient);

  preview(file: File): Observable<Preview> {
    const body = new FormData();
    body.append('file', file, file.name);
    return this.http.post(pathOf('previewImport'), body).pipe(map((answer) => ImportPreview.parse(answer)));
  }

  add(products: z.infer<typeof ImportProducts>['products']): Observable<z.infer<typeof ImportedProducts>> {
    return this.client.call('importProducts', { body: { products } });
  }
}
