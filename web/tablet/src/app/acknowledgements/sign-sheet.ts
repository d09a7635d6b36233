import { afterNextRender, ChangeDetectionStrategy, Component, computed, effect, ElementRef, inject, Injector, input, signal } from '@angular/core';
import { type Language } from '#compliance/outcome';
import { Note } from '#ui/note';
import { type OpenedText } from '../checklists/opened-text';
import { type DayJob } from '../day/day';
import { Frame } from '../frame/frame';
import { bestText, type GoodText, injectJob } from '../jobs/found-job';
import { type PersonView, type Witness } from '../jobs/job-view';
import { NoJob } from '../jobs/no-job';
import { type Draft, Outbox, TooLong } from '../outbox/outbox';
import { Sender } from '../outbox/sender';
import { NotKept } from '../outbox/storage';
import { clockTime, dayName } from '../words/dates';
import { messagesIn, tabletLanguages, Words } from '../words/words';
import { CannotSign, type Reason } from './cannot-sign';
import { type Ink } from './ink';
import { PeopleList } from './people-list';
import { PinEntry, type PinGiven } from './pin-entry';
import { SignPane } from './sign-pane';

/** One person at the tablet. The version and its texts are those of the moment they began: what is read is what is signed. */
interface Sitting {
  readonly person: PersonView;
  readonly witnesses: readonly Witness[];
  readonly job: DayJob;
  readonly texts: readonly OpenedText[];
  readonly isBriefed: boolean;
}

interface Outcome {
  readonly kind: 'done' | 'stop' | 'plain';
  readonly text: string;
  readonly language: Language;
  /** Told to be sent only when it was. */
  readonly envelopeId: string | null;
}

