import { type Routes } from '@angular/router';
import { listWithDetail } from '../pieces/list-with-detail';

/** One page: the list stays beside whoever is open. `new` adds. */
export const routes: Routes = [{ matcher: listWithDetail('personId'), title: 'People', loadComponent: () => import('./people-page/people-page').then((file) => file.PeoplePage) }];
