import { ChangeDetectionStrategy, Component, computed, effect, inject, input, output, signal, untracked } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { firstValueFrom } from 'rxjs';
import { type EquipmentKind } from '#compliance/facts';
import * as z from 'zod';
import { AirflowReading, Equipment, EquipmentEdit } from '#shared/equipment';
import { Conflict } from '../../pieces/conflict';
import { CheckField } from '../../pieces/fields/check-field';
import { ChoiceField, knownChoices } from '../../pieces/fields/choice-field';
import { NumberField } from '../../pieces/fields/number-field';
import { QuantityField } from '../../pieces/fields/quantity-field';
import { TextField } from '../../pieces/fields/text-field';
import { FormSending } from '../../pieces/form-sending';
import { FormTrouble } from '../../pieces/form-trouble';
import { EquipmentApi } from '../equipment-api';
import { editOf, emptyEquipment, equipmentForm, kindChoices } from '../equipment-form';

const collecting: readonly EquipmentKind[] = ['collector', 'vacuum', 'bucket-extraction', 'air-mover'];

/** One machine: what it is, what its maker asks, and what was measured. A new one when `equipment` is null. */
@Component({
  selector: 'kb-equipment-editor',
  imports: [CheckField, ChoiceField, Conflict, FormTrouble, MatButton, NumberField, QuantityField, ReactiveFormsModule, TextField],
  templateUrl: './equipment-editor.html',
  styleUrl: './equipment-editor.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EquipmentEditor {
  private readonly api = inject(EquipmentApi);

  readonly equipment = input<Equipment | null>(null);
  readonly saved = output<Equipment>();
  readonly cancelled = output<void>();

  protected readonly form = equipmentForm(inject(NonNullableFormBuilder), emptyEquipment);
  protected readonly sending = new FormSending(this.form);
  protected readonly hasReading = signal(false);
  protected readonly kindChoices = kindChoices;
  protected readonly knownChoices = knownChoices;
  private readonly kind = toSignal(this.form.controls.kind.valueChanges, { initialValue: this.form.controls.kind.value });
  protected readonly isCollecting = computed(() => collecting.includes(this.kind()));
  private readonly version = signal(0);
  protected readonly theirs = computed(() => {
    const current = Equipment.safeParse(this.sending.problem()?.current);
    return current.success ? current.data : null;
  });

  constructor() {
    effect(() => {
      const equipment = this.equipment();
      untracked(() => this.take(equipment));
    });
  }

  protected showReading(isThere: boolean): void {
    this.hasReading.set(isThere);
  }

  protected async save(): Promise<void> {
    const equipment = this.equipment();
    const hasReading = this.hasReading();
    // No reading at all, never an empty one.
    const schema = EquipmentEdit.extend({ airflow: z.preprocess((value) => (hasReading ? value : null), hasReading ? AirflowReading : AirflowReading.nullable()) });
    const saved = await this.sending.send(schema, (edit) => firstValueFrom(equipment ? this.api.edit(equipment.id, edit, this.version()) : this.api.add(edit)));
    if (saved) this.saved.emit(saved);
  }

  protected keepMine(theirs: Equipment): void {
    this.version.set(theirs.version);
    void this.save();
  }

  protected takeTheirs(theirs: Equipment): void {
    this.take(theirs);
  }

  private take(equipment: Equipment | null): void {
    const { airflow, ...edit } = equipment ? editOf(equipment) : emptyEquipment;
    this.version.set(equipment?.version ?? 0);
    this.form.reset({ ...edit, ...(airflow ? { airflow } : {}) });
    this.showReading(airflow !== null);
    this.sending.problem.set(null);
    this.sending.refusal.set('');
  }
}
