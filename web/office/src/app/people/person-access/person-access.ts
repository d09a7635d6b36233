import { ChangeDetectionStrategy, Component, computed, effect, inject, input, linkedSignal, output, signal, untracked } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { firstValueFrom } from 'rxjs';
import { roleNames, roles, type Role } from '#shared/common';
import { type Person, SetLogin } from '#shared/people';
import { Note } from '#ui/note';
import { problemOf, problemWords } from '#ui/problem';
import { State } from '#ui/state';
import { Access } from '../../contract/access';
import { Confirmation } from '../../pieces/confirmation';
import { ChoiceField, type Choice } from '../../pieces/fields/choice-field';
import { TextField } from '../../pieces/fields/text-field';
import { FormTrouble } from '../../pieces/form-trouble';
import { dayOf } from '../../pieces/dates';
import { PeopleApi } from '../people-api';
import { PinEvents } from '../pin-events/pin-events';

/** How a person gets in: PIN on the tablet, sign-in to the office. */
@Component({
  selector: 'kb-person-access',
  imports: [ChoiceField, FormTrouble, MatButton, Note, PinEvents, ReactiveFormsModule, State, TextField],
  templateUrl: './person-access.html',
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 0.75rem;
    }

    .digits {
      font-size: 1.75rem;
      font-variant-numeric: tabular-nums;
      letter-spacing: 0.08em;
    }

    .grid {
      display: grid;
      grid-template-columns: repeat(auto-fill, minmax(12rem, 1fr));
      gap: 0.75rem 1rem;
      align-items: start;
      margin-bottom: 0.75rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PersonAccess {
  private readonly api = inject(PeopleApi);
  private readonly access = inject(Access);
  private readonly confirmation = inject(Confirmation);
  private readonly builder = inject(NonNullableFormBuilder);

  readonly person = input.required<Person>();
  readonly changed = output<Person>();

  protected readonly mayResetPin = computed(() => this.access.may('resetPin') && this.person().hasPin);
  protected readonly mayGiveStartPin = computed(() => this.access.may('giveStartPin') && this.person().isActive && (!this.person().hasPin || this.person().pinProof === 'none'));
  protected readonly mayListPinEvents = computed(() => this.access.may('listPinEvents'));
  /** By id: a person that was read again is still the same. */
  private readonly personId = computed(() => this.person().id);
  /** Shown until another person is opened. */
  protected readonly startDigits = linkedSignal<string, string>({ source: this.personId, computation: () => '' });
  protected readonly isPinListOpen = linkedSignal<string, boolean>({ source: this.personId, computation: () => false });
  protected readonly dayOf = dayOf;
  protected readonly maySetLogin = computed(() => this.access.may('setLogin'));
  protected readonly isOpen = signal(false);
  protected readonly isSending = signal(false);
  protected readonly refusal = signal('');
  protected readonly roleNames = roleNames;
  protected readonly roleChoices: readonly Choice<Role>[] = roles.map((value) => ({ value, label: roleNames[value] }));
  protected readonly form = this.builder.group({ email: '', role: this.builder.control<Role>('crew-lead'), password: '' });

  constructor() {
    effect(() => {
      const { login } = this.person();
      untracked(() => {
        this.isOpen.set(false);
        this.refusal.set('');
        this.form.reset({ email: login?.email ?? '', role: login?.role ?? 'crew-lead', password: '' });
      });
    });
  }

  protected async resetPin(): Promise<void> {
    const { id, name } = this.person();
    const isSure = await this.confirmation.ask({ heading: `Reset the PIN of ${name}?`, text: `${name} chooses a new one on a paired tablet, before a lead or with a start PIN. Nobody can choose it for them. Signatures given before stay as they are.`, action: 'Reset PIN' });
    if (isSure) await this.send(() => firstValueFrom(this.api.resetPin(id)));
  }

  protected async giveStartPin(): Promise<void> {
    await this.send(async () => {
      const { pin, person } = await firstValueFrom(this.api.giveStartPin(this.person().id));
      this.startDigits.set(pin);
      return person;
    });
  }

  protected async giveLogin(): Promise<void> {
    const { email, role, password } = this.form.getRawValue();
    const request = SetLogin.safeParse({ login: { email, role, ...(password === '' ? {} : { password }) } });
    if (!request.success) {
      for (const issue of request.error.issues) {
        const control = this.form.get(String(issue.path[1]));
        control?.setErrors({ schema: issue.message });
        control?.markAsTouched();
      }
      return;
    }
    await this.send(() => firstValueFrom(this.api.setLogin(this.person().id, request.data.login)));
  }

  protected async takeLogin(): Promise<void> {
    const { id, name } = this.person();
    const isSure = await this.confirmation.ask({ heading: `Take away the sign-in of ${name}?`, text: 'It ends at once, everywhere. The person, their training and everything they signed stay.', action: 'Take it away', isDanger: true });
    if (isSure) await this.send(() => firstValueFrom(this.api.setLogin(id, null)));
  }

  private async send(call: () => Promise<Person>): Promise<void> {
    if (this.isSending()) return;
    this.isSending.set(true);
    this.refusal.set('');
    try {
      this.changed.emit(await call());
    } catch (error) {
      const problem = problemOf(error);
      const left = (problem.errors ?? []).filter(({ path, message }) => {
        const control = this.form.get(path.replace(/^login\./, ''));
        control?.setErrors({ server: message });
        control?.markAsTouched();
        return !control;
      });
      this.refusal.set([problemWords(problem), ...left.map(({ message }) => message)].join(' '));
    } finally {
      this.isSending.set(false);
    }
  }
}
