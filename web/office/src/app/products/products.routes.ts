import { type Routes } from '@angular/router';

export const routes: Routes = [
  { path: '', title: 'Products and kits', loadComponent: () => import('./product-list/product-list').then((file) => file.ProductList) },
  { path: 'kits/new', title: 'New kit', loadComponent: () => import('./kit-page/kit-page').then((file) => file.KitPage) },
  { path: 'kits/:kitId', title: 'Kit', loadComponent: () => import('./kit-page/kit-page').then((file) => file.KitPage) },
  { path: 'import', title: 'Add a product list', loadComponent: () => import('./import-products/import-page').then((file) => file.ImportPage) },
  { path: 'kits/:kitId/label', title: 'Label', loadComponent: () => import('./labels/label-page').then((file) => file.LabelPage) },
  { path: ':productId', title: 'Product', loadComponent: () => import('./product-page/product-page').then((file) => file.ProductPage) },
  { path: ':productId/label', title: 'Label', loadComponent: () => import('./labels/label-page').then((file) => file.LabelPage) },
];
