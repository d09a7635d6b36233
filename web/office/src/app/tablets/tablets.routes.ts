import { type Routes } from '@angular/router';

export const routes: Routes = [{ path: '', title: 'Tablets', loadComponent: () => import('./tablets-page/tablets-page').then((file) => file.TabletsPage) }];
