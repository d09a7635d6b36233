import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { type AppliedRevision, type Reach } from '#shared/library';
import { type Revision } from '#shared/sheets';
import { Note } from '#ui/note';
import { problemOf, problemWords } from '#ui/problem';
import { State, type StateKind } from '#ui/state';
import { Access } from '../../contract/access';
import { Confirmation } from '../../pieces/confirmation';
import { dayOf, dayShort } from '../../pieces/dates';
import { LibraryApi } from '../library-api';
import { capital, countWords, countsOf, fieldNames, reachNote } from './reach-words';

/** What a revision changes and whom it reaches; once it is confirmed, one action publishes the touched checklists again. */
@Component({
  selector: 'kb-reach-panel',
  imports: [MatButton, Note, RouterLink, State],
  templateUrl: './reach-panel.html',
  styleUrl: './reach-panel.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ReachPanel {
  private readonly api = inject(LibraryApi);
  private readonly access = inject(Access);
  private readonly confirmation = inject(Confirmation);

  readonly revision = input.required<Revision>();
  readonly applied = output<void>();

  /** Read again when the sheet was saved or confirmed: its values decide what changes. */
  private readonly asked = computed(() => {
    const { id, version, state } = this.revision();
    return state === 'waiting' || state === 'set-aside' ? undefined : { id, version };
  });
  protected readonly reach = this.api.reachResource(this.asked);
  /** What was read last stays while the same sheet is looked up again. */
  protected readonly shown = linkedSignal<{ readonly id: string | undefined; readonly value: Reach | null }, Reach | null>({
    source: () => ({ id: this.asked()?.id, value: this.reach.hasValue() ? this.reach.value() : null }),
    computation: ({ id, value }, before) => value ?? (before?.source.id === id ? before?.value : null) ?? null,
  });
  protected readonly isConfirmed = computed(() => this.revision().state === 'confirmed');
  protected readonly isOlder = computed(() => this.isConfirmed() && !this.revision().isCurrent);
  protected readonly note = computed(() => {
    const reach = this.shown();
    return reach && !this.isOlder() ? reachNote(reach, this.isConfirmed()) : null;
  });
  protected readonly counts = computed(() => {
    const reach = this.shown();
    return reach ? countsOf(reach) : null;
  });
  protected readonly mayApply = computed(() => this.isConfirmed() && this.revision().isCurrent && (this.counts()?.published ?? 0) > 0 && this.access.may('applyRevision'));
  protected readonly isSending = signal(false);
  protected readonly refusal = signal('');
  protected readonly outcome = linkedSignal<string, AppliedRevision | null>({ source: () => this.revision().id, computation: () => null });
  protected readonly fieldNames = fieldNames;
  protected readonly dayOf = dayOf;
  protected readonly dayShort = dayShort;

  reload(): void {
    this.reach.reload();
  }

  protected shiftState(shift: Reach['shifts'][number]): { readonly kind: StateKind; readonly words: string } {
    if (shift.publishedVersion === null) return { kind: 'plain', words: 'not published' };
    if (!shift.changesChecklist) return { kind: 'done', words: `version ${shift.publishedVersion} stays` };
    return { kind: 'stop', words: `${shift.signed} of ${shift.asked} signed the older one` };
  }

  protected async apply(): Promise<void> {
    const counts = this.counts();
    if (!counts || this.isSending()) return;
    const checklists = countWords(counts.published, 'checklist is published', 'checklists are published');
    const people = countWords(counts.asked, 'person is', 'people are');
    const isSure = await this.confirmation.ask({ heading: 'Apply this sheet', text: `${capital(checklists)} as a new version, and ${people} asked to be briefed and sign again. What was signed stays on record.`, action: 'Apply this sheet' });
    if (!isSure) return;
    this.isSending.set(true);
    this.refusal.set('');
    try {
      this.outcome.set(await firstValueFrom(this.api.apply(this.revision().id)));
      this.reach.reload();
      this.applied.emit();
    } catch (error) {
      this.refusal.set(problemWords(problemOf(error)));
    } finally {
      this.isSending.set(false);
    }
  }
}
