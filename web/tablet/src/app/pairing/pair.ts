import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { RouterLink } from '@angular/router';
import { Note } from '#ui/note';
import { CallFailed, TabletApi } from '../connection/tablet-api';
import { Day } from '../day/day';
import { Frame } from '../frame/frame';
import { Outbox } from '../outbox/outbox';
import { Sender } from '../outbox/sender';
import { Storage } from '../outbox/storage';
import { Words } from '../words/words';

/** Where a tablet becomes one of the organisation's: the code the office shows, typed once. */
@Component({
  selector: 'kb-pair',
  imports: [Frame, Note, ReactiveFormsModule, RouterLink],
  templateUrl: './pair.html',
  styleUrl: './pair.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Pair {
  private readonly api = inject(TabletApi);
  private readonly day = inject(Day);
  private readonly sender = inject(Sender);
  private readonly storage = inject(Storage);
  private readonly outbox = inject(Outbox);
  protected readonly words = inject(Words);

  protected readonly code = new FormControl('', { nonNullable: true, validators: [Validators.required, Validators.maxLength(20)] });
  protected readonly isPairing = signal(false);
  protected readonly trouble = signal('');
  protected readonly paired = signal('');
  protected readonly keptBefore = computed(() => {
    const count = this.outbox.waitingCount();
    return count > 0 ? this.words.say().pair.keptBefore(count) : '';
  });

  protected async pair(): Promise<void> {
    const say = this.words.say().pair;
    if (this.isPairing()) return;
    const code = this.code.value.trim();
    if (code === '' || this.code.invalid) {
      this.trouble.set(say.codeMissing);
      return;
    }
    this.trouble.set('');
    this.isPairing.set(true);
    try {
      const tablet = await this.api.pair({ code });
      this.paired.set(say.done(tablet.name, tablet.organisationName));
      this.code.reset();
      void this.storage.askToPersist();
      await this.day.refresh();
      void this.sender.sendNow();
    } catch (error) {
      this.trouble.set(this.troubleWords(error));
    } finally {
      this.isPairing.set(false);
    }
  }

  private troubleWords(error: unknown): string {
    const say = this.words.say().pair;
    if (!(error instanceof CallFailed)) throw error;
    if (error.trouble === 'no-signal') return say.noSignal;
    if (error.trouble === 'no-answer') return say.noAnswer;
    return error.problem?.detail ?? say.refused;
  }
}
