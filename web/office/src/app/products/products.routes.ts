import { type Routes } from '@angular/router';

export const routes: Routes = [
  { path: '', title: 'Products and kits', loadComponent: () => import('./product-list/product-list').then((file) => file.ProductList) },
  { path: 'kits/new', title: 'New kit', loadComponent: () => import('./kit-page/kit-page').then((file) => file.KitPage) },
  { path: 'kits/:kitId', title: 'Kit', loadComponent: () => import('./kit-page/kit-page').then((file) => file.KitPage) },
];
