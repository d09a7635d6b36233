import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { Empty } from '#ui/empty';
import { FileDrop } from '#ui/file-drop';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { problemOf, problemWords } from '#ui/problem';
import { State, type StateKind } from '#ui/state';
import { Access } from '../../contract/access';
import { ImportApi, type Preview, type PreviewRow } from './import-api';

const rowsAtFirst = 100;
const outcomes: Readonly<Record<PreviewRow['outcome'], { readonly kind: StateKind; readonly words: string; readonly order: number }>> = {
  wrong: { kind: 'stop', words: 'not taken', order: 0 },
  new: { kind: 'done', words: 'new', order: 1 },
  known: { kind: 'plain', words: 'here already', order: 2 },
};

/** A product list from a spreadsheet: what is wrong is shown row by row before anything is added. */
@Component({
  selector: 'kb-import-page',
  imports: [Empty, FileDrop, MatButton, Note, PageHeader, RouterLink, State],
  templateUrl: './import-page.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ImportPage {
  private readonly api = inject(ImportApi);
  private readonly access = inject(Access);

  protected readonly mayImport = computed(() => this.access.may('importProducts'));
  protected readonly fileName = signal('');
  protected readonly preview = signal<Preview | null>(null);
  protected readonly refusal = signal('');
  protected readonly busyWords = signal('');
  protected readonly done = signal<{ readonly added: number; readonly known: number } | null>(null);
  private readonly isWhole = signal(false);
  protected readonly outcomes = outcomes;
  protected readonly rows = computed(() => [...(this.preview()?.rows ?? [])].sort((a, b) => outcomes[a.outcome].order - outcomes[b.outcome].order || a.row - b.row));
  protected readonly shown = computed(() => (this.isWhole() ? this.rows() : this.rows().slice(0, rowsAtFirst)));

  protected showAll(): void {
    this.isWhole.set(true);
  }

  protected async look([file]: readonly File[]): Promise<void> {
    if (!file) return;
    this.fileName.set(file.name);
    this.preview.set(null);
    this.done.set(null);
    this.isWhole.set(false);
    await this.work('Looking at the list …', async () => this.preview.set(await firstValueFrom(this.api.preview(file))));
  }

  protected async add(): Promise<void> {
    const products = this.rows()
      .filter(({ outcome }) => outcome === 'new')
      .map(({ name, supplier }) => ({ name, supplier }));
    await this.work('Adding the products …', async () => {
      this.done.set(await firstValueFrom(this.api.add(products)));
      this.preview.set(null);
    });
  }

  private async work(words: string, action: () => Promise<void>): Promise<void> {
    if (this.busyWords() !== '') return;
    this.busyWords.set(words);
    this.refusal.set('');
    try {
      await action();
    } catch (error) {
      const problem = problemOf(error);
      this.refusal.set([problemWords(problem), ...(problem.errors ?? []).map(({ message }) => message)].join(' '));
    } finally {
      this.busyWords.set('');
    }
  }
}
