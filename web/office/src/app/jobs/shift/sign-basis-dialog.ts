import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogActions, MatDialogContent, MatDialogRef, MatDialogTitle } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { type TaskKind } from '#compliance/facts';
import { SignBasis, type Shift } from '#shared/jobs';
import { ChoiceField, type Choice } from '../../pieces/fields/choice-field';
import { NumberField } from '../../pieces/fields/number-field';
import { TextField } from '../../pieces/fields/text-field';
import { FormSending } from '../../pieces/form-sending';
import { FormTrouble } from '../../pieces/form-trouble';
import { SessionApi } from '../../session/session-api';
import { JobsApi } from '../jobs-api';

export interface BasisQuestion {
  readonly shiftId: string;
  readonly date: string;
  readonly taskKind: TaskKind;
  readonly taskName: string;
}

const kinds: readonly Choice<SignBasis['kind']>[] = [
  { value: 'objective-data', label: 'objective data for this kind of work' },
  { value: 'air-samples', label: 'air samples of our own' },
  { value: 'below-action-level', label: 'below the action level under any foreseeable condition' },
  { value: 'sampling-day', label: 'a sampling day: this shift is measured' },
];

/** A named, qualified person decides the exposure of a kind of work. Closes with the shift as it then stands. */
@Component({
  selector: 'kb-sign-basis-dialog',
  imports: [ChoiceField, FormTrouble, MatButton, MatDialogActions, MatDialogContent, MatDialogTitle, NumberField, ReactiveFormsModule, TextField],
  template: `
    <form novalidate [formGroup]="form" (ngSubmit)="sign()">
      <h2 matDialogTitle>Decide the exposure of {{ question.taskName.toLowerCase() }}</h2>
      <mat-dialog-content><div class="kb-stack">
        <p class="kb-quiet">The program decides nothing here. Your name stands under this basis, and it opens the task while its conditions hold.</p>
        <kb-form-trouble [words]="sending.refusal()" />
        <kb-choice-field label="Basis" formControlName="kind" [choices]="kinds" />
        @if (isSamplingDay()) {
          <kb-number-field label="Interim protection (APF)" formControlName="interimApf" hint="assigned protection factor the crew wears while it is measured: 10, 25, 50 …" />
        } @else {
          <kb-number-field label="8-hour average" unit="µg/m³" formControlName="exposureMicrogramsPerM3" hint="respirable crystalline silica without a respirator, as 8-hour average" />
        }
        <kb-text-field label="Conditions" formControlName="conditions" [lines]="3" hint="setting, machine, collector, hours: under which this holds" />
        <kb-text-field label="Ends on" kind="date" formControlName="endsOn" [min]="question.date" [hint]="isSamplingDay() ? 'a sampling day is good for the day of the shift only' : ''" />
        <kb-text-field label="Your name, as your signature" formControlName="typedName" [hint]="'write ' + name() + ' to sign'" />
      </div></mat-dialog-content>
      <mat-dialog-actions align="start">
        <button matButton="filled" type="submit" [disabled]="sending.isSending()">Sign this basis</button>
        <button matButton type="button" (click)="dialog.close()">Cancel</button>
      </mat-dialog-actions>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignBasisDialog {
  private readonly api = inject(JobsApi);
  private readonly session = inject(SessionApi).session;
  protected readonly question = inject<BasisQuestion>(MAT_DIALOG_DATA);
  protected readonly dialog = inject<MatDialogRef<SignBasisDialog, Shift>>(MatDialogRef);

  private readonly builder = inject(NonNullableFormBuilder);
  protected readonly form = this.builder.group({
    taskKind: this.builder.control(this.question.taskKind),
    kind: this.builder.control<SignBasis['kind']>('objective-data'),
    exposureMicrogramsPerM3: this.builder.control<number | null>(null),
    conditions: this.builder.control(''),
    endsOn: this.builder.control(this.question.date),
    interimApf: this.builder.control<number | null>(null),
    typedName: this.builder.control(''),
  });
  protected readonly sending = new FormSending(this.form);
  protected readonly kinds = kinds;
  private readonly kind = toSignal(this.form.controls.kind.valueChanges, { initialValue: this.form.controls.kind.value });
  protected readonly isSamplingDay = computed(() => this.kind() === 'sampling-day');
  protected readonly name = computed(() => this.session()?.person.name ?? 'your full name');

  protected async sign(): Promise<void> {
    this.clearHidden();
    const shift = await this.sending.send(SignBasis, (basis) => firstValueFrom(this.api.signBasis(this.question.shiftId, basis)));
    if (shift) this.dialog.close(shift);
  }

  /** A figure typed before the kind was changed must not be signed unseen. */
  private clearHidden(): void {
    if (this.isSamplingDay()) this.form.controls.exposureMicrogramsPerM3.setValue(null);
    else this.form.controls.interimApf.setValue(null);
  }
}
