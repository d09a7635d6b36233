import { ChangeDetectionStrategy, Component, computed, effect, inject, input, output, signal, untracked } from '@angular/core';
import { type SitePage } from '#shared/library';
import { Empty } from '#ui/empty';
import { PageViewer } from '#ui/page-viewer/page-viewer';
import { ReaderLanguage } from '../reader-language';
import { SiteVisit } from './site-visit';
import { siteWords } from './site-words';

/** One sheet of the job, shown on the page itself: a phone's own viewer could not send the code's secret. */
@Component({
  selector: 'kb-site-sheet',
  imports: [Empty, PageViewer],
  template: `
    <div class="kb-actions kb-no-print"><button type="button" class="kb-button outlined" (click)="closed.emit()">← {{ words().back }}</button></div>
    <h1 class="name">{{ sheet().productName }}</h1>
    @if (bytes(); as bytes) {
      @defer (on immediate) {
        <kb-page-viewer [source]="bytes" [name]="sheet().productName" [language]="language()"><button type="button" class="kb-button text" (click)="save(bytes)">{{ words().save }}</button></kb-page-viewer>
      } @placeholder {
        <kb-empty state="loading" [heading]="words().openingSheet" />
      }
      <div class="kb-actions kb-no-print"><button type="button" class="kb-button text" (click)="save(bytes)">{{ words().save }}</button></div>
    } @else if (hasFailed()) {
      <kb-empty state="offline" [heading]="words().sheetFailed" [detail]="words().sheetFailedNext" [retryLabel]="words().again" (retry)="load()" />
    } @else {
      <kb-empty state="loading" [heading]="words().openingSheet" />
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 0.75rem;
    }

    .name {
      font-size: 1.25rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SiteSheet {
  private readonly visit = inject(SiteVisit);
  protected readonly language = inject(ReaderLanguage).language;

  readonly sheet = input.required<SitePage['sheets'][number]>();
  readonly closed = output<void>();

  protected readonly words = computed(() => siteWords[this.language()]);
  protected readonly bytes = signal<ArrayBuffer | null>(null);
  protected readonly hasFailed = signal(false);

  constructor() {
    effect(() => {
      this.sheet();
      untracked(() => void this.load());
    });
  }

  protected async load(): Promise<void> {
    const { revisionId } = this.sheet();
    this.hasFailed.set(false);
    this.bytes.set(null);
    try {
      const bytes = await this.visit.sheet(revisionId);
      if (this.sheet().revisionId === revisionId) this.bytes.set(bytes);
    } catch {
      this.hasFailed.set(true);
    }
  }

  protected save(bytes: ArrayBuffer): void {
    const link = document.createElement('a');
    link.href = URL.createObjectURL(new Blob([bytes], { type: 'application/pdf' }));
    link.download = `${this.sheet().productName}.pdf`;
    link.click();
    // After the browser has taken it.
    setTimeout(() => URL.revokeObjectURL(link.href), 10_000);
  }
}
