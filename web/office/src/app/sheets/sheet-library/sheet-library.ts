import { ChangeDetectionStrategy, Component, computed, DestroyRef, effect, ElementRef, inject, input, signal, untracked } from '@angular/core';
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
import { walkResults } from '../search/result-keys';
import { type SheetSearch } from '../search/search-api';
import { SearchResults } from '../search/search-results';
import { knownChoice } from '../search/search-words';
import { SheetsApi, type RevisionState } from '../sheets-api';
import { SheetRows } from './sheet-rows';
import { SheetUploads } from '../uploads/sheet-uploads';
import { UploadList } from '../uploads/upload-list';

const pollMilliseconds = 2500;

/** Every safety data sheet: what waits for a person first, then what is being read, in use and set aside. */
@Component({
  selector: 'kb-sheet-library',
  imports: [Empty, ExportLinks, FileDrop, MatButton, PageHeader, RouterLink, SearchField, SearchResults, SheetRows, Unready, UploadList],
  templateUrl: './sheet-library.html',
  host: { '(keydown)': 'walk($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SheetLibrary {
  private readonly api = inject(SheetsApi);
  private readonly router = inject(Router);
  private readonly access = inject(Access);
  protected readonly uploads = inject(SheetUploads);

  private readonly page = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  // From the address, so that a search can be sent to somebody or come back to.
  readonly q = input('', { transform: (value: string | undefined) => value?.trim().slice(0, 100) ?? '' });
  readonly state = input('', { transform: (value: string | undefined) => knownChoice('state', value) });
  readonly language = input('', { transform: (value: string | undefined) => knownChoice('language', value) });
  readonly signalWord = input('', { transform: (value: string | undefined) => knownChoice('signalWord', value) });
  readonly isInUse = input('', { transform: (value: string | undefined) => knownChoice('isInUse', value) });
  protected readonly search = computed(() => ({ q: this.q(), state: this.state() || undefined, language: this.language() || undefined, signalWord: this.signalWord() || undefined, isInUse: this.isInUse() || undefined }) as SheetSearch);

  protected readonly mayKeep = computed(() => this.access.may('listLibraryTasks'));
  protected readonly mayUpload = computed(() => this.access.may('uploadSheet'));
  private readonly listOf = (state: RevisionState) => new PagedList(signal(''), (q: string, after) => this.api.list(state, q, after));
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

  /** Into the address; the last search is one step back, not each letter of it. */
  protected look(changes: Readonly<Record<string, string | null>>): void {
    void this.router.navigate([], { queryParams: changes, queryParamsHandling: 'merge', replaceUrl: this.q() !== '' });
  }

  protected walk(event: KeyboardEvent): void {
    walkResults(this.page, event);
  }

  protected reload(): void {
    for (const { list } of this.groups) list.reload();
  }

  /** What leaves one state comes into another: those three are read afresh, the rest stays as it is. */
  protected lookAgain(): void {
    for (const list of [this.beingRead, this.toCheck, this.toEnter]) list.refresh({ isWhole: true });
  }
}
