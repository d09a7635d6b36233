import { type Role } from '#shared/common';
import { ForbiddenError } from '../errors';

/** Somebody signed in, as read from the database for this very request. */
export interface PersonActor {
  readonly kind: 'person';
  readonly organisationId: string;
  readonly organisationName: string;
  readonly personId: string;
  readonly personName: string;
  readonly role: Role;
}
export interface TabletActor {
  readonly kind: 'tablet';
  readonly organisationId: string;
  readonly organisationName: string;
  readonly tabletId: string;
  readonly tabletName: string;
}
export type Actor = PersonActor | TabletActor;

/** Services ask again what the route's table already asked: authorisation does not depend on how a call arrived. */
export function demandRole(actor: PersonActor, ...allowed: readonly Role[]): void {
  if (!allowed.includes(actor.role)) throw new ForbiddenError(`Your role cannot do this. Ask somebody who is ${allowed.map((role) => role.replace('-', ' ')).join(' or ')}.`);
}