/** Where the crew signs, one after the other; nothing leads away while somebody signs. */
@Component({
  selector: 'kb-sign-sheet',
  imports: [Frame, NoJob, Note, PeopleList, SignPane, PinEntry, CannotSign],
  templateUrl: './sign-sheet.html',
  styleUrl: './sign-sheet.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignSheet {
  readonly shiftId = input.required<string>();
  private readonly outbox = inject(Outbox);
  private readonly sender = inject(Sender);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  protected readonly words = inject(Words);
  protected readonly found = injectJob(this.shiftId);

  protected readonly sitting = signal<Sitting | null>(null);
  protected readonly step = signal<'read' | 'pin' | 'cannot'>('read');
  private readonly language = signal<Language>('en');
  private readonly strokes = signal<{ readonly strokes: Ink; readonly question: string } | null>(null);
  protected readonly trouble = signal('');
  /** While something is being written: a finger that bounces writes it once. */
  private isKeeping = false;
  private readonly lastOutcome = signal<Outcome | null>(null);

  protected readonly kicker = computed(() => {
    const found = this.found();
    return found.state === 'good' ? `${found.view.text.jobName}, ${dayName(found.view.job.date, this.words.language())}` : '';
  });
  protected readonly text = computed<GoodText | null>(() => {
    const sitting = this.sitting();
    return sitting ? bestText(sitting.texts, this.language()) : null;
  });
  protected readonly languages = computed<readonly Language[]>(() => {
    const good = this.sitting()?.texts.filter(({ state }) => state === 'good').map(({ language }) => language) ?? [];
    return tabletLanguages.filter((language) => good.includes(language));
  });
  /** Said when the person's own language is there but its bytes are not those that were published. */
  protected readonly refusedText = computed(() => {
    const sitting = this.sitting();
    const own = sitting?.texts.find(({ language }) => language === sitting.person.language);
    return own && own.state !== 'good' ? messagesIn(own.language).sign.textRefused(messagesIn(own.language).languageName) : '';
  });
  protected readonly say = computed(() => messagesIn(this.text()?.language ?? this.words.language()));
  protected readonly outcome = computed(() => {
    const last = this.lastOutcome();
    if (!last) return null;
    const say = messagesIn(last.language).sign;
    const row = this.outbox.posted().find(({ row }) => row.id === last.envelopeId)?.row;
    const sending = !last.envelopeId ? '' : row?.state === 'done' ? say.sent : say.keptWaiting;
    return { ...last, text: [last.text, sending].filter(Boolean).join(' ') };
  });

  constructor() {
    // Each step begins at its heading: on a phone the one before was scrolled, and a reader must hear where it is.
    const injector = inject(Injector);
    let isFirst = true;
    effect(() => {
      this.step();
      this.sitting();
      if (!isFirst) afterNextRender(() => this.host.nativeElement.querySelector<HTMLElement>('.pane > :not([hidden]) h2, .pane > h2')?.focus(), { injector });
      isFirst = false;
    });
  }

  /** Whether the page may be left: not while somebody signs. */
  canLeave(): boolean {
    return this.sitting() === null;
  }

  protected begin(person: PersonView): void {
    const found = this.found();
    if (found.state !== 'good') return;
    const say = this.words.say().sign;
    if (person.state === 'signed') {
      this.lastOutcome.set({ kind: 'plain', text: say.already(clockTime(person.at ?? '', this.words.language())), language: this.words.language(), envelopeId: null });
      return;
    }
    this.lastOutcome.set(null);
    this.trouble.set('');
    this.strokes.set(null);
    this.language.set(person.language);
    this.step.set('read');
    this.sitting.set({ person, witnesses: found.view.witnesses, job: found.view.job, texts: found.texts, isBriefed: found.view.briefing !== null });
  }

  protected stop(): void {
    this.sitting.set(null);
    this.strokes.set(null);
  }

  protected chooseLanguage(language: Language): void {
    this.language.set(language);
  }

  protected askPin(signed: { readonly strokes: Ink; readonly question: string }): void {
    this.trouble.set('');
    this.strokes.set(signed);
    this.step.set('pin');
  }

  protected async keepSignature(pin: PinGiven): Promise<void> {
    const sitting = this.sitting();
    const text = this.text();
    const signed = this.strokes();
    if (!sitting || !text || !signed) return;
    const signature: Draft = {
      kind: 'signed',
      ...this.about(sitting, text),
      strokes: signed.strokes,
      ...pin.sealed,
      ownLine: { question: signed.question, answer: 'yes' },
    };
    await this.keep(sitting, pin.pinSet ? [pin.pinSet, signature] : [signature], (at) => messagesIn(text.language).sign.signed(sitting.person.name, at));
  }

  protected async keepCannot(told: { readonly reason: Reason; readonly note: string | null }): Promise<void> {
    const sitting = this.sitting();
    const text = this.text();
    if (!sitting || !text) return;
    await this.keep(sitting, [{ kind: 'could-not-sign', ...this.about(sitting, text), ...told }], () => messagesIn(text.language).cannot.kept(sitting.person.name));
  }

  /** What was signed is on disk before anybody is told so; then it is sent if it can be. */
  private async keep(sitting: Sitting, drafts: readonly Draft[], words: (at: string) => string): Promise<void> {
    if (this.isKeeping) return;
    const language = this.text()?.language ?? 'en';
    const say = messagesIn(language).sign;
    this.isKeeping = true;
    try {
      const envelope = (await this.outbox.add(drafts)).at(-1);
      this.lastOutcome.set({ kind: 'done', text: words(clockTime(envelope?.capturedAt ?? '', language)), language, envelopeId: envelope?.id ?? null });
      this.stop();
      void this.sender.sendNow();
    } catch (error) {
      if (!(error instanceof NotKept) && !(error instanceof TooLong)) throw error;
      this.trouble.set(error instanceof TooLong ? say.tooLong : say.notKept);
      this.step.set('read');
    } finally {
      this.isKeeping = false;
    }
  }

  private about(sitting: Sitting, text: GoodText): { readonly versionId: string; readonly language: Language; readonly textSha256: string; readonly personId: string; readonly shiftId: string } {
    return { versionId: sitting.job.version.id, language: text.language, textSha256: text.sha256, personId: sitting.person.id, shiftId: sitting.job.shiftId };
  }
}
