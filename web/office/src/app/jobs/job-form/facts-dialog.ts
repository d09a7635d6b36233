import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogActions, MatDialogContent, MatDialogRef, MatDialogTitle } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { Job, JobEdit } from '#shared/jobs';
import { Conflict } from '../../pieces/conflict';
import { FormSending } from '../../pieces/form-sending';
import { FormTrouble } from '../../pieces/form-trouble';
import { JobsApi } from '../jobs-api';
import { editOf, jobForm } from './job-form';
import { JobFields } from './job-fields';

/** Changes a job's facts. Closes with the saved job, or with nothing. */
@Component({
  selector: 'kb-facts-dialog',
  imports: [Conflict, FormTrouble, JobFields, MatButton, MatDialogActions, MatDialogContent, MatDialogTitle, ReactiveFormsModule],
  template: `
    <form novalidate [formGroup]="form" (ngSubmit)="save()">
      <h2 matDialogTitle>Change facts</h2>
      <mat-dialog-content><div class="kb-stack">
        @if (theirs(); as theirs) {
          <kb-conflict what="this job" [mine]="form.getRawValue()" [theirs]="theirs" (keepMine)="keepMine(theirs)" (takeTheirs)="takeTheirs(theirs)" />
        } @else {
          <kb-form-trouble [words]="sending.refusal()" />
        }
        <kb-job-fields [form]="form" [showOpen]="true" />
      </div></mat-dialog-content>
      <mat-dialog-actions align="start">
        <button matButton="filled" type="submit" [disabled]="sending.isSending()">Save facts</button>
        <button matButton type="button" (click)="dialog.close()">Cancel</button>
      </mat-dialog-actions>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FactsDialog {
  private readonly api = inject(JobsApi);
  private readonly job = inject<Job>(MAT_DIALOG_DATA);
  protected readonly dialog = inject<MatDialogRef<FactsDialog, Job>>(MatDialogRef);

  protected readonly form = jobForm(inject(NonNullableFormBuilder), editOf(this.job));
  protected readonly sending = new FormSending(this.form);
  private readonly version = signal(this.job.version);
  /** What is stored now, after somebody else saved first. */
  protected readonly theirs = computed(() => {
    const current = Job.safeParse(this.sending.problem()?.current);
    return current.success ? current.data : null;
  });

  protected async save(): Promise<void> {
    const saved = await this.sending.send(JobEdit, (edit) => firstValueFrom(this.api.edit(this.job.id, edit, this.version())));
    if (saved) this.dialog.close(saved);
  }

  protected keepMine(theirs: Job): void {
    this.version.set(theirs.version);
    void this.save();
  }

  protected takeTheirs(theirs: Job): void {
    this.version.set(theirs.version);
    this.form.reset(editOf(theirs));
    this.sending.problem.set(null);
    this.sending.refusal.set('');
  }
}
