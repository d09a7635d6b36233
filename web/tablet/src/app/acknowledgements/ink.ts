import { afterNextRender, ChangeDetectionStrategy, Component, DestroyRef, type ElementRef, inject, input, output, signal, viewChild } from '@angular/core';
import type SignaturePad from 'signature_pad';
import type * as z from 'zod';
import { type Strokes } from '#shared/acknowledgements';

export type Ink = z.infer<typeof Strokes>;

/** The signature box. What is drawn survives turning the tablet; ink takes the colour of the scheme, and no colour is kept. */
@Component({
  selector: 'kb-ink',
  template: `
    <canvas #canvas role="img" [attr.aria-label]="label()"></canvas>
    <span class="kb-quiet" aria-hidden="true">{{ hint() }}</span>
  `,
  styleUrl: './ink.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class InkBox {
  readonly label = input.required<string>();
  readonly hint = input.required<string>();
  /** Whether there is any ink. */
  readonly drawn = output<boolean>();
  /** The drawing code could not be loaded. */
  readonly failed = output<void>();

  private readonly canvas = viewChild.required<ElementRef<HTMLCanvasElement>>('canvas');
  private readonly destroyRef = inject(DestroyRef);
  private readonly pad = signal<SignaturePad | null>(null);
  private width = 0;
  private height = 0;

  constructor() {
    afterNextRender(() => void this.start());
  }

  /** Point groups in CSS pixels of the box, times in milliseconds, as captured. */
  strokes(): Ink {
    const groups = this.pad()?.toData() ?? [];
    return groups.map(({ points }) => ({
      points: points.map(({ x, y, time, pressure }) => ({ x: round(x), y: round(y), time: Math.round(time), pressure: round(pressure) })),
    }));
  }

  clear(): void {
    this.pad()?.clear();
    this.drawn.emit(false);
  }

  private async start(): Promise<void> {
    const canvas = this.canvas().nativeElement;
    try {
      const { default: Pad } = await import('signature_pad');
      const pad = new Pad(canvas, { minWidth: 1.2, maxWidth: 3.4, penColor: inkColor(canvas) });
      pad.addEventListener('endStroke', () => this.drawn.emit(!pad.isEmpty()));
      this.pad.set(pad);
    } catch (error) {
      console.error(error);
      this.failed.emit();
      return;
    }
    const resized = new ResizeObserver(() => this.fit());
    resized.observe(canvas);
    const dark = matchMedia('(prefers-color-scheme: dark)');
    const recolour = (): void => this.redraw(1);
    dark.addEventListener('change', recolour);
    this.destroyRef.onDestroy(() => {
      this.pad()?.off();
      resized.disconnect();
      dark.removeEventListener('change', recolour);
    });
    this.fit();
  }

  /** A canvas forgets its picture when resized: draw it again, smaller if the box became smaller. */
  private fit(): void {
    const canvas = this.canvas().nativeElement;
    const { width, height } = canvas.getBoundingClientRect();
    if (width === 0 || height === 0 || (width === this.width && height === this.height)) return;
    const scale = this.width > 0 ? Math.min(1, width / this.width, height / this.height) : 1;
    this.width = width;
    this.height = height;
    const ratio = Math.max(devicePixelRatio, 1);
    canvas.width = Math.round(width * ratio);
    canvas.height = Math.round(height * ratio);
    canvas.getContext('2d')?.scale(ratio, ratio);
    this.redraw(scale);
  }

  private redraw(scale: number): void {
    const pad = this.pad();
    if (!pad) return;
    pad.penColor = inkColor(this.canvas().nativeElement);
    const groups = pad.toData().map((group) => ({ ...group, penColor: pad.penColor, points: group.points.map((point) => ({ ...point, x: point.x * scale, y: point.y * scale })) }));
    pad.fromData(groups);
  }
}

function inkColor(canvas: HTMLCanvasElement): string {
  return getComputedStyle(canvas).color;
}

/** A hundredth of a pixel is finer than any finger. */
function round(value: number): number {
  return Math.round(value * 100) / 100;
}
