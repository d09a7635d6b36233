import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { firstValueFrom, type Observable } from 'rxjs';
import { type SiteCode } from '#shared/library';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { problemOf, problemWords } from '#ui/problem';
import { State } from '#ui/state';
import { Access } from '../../contract/access';
import { Confirmation } from '../../pieces/confirmation';
import { dayOf, localDateOf, momentShort } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { SessionApi } from '../../session/session-api';
import { JobsApi } from '../jobs-api';
import { SiteCodeApi } from './site-code-api';
import { SiteCodeSheet } from './site-code-sheet';

/** Makes, replaces and revokes the printed code of a job, and shows the page to print while its address is known. */
@Component({
  selector: 'kb-site-code-page',
  imports: [MatButton, Note, PageHeader, RouterLink, SiteCodeSheet, State, Unready],
  templateUrl: './site-code-page.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SiteCodePage {
  private readonly api = inject(SiteCodeApi);
  private readonly confirmation = inject(Confirmation);
  private readonly access = inject(Access);
  private readonly session = inject(SessionApi).session;

  readonly jobId = input.required<string>();

  protected readonly job = inject(JobsApi).jobResource(this.jobId);
  private readonly stored = this.api.codeResource(this.jobId);
  /** What was just done here counts before what was read; only that knows the address. */
  private readonly done = linkedSignal<string, SiteCode | null>({ source: this.jobId, computation: () => null });
  protected readonly code = computed(() => this.done() ?? (this.stored.hasValue() ? this.stored.value() : null));
  protected readonly error = computed(() => this.job.error() ?? (this.code() ? undefined : this.stored.error()));
  protected readonly mayMake = computed(() => this.access.may('makeSiteCode'));
  protected readonly organisationName = computed(() => this.session()?.organisation.name ?? '');
  protected readonly madeWords = computed(() => {
    const code = this.code();
    return code?.madeAt ? `${momentShort(code.madeAt)} by ${code.madeBy ?? 'somebody'}` : '';
  });
  protected readonly madeOn = computed(() => dayOf(localDateOf(this.code()?.madeAt ?? new Date())));
  protected readonly isSending = signal(false);
  protected readonly refusal = signal('');

  protected reload(): void {
    this.job.reload();
    this.stored.reload();
  }

  protected async make(isOn: boolean): Promise<void> {
    const isSure = !isOn || (await this.confirmation.ask({ heading: 'Replace the code', text: 'Every paper with the present code stops working at once; phones drop what they kept of it at their next contact. Print the new one and hang it in the same places.', action: 'Replace the code', isDanger: true }));
    if (isSure) await this.send(this.api.make(this.jobId()));
  }

  protected async revoke(): Promise<void> {
    if (await this.confirmation.ask({ heading: 'Revoke the code', text: "Every paper with this code stops working at once; phones drop what they kept of it at their next contact. The crew then has the lead's tablet and the binder.", action: 'Revoke the code', isDanger: true })) await this.send(this.api.revoke(this.jobId()));
  }

  protected print(): void {
    window.print();
  }

  private async send(request: Observable<SiteCode>): Promise<void> {
    if (this.isSending()) return;
    this.isSending.set(true);
    this.refusal.set('');
    try {
      this.done.set(await firstValueFrom(request));
    } catch (error) {
      this.refusal.set(problemWords(problemOf(error)));
    } finally {
      this.isSending.set(false);
    }
  }
}
