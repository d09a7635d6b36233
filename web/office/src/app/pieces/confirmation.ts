import { ChangeDetectionStrategy, Component, inject, Injectable } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialog, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';

export interface ConfirmationQuestion {
  readonly heading: string;
  readonly text: string;
  /** Names the deed: "Withdraw tablet", never "OK". */
  readonly action: string;
  readonly isDanger?: boolean;
}

/** Asks before something that cannot be undone with one click. */
@Injectable({ providedIn: 'root' })
export class Confirmation {
  private readonly dialogs = inject(MatDialog);

  async ask(question: ConfirmationQuestion): Promise<boolean> {
    return (await firstValueFrom(this.dialogs.open<ConfirmationDialog, ConfirmationQuestion, boolean>(ConfirmationDialog, { data: question, width: '34rem', maxWidth: '96vw' }).afterClosed())) ?? false;
  }
}

@Component({
  selector: 'kb-confirmation-dialog',
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 matDialogTitle>{{ question.heading }}</h2>
    <mat-dialog-content>{{ question.text }}</mat-dialog-content>
    <mat-dialog-actions align="start">
      <button type="button" matButton="filled" [class.kb-danger]="question.isDanger" [matDialogClose]="true">{{ question.action }}</button>
      <button type="button" matButton [matDialogClose]="false">Leave it as it is</button>
    </mat-dialog-actions>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ConfirmationDialog {
  protected readonly question = inject<ConfirmationQuestion>(MAT_DIALOG_DATA);
}
