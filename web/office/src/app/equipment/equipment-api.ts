import { inject, Injectable } from '@angular/core';
import { type Observable } from 'rxjs';
import { type Page } from '#shared/common';
import { type Equipment, type EquipmentEdit } from '#shared/equipment';
import { allPages } from '../contract/all-pages';
import { ContractClient } from '../contract/contract-client';

/** Machines, collectors and vacuums. */
@Injectable({ providedIn: 'root' })
export class EquipmentApi {
  private readonly client = inject(ContractClient);

  list(after?: string): Observable<Page<Equipment>> {
    return this.client.call('listEquipment', { query: { after, limit: 100 } });
  }

  all(): Observable<readonly Equipment[]> {
    return allPages((after) => this.list(after));
  }

  add(equipment: EquipmentEdit): Observable<Equipment> {
    return this.client.call('addEquipment', { body: equipment });
  }

  edit(equipmentId: string, equipment: EquipmentEdit, version: number): Observable<Equipment> {
    return this.client.call('editEquipment', { params: { equipmentId }, body: equipment, version });
  }
}
