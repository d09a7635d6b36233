import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Mark } from '#ui/mark';
import { Note } from '#ui/note';
import { State } from '#ui/state';
import { Frame } from '../frame/frame';
import { injectJob } from '../jobs/found-job';
import { NoJob } from '../jobs/no-job';
import { dayName, nameList } from '../words/dates';
import { messagesIn, tabletLanguages, Words } from '../words/words';
import { type TextTask } from '#compliance/checklists/text';
import { LineSource } from './line-source';

/** The published list from top to bottom, to read. */
@Component({
  selector: 'kb-whole-checklist',
  imports: [Frame, NoJob, Mark, Note, State, LineSource],
  templateUrl: './whole-checklist.html',
  styleUrl: './whole-checklist.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WholeChecklist {
  readonly shiftId = input.required<string>();
  protected readonly words = inject(Words);
  protected readonly found = injectJob(this.shiftId);
  protected readonly languages = tabletLanguages.map((code) => ({ code, name: messagesIn(code).languageName }));
  protected readonly kicker = computed(() => {
    const found = this.found();
    if (found.state !== 'good') return '';
    const { text, job } = found.view;
    return `${text.jobName}, ${text.siteName}, ${dayName(job.date, this.words.language())}`;
  });

  protected names(task: TextTask): string {
    const found = this.found();
    if (found.state !== 'good') return '';
    const names = found.view.text.people.filter(({ personId }) => task.personIds.includes(personId)).map(({ name }) => name);
    return names.length > 0 ? nameList(names, this.words.language()) : this.words.say().task.nobody;
  }
}
