import { join, resolve } from 'node:path';
import { tmpdir } from 'node:os';
import compression from 'compression';
import express, { type Express, type RequestHandler, Router } from 'express';
import helmet from 'helmet';
import { acknowledgementsRoutes } from './acknowledgements/acknowledgements-routes';
import { deliveriesService } from './acknowledgements/deliveries-service';
import { historyService } from './acknowledgements/history-service';
import { tabletDayService } from './acknowledgements/tablet-day-service';
import { actionsRoutes } from './actions/actions-routes';
import { actionsService } from './actions/actions-service';
import { checklistsService } from './checklists/checklists-service';
import { correctionsRoutes } from './corrections/corrections-routes';
import { correctionsService } from './corrections/corrections-service';
import { type Deps } from './deps';
import { equipmentRoutes } from './equipment/equipment-routes';
import { equipmentService } from './equipment/equipment-service';
import { mount } from './http/mount';
import { answerProblem, unknownRoute } from './http/problem';
import { demandSameOrigin } from './http/same-origin';
import { sessions } from './http/sessions';
import { createUploads, maxZipBytes } from './http/uploads';
import { bulkService } from './library/bulk-service';
import { keepingService } from './library/keeping-service';
import { libraryRoutes } from './library/library-routes';
import { reachService } from './library/reach-service';
import { requestsService } from './library/requests-service';
import { siteService } from './library/site-service';
import { jobsRoutes } from './jobs/jobs-routes';
import { jobsService } from './jobs/jobs-service';
import { peopleRoutes } from './people/people-routes';
import { peopleService } from './people/people-service';
import { pinsService } from './people/pins-service';
import { productsRoutes } from './products/products-routes';
import { productsService } from './products/products-service';
import { recordlogService } from './recordlog/recordlog-service';
import { sheetsRoutes } from './sds/sheets-routes';
import { sheetsService } from './sds/sheets-service';
import { searchRoutes } from './search/search-routes';
import { searchService } from './search/search-service';
import { knownMachines } from './session/known-machines';
import { passportFor, sessionRoutes } from './session/session-routes';
import { sessionService } from './session/session-service';
import { recogniseTablet, tabletsRoutes } from './tablets/tablets-routes';
import { tabletsService } from './tablets/tablets-service';
import { todayService } from './today/today-service';

/** The whole service as an Express application; never listens. `close` ends what it started. */
export function createApp(deps: Deps): { app: Express; close: () => void } {
  const { config, log } = deps;
  const isSecure = config.publicUrl.startsWith('https:');
  const app = express();
  app.disable('x-powered-by');
  if (config.TRUST_PROXY) app.set('trust proxy', config.TRUST_PROXY);
  app.use(logRequests(deps));
  app.use(securityHeaders(isSecure));
  app.get('/healthz', (_request, response) => void response.json({ ok: true }));
  app.get('/readyz', readiness(deps));

  const kept = sessions(deps.database, config.keys.sessionSecret, isSecure);
  const session = sessionService(deps);
  const machines = knownMachines(config.keys.sessionSecret);
  const door = passportFor(session, machines);
  const tablets = tabletsService(deps);
  const recordlog = recordlogService(deps);
  const api = Router();
  api.use((_request, response, next) => {
    response.set('Cache-Control', 'no-store');
    next();
  });
  api.use(demandSameOrigin(config.publicUrl));
  api.use('/api/tablet', recogniseTablet(tablets));
  // A tablet's requests carry no session: they must not make one, or keep one alive.
  const people = Router().use(kept.handler, door.initialize(), door.session(), (request, _response, next) => {
    if (request.user) request.actor = request.user;
    next();
  });
  api.use((request, response, next) => (request.path.startsWith('/api/tablet/') ? next() : people(request, response, next)));
  api.use(sessionRoutes(session, door, machines, isSecure));
  api.use(peopleRoutes(peopleService(deps), pinsService(deps)));
  api.use(tabletsRoutes(tablets, isSecure));
  api.use(equipmentRoutes(equipmentService(deps)));
  const sheets = sheetsService(deps);
  const checklists = checklistsService(deps);
  const uploadFolder = config.UPLOAD_FOLDER ?? join(tmpdir(), `kneeboard-uploads-${process.pid}`);
  const uploads = createUploads(uploadFolder);
  api.use(sheetsRoutes(sheets, uploads));
  const library = { reach: reachService(deps, checklists), keeping: keepingService(deps), requests: requestsService(deps, sheets), bulk: bulkService(deps, sheets), site: siteService(deps, sheets) };
  api.use(correctionsRoutes(correctionsService(deps)));
  api.use(searchRoutes(searchService(deps)));
  api.use(libraryRoutes(library, uploads, createUploads(uploadFolder, maxZipBytes)));
  api.use(productsRoutes(productsService(deps)));
  api.use(jobsRoutes(jobsService(deps), checklists));
  api.use(actionsRoutes(actionsService(deps)));
  api.use(acknowledgementsRoutes(historyService(deps, recordlog), recordlog, deliveriesService(deps), tabletDayService(deps)));
  const today = todayService(deps);
  mount(api, 'readToday', ({ actor }) => today.read(actor));
  // What is no row of the contract is not a page either.
  api.use(unknownRoute);
  app.use((request, response, next) => (request.path.startsWith('/api/') ? api(request, response, next) : next()));

  app.use(pages(config.WEB_ROOT));
  app.use(unknownRoute);
  app.use(answerProblem(log));
  return { app, close: kept.close };
}

