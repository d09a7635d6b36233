import { Router } from 'express';
import { mount } from '../http/mount';
import { type PeopleService } from './people-service';

export function peopleRoutes(service: PeopleService): Router {
  const router = Router();
  mount(router, 'listPeople', ({ actor, query }) => service.list(actor, query));
  mount(router, 'addPerson', ({ actor, body }) => service.add(actor, body));
  mount(router, 'readPerson', ({ actor, params }) => service.read(actor, params.personId));
  mount(router, 'editPerson', ({ actor, params, version, body }) => service.edit(actor, params.personId, version, body));
  mount(router, 'setLogin', ({ actor, params, body }) => service.setLogin(actor, params.personId, body));
  mount(router, 'resetPin', ({ actor, params }) => service.resetPin(actor, params.personId));
  return router;
}
