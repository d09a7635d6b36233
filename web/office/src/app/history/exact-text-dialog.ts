import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogActions, MatDialogContent, MatDialogRef, MatDialogTitle } from '@angular/material/dialog';
import { Note } from '#ui/note';
import { ContractClient } from '../contract/contract-client';
import { Unready } from '../pieces/unready';
import { readExactText, type ExactText } from './exact-text';
import { SignedText } from './signed-text';

export interface ExactTextQuestion {
  readonly versionId: string;
  readonly language: 'en' | 'es';
  /** What the record says the bytes hash to. */
  readonly sha256: string;
  readonly heading: string;
}

/** The very bytes that were signed: read as text, hashed in this browser, compared with the record. */
@Component({
  selector: 'kb-exact-text-dialog',
  imports: [MatButton, MatDialogActions, MatDialogContent, MatDialogTitle, Note, SignedText, Unready],
  template: `
    <h2 matDialogTitle>{{ question.heading }}</h2>
    <mat-dialog-content><div class="kb-stack">
      @if (read(); as read) {
        @if (read.sha256 === null) {
          <kb-note kind="caution">This browser hashes only over https or on this machine. Save the bytes and use sha256sum.</kb-note>
        } @else if (read.sha256 === question.sha256) {
          <kb-note kind="done"><b>These are the bytes on record.</b> Their SHA-256, computed here, is the one that was signed.</kb-note>
        } @else {
          <kb-note kind="stop" [announce]="true"><b>These are not the bytes on record.</b> Their SHA-256 differs from the one that was signed. Tell the owner.</kb-note>
        }
        <p class="kb-hash">sha256 {{ question.sha256 }}<br />{{ read.byteLength.toLocaleString('en-US') }} bytes, UTF-8</p>
        <p>
          <button type="button" class="kb-link" [attr.aria-pressed]="isRaw()" (click)="isRaw.set(!isRaw())">{{ isRaw() ? 'Show as it reads' : 'Show the bytes as they are' }}</button>
        </p>
        <div class="text" tabindex="0" role="document" aria-label="The exact text" [class.raw]="isRaw() || !read.checklist" [attr.lang]="question.language">
          @if (read.checklist && !isRaw()) {
            <kb-signed-text [text]="read.checklist" />
          } @else {
            {{ read.text }}
          }
        </div>
      } @else {
        <kb-unready what="the text" [error]="error()" (retry)="load()" />
      }
    </div></mat-dialog-content>
    <mat-dialog-actions align="start">
      <button type="button" matButton="filled" (click)="dialog.close()">Close</button>
      <a matButton [href]="href" [download]="'text-' + question.sha256.slice(0, 12) + '.txt'">Save the bytes</a>
    </mat-dialog-actions>
  `,
  styles: `
    .text {
      border-top: var(--kb-strip);
      border-bottom: var(--kb-strip);
      padding: 1rem 0;
    }

    .raw {
      white-space: pre-wrap;
      font: 500 0.8125rem / 1.5 var(--kb-mono);
      overflow-wrap: anywhere;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ExactTextDialog {
  private readonly client = inject(ContractClient);
  protected readonly question = inject<ExactTextQuestion>(MAT_DIALOG_DATA);
  protected readonly dialog = inject<MatDialogRef<ExactTextDialog>>(MatDialogRef);

  protected readonly read = signal<ExactText | null>(null);
  protected readonly error = signal<unknown>(null);
  protected readonly isRaw = signal(false);
  private readonly params = { versionId: this.question.versionId, language: this.question.language };
  protected readonly href = this.client.hrefOf('readText', this.params);

  constructor() {
    void this.load();
  }

  protected async load(): Promise<void> {
    this.error.set(null);
    try {
      this.read.set(await readExactText(this.client, this.question.versionId, this.question.language));
    } catch (error) {
      this.error.set(error);
    }
  }
}