function securityHeaders(isSecure: boolean): RequestHandler {
  const self = "'self'";
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: [self],
        scriptSrc: [self],
        // Angular writes component styles into the page.
        styleSrc: [self, "'unsafe-inline'"],
        imgSrc: [self, 'data:', 'blob:'],
        fontSrc: [self],
        connectSrc: [self],
        workerSrc: [self],
        manifestSrc: [self],
        objectSrc: ["'none'"],
        baseUri: [self],
        formAction: [self],
        frameAncestors: ["'none'"],
      },
    },
    crossOriginEmbedderPolicy: false,
    referrerPolicy: { policy: 'same-origin' },
    strictTransportSecurity: isSecure ? { maxAge: 31_536_000, includeSubDomains: false } : false,
  });
}

/** Ready means: the database answers. Storage and mail may be away for a while without signatures being lost. */
const readiness =
  ({ database, log }: Deps): RequestHandler =>
  async (_request, response) => {
    try {
      await database.atTheDoor('SELECT 1', []);
      response.json({ ready: true });
    } catch (error) {
      log.warn({ err: error }, 'not ready');
      response.status(503).json({ ready: false, because: 'The database does not answer.' });
    }
  };

/** One line a request: no query, no body, no headers, so no secret. */
const logRequests =
  ({ log, clock }: Deps): RequestHandler =>
  (request, response, next) => {
    const started = clock.now().getTime();
    response.on('finish', () => {
      const by = request.actor?.kind === 'person' ? { person: request.actor.personId } : request.actor ? { tablet: request.actor.tabletId } : {};
      log.info({ method: request.method, path: request.path, status: response.statusCode, ms: clock.now().getTime() - started, ...by }, 'request');
    });
    next();
  };

/** The two applications. Files with a hash in their name never change; the pages that name them are asked for every time. */
function pages(webRoot: string): Router {
  const router = Router();
  const root = resolve(webRoot);
  const files = (folder: string) =>
    express.static(join(root, folder), {
      index: false,
      setHeaders: (response, path) => response.set('Cache-Control', /-[A-Z0-9]{8}\.(?:js|css|woff2)$/.test(path) ? 'public, max-age=31536000, immutable' : 'no-cache'),
    });
  const page = (folder: string): RequestHandler => (request, response, next) => {
    if (request.method !== 'GET' || !request.accepts('html') || /\.\w+$/.test(request.path)) return next();
    response.set('Cache-Control', 'no-cache').sendFile(join(root, folder, 'index.html'), (error) => error && next(error));
  };
  router.use(compression());
  router.get('/tablet', (request, response, next) => (request.path === '/tablet' && !request.originalUrl.startsWith('/tablet/') ? response.redirect(308, '/tablet/') : next()));
  router.use('/tablet', files('tablet'), page('tablet'));
  router.use(files('office'), page('office'));
  return router;
}
