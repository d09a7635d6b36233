import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** Point groups as signature_pad's `toData()` gives them; only places matter here. */
export type SignatureStrokes = readonly { readonly points: readonly { readonly x: number; readonly y: number }[] }[];

/** A stored signature, redrawn from its strokes: never a picture file, always the data that was signed. */
@Component({
  selector: 'kb-signature-image',
  template: `
    @if (viewBox(); as box) {
      <svg role="img" [attr.aria-label]="label()" [attr.viewBox]="box">
        @for (path of paths(); track $index) {
          <path [attr.d]="path" />
        }
      </svg>
    } @else {
      <span class="kb-quiet">{{ emptyWords() }}</span>
    }
  `,
  styles: `
    :host {
      display: grid;
      place-items: center;
      min-height: 5rem;
      padding: 8px;
      background: var(--kb-ground-2);
    }

    svg {
      width: 100%;
      height: var(--kb-signature-height, 4.5rem);
    }

    path {
      fill: none;
      stroke: var(--kb-ink);
      stroke-width: 2.2;
      stroke-linecap: round;
      stroke-linejoin: round;
      vector-effect: non-scaling-stroke;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignatureImage {
  readonly strokes = input.required<SignatureStrokes>();
  /** "Signature of Marisol Tena". */
  readonly label = input('Signature');
  readonly emptyWords = input('No strokes were stored.');

  protected readonly paths = computed(() => this.strokes().flatMap(({ points }) => (points.length === 0 ? [] : [pathOf(points)])));

  protected readonly viewBox = computed(() => {
    const points = this.strokes().flatMap((stroke) => stroke.points);
    if (points.length === 0) return null;
    // A loop, not Math.min(...): a signature may hold more points than a call may hold arguments.
    let [left, top, right, bottom] = [Infinity, Infinity, -Infinity, -Infinity];
    for (const { x, y } of points) {
      left = Math.min(left, x);
      right = Math.max(right, x);
      top = Math.min(top, y);
      bottom = Math.max(bottom, y);
    }
    const air = 6;
    return `${round(left - air)} ${round(top - air)} ${round(right - left + 2 * air)} ${round(bottom - top + 2 * air)}`;
  });
}

/** A curve through the middles between points, so that the line has no corners; one point is a dot. */
function pathOf(points: SignatureStrokes[number]['points']): string {
  const [first, ...rest] = points;
  if (!first) return '';
  const last = rest.at(-1);
  if (!last) return `M${round(first.x)} ${round(first.y)}h.01`;
  const curves = rest.slice(0, -1).map((point, index) => {
    const next = rest[index + 1] ?? point;
    return `Q${round(point.x)} ${round(point.y)} ${round((point.x + next.x) / 2)} ${round((point.y + next.y) / 2)}`;
  });
  return `M${round(first.x)} ${round(first.y)}${curves.join('')}L${round(last.x)} ${round(last.y)}`;
}

function round(value: number): number {
  return Math.round(value * 10) / 10;
}
