import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogActions, MatDialogContent, MatDialogRef, MatDialogTitle } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { ReturnSheet, type SheetRequest, type SheetReturnDraft } from '#shared/library';
import { type Revision } from '#shared/sheets';
import { ChoiceField, type Choice } from '../../pieces/fields/choice-field';
import { TextField } from '../../pieces/fields/text-field';
import { FormSending } from '../../pieces/form-sending';
import { FormTrouble } from '../../pieces/form-trouble';
import { LibraryApi } from '../library-api';

export interface ReturnQuestion {
  readonly revision: Revision;
  readonly draft: SheetReturnDraft;
}
type Language = ReturnSheet['language'];

/** Sends a sheet back to its supplier: the findings of the audit stand in the mail and can be changed before it goes. */
@Component({
  selector: 'kb-return-dialog',
  imports: [ChoiceField, FormTrouble, MatButton, MatDialogActions, MatDialogContent, MatDialogTitle, ReactiveFormsModule, TextField],
  template: `
    <h2 matDialogTitle>Send back to the supplier</h2>
    <form novalidate [formGroup]="form" (ngSubmit)="send()">
      <mat-dialog-content><div class="kb-stack">
        <p>They get an e-mail with your message and a link that takes one PDF without an account, once, for 30 days. Look the findings up on the page first: a section that was not read is not always missing.</p>
        <kb-form-trouble [words]="sending.refusal()" />
        <div class="two">
          <kb-text-field label="Product" formControlName="productName" />
          <kb-text-field label="Supplier" formControlName="supplier" />
        </div>
        <div class="two">
          <kb-text-field label="Supplier's e-mail address" kind="email" formControlName="email" [hint]="question.draft.email ? 'asked there last' : ''" />
          <kb-choice-field label="Language of the e-mail" formControlName="language" [choices]="languages" />
        </div>
        <kb-text-field label="Message" [lines]="11" formControlName="message" />
        @if (maySetAside) {
          <label class="choice"><input type="checkbox" formControlName="isSetAside" /> Set this sheet aside until the answer is there. It stays stored and reaches nobody.</label>
        }
      </div></mat-dialog-content>
      <mat-dialog-actions align="start">
        <button type="submit" matButton="filled" [disabled]="sending.isSending()">Send it back</button>
        <button type="button" matButton (click)="dialog.close()">Not now</button>
      </mat-dialog-actions>
    </form>
  `,
  styles: `
    .two {
      display: grid;
      grid-template-columns: 1fr 1fr;
      gap: 0.75rem 1rem;
    }

    .choice {
      display: flex;
      gap: 10px;
      align-items: center;
      min-height: var(--kb-target);
    }

    input[type='checkbox'] {
      flex: none;
      width: 20px;
      height: 20px;
      margin: 0;
      accent-color: var(--kb-pigment);
    }

    @media (max-width: 600px) {
      .two {
        grid-template-columns: 1fr;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ReturnDialog {
  private readonly api = inject(LibraryApi);
  protected readonly question = inject<ReturnQuestion>(MAT_DIALOG_DATA);
  protected readonly dialog = inject<MatDialogRef<ReturnDialog, SheetRequest>>(MatDialogRef);

  protected readonly languages: readonly Choice<Language>[] = [
    { value: 'en', label: 'English' },
    { value: 'es', label: 'Español' },
  ];
  protected readonly maySetAside = ['read', 'needs-entry'].includes(this.question.revision.state);
  protected readonly form = inject(NonNullableFormBuilder).group({
    productName: this.question.draft.productName,
    supplier: this.question.draft.supplier,
    email: this.question.draft.email,
    language: 'en' as Language,
    message: this.question.draft.messages.en,
    isSetAside: this.maySetAside,
  });
  protected readonly sending = new FormSending(this.form);

  constructor() {
    const { language, message } = this.form.controls;
    const { messages } = this.question.draft;
    // A message the person changed stays.
    language.valueChanges.pipe(takeUntilDestroyed()).subscribe((chosen) => Object.values(messages).includes(message.value) && message.setValue(messages[chosen]));
  }

  protected async send(): Promise<void> {
    const { id, version } = this.question.revision;
    const request = await this.sending.send(ReturnSheet, (value) => firstValueFrom(this.api.returnSheet(id, version, value)));
    if (request) this.dialog.close(request);
  }
}
