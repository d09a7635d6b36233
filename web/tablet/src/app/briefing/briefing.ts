import { ChangeDetectionStrategy, Component, computed, effect, ElementRef, inject, input, signal } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { Mark } from '#ui/mark';
import { Note } from '#ui/note';
import { type TextLine } from '#compliance/checklists/text';
import { LineSource } from '../checklists/line-source';
import { WhoToCall } from '../connection/who-to-call';
import { Frame } from '../frame/frame';
import { injectJob } from '../jobs/found-job';
import { NoJob } from '../jobs/no-job';
import { NotKept, Storage } from '../outbox/storage';
import { Outbox } from '../outbox/outbox';
import { type Draft as Envelope } from '../outbox/outbox';
import { Sender } from '../outbox/sender';
import { PinDesk } from '../acknowledgements/pin-desk';
import { PinEntry, type PinGiven } from '../acknowledgements/pin-entry';
import { type PersonView, type Witness } from '../jobs/job-view';
import { clockTime, dayName } from '../words/dates';
import { Words } from '../words/words';

interface Given {
  readonly answer: 'yes' | 'no';
  readonly note: string;
}
/** A whole briefing that waits for the PIN of who gave it: a newer list or another lead meanwhile changes nothing of it. */
interface Asked {
  readonly person: PersonView;
  readonly witnesses: readonly Witness[];
  readonly textSha256: string;
  readonly envelope: Envelope;
  readonly versionId: string;
}
/** Half a briefing, kept so that a sleeping tablet does not lose it. */
interface Draft {
  readonly versionId: string;
  readonly given: Readonly<Record<string, Given>>;
}

/** The morning lines, said by the lead and answered as they are now. */
@Component({
  selector: 'kb-briefing',
  imports: [Frame, NoJob, Note, Mark, LineSource, PinEntry, RouterLink],
  templateUrl: './briefing.html',
  styleUrl: './briefing.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Briefing {
  readonly shiftId = input.required<string>();
  private readonly outbox = inject(Outbox);
  private readonly sender = inject(Sender);
  private readonly storage = inject(Storage);
  private readonly desk = inject(PinDesk);
  private readonly router = inject(Router);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  protected readonly call = inject(WhoToCall).afterNo;
  protected readonly words = inject(Words);
  protected readonly found = injectJob(this.shiftId);

  protected readonly given = signal<Readonly<Record<string, Given>>>({});
  protected readonly trouble = signal('');
  protected readonly asked = signal<Asked | null>(null);
  /** While the answers are written: a second tap on Done is not a second briefing. */
  private isKeeping = false;
  private readonly chosenLead = signal<string | null>(null);
  private readonly draftOf = signal<string | null>(null);

  private readonly view = computed(() => {
    const found = this.found();
    return found.state === 'good' ? found.view : null;
  });
  private readonly versionId = computed(() => this.view()?.job.version.id ?? null);
  protected readonly leadId = computed(() => this.chosenLead() ?? this.view()?.lead?.id ?? null);
  protected readonly left = computed(() => this.view()?.text.morning.filter(({ id }) => !this.given()[id]).length ?? 0);
  protected readonly kicker = computed(() => {
    const view = this.view();
    return view ? `${view.text.jobName}, ${dayName(view.job.date, this.words.language())}` : '';
  });
  protected readonly before = computed(() => {
    const briefing = this.view()?.briefing;
    return briefing ? this.words.say().briefing.doneBefore(clockTime(briefing.at, this.words.language())) : '';
  });

  constructor() {
    effect(() => {
      const versionId = this.versionId();
      if (versionId && this.draftOf() !== versionId) void this.readDraft(versionId);
    });
  }

  protected answer(lineId: string, answer: 'yes' | 'no'): void {
    this.change(lineId, { answer, note: this.given()[lineId]?.note ?? '' });
  }

  protected writeNote(lineId: string, note: string): void {
    const answer = this.given()[lineId]?.answer;
    if (answer) this.change(lineId, { answer, note });
  }

  protected chooseLead(personId: string): void {
    this.chosenLead.set(personId);
  }

  protected consequence(line: TextLine): string {
    const say = this.words.say().briefing;
    if (!line.isCritical) return say.noted;
    const task = this.view()?.text.tasks.find(({ taskId }) => taskId === line.taskId);
    return `${task ? say.holdsTask(task.name) : say.holdsAll} ${this.call()}`;
  }

  /** All lines are answered: now the PIN of who answered them. */
  protected async finish(): Promise<void> {
    const view = this.view();
    const say = this.words.say();
    if (!view) return;
    const open = view.text.morning.find(({ id }) => !this.given()[id]);
    const person = view.people.find(({ id }) => id === this.leadId());
    if (open) {
      this.trouble.set(say.briefing.missing);
      this.host.nativeElement.querySelector<HTMLElement>(`[data-line="${CSS.escape(open.id)}"] button`)?.focus();
      return;
    }
    if (!person) {
      this.trouble.set(say.briefing.whoMissing);
      return;
    }
    const answers = view.text.morning.map(({ id }) => ({ lineId: id, answer: this.given()[id]?.answer ?? 'no', note: this.given()[id]?.note.trim() || null }));
    const versionId = view.job.version.id;
    const textSha256 = await this.desk.answersHash('briefing', versionId, null, answers);
    this.trouble.set('');
    this.asked.set({ person, witnesses: view.witnesses, textSha256, versionId, envelope: { kind: 'briefing', versionId, personId: person.id, answers, shiftId: view.job.shiftId } });
  }

  protected async keep({ sealed, pinSet }: PinGiven): Promise<void> {
    const asked = this.asked();
    if (!asked || this.isKeeping) return;
    this.isKeeping = true;
    try {
      const briefing: Envelope = { ...asked.envelope, ...sealed };
      await this.outbox.add(pinSet ? [pinSet, briefing] : [briefing]);
    } catch (error) {
      this.isKeeping = false;
      if (!(error instanceof NotKept)) throw error;
      this.asked.set(null);
      this.trouble.set(this.words.say().sign.notKept);
      return;
    }
    await this.keepDraft({ versionId: asked.versionId, given: {} });
    void this.sender.sendNow();
    await this.router.navigate(['/jobs', this.shiftId()]);
  }

  protected goBack(): void {
    this.asked.set(null);
  }

  private change(lineId: string, given: Given): void {
    this.given.update((all) => ({ ...all, [lineId]: given }));
    this.trouble.set('');
    const versionId = this.versionId();
    if (versionId) void this.keepDraft({ versionId, given: this.given() });
  }

  private async readDraft(versionId: string): Promise<void> {
    this.draftOf.set(versionId);
    const kept = await this.storage.use((database) => database.get('kept', 'briefing-draft')).catch(() => undefined);
    this.given.set(isDraft(kept) && kept.versionId === versionId ? kept.given : {});
  }

  private async keepDraft(draft: Draft): Promise<void> {
    await this.storage.use((database) => database.put('kept', draft, 'briefing-draft')).catch((error: unknown) => console.error(error));
  }
}

function isDraft(value: unknown): value is Draft {
  return typeof value === 'object' && value !== null && 'versionId' in value && 'given' in value && typeof value.given === 'object';
}
