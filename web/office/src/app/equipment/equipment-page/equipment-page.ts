import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { type Equipment } from '#shared/equipment';
import { Empty } from '#ui/empty';
import { PageHeader } from '#ui/page-header';
import { State } from '#ui/state';
import { Access } from '../../contract/access';
import { PagedList } from '../../contract/paged-list';
import { dayOf } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { withUnit } from '../../pieces/units';
import { EquipmentApi } from '../equipment-api';
import { EquipmentEditor } from '../equipment-editor/equipment-editor';
import { kindName } from '../equipment-form';

/** Machines, collectors and vacuums, with one open beside the list. */
@Component({
  selector: 'kb-equipment-page',
  imports: [Empty, EquipmentEditor, MatButton, PageHeader, RouterLink, State, Unready],
  templateUrl: './equipment-page.html',
  styleUrl: './equipment-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EquipmentPage {
  private readonly api = inject(EquipmentApi);
  private readonly access = inject(Access);
  private readonly router = inject(Router);

  readonly equipmentId = input<string>();

  protected readonly list = new PagedList(signal(null).asReadonly(), (_query: null, after) => this.api.list(after));
  protected readonly mayAdd = computed(() => this.access.may('addEquipment'));
  protected readonly mayEdit = computed(() => this.access.may('editEquipment'));
  protected readonly isNew = computed(() => this.equipmentId() === 'new' && this.mayAdd());
  protected readonly open = computed(() => this.list.items().find(({ id }) => id === this.equipmentId()) ?? null);
  protected readonly isEditing = linkedSignal({ source: this.equipmentId, computation: () => false });
  protected readonly kindName = kindName;

  protected airflowWords({ airflow, requiredAirflowM3PerH: required }: Equipment): string {
    if (airflow) return `${withUnit('airflow', airflow.airflowM3PerH)}, ${airflow.instrument}, ${airflow.place}, filter ${airflow.filterState}, ${airflow.takenBy}, ${dayOf(airflow.takenOn)}`;
    return required === null ? '' : `maker asks ${withUnit('airflow', required)}`;
  }

  protected shortAirflow({ airflow, requiredAirflowM3PerH: required }: Equipment): string {
    if (airflow) return `${withUnit('airflow', airflow.airflowM3PerH)} on ${dayOf(airflow.takenOn)}`;
    return required === null ? '' : `asks ${withUnit('airflow', required)}`;
  }

  /** What is on it, as far as somebody said. */
  protected features(machine: Equipment): string {
    const known = (words: string, value: boolean | null) => (value === null ? '' : value ? words : `no ${words}`);
    return [
      known('shroud', machine.hasShroud),
      known('water feed', machine.hasWaterFeed),
      known('HEPA filter', machine.isHepa),
      known('filter cleaning', machine.hasFilterCleaning),
      known('cyclone', machine.hasCyclone),
      machine.filterEfficiencyPercent === null ? '' : `filter ${machine.filterEfficiencyPercent} %`,
      machine.wheelDiameterMm === null ? '' : `${withUnit('thickness', machine.wheelDiameterMm)} wheel`,
      machine.isRideOn ? 'ride-on' : '',
    ]
      .filter(Boolean)
      .join(', ');
  }

  protected close(): void {
    void this.router.navigate(['/equipment']);
  }

  protected take(machine: Equipment): void {
    this.list.items.update((machines) => machines.map((other) => (other.id === machine.id ? machine : other)));
    this.isEditing.set(false);
  }

  protected async takeNew(machine: Equipment): Promise<void> {
    this.list.items.update((machines) => [machine, ...machines]);
    await this.router.navigate(['/equipment', machine.id]);
  }
}
