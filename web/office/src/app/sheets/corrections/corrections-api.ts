import { inject, Injectable } from '@angular/core';
import { type Observable } from 'rxjs';
import { type Page } from '#shared/common';
import { type SheetCorrection, type SheetSuggestions } from '#shared/corrections';
import { ContractClient } from '../../contract/contract-client';

/** What corrections taught, and what they say of one sheet. */
@Injectable({ providedIn: 'root' })
export class CorrectionsApi {
  private readonly client = inject(ContractClient);

  suggestions(revisionId: string): Observable<SheetSuggestions> {
    return this.client.call('listSuggestions', { params: { revisionId } });
  }

  list(after?: string): Observable<Page<SheetCorrection>> {
    return this.client.call('listCorrections', { query: { after } });
  }

  remove(correctionId: string): Observable<void> {
    return this.client.call('removeCorrection', { params: { correctionId } });
  }
}
