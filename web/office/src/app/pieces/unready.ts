import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { Problem } from '#shared/common';
import { Empty } from '#ui/empty';
import { problemOf } from '#ui/problem';

/** What stands in place of a page's content while it is loading, failed or out of reach. */
@Component({
  selector: 'kb-unready',
  imports: [Empty],
  template: `
    @if (problem(); as problem) {
      <kb-empty
        [state]="problem.status === 0 ? 'offline' : 'error'"
        [heading]="problem.title"
        [detail]="problem.detail ?? ''"
        [retryLabel]="problem.status === 404 || problem.status === 403 ? '' : 'Try again'"
        (retry)="retry.emit()"
      >
        <ng-content />
      </kb-empty>
    } @else {
      <kb-empty state="loading" [heading]="'Loading ' + what()" />
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Unready {
  /** What is loading, as it stands in a sentence: "jobs". */
  readonly what = input.required<string>();
  /** A resource's error, or a problem already read; nothing while loading. */
  readonly error = input<unknown>(null);
  readonly retry = output<void>();

  protected readonly problem = computed<Problem | null>(() => {
    const error = this.error();
    if (!error) return null;
    const known = Problem.safeParse(error);
    return known.success ? known.data : problemOf(error);
  });
}
