import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { protectionTopics, type SheetEdit } from '#shared/sheets';
import { ChoiceField, type Choice } from '../../pieces/fields/choice-field';
import { TextField } from '../../pieces/fields/text-field';
import { languageNames, signalWordNames, type ReviewKey } from './review-rows';
import { ingredientGroup, limitGroup, protectionGroup, type SheetForm } from './sheet-form';

const entries = <K extends string>(names: Readonly<Record<K, string>>): readonly Choice<K | null>[] => [{ value: null, label: 'choose' }, ...(Object.keys(names) as K[]).map((value) => ({ value, label: names[value] }))];

/** The fields of one line of the review, to be changed or entered by hand. */
@Component({
  selector: 'kb-value-editor',
  imports: [ChoiceField, ReactiveFormsModule, TextField],
  templateUrl: './value-editor.html',
  styleUrl: './value-editor.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ValueEditor {
  private readonly builder = inject(NonNullableFormBuilder);

  readonly form = input.required<SheetForm>();
  readonly key = input.required<ReviewKey>();

  protected readonly controls = computed(() => this.form().controls);
  protected readonly languages = entries(languageNames);
  protected readonly signalWords = entries(signalWordNames);
  protected readonly topics: readonly Choice<SheetEdit['protectionWords'][number]['topic']>[] = protectionTopics.map((value) => ({ value, label: value }));

  protected addIngredient(): void {
    this.controls().ingredients.push(ingredientGroup(this.builder, { name: '', cas: null, concentration: null }));
  }

  protected addLimit(): void {
    this.controls().limits.push(limitGroup(this.builder, { substance: '', kind: '8-hour average', value: '', unit: 'mg/m³' }));
  }

  protected addProtection(): void {
    this.controls().protectionWords.push(protectionGroup(this.builder, { topic: 'eyes', text: '' }));
  }
}
