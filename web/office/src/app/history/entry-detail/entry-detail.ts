import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { type Acknowledgement } from '#shared/acknowledgements';
import { Note } from '#ui/note';
import { SignatureImage } from '#ui/signature-image';
import { State } from '#ui/state';
import { momentFull, momentShort } from '../../pieces/dates';
import { ExactTextDialog, type ExactTextQuestion } from '../exact-text-dialog';
import { HistoryApi } from '../history-api';
import { clockWords, howKind, howWords, kindNames, languageNames, shortHash } from '../history-words';
import { HowToCheckDialog } from '../record-result/how-to-check-dialog';

/** One acknowledgement in full: signature, times, meaning, exact text, and its place in the record. */
@Component({
  selector: 'kb-entry-detail',
  imports: [MatButton, Note, SignatureImage, State],
  templateUrl: './entry-detail.html',
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 0.9rem;
    }

    .proof {
      white-space: pre-line;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EntryDetail {
  private readonly api = inject(HistoryApi);
  private readonly dialogs = inject(MatDialog);

  readonly entry = input.required<Acknowledgement>();
  readonly closed = output<void>();

  protected readonly receiptHref = computed(() => this.api.receiptHref(this.entry().id));
  protected readonly subtitle = computed(() => {
    const { kind, language, versionNumber } = this.entry();
    return `${kindNames[kind]} in ${language === 'es' ? 'Spanish' : 'English'}, version ${versionNumber}`;
  });
  protected readonly index = computed(() => this.entry().entryIndex.toLocaleString('en-US'));
  protected readonly momentFull = momentFull;
  protected readonly momentShort = momentShort;
  protected readonly clockWords = clockWords;
  protected readonly howWords = howWords;
  protected readonly howKind = howKind;
  protected readonly shortHash = shortHash;

  protected readText(): void {
    const { versionId, language, textSha256, versionNumber } = this.entry();
    const data: ExactTextQuestion = { versionId, language, sha256: textSha256, heading: `The exact text, version ${versionNumber}, ${languageNames[language]}` };
    this.dialogs.open<ExactTextDialog, ExactTextQuestion>(ExactTextDialog, { data, width: '52rem', maxWidth: '96vw' });
  }

  protected explain(): void {
    this.dialogs.open(HowToCheckDialog, { width: '44rem', maxWidth: '96vw' });
  }
}
