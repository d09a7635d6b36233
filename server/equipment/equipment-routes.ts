import { Router } from 'express';
import { mount } from '../http/mount';
import { type EquipmentService } from './equipment-service';

export function equipmentRoutes(service: EquipmentService): Router {
  const router = Router();
  mount(router, 'listEquipment', ({ actor, query }) => service.list(actor, query));
  mount(router, 'addEquipment', ({ actor, body }) => service.add(actor, body));
  mount(router, 'editEquipment', ({ actor, params, version, body }) => service.edit(actor, params.equipmentId, version, body));
  return router;
}
