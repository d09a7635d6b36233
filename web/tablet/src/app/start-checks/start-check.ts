import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Empty } from '#ui/empty';
import { Mark } from '#ui/mark';
import { Note } from '#ui/note';
import { type TextLine } from '#compliance/checklists/text';
import { LineSource } from '../checklists/line-source';
import { ReadAloud } from '../checklists/read-aloud';
import { WhoToCall } from '../connection/who-to-call';
import { Frame } from '../frame/frame';
import { injectJob } from '../jobs/found-job';
import { NoJob } from '../jobs/no-job';
import { Outbox } from '../outbox/outbox';
import { Sender } from '../outbox/sender';
import { NotKept } from '../outbox/storage';
import { clockTime, dayName, nameList } from '../words/dates';
import { messagesIn, tabletLanguages, Words } from '../words/words';

interface Answered {
  readonly lineId: string;
  readonly answer: 'yes' | 'no';
  readonly note: string | null;
}

/** The live lines that unlock one task, one at a time, answered where the work is. A critical "No" stops the task at once. */
@Component({
  selector: 'kb-start-check',
  imports: [Frame, NoJob, Empty, Mark, Note, LineSource, ReadAloud, RouterLink],
  templateUrl: './start-check.html',
  styleUrl: './start-check.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StartCheck {
  readonly shiftId = input.required<string>();
  readonly taskId = input.required<string>();
  private readonly outbox = inject(Outbox);
  private readonly sender = inject(Sender);
  protected readonly whoToCall = inject(WhoToCall);
  protected readonly words = inject(Words);
  protected readonly found = injectJob(this.shiftId);
  protected readonly languages = tabletLanguages.map((code) => ({ code, name: messagesIn(code).languageName }));

  protected readonly at = signal(0);
  protected readonly outcome = signal<'open' | 'noted' | 'stopped' | null>(null);
  protected readonly isSent = signal(false);
  protected readonly trouble = signal('');
  private readonly answered = signal<readonly Answered[]>([]);
  private readonly chosenChecker = signal<string | null>(null);

  protected readonly view = computed(() => {
    const found = this.found();
    return found.state === 'good' ? found.view : null;
  });
  protected readonly one = computed(() => this.view()?.tasks.find(({ task }) => task.taskId === this.taskId()) ?? null);
  protected readonly line = computed<TextLine | null>(() => this.one()?.task.live[this.at()] ?? null);
  protected readonly checkerId = computed(() => this.chosenChecker() ?? this.view()?.lead?.id ?? this.one()?.people[0]?.id ?? null);
  /** Whose masks are on, for a line about masks; forgotten with each line. */
  protected readonly masksOn = linkedSignal<TextLine | null, readonly string[]>({ source: this.line, computation: () => [] });
  protected readonly note = linkedSignal<TextLine | null, string>({ source: this.line, computation: () => '' });
  protected readonly isNoteOpen = linkedSignal<TextLine | null, boolean>({ source: this.line, computation: () => false });

  protected readonly kicker = computed(() => {
    const view = this.view();
    if (!view) return '';
    const language = this.words.language();
    return `${view.text.jobName}, ${dayName(view.job.date, language)}, ${clockTime(new Date().toISOString(), language)}`;
  });
  protected readonly taskNames = computed(() => this.one()?.task.name.toLocaleLowerCase(this.words.language()) ?? '');
  protected readonly notSigned = computed(() => {
    const names = this.one()?.people.filter(({ state }) => state !== 'signed').map(({ name }) => name) ?? [];
    return names.length > 0 ? this.words.say().check.notSigned(nameList(names, this.words.language())) : '';
  });
  protected readonly ifNo = computed(() => {
    const say = this.words.say().call;
    const contact = this.whoToCall.contact();
    return contact ? say.anytime(this.taskNames(), contact) : say.anytimeNobody(this.taskNames());
  });
  protected readonly spoken = computed(() => [this.line()?.text, this.line()?.why].filter(Boolean).join(' '));

  protected toggleMask(name: string): void {
    this.masksOn.update((names) => (names.includes(name) ? names.filter((one) => one !== name) : [...names, name]));
  }

  protected chooseChecker(personId: string): void {
    this.chosenChecker.set(personId);
  }

  protected goBack(): void {
    this.at.update((at) => Math.max(0, at - 1));
    this.answered.update((answers) => answers.slice(0, -1));
  }

  protected async answer(answer: 'yes' | 'no'): Promise<void> {
    const line = this.line();
    const task = this.one()?.task;
    if (!line || !task) return;
    const note = [...this.masksOn(), this.note().trim()].filter(Boolean).join(', ') || null;
    const answers = [...this.answered(), { lineId: line.id, answer, note }];
    const isStop = answer === 'no' && line.isCritical;
    if (!isStop && this.at() < task.live.length - 1) {
      this.answered.set(answers);
      this.at.update((at) => at + 1);
      return;
    }
    await this.keep(answers, isStop);
  }

  private async keep(answers: readonly Answered[], isStop: boolean): Promise<void> {
    const view = this.view();
    const personId = this.checkerId();
    if (!view || !personId) return;
    try {
      await this.outbox.add([{ kind: 'start-check', versionId: view.job.version.id, personId, taskId: this.taskId(), answers: [...answers], shiftId: view.job.shiftId }]);
    } catch (error) {
      if (!(error instanceof NotKept)) throw error;
      this.trouble.set(this.words.say().sign.notKept);
      return;
    }
    this.trouble.set('');
    this.answered.set(answers);
    this.outcome.set(isStop ? 'stopped' : answers.some(({ answer }) => answer === 'no') ? 'noted' : 'open');
    this.isSent.set(await this.sender.sendNow());
  }
}
