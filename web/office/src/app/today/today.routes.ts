import { type Routes } from '@angular/router';

export const routes: Routes = [{ path: '', title: 'Today', loadComponent: () => import('./today-page/today-page').then((file) => file.TodayPage) }];
