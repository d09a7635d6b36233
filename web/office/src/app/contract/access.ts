import { inject, Injectable } from '@angular/core';
import { type Role } from '#shared/common';
import { endpoints, type Endpoint, type EndpointName } from '#shared/endpoints';
import { SessionApi } from '../session/session-api';

/** Whether a role may call a row of the contract; the server decides again on every request. */
export function roleMay(role: Role, name: EndpointName): boolean {
  const { access }: Endpoint = endpoints[name];
  return access === 'public' || (access !== 'tablet' && access.includes(role));
}

/** What the signed-in person may do, read from the contract itself: pages ask before they draw a button. */
@Injectable({ providedIn: 'root' })
export class Access {
  private readonly session = inject(SessionApi).session;

  may(name: EndpointName): boolean {
    const session = this.session();
    return session !== null && roleMay(session.role, name);
  }
}
