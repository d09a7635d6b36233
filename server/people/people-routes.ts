import { Router } from 'express';
import { mount } from '../http/mount';
import { type PeopleService } from './people-service';
import { type PinsService } from './pins-service';

export function peopleRoutes(service: PeopleService, pins: PinsService): Router {
  const router = Router();
  mount(router, 'listPeople', ({ actor, query }) => service.list(actor, query));
  mount(router, 'addPerson', ({ actor, body }) => service.add(actor, body));
  mount(router, 'readPerson', ({ actor, params }) => service.read(actor, params.personId));
  mount(router, 'editPerson', ({ actor, params, version, body }) => service.edit(actor, params.personId, version, body));
  mount(router, 'setLogin', ({ actor, params, body }) => service.setLogin(actor, params.personId, body));
  mount(router, 'giveStartPin', async ({ actor, params }) => ({ ...(await pins.giveStartPin(actor, params.personId)), person: await service.read(actor, params.personId) }));
  mount(router, 'listPinEvents', ({ actor, query }) => pins.list(actor, query));
  mount(router, 'resetPin', async ({ actor, params }) => {
    await pins.reset(actor, params.personId);
    return service.read(actor, params.personId);
  });
  return router;
}
