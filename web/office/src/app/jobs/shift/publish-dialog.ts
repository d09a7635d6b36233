import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogActions, MatDialogContent, MatDialogRef, MatDialogTitle } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { type TaskAnswer } from '#compliance/answer';
import { type Finding } from '#compliance/outcome';
import { type PublishedVersion } from '#shared/jobs';
import { problemOf, problemWords } from '#ui/problem';
import { State } from '#ui/state';
import { FormTrouble } from '../../pieces/form-trouble';
import { JobsApi } from '../jobs-api';
import { stateKinds } from './answer-rows';

export interface PublishQuestion {
  readonly shiftId: string;
  readonly version: number;
  readonly day: string;
  readonly nextNumber: number;
  readonly asked: readonly string[];
  /** How many had signed the version before. */
  readonly signedBefore: number;
  readonly held: readonly TaskAnswer[];
  /** Lines about the whole shift that hold work. */
  readonly holding: readonly Finding[];
  readonly label: string;
}

/** Says exactly what publishing does before it does it. Closes with the published version. */
@Component({
  selector: 'kb-publish-dialog',
  imports: [FormTrouble, MatButton, MatDialogActions, MatDialogContent, MatDialogTitle, State],
  template: `
    <h2 matDialogTitle>{{ question.nextNumber === 1 ? 'Publish the checklist' : 'Publish version ' + question.nextNumber }}</h2>
    <mat-dialog-content><div class="kb-stack">
      <kb-form-trouble [words]="refusal()" />
      <p>
        {{ question.day }}, version {{ question.nextNumber }}, in English and Spanish. It is frozen as it is signed.
        <b>{{ askedWords() }}</b>
      </p>
      @if (question.held.length > 0) {
        <div>
          <h3>Held, and shown to the crew as held</h3>
          <ul class="kb-rows" style="--kb-columns: 9rem minmax(0, 1fr)">
            @for (task of question.held; track task.taskId) {
              <li>
                <kb-state [kind]="kinds[task.state]">{{ task.label.en }}</kb-state>
                <span
                  ><b>{{ task.name.en }}.</b> {{ task.summary.en }}</span
                >
              </li>
            }
          </ul>
        </div>
      }
      @if (question.holding.length > 0) {
        <div>
          <h3>Open for the whole shift</h3>
          <ul class="kb-rows" style="--kb-columns: minmax(0, 1fr)">
            @for (line of question.holding; track line.id) {
              <li>{{ line.text.en }}</li>
            }
          </ul>
        </div>
      }
    </div></mat-dialog-content>
    <mat-dialog-actions align="start">
      <button type="button" matButton="filled" [disabled]="isSending()" (click)="publish()">{{ question.label }}</button>
      <button type="button" matButton (click)="dialog.close()">Not yet</button>
    </mat-dialog-actions>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PublishDialog {
  private readonly api = inject(JobsApi);
  protected readonly question = inject<PublishQuestion>(MAT_DIALOG_DATA);
  protected readonly dialog = inject<MatDialogRef<PublishDialog, PublishedVersion>>(MatDialogRef);

  protected readonly isSending = signal(false);
  protected readonly refusal = signal('');
  protected readonly kinds = stateKinds;

  protected askedWords(): string {
    const { asked, signedBefore, nextNumber } = this.question;
    const people = asked.length === 1 ? '1 person' : `${asked.length} people`;
    const again = nextNumber > 1 ? ` again; ${signedBefore} had signed version ${nextNumber - 1}` : '';
    return asked.length === 0 ? 'Nobody is on this shift yet, so nobody is asked to sign.' : `${people} will be asked to sign${again}.`;
  }

  protected async publish(): Promise<void> {
    if (this.isSending()) return;
    this.isSending.set(true);
    this.refusal.set('');
    try {
      this.dialog.close(await firstValueFrom(this.api.publish(this.question.shiftId, this.question.version)));
    } catch (error) {
      const problem = problemOf(error);
      this.refusal.set(problem.status === 412 ? 'Somebody changed this shift meanwhile. Close this, look at the lines again, then publish.' : problemWords(problem));
    } finally {
      this.isSending.set(false);
    }
  }
}
