import { ChangeDetectionStrategy, Component, input, output, signal } from '@angular/core';
import { Note } from '#ui/note';
import { couldNotSignReasons } from '#shared/envelopes';
import { type Messages } from '../words/en';

export type Reason = (typeof couldNotSignReasons)[number];

/** "I can't sign yet" is ordinary: a reason, a few words if wanted, and off the shared screen again. */
@Component({
  selector: 'kb-cannot-sign',
  imports: [Note],
  templateUrl: './cannot-sign.html',
  styleUrl: './cannot-sign.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CannotSign {
  readonly say = input.required<Messages>();
  readonly crewSize = input.required<number>();
  readonly told = output<{ readonly reason: Reason; readonly note: string | null }>();
  readonly cancelled = output<void>();

  protected readonly reasons = couldNotSignReasons;
  protected readonly smallCrew = 8;
  protected readonly reason = signal<Reason | null>(null);
  protected readonly note = signal('');
  protected readonly isMissing = signal(false);

  protected choose(reason: Reason): void {
    this.reason.set(reason);
    this.isMissing.set(false);
  }

  protected tell(): void {
    const reason = this.reason();
    if (!reason) {
      this.isMissing.set(true);
      return;
    }
    this.told.emit({ reason, note: this.note().trim() || null });
  }
}
