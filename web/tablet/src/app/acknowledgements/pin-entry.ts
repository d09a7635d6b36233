import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { Note } from '#ui/note';
import { Connection } from '../connection/connection';
import { type PersonView } from '../jobs/job-view';
import { type Draft } from '../outbox/outbox';
import { type Messages } from '../words/en';
import { Keypad } from './keypad';
import { PinDesk, type SealedPin } from './pin-desk';

/** The person's sealed PIN for what is being signed, and the envelope that sets it when it is new. */
export interface PinGiven {
  readonly sealed: SealedPin;
  readonly pinSet: Draft | null;
}

type Step = 'enter' | 'choose' | 'repeat' | 'witness';

/**
 * The PIN beside a signature: typed, or chosen twice on first use and witnessed by the lead.
 * It is sealed as soon as it is complete; plain digits live only in this component, and only until then.
 */
@Component({
  selector: 'kb-pin-entry',
  imports: [Keypad, Note],
  template: `
    <h2 tabindex="-1">{{ heading() }}</h2>
    @if (detail()) {
      <p>{{ detail() }}</p>
    }
    @if (step() === 'enter' && isOffline()) {
      <p class="kb-quiet">{{ say().pin.later }}</p>
    }
    <div aria-live="assertive">
      @if (trouble()) {
        <kb-note kind="stop">{{ trouble() }}</kb-note>
      }
    </div>
    <div role="status">
      @if (isBusy()) {
        <p>{{ say().pin.checking }}</p>
      }
    </div>
    <kb-keypad [say]="say()" [isBusy]="isBusy() || isPaused()" (entered)="take($event)" (tooShort)="trouble.set(say().pin.short)" />
    <button type="button" class="kb-button text small" [disabled]="isBusy()" (click)="cancelled.emit()">{{ say().pin.back }}</button>
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 0.75rem;
      align-items: flex-start;
    }

    h2 {
      font-size: 1.625rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PinEntry {
  readonly person = input.required<PersonView>();
  /** Who witnesses a new PIN: the lead, when the lead has a PIN and is somebody else. */
  readonly lead = input.required<PersonView | null>();
  /** SHA-256 of the text being signed: the PIN is sealed together with it. */
  readonly textSha256 = input.required<string>();
  readonly say = input.required<Messages>();
  readonly given = output<PinGiven>();
  readonly cancelled = output<void>();

  private readonly desk = inject(PinDesk);
  private readonly connection = inject(Connection);
  private readonly later = signal<Step | null>(null);
  private chosen = '';
  private chosenSeals: { readonly forSetting: SealedPin; readonly forSigning: SealedPin } | null = null;

  protected readonly trouble = signal('');
  protected readonly isBusy = signal(false);
  protected readonly isPaused = signal(false);
  protected readonly step = computed<Step>(() => this.later() ?? (this.person().hasPin ? 'enter' : 'choose'));
  protected readonly isOffline = computed(() => this.connection.state() !== 'online');
  private readonly witness = computed(() => {
    const lead = this.lead();
    return lead && lead.id !== this.person().id && lead.hasPin ? lead : null;
  });

  protected readonly heading = computed(() => {
    const say = this.say().pin;
    const name = this.person().name;
    switch (this.step()) {
      case 'enter':
        return say.enter(name);
      case 'choose':
        return say.choose(name);
      case 'repeat':
        return say.repeat;
      case 'witness':
        return say.witness(this.witness()?.name ?? '');
    }
  });
  protected readonly detail = computed(() => {
    if (this.step() === 'choose') return this.say().pin.chooseDetail;
    return this.step() === 'witness' ? this.say().pin.witnessDetail(this.person().name) : '';
  });

  protected async take(pin: string): Promise<void> {
    this.trouble.set('');
    this.isBusy.set(true);
    try {
      switch (this.step()) {
        case 'enter':
          return await this.takeOwn(pin);
        case 'choose':
          return this.takeChoice(pin);
        case 'repeat':
          return await this.takeRepeat(pin);
        case 'witness':
          return await this.takeWitness(pin);
      }
    } finally {
      this.isBusy.set(false);
    }
  }

  private async takeOwn(pin: string): Promise<void> {
    const [asked, sealed] = await this.sealTwice(pin, this.textSha256());
    if (await this.passes(this.person(), this.textSha256(), asked)) this.given.emit({ sealed, pinSet: null });
  }

  private takeChoice(pin: string): void {
    if (isPlain(pin)) {
      this.trouble.set(this.say().pin.plain);
      return;
    }
    this.chosen = pin;
    this.later.set('repeat');
  }

  private async takeRepeat(pin: string): Promise<void> {
    const isSame = pin === this.chosen;
    this.chosen = '';
    if (!isSame) {
      this.trouble.set(this.say().pin.differs);
      this.later.set(null);
      return;
    }
    this.chosenSeals = { forSetting: await this.desk.seal(pin, await this.desk.pinSetHash(this.person().id)), forSigning: await this.desk.seal(pin, this.textSha256()) };
    if (this.witness()) this.later.set('witness');
    else this.giveChosen(null, null);
  }

  private async takeWitness(pin: string): Promise<void> {
    const witness = this.witness();
    if (!witness) return;
    const hash = await this.desk.pinSetHash(this.person().id);
    const [asked, sealed] = await this.sealTwice(pin, hash);
    if (await this.passes(witness, hash, asked)) this.giveChosen(witness, sealed);
  }

  private giveChosen(witness: PersonView | null, sealed: SealedPin | null): void {
    if (!this.chosenSeals) return;
    const { forSetting, forSigning } = this.chosenSeals;
    const witnessing = sealed ? { witnessSealedPin: sealed.sealedPin, witnessNonce: sealed.nonce } : {};
    this.given.emit({
      sealed: forSigning,
      pinSet: { kind: 'pin-set', personId: this.person().id, ...forSetting, witnessPersonId: witness?.id ?? null, ...witnessing },
    });
  }

  /** One to ask with and one to keep: what goes over the wire now says nothing about what is kept. */
  private sealTwice(pin: string, hash: string): Promise<[SealedPin, SealedPin]> {
    return Promise.all([this.desk.seal(pin, hash), this.desk.seal(pin, hash)]);
  }

  private async passes(person: PersonView, hash: string, sealed: SealedPin): Promise<boolean> {
    const answer = await this.desk.check(person.id, hash, sealed);
    if (answer.outcome === 'wrong') this.trouble.set(this.say().pin.wrong(person.name, answer.detail));
    if (answer.outcome === 'paused') this.pause(answer.seconds);
    return answer.outcome === 'right' || answer.outcome === 'unchecked';
  }

  private pause(seconds: number): void {
    this.trouble.set(this.say().pin.paused(Math.ceil(seconds)));
    this.isPaused.set(true);
    setTimeout(() => {
      this.isPaused.set(false);
      this.trouble.set('');
    }, seconds * 1000);
  }
}

/** One digit over and over, or a run up or down: the first anybody tries. */
function isPlain(pin: string): boolean {
  const steps = [...pin].slice(1).map((digit, index) => Number(digit) - Number(pin[index]));
  return [0, 1, -1].some((step) => steps.every((one) => one === step));
}
