import { ChangeDetectionStrategy, Component, inject, Injectable } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialog, MatDialogActions, MatDialogContent, MatDialogRef, MatDialogTitle } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { AskSupplier, type SheetRequest } from '#shared/library';
import { ChoiceField, type Choice } from '../../pieces/fields/choice-field';
import { TextField } from '../../pieces/fields/text-field';
import { FormSending } from '../../pieces/form-sending';
import { FormTrouble } from '../../pieces/form-trouble';
import { LibraryApi } from '../library-api';

export interface AskQuestion {
  readonly productId: string;
  readonly productName: string;
  readonly supplier: string;
  /** What is missing: any current sheet, or the one in Spanish. */
  readonly wants: 'sheet' | 'spanish';
}
type Language = AskSupplier['language'];

/** What the supplier reads until a person writes something else. */
const proposals: Readonly<Record<AskQuestion['wants'], Readonly<Record<Language, string>>>> = {
  sheet: {
    en: 'Please send the newest revision, as a PDF, with all 16 sections.',
    es: 'Por favor envíe la revisión más reciente, en PDF, con las 16 secciones.',
  },
  spanish: {
    en: 'We have your English sheet. Please send the same revision in Spanish, as a PDF.',
    es: 'Tenemos su hoja en inglés. Por favor envíe la misma revisión en español, en PDF.',
  },
};

/** Opens the question; answers the request, or nothing when it was left. */
@Injectable({ providedIn: 'root' })
export class AskTheSupplier {
  private readonly dialogs = inject(MatDialog);

  ask(question: AskQuestion): Promise<SheetRequest | undefined> {
    return firstValueFrom(this.dialogs.open<AskSupplierDialog, AskQuestion, SheetRequest>(AskSupplierDialog, { data: question, width: '38rem', maxWidth: '96vw' }).afterClosed());
  }
}

/** Asks a supplier for a sheet by e-mail, with a link that needs no account. */
@Component({
  selector: 'kb-ask-supplier-dialog',
  imports: [ChoiceField, FormTrouble, MatButton, MatDialogActions, MatDialogContent, MatDialogTitle, ReactiveFormsModule, TextField],
  template: `
    <h2 matDialogTitle>Ask the supplier</h2>
    <form novalidate [formGroup]="form" (ngSubmit)="ask()">
      <mat-dialog-content><div class="kb-stack">
        <div>
          <b>{{ question.productName }}</b>
          <div class="kb-quiet">{{ question.supplier }}</div>
        </div>
        <p>
          They get an e-mail with a link that takes one PDF without an account. It works once, for 30 days, and shows only your company's name, this product and your message.
        </p>
        <kb-form-trouble [words]="sending.refusal()" />
        <kb-text-field label="Supplier's e-mail address" kind="email" formControlName="email" />
        <kb-choice-field label="Language of the e-mail" formControlName="language" [choices]="languages" />
        <kb-text-field label="Message" [lines]="4" formControlName="message" />
      </div></mat-dialog-content>
      <mat-dialog-actions align="start">
        <button type="submit" matButton="filled" [disabled]="sending.isSending()">Send the request</button>
        <button type="button" matButton (click)="dialog.close()">Not now</button>
      </mat-dialog-actions>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AskSupplierDialog {
  private readonly api = inject(LibraryApi);
  protected readonly question = inject<AskQuestion>(MAT_DIALOG_DATA);
  protected readonly dialog = inject<MatDialogRef<AskSupplierDialog, SheetRequest>>(MatDialogRef);

  protected readonly languages: readonly Choice<Language>[] = [
    { value: 'en', label: 'English' },
    { value: 'es', label: 'Español' },
  ];
  protected readonly form = inject(NonNullableFormBuilder).group({ productId: this.question.productId, email: '', language: 'en' as Language, message: proposals[this.question.wants].en });
  protected readonly sending = new FormSending(this.form);

  constructor() {
    const { language, message } = this.form.controls;
    const proposal = proposals[this.question.wants];
    // A message the person wrote themselves stays.
    language.valueChanges.pipe(takeUntilDestroyed()).subscribe((chosen) => Object.values(proposal).includes(message.value) && message.setValue(proposal[chosen]));
  }

  protected async ask(): Promise<void> {
    const request = await this.sending.send(AskSupplier, (value) => firstValueFrom(this.api.ask(value)));
    if (request) this.dialog.close(request);
  }
}
