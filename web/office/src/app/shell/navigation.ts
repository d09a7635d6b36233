import { type Routes } from '@angular/router';
import { type Role } from '#shared/common';

export interface NavigationEntry {
  /** First part of the address, the same word as the subject's folder. */
  readonly path: string;
  readonly label: string;
  readonly roles: readonly Role[];
}

const everyone: readonly Role[] = ['owner', 'safety-officer', 'crew-lead', 'auditor'];
const office: readonly Role[] = ['owner', 'safety-officer', 'crew-lead'];

/** Every subject of the office in the order of the rail. One shows once its route is registered in app.routes.ts. */
export const navigation: readonly NavigationEntry[] = [
  { path: 'today', label: 'Today', roles: office },
  { path: 'jobs', label: 'Jobs', roles: everyone },
  { path: 'sheets', label: 'SDS library', roles: everyone },
  { path: 'products', label: 'Products and kits', roles: everyone },
  { path: 'exposure', label: 'Exposure', roles: everyone },
  { path: 'people', label: 'People', roles: everyone },
  { path: 'equipment', label: 'Equipment', roles: office },
  { path: 'tablets', label: 'Tablets', roles: office },
  { path: 'rules', label: 'Rules and sources', roles: everyone },
  { path: 'history', label: 'History', roles: ['owner', 'safety-officer', 'auditor'] },
];

/** What a role sees. With the router's configuration, only what exists. */
export function navigationFor(role: Role, config?: Routes): readonly NavigationEntry[] {
  const paths = config && new Set(config.flatMap((route) => [route.path, ...(route.children ?? []).map((child) => child.path)]));
  return navigation.filter((entry) => entry.roles.includes(role) && (!paths || paths.has(entry.path)));
}
