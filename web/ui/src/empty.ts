import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';

export type EmptyState = 'empty' | 'loading' | 'error' | 'offline';

/**
 * What stands where a list would: nothing yet, loading, failed or offline, each with the next step.
 * The content is the next step (a link or button); `retryLabel` adds a button that emits `retry`.
 */
@Component({
  selector: 'kb-empty',
  template: `
    @if (state() === 'loading') {
      <div class="bar" aria-hidden="true"></div>
    }
    <p class="heading">{{ heading() }}</p>
    @if (detail()) {
      <p class="kb-quiet">{{ detail() }}</p>
    }
    <div class="kb-actions">
      @if (retryLabel()) {
        <button type="button" class="kb-button outlined small" (click)="retry.emit()">{{ retryLabel() }}</button>
      }
      <ng-content />
    </div>
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 0.5rem;
      padding: 1.5rem 0;
      max-width: 40rem;
    }

    .heading {
      font-weight: 600;
      font-size: var(--kb-h2);
    }

    .kb-actions:empty {
      display: none;
    }

    .bar {
      height: 3px;
      width: 8rem;
      background: linear-gradient(90deg, var(--kb-brass-line) 0 33%, transparent 33%) 0 0 / 150% 100%;
      animation: pass 1.6s linear infinite;
    }

    @keyframes pass {
      from {
        background-position: 150% 0;
      }
      to {
        background-position: -150% 0;
      }
    }
  `,
  host: { '[attr.role]': 'role()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Empty {
  readonly heading = input.required<string>();
  readonly state = input<EmptyState>('empty');
  readonly detail = input('');
  readonly retryLabel = input('');
  readonly retry = output<void>();

  protected readonly role = computed(() => {
    if (this.state() === 'empty') return null;
    return this.state() === 'error' ? 'alert' : 'status';
  });
}
