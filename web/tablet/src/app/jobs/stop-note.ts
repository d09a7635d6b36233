import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Note } from '#ui/note';
import { Connection } from '../connection/connection';
import { WhoToCall } from '../connection/who-to-call';
import { Day } from '../day/day';
import { whenTime } from '../words/dates';
import { Words } from '../words/words';
import { type Stop } from './job-view';

/** Why a task is stopped, by whom, who fixes it and what opens it again; without signal also what this tablet cannot know. */
@Component({
  selector: 'kb-stop-note',
  imports: [Note],
  template: `
    @let say = words.say();
    <kb-note kind="stop">
      @for (stop of stops(); track stop.text) {
        <p><b>{{ say.answer.no }}:</b> {{ stop.text }}</p>
        <p class="kb-quiet">{{ who(stop) }} {{ stop.isHeard ? say.task.heard : say.task.notHeard }}</p>
        @if (!stop.isHeard) {
          <p>{{ call() }}</p>
        }
      }
      <p>{{ say.task.restart }}</p>
      @if (lastHeard(); as heard) {
        <p>{{ heard }}</p>
      }
    </kb-note>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StopNote {
  readonly stops = input.required<readonly Stop[]>();
  private readonly connection = inject(Connection);
  private readonly day = inject(Day);
  private readonly contact = inject(WhoToCall).contact;
  protected readonly call = inject(WhoToCall).afterNo;
  protected readonly words = inject(Words);

  protected readonly lastHeard = computed(() => {
    const heardAt = this.day.heardAt();
    if (this.connection.state() === 'online' || !heardAt) return '';
    return this.words.say().task.mayBeOpen(whenTime(heardAt, this.words.language()), this.contact());
  });

  protected who({ by, at, ownerName }: Stop): string {
    const say = this.words.say().task;
    return [by && at ? say.stoppedBy(by, whenTime(at, this.words.language())) : '', ownerName ? say.fixedBy(ownerName) : say.fixedByNobody].filter(Boolean).join(' ');
  }
}
