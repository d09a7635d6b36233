import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { JobEdit } from '#shared/jobs';
import { PageHeader } from '#ui/page-header';
import { FormSending } from '../../pieces/form-sending';
import { FormTrouble } from '../../pieces/form-trouble';
import { JobsApi } from '../jobs-api';
import { emptyJob, jobForm } from './job-form';
import { JobFields } from './job-fields';

/** A new job. What nobody knows yet may stay open: the shift page says what it holds up. */
@Component({
  selector: 'kb-new-job',
  imports: [FormTrouble, JobFields, MatButton, PageHeader, ReactiveFormsModule, RouterLink],
  template: `
    <form class="kb-page" novalidate [formGroup]="form" (ngSubmit)="addJob()">
      <kb-page-header heading="New job" kicker="Jobs">
        <a matButton routerLink="/jobs">Cancel</a>
        <button matButton="filled" type="submit" [disabled]="sending.isSending()">Add job</button>
      </kb-page-header>
      <kb-form-trouble [words]="sending.refusal()" />
      <kb-job-fields [form]="form" />
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewJob {
  private readonly api = inject(JobsApi);
  private readonly router = inject(Router);

  protected readonly form = jobForm(inject(NonNullableFormBuilder), emptyJob);
  protected readonly sending = new FormSending(this.form);

  protected async addJob(): Promise<void> {
    const job = await this.sending.send(JobEdit, (request) => firstValueFrom(this.api.add(request)));
    if (job) await this.router.navigate(['/jobs', job.id]);
  }
}
