import { rm } from 'node:fs/promises';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { Router, type Request, type Response } from 'express';
import { LinkToken } from '#shared/library';
import { sendFile } from '../acknowledgements/acknowledgements-routes';
import { NotFoundError } from '../errors';
import { mount, type UploadedFile, type Uploads } from '../http/mount';
import { sendSheet } from '../sds/sheets-routes';
import { type BulkService } from './bulk-service';
import { type KeepingService } from './keeping-service';
import { type ReachService } from './reach-service';
import { type RequestsService } from './requests-service';
import { type SiteService } from './site-service';

interface Services {
  readonly reach: ReachService;
  readonly keeping: KeepingService;
  readonly requests: RequestsService;
  readonly bulk: BulkService;
  readonly site: SiteService;
}

export function libraryRoutes({ reach, keeping, requests, bulk, site }: Services, uploads: Uploads, zipUploads: Uploads): Router {
  const router = Router();
  mount(router, 'readReach', ({ actor, params }) => reach.read(actor, params.revisionId));
  mount(router, 'applyRevision', ({ actor, params }) => reach.apply(actor, params.revisionId));
  mount(router, 'listProductUses', ({ actor, query }) => reach.uses(actor, query));
  mount(router, 'listLibraryTasks', ({ actor, query }) => keeping.listTasks(actor, query));
  mount(router, 'readLibraryPolicy', ({ actor }) => keeping.readPolicy(actor));
  mount(router, 'setLibraryPolicy', ({ actor, body }) => keeping.setPolicy(actor, body));
  mount(router, 'readKitLabel', ({ actor, params, query }) => keeping.kitLabel(actor, params.kitId, query));
  mount(router, 'readProductLabel', ({ actor, params }) => keeping.productLabel(actor, params.productId));

  mount(router, 'listRequests', ({ actor, query }) => requests.list(actor, query));
  mount(router, 'askSupplier', ({ actor, body }) => requests.ask(actor, body));
  mount(router, 'draftReturn', ({ actor, params }) => requests.draftReturn(actor, params.revisionId));
  mount(router, 'returnSheet', ({ actor, params, version, body }) => requests.returnSheet(actor, params.revisionId, version, body));
  mount(router, 'withdrawRequest', ({ actor, params }) => requests.withdraw(actor, params.requestId));
  mount(router, 'openRequest', ({ body, request }) => requests.open(body.token, addressOf(request)));
  mount(
    router,
    'answerRequest',
    ({ body, request }) =>
      removed(body, async () => {
        await requests.answer(tokenOf(request), body, addressOf(request));
        return undefined;
      }),
    uploads,
  );

  mount(router, 'uploadZip', ({ actor, body }) => removed(body, () => bulk.uploadZip(actor, body)), zipUploads);
  mount(router, 'previewImport', ({ actor, body }) => removed(body, () => bulk.preview(actor, body)), uploads);
  mount(router, 'importProducts', ({ actor, body }) => bulk.importProducts(actor, body.products));
  mount(router, 'exportProductsCsv', ({ actor, response }) => sendFile(response, 'products.csv', 'text/csv; charset=utf-8', Readable.from(bulk.exportCsv(actor))));
  mount(router, 'exportSheetsZip', async ({ actor, response }) => sendZip(response, await bulk.exportZip(actor)));

  mount(router, 'readSiteCode', ({ actor, params }) => site.read(actor, params.jobId));
  mount(router, 'makeSiteCode', ({ actor, params }) => site.make(actor, params.jobId));
  mount(router, 'revokeSiteCode', ({ actor, params }) => site.revoke(actor, params.jobId));
  mount(router, 'openSite', ({ body, request }) => site.open(body.token, addressOf(request)));
  mount(router, 'readSiteSheet', async ({ params, request, response }) => sendSheet(response, await site.readSheet(tokenOf(request), params.revisionId, addressOf(request))));
  return router;
}

const addressOf = (request: Request): string => request.ip ?? 'unknown';
/** A link's secret comes in a header: addresses end up in logs and histories. */
function tokenOf(request: Request): string {
  const token = LinkToken.safeParse(request.headers['x-kneeboard-link']);
  if (!token.success) throw new NotFoundError('open link');
  return token.data;
}
async function removed<T>(file: UploadedFile, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } finally {
    await rm(file.path, { force: true });
  }
}
async function sendZip(response: Response, zip: Readable): Promise<undefined> {
  response.set({ 'Content-Type': 'application/zip', 'Content-Disposition': 'attachment; filename="safety-data-sheets.zip"', 'Cache-Control': 'no-store' });
  await pipeline(zip, response);
  return undefined;
}
