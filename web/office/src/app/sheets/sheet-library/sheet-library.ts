import { ChangeDetectionStrategy, Component, computed, DestroyRef, effect, inject, input, untracked } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { Empty } from '#ui/empty';
import { FileDrop } from '#ui/file-drop';
import { PageHeader } from '#ui/page-header';
import { Access } from '../../contract/access';
import { PagedList } from '../../contract/paged-list';
import { SearchField } from '../../pieces/search-field';
import { Unready } from '../../pieces/unready';
import { ExportLinks } from '../../products/export-links';
import { SheetsApi, type RevisionState } from '../sheets-api';
import { SheetRows } from './sheet-rows';
import { SheetUploads } from '../uploads/sheet-uploads';
import { UploadList } from '../uploads/upload-list';

const pollMilliseconds = 2500;

/** Every safety data sheet: what waits for a person first, then what is being read, in use and set aside. */
@Component({
  selector: 'kb-sheet-library',
  imports: [Empty, ExportLinks, FileDrop, MatButton, PageHeader, RouterLink, SearchField, SheetRows, Unready, UploadList],
  templateUrl: './sheet-library.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SheetLibrary {
  private readonly api = inject(SheetsApi);
  private readonly router = inject(Router);
  private readonly access = inject(Access);
  protected readonly uploads = inject(SheetUploads);

  readonly q = input('', { transform: (value: string | undefined) => value ?? '' });

  protected readonly mayKeep = computed(() => this.access.may('listLibraryTasks'));
  protected readonly mayUpload = computed(() => this.access.may('uploadSheet'));
  private readonly listOf = (state: RevisionState) => new PagedList(this.q, (q: string, after) => this.api.list(state, q, after));
  private readonly toCheck = this.listOf('read');
  private readonly toEnter = this.listOf('needs-entry');
  private readonly beingRead = this.listOf('waiting');
  private readonly confirmed = this.listOf('confirmed');
  private readonly setAside = this.listOf('set-aside');
  protected readonly groups = [
    { heading: 'To check', list: this.toCheck },
    { heading: 'To enter by hand', list: this.toEnter },
    { heading: 'Being read', list: this.beingRead },
    { heading: 'Confirmed', list: this.confirmed },
    { heading: 'Set aside', list: this.setAside },
  ] as const;

  protected readonly isReady = computed(() => this.groups.every(({ list }) => list.status() === 'ready' || list.items().length > 0));
  protected readonly isEmpty = computed(() => this.groups.every(({ list }) => list.status() === 'ready' && list.items().length === 0));
  protected readonly problem = computed(() => this.groups.map(({ list }) => list.problem()).find((problem) => problem !== null) ?? null);
  protected readonly kicker = computed(() => {
    const waiting = this.toCheck.items().length + this.toEnter.items().length;
    const isMore = this.toCheck.next() !== null || this.toEnter.next() !== null;
    return waiting === 0 ? '' : `${waiting}${isMore ? ' or more' : ''} waiting for you`;
  });

  constructor() {
    const timer = setInterval(() => {
      if (this.uploads.isBusy() || this.beingRead.items().length > 0) this.lookAgain();
    }, pollMilliseconds);
    inject(DestroyRef).onDestroy(() => clearInterval(timer));
    // A file that has just been stored shows at once, not at the next look.
    effect(() => {
      const stored = this.uploads.uploads().filter(({ state }) => state === 'done').length;
      if (stored > 0) untracked(() => this.lookAgain());
    });
  }

  protected search(q: string): void {
    void this.router.navigate([], { queryParams: { q: q || null }, queryParamsHandling: 'merge', replaceUrl: true });
  }

  protected reload(): void {
    for (const { list } of this.groups) list.reload();
  }

  /** What leaves one state comes into another: those three are read afresh, the rest stays as it is. */
  private lookAgain(): void {
    for (const list of [this.beingRead, this.toCheck, this.toEnter]) list.refresh({ isWhole: true });
  }
}
