import { type Routes } from '@angular/router';

export const routes: Routes = [{ path: '', title: 'Rules and sources', loadComponent: () => import('./rules-page/rules-page').then((file) => file.RulesPage) }];
