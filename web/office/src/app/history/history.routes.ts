import { type Routes } from '@angular/router';

export const routes: Routes = [{ path: '', title: 'History', loadComponent: () => import('./history-page/history-page').then((file) => file.HistoryPage) }];
