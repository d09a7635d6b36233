import { type Routes } from '@angular/router';
import { listWithDetail } from '../pieces/list-with-detail';

/** One page: the list stays beside the machine that is open. `new` adds. */
export const routes: Routes = [{ matcher: listWithDetail('equipmentId'), title: 'Equipment', loadComponent: () => import('./equipment-page/equipment-page').then((file) => file.EquipmentPage) }];
