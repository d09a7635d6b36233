import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Note } from '#ui/note';
import { State, type StateKind } from '#ui/state';
import { Frame } from '../frame/frame';
import { clockTime, dayName, nameList, whenTime } from '../words/dates';
import { Words } from '../words/words';
import { injectJob } from './found-job';
import { type JobView, type PersonView, type Reopening, type TaskView } from './job-view';
import { NoJob } from './no-job';
import { StopNote } from './stop-note';

const taskKinds: Readonly<Record<TaskView['state'], StateKind>> = { 'may-not-start': 'stop', 'not-decided': 'caution', stopped: 'stop', started: 'done', ready: 'plain' };

/** One job today: the briefing, the signing, and what each task needs before it starts. */
@Component({
  selector: 'kb-job-home',
  imports: [Frame, NoJob, Note, State, StopNote, RouterLink],
  templateUrl: './job-home.html',
  styleUrl: './job-home.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class JobHome {
  readonly shiftId = input.required<string>();
  protected readonly words = inject(Words);
  protected readonly found = injectJob(this.shiftId);
  protected readonly taskKinds = taskKinds;

  protected readonly kicker = computed(() => {
    const found = this.found();
    return found.state === 'good' ? `${found.view.text.siteName}, ${dayName(found.view.job.date, this.words.language())}` : '';
  });

  /** What the office said about signatures and somebody here must settle. */
  protected readonly doubts = computed(() => {
    const found = this.found();
    if (found.state !== 'good') return [];
    const say = this.words.say().job;
    const about = (words: (names: string) => string, isMeant: (person: PersonView) => boolean): readonly string[] => {
      const names = found.view.people.filter(isMeant).map(({ name }) => name);
      return names.length > 0 ? [words(nameList(names, this.words.language()))] : [];
    };
    return [
      ...about(say.notConfirmed, ({ doubt }) => doubt === 'pin-wrong'),
      ...about(say.noPin, ({ doubt }) => doubt === 'no-pin'),
      ...about(say.noWitness, ({ doubt }) => doubt === 'no-witness'),
      ...about(say.second, ({ noted }) => noted === 'second'),
      ...about(say.keptAside, ({ noted }) => noted === 'kept-aside'),
    ];
  });

  protected readonly newer = computed(() => {
    const found = this.found();
    if (found.state !== 'good' || !found.view.people.some(({ state }) => state === 'sign-again')) return '';
    const { number, publishedAt } = found.view.job.version;
    return this.words.say().job.newer(number, whenTime(publishedAt, this.words.language()));
  });

  protected briefingWords(view: JobView): string {
    const say = this.words.say();
    if (!view.briefing) return say.job.briefingNot;
    const done = say.job.briefingDone(clockTime(view.briefing.at, this.words.language()), view.briefing.by);
    const no = view.briefing.noLineIds.length;
    const sending = view.briefing.sending;
    return [done, no > 0 ? say.job.briefingNo(no) : '', view.briefing.isProven ? '' : say.job.briefingUnproven, sending ? say.people[sending] : ''].filter(Boolean).join(', ');
  }

  protected reopenedWords({ at, by, evidence }: Reopening): string {
    return this.words.say().task.reopened(whenTime(at, this.words.language()), by, evidence);
  }

  protected names(people: readonly PersonView[]): string {
    return people.length > 0 ? nameList(people.map(({ name }) => name), this.words.language()) : this.words.say().task.nobody;
  }
}
