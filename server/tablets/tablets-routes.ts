import { Router, type RequestHandler } from 'express';
import { mount } from '../http/mount';
import { type TabletsService } from './tablets-service';

const cookieName = 'kneeboard_tablet';
const fourHundredDaysMs = 400 * 24 * 3600 * 1000;

export function tabletsRoutes(service: TabletsService, isSecure: boolean): Router {
  const router = Router();
  mount(router, 'listTablets', ({ actor, query }) => service.list(actor, query));
  mount(router, 'addTablet', ({ actor, body }) => service.add(actor, body.name));
  mount(router, 'renewPairingCode', ({ actor, params }) => service.renewCode(actor, params.tabletId));
  mount(router, 'withdrawTablet', ({ actor, params }) => service.withdraw(actor, params.tabletId));
  mount(router, 'pairTablet', async ({ body, request, response }) => {
    const { token, tablet } = await service.pair(body.code, request.ip ?? 'unknown');
    response.cookie(cookieName, token, { httpOnly: true, sameSite: 'strict', secure: isSecure, path: '/api/tablet', maxAge: fourHundredDaysMs });
    return tablet;
  });
  return router;
}

/** The tablet speaks as a device: its own cookie, never somebody's session. */
export const recogniseTablet =
  (service: TabletsService): RequestHandler =>
  async (request, _response, next) => {
    const token = /(?:^|;\s*)kneeboard_tablet=([\w-]{43})(?:;|$)/.exec(request.headers.cookie ?? '')?.[1];
    const actor = token ? await service.readActor(token) : null;
    if (actor) request.actor = actor;
    next();
  };
