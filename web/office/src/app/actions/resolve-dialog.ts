import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogActions, MatDialogContent, MatDialogRef, MatDialogTitle } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { CorrectiveAction, ResolveAction } from '#shared/actions';
import { Note } from '#ui/note';
import { momentShort } from '../pieces/dates';
import { TextField } from '../pieces/fields/text-field';
import { FormSending } from '../pieces/form-sending';
import { FormTrouble } from '../pieces/form-trouble';
import { ActionsApi } from './actions-api';

/** Closes a corrective action with its evidence; the stopped task may then start again. Closes with the resolved action. */
@Component({
  selector: 'kb-resolve-dialog',
  imports: [FormTrouble, MatButton, MatDialogActions, MatDialogContent, MatDialogTitle, Note, ReactiveFormsModule, TextField],
  template: `
    <form novalidate [formGroup]="form" (ngSubmit)="resolve()">
      <h2 matDialogTitle>{{ action.taskName ? 'Release ' + action.taskName.toLowerCase() : 'Resolve this' }}</h2>
      <mat-dialog-content><div class="kb-stack">
        <kb-note kind="stop"
          ><b>{{ action.text }}</b
          ><br />{{ action.openedBy }}, {{ opened }}</kb-note
        >
        @if (theirs(); as theirs) {
          <kb-note kind="caution" [announce]="true">
            @if (theirs.resolvedAt) {
              {{ theirs.resolvedBy }} resolved this meanwhile: “{{ theirs.evidence }}”
            } @else {
              Somebody changed this meanwhile; {{ theirs.ownerName ?? 'nobody' }} owns it now. Save again to resolve it.
            }
          </kb-note>
        } @else {
          <kb-form-trouble [words]="sending.refusal()" />
        }
        <kb-text-field label="What was done, and how it was checked" formControlName="evidence" [lines]="4" hint="with the reading: instrument, place, figure, who" />
      </div></mat-dialog-content>
      <mat-dialog-actions align="start">
        <button matButton="filled" type="submit" [disabled]="sending.isSending()">Resolve with this evidence</button>
        <button matButton type="button" (click)="dialog.close()">Cancel</button>
      </mat-dialog-actions>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ResolveDialog {
  private readonly api = inject(ActionsApi);
  protected readonly action = inject<CorrectiveAction>(MAT_DIALOG_DATA);
  protected readonly dialog = inject<MatDialogRef<ResolveDialog, CorrectiveAction>>(MatDialogRef);

  protected readonly form = inject(NonNullableFormBuilder).group({ evidence: '' });
  protected readonly sending = new FormSending(this.form);
  protected readonly opened = momentShort(this.action.openedAt);
  private readonly newest = signal(this.action);
  protected readonly theirs = computed(() => {
    const current = CorrectiveAction.safeParse(this.sending.problem()?.current);
    return current.success ? current.data : null;
  });

  protected async resolve(): Promise<void> {
    const seen = this.theirs();
    if (seen) this.newest.set(seen);
    const resolved = await this.sending.send(ResolveAction, ({ evidence }) => firstValueFrom(this.api.resolve(this.newest(), evidence)));
    if (resolved) this.dialog.close(resolved);
  }
}
