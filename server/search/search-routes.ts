import { Router } from 'express';
import { mount } from '../http/mount';
import { type SearchService } from './search-service';

export function searchRoutes(service: SearchService): Router {
  const router = Router();
  mount(router, 'searchSheets', ({ actor, query }) => service.search(actor, query));
  return router;
}
