import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { type Problem } from '#shared/common';
import { type Shift } from '#shared/jobs';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { ContractClient } from '../../contract/contract-client';
import { readExactText, type ExactText } from '../../history/exact-text';
import { languageNames } from '../../history/history-words';
import { dayName } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { JobsApi } from '../jobs-api';
import { PaperList } from './paper-list';

const noSuchVersion: Problem = { type: 'about:blank', title: 'No such version', status: 404, detail: 'This shift has no published list of that number. Look at the shift.' };

/** A published version as a list to print, tick and sign by hand; in English or Spanish (`?language=es`). */
@Component({
  selector: 'kb-paper-page',
  imports: [MatButton, Note, PageHeader, PaperList, RouterLink, Unready],
  templateUrl: './paper-page.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PaperPage {
  private readonly api = inject(JobsApi);
  private readonly client = inject(ContractClient);

  readonly jobId = input.required<string>();
  readonly shiftId = input.required<string>();
  readonly versionId = input.required<string>();
  readonly language = input<string>();

  protected readonly shift = signal<Shift | null>(null);
  protected readonly text = signal<ExactText | null>(null);
  protected readonly error = signal<unknown>(null);

  protected readonly version = computed(() => this.shift()?.versions.find(({ id }) => id === this.versionId()) ?? null);
  protected readonly newest = computed(() => [...(this.shift()?.versions ?? [])].sort((a, b) => b.number - a.number)[0] ?? null);
  protected readonly isOld = computed(() => this.newest()?.id !== this.versionId());
  protected readonly chosen = computed(() => {
    const texts = this.version()?.texts ?? [];
    return texts.find(({ language }) => language === this.language()) ?? texts[0] ?? null;
  });
  /** Bytes that hash to what is on record, or cannot be hashed here. */
  protected readonly isOnRecord = computed(() => {
    const text = this.text();
    return text?.checklist != null && (text.sha256 === null || text.sha256 === this.chosen()?.sha256);
  });
  protected readonly kicker = computed(() => {
    const [shift, version] = [this.shift(), this.version()];
    return shift && version ? `${shift.job.name} · ${dayName(shift.date)} · version ${version.number}` : '';
  });
  protected readonly address = computed(() => `${location.origin}/jobs/${this.jobId()}/shifts/${this.shiftId()}/paper/${this.versionId()}?language=${this.chosen()?.language ?? 'en'}`);
  protected readonly languageNames = languageNames;

  constructor() {
    effect(() => {
      this.shiftId();
      this.versionId();
      this.language();
      untracked(() => void this.load());
    });
  }

  protected async load(): Promise<void> {
    this.error.set(null);
    this.text.set(null);
    try {
      this.shift.set(await firstValueFrom(this.api.shift(this.shiftId())));
      const chosen = this.chosen();
      if (!chosen) this.error.set(noSuchVersion);
      else this.text.set(await readExactText(this.client, this.versionId(), chosen.language));
    } catch (error) {
      this.error.set(error);
    }
  }

  protected print(): void {
    window.print();
  }
}
