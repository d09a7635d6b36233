import { ChangeDetectionStrategy, Component, computed, effect, inject, input, linkedSignal, signal } from '@angular/core';
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
import { PinDesk } from '../acknowledgements/pin-desk';
import { PinEntry, type PinGiven } from '../acknowledgements/pin-entry';
import { type PersonView, type Witness } from '../jobs/job-view';
import { StopNote } from '../jobs/stop-note';
import { type Draft, Outbox } from '../outbox/outbox';
import { Sender } from '../outbox/sender';
import { NotKept } from '../outbox/storage';
import { clockTime, dayName, nameList, whenTime } from '../words/dates';
import { messagesIn, tabletLanguages, Words } from '../words/words';

interface Answered {
  readonly lineId: string;
  readonly answer: 'yes' | 'no';
  readonly note: string | null;
}

/** All lines answered, waiting for the PIN of who answered. */
interface Asked {
  readonly person: PersonView;
  readonly witnesses: readonly Witness[];
  readonly textSha256: string;
  readonly envelope: Draft;
  readonly answers: readonly Answered[];
}

/** The buttons stay in one place while the lines change: a gloved finger that bounces must not answer a line nobody saw. */
const bounceMs = 500;

/** The live lines that unlock one task, one at a time, answered where the work is. A critical "No" stops the task at once. */
@Component({
  selector: 'kb-start-check',
  imports: [Frame, NoJob, Empty, Mark, Note, LineSource, PinEntry, ReadAloud, RouterLink, StopNote],
  templateUrl: './start-check.html',
  styleUrl: './start-check.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StartCheck {
  readonly shiftId = input.required<string>();
  readonly taskId = input.required<string>();
  private readonly outbox = inject(Outbox);
  private readonly sender = inject(Sender);
  private readonly desk = inject(PinDesk);
  protected readonly whoToCall = inject(WhoToCall);
  protected readonly words = inject(Words);
  protected readonly found = injectJob(this.shiftId);
  protected readonly languages = tabletLanguages.map((code) => ({ code, name: messagesIn(code).languageName }));

  protected readonly outcome = signal<'open' | 'noted' | 'stopped' | null>(null);
  protected readonly isSent = signal(false);
  protected readonly trouble = signal('');
  private readonly chosenChecker = signal<string | null>(null);

  protected readonly view = computed(() => {
    const found = this.found();
    return found.state === 'good' ? found.view : null;
  });
  private readonly versionId = computed(() => this.view()?.job.version.id ?? null);
  /** A newer version may ask other lines: what was answered of the old one begins anew, or it would fit neither. */
  protected readonly at = linkedSignal<string | null, number>({ source: this.versionId, computation: () => 0 });
  private readonly answered = linkedSignal<string | null, readonly Answered[]>({ source: this.versionId, computation: () => [] });
  protected readonly asked = linkedSignal<string | null, Asked | null>({ source: this.versionId, computation: () => null });
  protected readonly one = computed(() => this.view()?.tasks.find(({ task }) => task.taskId === this.taskId()) ?? null);
  protected readonly line = computed<TextLine | null>(() => this.one()?.task.live[this.at()] ?? null);
  protected readonly checkerId = computed(() => this.chosenChecker() ?? this.view()?.lead?.id ?? this.one()?.people[0]?.id ?? null);
  /** By id: the day that is heard again brings the same line anew, and must take nothing away that was typed. */
  private readonly lineId = computed(() => this.line()?.id ?? null);
  /** Whose masks are on, for a line about masks; forgotten with each line. */
  protected readonly masksOn = linkedSignal<string | null, readonly string[]>({ source: this.lineId, computation: () => [] });
  protected readonly note = linkedSignal<string | null, string>({ source: this.lineId, computation: () => '' });
  protected readonly isNoteOpen = linkedSignal<string | null, boolean>({ source: this.lineId, computation: () => false });

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
  /** Whether the line has just come, or the answers are being kept: taps do nothing then. */
  protected readonly isSettling = signal(true);

  protected readonly spoken = computed(() => [this.line()?.text, this.line()?.why].filter(Boolean).join(' '));

  constructor() {
    effect((onCleanup) => {
      this.lineId();
      this.isSettling.set(true);
      const timer = setTimeout(() => this.isSettling.set(false), bounceMs);
      onCleanup(() => clearTimeout(timer));
    });
  }

  protected toggleMask(name: string): void {
    this.masksOn.update((names) => (names.includes(name) ? names.filter((one) => one !== name) : [...names, name]));
  }

  protected chooseChecker(personId: string): void {
    this.chosenChecker.set(personId);
  }

  protected leavePin(): void {
    this.asked.set(null);
  }

  protected reopenedAt(instant: string): string {
    return whenTime(instant, this.words.language());
  }

  protected goBack(): void {
    this.at.update((at) => Math.max(0, at - 1));
    this.answered.update((answers) => answers.slice(0, -1));
  }

  protected async answer(answer: 'yes' | 'no'): Promise<void> {
    const line = this.line();
    const task = this.one()?.task;
    if (!line || !task || this.isSettling()) return;
    this.isSettling.set(true);
    const note = [...this.masksOn(), this.note().trim()].filter(Boolean).join(', ') || null;
    const answers = [...this.answered(), { lineId: line.id, answer, note }];
    const isStop = answer === 'no' && line.isCritical;
    if (!isStop && this.at() < task.live.length - 1) {
      this.answered.set(answers);
      this.at.update((at) => at + 1);
      return;
    }
    await this.finish(answers, isStop);
  }

  /** A stop needs no PIN: nobody looks for one while the dust is in the air. What lets a task start is proven like a signature. */
  private async finish(answers: readonly Answered[], isStop: boolean): Promise<void> {
    const view = this.view();
    const person = view?.people.find(({ id }) => id === this.checkerId());
    if (!view || !person) return this.isSettling.set(false);
    const versionId = view.job.version.id;
    const envelope: Draft = { kind: 'start-check', versionId, personId: person.id, taskId: this.taskId(), answers: [...answers], shiftId: view.job.shiftId };
    if (isStop) return this.keep([envelope], answers, true);
    this.asked.set({ person, witnesses: view.witnesses, textSha256: await this.desk.answersHash('start-check', versionId, this.taskId(), answers), envelope, answers });
    this.isSettling.set(false);
  }

  protected async keepProven({ sealed, pinSet }: PinGiven): Promise<void> {
    const asked = this.asked();
    if (!asked || this.isSettling()) return;
    this.isSettling.set(true);
    const check: Draft = { ...asked.envelope, ...sealed };
    await this.keep(pinSet ? [pinSet, check] : [check], asked.answers, false);
    this.asked.set(null);
  }

  private async keep(envelopes: readonly Draft[], answers: readonly Answered[], isStop: boolean): Promise<void> {
    try {
      await this.outbox.add(envelopes);
    } catch (error) {
      if (!(error instanceof NotKept)) throw error;
      this.trouble.set(this.words.say().sign.notKept);
      this.isSettling.set(false);
      return;
    }
    this.trouble.set('');
    this.answered.set(answers);
    this.outcome.set(isStop ? 'stopped' : answers.some(({ answer }) => answer === 'no') ? 'noted' : 'open');
    this.isSent.set(await this.sender.sendNow());
  }
}
