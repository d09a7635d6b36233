import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Note } from '#ui/note';
import { type StateKind } from '#ui/state';
import { Day } from '../day/day';
import { Outbox } from '../outbox/outbox';
import { Sender } from '../outbox/sender';
import { Storage } from '../outbox/storage';
import { whenTime } from '../words/dates';
import { Words } from '../words/words';
import { Connection } from './connection';

interface Said {
  readonly kind: StateKind;
  readonly text: string;
  /** Said in bold after the text: how many wait. */
  readonly count: string;
}

/** Stands on every page: is there signal, and how much has not been sent. A sentence, always. */
@Component({
  selector: 'kb-connection-note',
  imports: [Note, RouterLink],
  template: `
    @if (said(); as now) {
      @if (now.kind === 'done') {
        <p class="kb-quiet" role="status">
          <span>{{ now.text }}</span> <span>{{ heard() }}</span>
        </p>
      } @else {
        <kb-note [kind]="now.kind" [announce]="true">
          {{ now.text }} <b>{{ now.count }}</b>
          @if (isUnpaired()) {
            <a class="pair" routerLink="/pair">{{ words.say().signal.pair }}</a>
          }
        </kb-note>
      }
    }
    @if (outbox.lostCount(); as lost) {
      <kb-note kind="stop" [announce]="true">
        {{ words.say().signal.lost(lost) }}
        <button type="button" class="kb-button text small" (click)="outbox.acknowledgeLoss()">{{ words.say().signal.lostRead }}</button>
      </kb-note>
    }
    @if (storageWords(); as trouble) {
      <kb-note kind="stop" [announce]="true">{{ trouble }}</kb-note>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 0.5rem;
      max-width: 26rem;
    }

    b,
    span {
      display: inline-block;
    }

    @media (min-width: 601px) {
      span {
        display: block;
      }
    }

    .pair {
      display: flex;
      align-items: center;
      min-height: var(--kb-target);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ConnectionNote {
  private readonly connection = inject(Connection);
  protected readonly outbox = inject(Outbox);
  private readonly sender = inject(Sender);
  private readonly storage = inject(Storage);
  private readonly day = inject(Day);
  protected readonly words = inject(Words);

  protected readonly isUnpaired = computed(() => this.connection.state() === 'not-paired');
  protected readonly heard = computed(() => {
    const at = this.day.heardAt();
    const say = this.words.say().signal;
    return at ? say.heard(whenTime(at, this.words.language())) : '';
  });
  protected readonly storageWords = computed(() => {
    const trouble = this.storage.trouble();
    return trouble ? this.words.say().signal[trouble] : '';
  });

  protected readonly said = computed<Said>(() => {
    const say = this.words.say().signal;
    const waiting = this.outbox.waitingCount();
    const count = waiting > 0 ? say.waiting(waiting) : '';
    switch (this.connection.state()) {
      case 'checking':
        return { kind: 'plain', text: say.checking, count };
      case 'no-signal':
        return { kind: 'caution', text: waiting > 0 ? say.noneKept : say.none, count };
      case 'no-answer':
        return { kind: 'caution', text: waiting > 0 ? say.noAnswerKept : say.noAnswer, count };
      case 'not-paired':
        return { kind: 'stop', text: waiting > 0 ? say.notPairedKept : say.notPaired, count };
      case 'online':
        if (waiting === 0) return { kind: 'done', text: say.allSent, count };
        return this.sender.isSending() ? { kind: 'plain', text: '', count: say.sending(waiting) } : { kind: 'caution', text: '', count };
    }
  });
}
