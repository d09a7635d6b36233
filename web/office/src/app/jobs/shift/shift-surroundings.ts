import { inject, Injectable, signal } from '@angular/core';
import { firstValueFrom, forkJoin } from 'rxjs';
import { type CorrectiveAction } from '#shared/actions';
import { type Tablet } from '#shared/tablets';
import { ActionsApi } from '../../actions/actions-api';
import { Access } from '../../contract/access';
import { EquipmentApi } from '../../equipment/equipment-api';
import { PeopleApi } from '../../people/people-api';
import { ProductsApi } from '../../products/products-api';
import { TabletsApi } from '../../tablets/tablets-api';
import { noThings, type ShiftThings } from './shift-names';

/** What a shift page lists beside the shift: people, machines and kits to choose from, tablets, corrective actions. */
@Injectable()
export class ShiftSurroundings {
  private readonly access = inject(Access);
  private readonly people = inject(PeopleApi);
  private readonly equipment = inject(EquipmentApi);
  private readonly products = inject(ProductsApi);
  private readonly tabletsApi = inject(TabletsApi);
  private readonly actionsApi = inject(ActionsApi);

  readonly things = signal<ShiftThings>(noThings);
  readonly tablets = signal<readonly Tablet[]>([]);
  readonly actions = signal<readonly CorrectiveAction[]>([]);
  /** Whether something to choose from could not be read; the shift itself still stands. */
  readonly isIncomplete = signal(false);

  async load(shiftId: string): Promise<void> {
    this.isIncomplete.set(false);
    await Promise.all([this.loadThings(), this.loadTablets(), this.loadActions(shiftId)]);
  }

  async loadActions(shiftId: string): Promise<void> {
    try {
      this.actions.set(await firstValueFrom(this.actionsApi.ofShift(shiftId)));
    } catch {
      this.isIncomplete.set(true);
    }
  }

  private async loadThings(): Promise<void> {
    // Only those who plan choose from lists; others read the names that come with the shift.
    if (!this.access.may('editShiftPlan')) return;
    try {
      this.things.set(await firstValueFrom(forkJoin({ people: this.people.all(), equipment: this.equipment.all(), kits: this.products.allKits() })));
    } catch {
      this.isIncomplete.set(true);
    }
  }

  private async loadTablets(): Promise<void> {
    if (!this.access.may('listTablets')) return;
    try {
      this.tablets.set((await firstValueFrom(this.tabletsApi.list())).items);
    } catch {
      this.isIncomplete.set(true);
    }
  }
}
