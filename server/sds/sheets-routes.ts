import { Router } from 'express';
import { rm } from 'node:fs/promises';
import { type Response } from 'express';
import { mount, type Uploads } from '../http/mount';
import { type SheetsService } from './sheets-service';

export function sheetsRoutes(service: SheetsService, uploads: Uploads): Router {
  const router = Router();
  mount(router, 'listSheets', ({ actor, query }) => service.list(actor, query));
  mount(
    router,
    'uploadSheet',
    async ({ actor, body, response }) => {
      try {
        response.status(202);
        return await service.upload(actor, body);
      } finally {
        await rm(body.path, { force: true });
      }
    },
    uploads,
  );
  mount(router, 'readRevision', ({ actor, params }) => service.read(actor, params.revisionId));
  mount(router, 'readRevisionFile', async ({ actor, params, response }) => sendSheet(response, await service.readFile(actor.organisationId, params.revisionId, false)));
  mount(router, 'readTabletSheet', async ({ actor, params, response }) => sendSheet(response, await service.readFile(actor.organisationId, params.revisionId, true)));
  mount(router, 'saveRevision', ({ actor, params, version, body }) => service.save(actor, params.revisionId, version, body));
  mount(router, 'confirmRevision', ({ actor, params, version, body }) => service.confirm(actor, params.revisionId, version, body));
  mount(router, 'setRevisionAside', ({ actor, params, version }) => service.setAside(actor, params.revisionId, version));
  mount(router, 'takeRevisionBack', ({ actor, params, version }) => service.takeBack(actor, params.revisionId, version));
  mount(router, 'readRevisionAgain', ({ actor, params }) => service.readAgain(actor, params.revisionId));
  return router;
}

/** A stranger's file: never sniffed, never run, never in our origin's powers. */
export function sendSheet(response: Response, { bytes, fileName, isPdf }: { bytes: Buffer; fileName: string; isPdf: boolean }): undefined {
  response
    .set({
      'Content-Type': isPdf ? 'application/pdf' : 'application/octet-stream',
      'Content-Disposition': `${isPdf ? 'inline' : 'attachment'}; filename="sheet.${isPdf ? 'pdf' : 'bin'}"; filename*=UTF-8''${encodeURIComponent(fileName)}`,
      'Content-Security-Policy': "sandbox; default-src 'none'",
      'X-Content-Type-Options': 'nosniff',
      'Cache-Control': 'private, max-age=0, must-revalidate',
    })
    .send(bytes);
  return undefined;
}
