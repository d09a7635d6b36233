import { Router } from 'express';
import { mount } from '../http/mount';
import { type ActionsService } from './actions-service';

export function actionsRoutes(service: ActionsService): Router {
  const router = Router();
  mount(router, 'listActions', ({ actor, query }) => service.list(actor, query));
  mount(router, 'assignAction', ({ actor, params, version, body }) => service.assign(actor, params.actionId, version, body.ownerPersonId));
  mount(router, 'resolveAction', ({ actor, params, version, body }) => service.resolve(actor, params.actionId, version, body.evidence));
  return router;
}
