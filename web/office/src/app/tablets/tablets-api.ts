import { inject, Injectable } from '@angular/core';
import { type Observable } from 'rxjs';
import { type Page } from '#shared/common';
import { type PairingCode, type Tablet } from '#shared/tablets';
import { type KeptAside } from '#shared/today';
import type * as z from 'zod';
import { ContractClient } from '../contract/contract-client';

/** Tablets that crews sign on. */
@Injectable({ providedIn: 'root' })
export class TabletsApi {
  private readonly client = inject(ContractClient);

  list(after?: string): Observable<Page<Tablet>> {
    return this.client.call('listTablets', { query: { after } });
  }

  add(name: string): Observable<PairingCode> {
    return this.client.call('addTablet', { body: { name } });
  }

  renewCode(tabletId: string): Observable<PairingCode> {
    return this.client.call('renewPairingCode', { params: { tabletId } });
  }

  withdraw(tabletId: string): Observable<Tablet> {
    return this.client.call('withdrawTablet', { params: { tabletId } });
  }

  /** Deliveries that could not be recorded: stored all the same, a person must look. */
  keptAside(after?: string): Observable<Page<z.infer<typeof KeptAside>>> {
    return this.client.call('listKeptAside', { query: { after } });
  }
}
