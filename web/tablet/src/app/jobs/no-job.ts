import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Empty } from '#ui/empty';
import { Sender } from '../outbox/sender';
import { Day } from '../day/day';
import { Frame } from '../frame/frame';
import { Words } from '../words/words';
import { type FoundJob } from './found-job';

/** What a job's page shows when there is no list to show: why, and the next step. */
@Component({
  selector: 'kb-no-job',
  imports: [Empty, Frame, RouterLink],
  template: `
    <kb-frame [title]="words.say().today.title">
      @defer (on immediate) {
        @if (found().state === 'loading') {
          <kb-empty state="loading" [heading]="words.say().today.loading" />
        } @else {
          <kb-empty state="error" [heading]="said().heading" [detail]="said().detail">
            <button type="button" class="kb-button outlined small" (click)="lookAgain()">{{ words.say().today.look }}</button>
            <a class="kb-button text small" routerLink="/">{{ words.say().job.back }}</a>
          </kb-empty>
        }
      }
    </kb-frame>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NoJob {
  readonly found = input.required<FoundJob>();
  private readonly day = inject(Day);
  private readonly sender = inject(Sender);
  protected readonly words = inject(Words);

  protected readonly said = computed(() => {
    const say = this.words.say().job;
    const state = this.found().state;
    if (state === 'damaged') return { heading: say.damaged, detail: say.damagedDetail };
    if (state === 'unreadable') return { heading: say.unreadable, detail: say.unreadableDetail };
    return { heading: say.gone, detail: say.goneDetail };
  });

  protected lookAgain(): void {
    void this.sender.sendNow().then(() => this.day.refresh());
  }
}
