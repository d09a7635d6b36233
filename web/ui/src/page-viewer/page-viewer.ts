import { ChangeDetectionStrategy, Component, DestroyRef, type ElementRef, afterNextRender, computed, effect, inject, input, linkedSignal, signal, viewChild } from '@angular/core';
import { type Language } from '#compliance/outcome';
import { Empty } from '../empty';
import { type Pdf, openPdf, pageText } from './open-pdf';
import { PAGE_VIEWER_WORDS } from './page-viewer-words';

/** A place on a page: page from 1, box in PDF points from the page's top left corner. */
export interface PagePlace {
  readonly page: number;
  readonly box: { readonly x: number; readonly y: number; readonly width: number; readonly height: number } | null;
}

const ZOOMS = [0.5, 0.75, 1, 1.5, 2, 3] as const;

/**
 * One page of a PDF at a time, with a place on it marked. Use inside `@defer (on immediate)`: a busy machine has no idle moment
 * to wait for. The PDF library itself is fetched on first use.
 * The content stands beside the error as the way out, for example a link to the file.
 */
@Component({
  selector: 'kb-page-viewer',
  imports: [Empty],
  templateUrl: './page-viewer.html',
  styleUrl: './page-viewer.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PageViewer {
  private readonly canvas = viewChild<ElementRef<HTMLCanvasElement>>('canvas');
  private readonly desk = viewChild.required<ElementRef<HTMLElement>>('desk');

  /** Address of the file, or its bytes. */
  readonly source = input.required<string | ArrayBuffer>();
  /** What the file is, for those who hear it: "Quarrybond 40, part C". */
  readonly name = input.required<string>();
  /** Marked and brought into sight whenever it changes. */
  readonly place = input<PagePlace | null>(null);
  readonly language = input<Language>('en');

  protected readonly words = computed(() => PAGE_VIEWER_WORDS[this.language()]);
  protected readonly pdf = signal<Pdf | null>(null);
  protected readonly hasFailed = signal(false);
  protected readonly pageCount = computed(() => this.pdf()?.numPages ?? 0);
  protected readonly page = linkedSignal(() => this.place()?.page ?? 1);
  /** Scale against paper size; null fits the width. */
  protected readonly zoom = signal<number | null>(null);
  protected readonly isTextShown = signal(false);
  protected readonly text = signal<readonly string[]>([]);
  protected readonly size = signal<{ readonly width: number; readonly height: number } | null>(null);
  protected readonly mark = computed(() => {
    const place = this.place();
    const size = this.size();
    if (!place?.box || !size || place.page !== this.page()) return null;
    const { x, y, width, height } = place.box;
    // A little air around the words, or the mark hides their edges.
    const air = 3;
    return { left: ((x - air) / size.width) * 100, top: ((y - air) / size.height) * 100, width: ((width + 2 * air) / size.width) * 100, height: ((height + 2 * air) / size.height) * 100 };
  });

  private readonly deskWidth = signal(0);
  private readonly attempt = signal(0);

  constructor() {
    const destroyRef = inject(DestroyRef);
    afterNextRender(() => {
      const desk = this.desk().nativeElement;
      this.deskWidth.set(desk.clientWidth);
      if (typeof ResizeObserver === 'undefined') return;
      const observer = new ResizeObserver(() => this.deskWidth.set(desk.clientWidth));
      observer.observe(desk);
      destroyRef.onDestroy(() => observer.disconnect());
    });
    effect((onCleanup) => {
      const source = this.source();
      this.attempt();
      let close: (() => void) | undefined;
      let isGone = false;
      onCleanup(() => {
        isGone = true;
        close?.();
      });
      this.pdf.set(null);
      this.hasFailed.set(false);
      openPdf(source).then(
        (opened) => {
          close = opened.close;
          if (isGone) close();
          else this.pdf.set(opened.pdf);
        },
        () => !isGone && this.hasFailed.set(true),
      );
    });
    effect((onCleanup) => this.draw(onCleanup));
    effect(() => this.bringIntoSight());
  }

  protected turn(by: number): void {
    this.page.update((page) => Math.min(this.pageCount(), Math.max(1, page + by)));
    this.desk().nativeElement.scrollTop = 0;
  }

  protected goTo(input: HTMLInputElement): void {
    const wanted = Math.round(Number(input.value));
    if (Number.isFinite(wanted) && wanted >= 1 && wanted <= this.pageCount()) this.page.set(wanted);
    input.value = String(this.page());
  }

  protected zoomBy(direction: 1 | -1): void {
    const size = this.size();
    const now = this.zoom() ?? (size ? this.fitScale(size.width) : 1);
    const next = direction === 1 ? ZOOMS.find((zoom) => zoom > now + 0.01) : ZOOMS.findLast((zoom) => zoom < now - 0.01);
    if (next !== undefined) this.zoom.set(next);
  }

  protected fitWidth(): void {
    this.zoom.set(null);
  }

  protected toggleText(): void {
    this.isTextShown.update((isShown) => !isShown);
  }

  protected tryAgain(): void {
    this.attempt.update((count) => count + 1);
  }

  private fitScale(pageWidth: number): number {
    return Math.max(0.2, (this.deskWidth() - 2) / pageWidth);
  }

  private draw(onCleanup: (cleanup: () => void) => void): void {
    const pdf = this.pdf();
    const canvas = this.canvas()?.nativeElement;
    const pageNumber = this.page();
    const zoom = this.zoom();
    const deskWidth = this.deskWidth();
    if (!pdf || !canvas || pageNumber > pdf.numPages || (zoom === null && deskWidth === 0)) return;
    let cancel: (() => void) | undefined;
    let isGone = false;
    onCleanup(() => {
      isGone = true;
      cancel?.();
    });
    const run = async (): Promise<void> => {
      const page = await pdf.getPage(pageNumber);
      if (isGone) return;
      const paper = page.getViewport({ scale: 1 });
      this.size.set({ width: paper.width, height: paper.height });
      const scale = zoom ?? this.fitScale(paper.width);
      const pixels = page.getViewport({ scale: scale * Math.min(window.devicePixelRatio || 1, 2) });
      canvas.width = Math.floor(pixels.width);
      canvas.height = Math.floor(pixels.height);
      canvas.style.width = `${paper.width * scale}px`;
      canvas.style.height = `${paper.height * scale}px`;
      const task = page.render({ canvas, viewport: pixels });
      cancel = () => task.cancel();
      await task.promise;
      const lines = await pageText(pdf, pageNumber);
      if (!isGone) this.text.set(lines);
    };
    run().catch(() => !isGone && this.hasFailed.set(true));
  }

  private bringIntoSight(): void {
    const mark = this.mark();
    const size = this.size();
    const desk = this.desk().nativeElement;
    if (!mark || !size) return;
    const scale = this.zoom() ?? this.fitScale(size.width);
    desk.scrollTop = Math.max(0, ((mark.top + mark.height / 2) / 100) * size.height * scale - desk.clientHeight / 2);
    desk.scrollLeft = Math.max(0, ((mark.left + mark.width / 2) / 100) * size.width * scale - desk.clientWidth / 2);
  }
}
