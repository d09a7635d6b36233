import { ChangeDetectionStrategy, Component, computed, ElementRef, input, output, signal, viewChild } from '@angular/core';
import { type Mark as MarkName } from '#compliance/answer';
import { type Language } from '#compliance/outcome';
import { Mark } from '#ui/mark';
import { Note } from '#ui/note';
import { ReadAloud } from '../checklists/read-aloud';
import { type GoodText } from '../jobs/found-job';
import { type PersonView } from '../jobs/job-view';
import { messagesIn } from '../words/words';
import { type Ink, InkBox } from './ink';

/** What one person reads and signs, in the language whose bytes are signed. */
@Component({
  selector: 'kb-sign-pane',
  imports: [Mark, Note, InkBox, ReadAloud],
  templateUrl: './sign-pane.html',
  styleUrl: './sign-pane.scss',
  host: { '[attr.lang]': 'text().language' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignPane {
  readonly person = input.required<PersonView>();
  readonly text = input.required<GoodText>();
  readonly languages = input.required<readonly Language[]>();
  readonly isBriefed = input.required<boolean>();
  readonly languageChosen = output<Language>();
  readonly signed = output<{ readonly strokes: Ink; readonly question: string }>();
  readonly cannot = output<void>();
  readonly notMe = output<void>();

  private readonly ink = viewChild.required(InkBox);
  private readonly inkPlace = viewChild.required<InkBox, ElementRef<HTMLElement>>(InkBox, { read: ElementRef });
  protected readonly isAnswered = signal(false);
  protected readonly trouble = signal('');
  protected readonly say = computed(() => messagesIn(this.text().language));
  protected readonly languageNames = computed(() => this.languages().map((code) => ({ code, name: messagesIn(code).languageName })));

  private readonly own = computed(() => this.text().text.people.find(({ personId }) => personId === this.person().id) ?? null);
  protected readonly ownLines = computed(() => this.own()?.lines ?? []);
  private readonly tasks = computed(() => {
    const { tasks } = this.text().text;
    return tasks.filter((task) => task.personIds.includes(this.person().id));
  });
  protected readonly taskWords = computed(() => {
    const names = this.tasks().map(({ name }) => name.toLocaleLowerCase(this.text().language));
    return names.length > 0 ? this.say().sign.yourTasks(names.join(', ')) : this.say().sign.noTasks;
  });
  /** Each thing to wear once, over all own tasks. */
  protected readonly protection = computed(() => {
    const seen = new Map<string, { readonly mark: MarkName; readonly name: string }>();
    for (const item of this.tasks().flatMap((task) => task.protection)) seen.set(item.name, item);
    return [...seen.values()];
  });
  protected readonly question = computed(() => {
    const say = this.say().sign;
    if (this.tasks().length === 0) return say.ownNoTasks;
    // Whoever wears none is not asked whether it fits: a question that can only be answered with a lie.
    return this.protection().some(({ mark }) => mark === 'respirator') ? say.own : say.ownNoMask;
  });
  protected readonly spoken = computed(() => [this.taskWords(), ...this.ownLines(), this.text().text.sentence].join('. '));

  /** The box is next: it comes clear of the row of buttons that stays in sight. */
  protected matches(): void {
    this.isAnswered.set(true);
    this.trouble.set('');
    this.inkPlace().nativeElement.scrollIntoView?.({ block: 'nearest' });
  }

  protected done(): void {
    const strokes = this.ink().strokes();
    if (!this.isAnswered()) this.trouble.set(this.say().sign.ownFirst);
    else if (strokes.length === 0) this.trouble.set(this.say().sign.empty);
    else this.signed.emit({ strokes, question: this.question() });
  }

  protected clear(): void {
    this.ink().clear();
    this.trouble.set('');
  }
}
