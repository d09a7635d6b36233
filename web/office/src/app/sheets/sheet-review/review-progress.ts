import { computed, signal, type Signal } from '@angular/core';
import { type ReviewKey, type ReviewRow } from './review-rows';

/** Where a person is in the review: which line is open, which ones they have looked at, which one they change. */
export class ReviewProgress {
  readonly activeKey = signal<ReviewKey>('productName');
  readonly editingKey = signal<ReviewKey | null>(null);
  private readonly lookedAt = signal<ReadonlySet<ReviewKey>>(new Set());

  readonly pending = computed(() => this.rows().filter((row) => row.wantsLook && !this.lookedAt().has(row.key)));

  constructor(private readonly rows: Signal<readonly ReviewRow[]>) {}

  isLookedAt(key: ReviewKey): boolean {
    return this.lookedAt().has(key);
  }

  /** Opens the first line that wants a look, or the first line. */
  begin(): void {
    this.lookedAt.set(new Set());
    this.editingKey.set(null);
    this.activeKey.set(this.pending()[0]?.key ?? 'productName');
  }

  /** When more is known of the lines, and nobody has begun yet. */
  beginUnlessUnderWay(): void {
    if (this.lookedAt().size === 0 && this.editingKey() === null) this.begin();
  }

  move(by: 1 | -1): void {
    const rows = this.rows();
    const at = rows.findIndex(({ key }) => key === this.activeKey());
    const next = rows[Math.min(rows.length - 1, Math.max(0, at + by))];
    if (next) this.open(next.key);
  }

  open(key: ReviewKey): void {
    if (this.editingKey() !== key) this.editingKey.set(null);
    this.activeKey.set(key);
  }

  /** "Yes, matches": this line is done; on to the next one that wants a look, else to the next line. */
  matches(key: ReviewKey): void {
    this.lookedAt.update((keys) => new Set(keys).add(key));
    this.editingKey.set(null);
    const next = this.pending()[0];
    if (next) this.activeKey.set(next.key);
    else this.move(1);
  }

  change(key: ReviewKey): void {
    if (key === 'sections') return;
    this.activeKey.set(key);
    this.editingKey.set(key);
  }
}
