import { Router } from 'express';
import { mount } from '../http/mount';
import { type CorrectionsService } from './corrections-service';

export function correctionsRoutes(service: CorrectionsService): Router {
  const router = Router();
  mount(router, 'listSuggestions', ({ actor, params }) => service.suggest(actor, params.revisionId));
  mount(router, 'listCorrections', ({ actor, query }) => service.list(actor, query));
  mount(router, 'removeCorrection', ({ actor, params }) => service.remove(actor, params.correctionId).then(() => undefined));
  return router;
}
