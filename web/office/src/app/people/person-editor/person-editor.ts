import { ChangeDetectionStrategy, Component, computed, effect, inject, input, output, signal, untracked } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { firstValueFrom } from 'rxjs';
import { Person, PersonEdit } from '#shared/people';
import { Conflict } from '../../pieces/conflict';
import { CheckField } from '../../pieces/fields/check-field';
import { ChoiceField } from '../../pieces/fields/choice-field';
import { TextField } from '../../pieces/fields/text-field';
import { FormSending } from '../../pieces/form-sending';
import { FormTrouble } from '../../pieces/form-trouble';
import { PeopleApi } from '../people-api';
import { editOf, emptyPerson, emptyRespirator, fitTestChoices, languageChoices, personForm, respiratorChoices, respiratorGroup } from '../person-form';

/** One person's facts: a new one when `person` is null. */
@Component({
  selector: 'kb-person-editor',
  imports: [CheckField, ChoiceField, Conflict, FormTrouble, MatButton, ReactiveFormsModule, TextField],
  templateUrl: './person-editor.html',
  styleUrl: './person-editor.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PersonEditor {
  private readonly api = inject(PeopleApi);
  private readonly builder = inject(NonNullableFormBuilder);

  readonly person = input<Person | null>(null);
  readonly saved = output<Person>();
  readonly cancelled = output<void>();

  protected readonly form = personForm(this.builder, emptyPerson);
  protected readonly sending = new FormSending(this.form);
  protected readonly languageChoices = languageChoices;
  protected readonly respiratorChoices = respiratorChoices;
  protected readonly fitTestChoices = fitTestChoices;
  private readonly version = signal(0);
  protected readonly theirs = computed(() => {
    const current = Person.safeParse(this.sending.problem()?.current);
    return current.success ? current.data : null;
  });
  protected readonly theirEdit = computed(() => {
    const theirs = this.theirs();
    return theirs ? editOf(theirs) : null;
  });

  constructor() {
    effect(() => {
      const person = this.person();
      untracked(() => this.take(person));
    });
  }

  protected addRespirator(): void {
    this.form.controls.respirators.push(respiratorGroup(this.builder, emptyRespirator));
  }

  protected async save(): Promise<void> {
    const person = this.person();
    const saved = await this.sending.send(PersonEdit, (edit) => firstValueFrom(person ? this.api.edit(person.id, edit, this.version()) : this.api.add(edit)));
    if (saved) this.saved.emit(saved);
  }

  protected keepMine(theirs: Person): void {
    this.version.set(theirs.version);
    void this.save();
  }

  protected takeTheirs(theirs: Person): void {
    this.sending.problem.set(null);
    this.sending.refusal.set('');
    this.take(theirs);
  }

  private take(person: Person | null): void {
    const edit = person ? editOf(person) : emptyPerson;
    this.version.set(person?.version ?? 0);
    this.form.controls.respirators.clear();
    for (const respirator of edit.respirators) this.form.controls.respirators.push(respiratorGroup(this.builder, respirator));
    this.form.reset(edit);
    this.sending.refusal.set('');
    this.sending.problem.set(null);
  }
}
