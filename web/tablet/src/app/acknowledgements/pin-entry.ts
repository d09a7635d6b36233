import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { Note } from '#ui/note';
import { Connection } from '../connection/connection';
import { WhoToCall } from '../connection/who-to-call';
import { type PersonView, type Witness } from '../jobs/job-view';
import { type Draft } from '../outbox/outbox';
import { type Messages } from '../words/en';
import { Keypad } from './keypad';
import { PinDesk, type SealedPin } from './pin-desk';

/** The person's sealed PIN for what is being signed or answered, and the envelope that sets it when it is new. */
export interface PinGiven {
  readonly sealed: SealedPin;
  readonly pinSet: Draft | null;
}

type Step = 'enter' | 'choose' | 'repeat' | 'witness' | 'start';

const startPinDigits = 8;

/**
 * The PIN beside a signature or answers: typed; or chosen twice on first use and vouched for, by a lead or officer with an own PIN
 * or by the start PIN from the office. With neither it goes on, and says that it will not count.
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
    <kb-keypad [say]="say()" [isBusy]="isBusy() || isPaused()" [fewest]="step() === 'start' ? startDigits : 4" [most]="step() === 'start' ? startDigits : 6" (entered)="take($event)" (tooShort)="trouble.set(step() === 'start' ? say().pin.startShort : say().pin.short)" />
    @if (step() === 'witness' || step() === 'start') {
      <div class="kb-actions" role="group" [attr.aria-label]="say().pin.otherWays">
        @for (other of others(); track other.id) {
          <button type="button" class="kb-button outlined small" [disabled]="isBusy()" (click)="chooseWitness(other)">{{ say().pin.witnessBy(other.name) }}</button>
        }
        @if (step() === 'witness') {
          <button type="button" class="kb-button outlined small" [disabled]="isBusy()" (click)="useStartPin()">{{ say().pin.useStart }}</button>
        }
        <button type="button" class="kb-button text small" [disabled]="isBusy()" (click)="goOnAlone()">{{ say().pin.nobody }}</button>
      </div>
      <p class="kb-quiet">{{ say().pin.nobodyDetail }}</p>
    }
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
  /** Who may witness a new PIN; the person is left out here. The first one is asked. */
  readonly witnesses = input.required<readonly Witness[]>();
  /** SHA-256 of the text being signed, or of the answers: the PIN is sealed together with it. */
  readonly textSha256 = input.required<string>();
  readonly say = input.required<Messages>();
  readonly given = output<PinGiven>();
  readonly cancelled = output<void>();

  private readonly desk = inject(PinDesk);
  private readonly connection = inject(Connection);
  private readonly whoToCall = inject(WhoToCall);
  private readonly later = signal<Step | null>(null);
  private chosen = '';
  private chosenSeals: { readonly forSetting: SealedPin; readonly forSigning: SealedPin } | null = null;

  protected readonly trouble = signal('');
  protected readonly isBusy = signal(false);
  protected readonly isPaused = signal(false);
  protected readonly step = computed<Step>(() => this.later() ?? (this.person().hasPin && this.person().isPinProven ? 'enter' : 'choose'));
  protected readonly startDigits = startPinDigits;
  private readonly chosenWitness = signal<Witness | null>(null);
  protected readonly isOffline = computed(() => this.connection.state() !== 'online');
  private readonly candidates = computed(() => this.witnesses().filter(({ id }) => id !== this.person().id));
  private readonly witness = computed(() => this.chosenWitness() ?? this.candidates()[0] ?? null);
  protected readonly others = computed(() => this.candidates().filter(({ id }) => this.step() === 'start' || id !== this.witness()?.id));

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
      case 'start':
        return say.start(name);
    }
  });
  protected readonly detail = computed(() => {
    const say = this.say().pin;
    if (this.step() === 'choose') return this.person().hasPin ? say.chooseAgain : say.chooseDetail;
    if (this.step() === 'start') return say.startDetail(this.whoToCall.contact());
    return this.step() === 'witness' ? say.witnessDetail(this.person().name) : '';
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
        case 'start':
          return await this.takeStart(pin);
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
    this.later.set(this.witness() ? 'witness' : 'start');
  }

  private async takeWitness(pin: string): Promise<void> {
    const witness = this.witness();
    if (!witness) return;
    const hash = await this.desk.pinSetHash(this.person().id);
    const [asked, sealed] = await this.sealTwice(pin, hash);
    if (await this.passes(witness, hash, asked)) this.giveChosen({ witnessPersonId: witness.id, witnessSealedPin: sealed.sealedPin, witnessNonce: sealed.nonce });
  }

  private async takeStart(pin: string): Promise<void> {
    const { id } = this.person();
    const hash = await this.desk.pinSetHash(id);
    const [asked, sealed] = await this.sealTwice(pin, hash);
    const answer = await this.desk.check(id, hash, asked, 'start-pin');
    if (answer.outcome === 'wrong') this.trouble.set(this.say().pin.startWrong(this.whoToCall.contact()));
    else if (answer.outcome === 'paused') this.pause(answer.seconds);
    else this.giveChosen({ witnessPersonId: null, startSealedPin: sealed.sealedPin, startNonce: sealed.nonce });
  }

  protected chooseWitness(witness: Witness): void {
    this.trouble.set('');
    this.chosenWitness.set(witness);
    this.later.set('witness');
  }

  protected useStartPin(): void {
    this.trouble.set('');
    this.later.set('start');
  }

  /** Kept and marked at the office: it counts once the person has a witnessed PIN and signs again. */
  protected goOnAlone(): void {
    if (this.person().hasPin && this.chosenSeals) this.given.emit({ sealed: this.chosenSeals.forSigning, pinSet: null });
    else this.giveChosen({ witnessPersonId: null });
  }

  private giveChosen(voucher: Voucher): void {
    if (!this.chosenSeals) return;
    const { forSetting, forSigning } = this.chosenSeals;
    this.given.emit({ sealed: forSigning, pinSet: { kind: 'pin-set', personId: this.person().id, ...forSetting, ...voucher } });
  }

  /** One to ask with and one to keep: what goes over the wire now says nothing about what is kept. */
  private sealTwice(pin: string, hash: string): Promise<[SealedPin, SealedPin]> {
    return Promise.all([this.desk.seal(pin, hash), this.desk.seal(pin, hash)]);
  }

  private async passes(person: Witness, hash: string, sealed: SealedPin): Promise<boolean> {
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

/** What of a new PIN's envelope says who vouched for it. */
interface Voucher {
  readonly witnessPersonId: string | null;
  readonly witnessSealedPin?: string;
  readonly witnessNonce?: string;
  readonly startSealedPin?: string;
  readonly startNonce?: string;
}

/** One digit over and over, or a run up or down: the first anybody tries. */
function isPlain(pin: string): boolean {
  const steps = [...pin].slice(1).map((digit, index) => Number(digit) - Number(pin[index]));
  return [0, 1, -1].some((step) => steps.every((one) => one === step));
}
