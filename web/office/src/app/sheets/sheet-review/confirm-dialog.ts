import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogActions, MatDialogContent, MatDialogRef, MatDialogTitle } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { type Product } from '#shared/products';
import { type ConfirmSheet, type Revision, type SheetEdit } from '#shared/sheets';
import { problemOf, problemWords } from '#ui/problem';
import { TextField } from '../../pieces/fields/text-field';
import { FormTrouble } from '../../pieces/form-trouble';
import { SearchField } from '../../pieces/search-field';
import { ProductsApi } from '../../products/products-api';
import { SheetsApi } from '../sheets-api';

export interface ConfirmQuestion {
  readonly revision: Revision;
  readonly fields: SheetEdit;
}
/** The confirmed sheet, or the problem whose messages belong on the page's fields. */
export type ConfirmOutcome = { readonly confirmed: Revision } | { readonly problem: ReturnType<typeof problemOf> };

/** Which product the sheet belongs to: one that is known, or a new one with the name from the sheet. */
@Component({
  selector: 'kb-confirm-dialog',
  imports: [FormTrouble, MatButton, MatDialogActions, MatDialogContent, MatDialogTitle, ReactiveFormsModule, SearchField, TextField],
  templateUrl: './confirm-dialog.html',
  styles: `
    legend {
      margin-bottom: 0.5rem;
    }

    .choice {
      display: flex;
      gap: 10px;
      align-items: center;
      min-height: var(--kb-target);
    }

    input[type='radio'] {
      width: 20px;
      height: 20px;
      margin: 0;
      accent-color: var(--kb-pigment);
    }

    .new {
      display: grid;
      gap: 0.75rem;
      padding-inline-start: 30px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ConfirmDialog {
  private readonly sheets = inject(SheetsApi);
  private readonly products = inject(ProductsApi);
  protected readonly question = inject<ConfirmQuestion>(MAT_DIALOG_DATA);
  protected readonly dialog = inject<MatDialogRef<ConfirmDialog, ConfirmOutcome>>(MatDialogRef);

  protected readonly form = inject(NonNullableFormBuilder).group({ name: this.question.fields.productName ?? '', supplier: this.question.fields.supplier ?? '' });
  protected readonly found = signal<readonly Product[]>([]);
  /** Id of a known product; null for a new one. */
  protected readonly chosenId = signal<string | null>(null);
  protected readonly isSending = signal(false);
  protected readonly refusal = signal('');

  constructor() {
    void this.find(this.question.fields.productName ?? '', true);
  }

  protected async find(q: string, isFirst = false): Promise<void> {
    try {
      const { items } = await firstValueFrom(this.products.find(q));
      this.found.set(items);
      const name = this.question.fields.productName?.toLowerCase();
      const same = items.find((product) => product.name.toLowerCase() === name);
      if (isFirst) this.chosenId.set(same?.id ?? null);
    } catch (error) {
      this.refusal.set(problemWords(problemOf(error)));
    }
  }

  protected async confirm(): Promise<void> {
    if (this.isSending()) return;
    const { revision, fields } = this.question;
    const id = this.chosenId();
    const product: ConfirmSheet['product'] = id === null ? this.form.getRawValue() : { id };
    this.isSending.set(true);
    this.refusal.set('');
    try {
      this.dialog.close({ confirmed: await firstValueFrom(this.sheets.confirm(revision.id, fields, product, revision.version)) });
    } catch (error) {
      const problem = problemOf(error);
      // Messages about the sheet's own values, and a changed sheet, are the page's business.
      if (problem.current !== undefined || problem.errors?.some(({ path }) => path.startsWith('fields'))) this.dialog.close({ problem });
      else this.refusal.set([problemWords(problem), ...(problem.errors ?? []).map(({ message }) => message)].join(' '));
    } finally {
      this.isSending.set(false);
    }
  }
}
