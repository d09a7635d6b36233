import { Router } from 'express';
import { type ChecklistsService } from '../checklists/checklists-service';
import { mount } from '../http/mount';
import { type JobsService } from './jobs-service';

export function jobsRoutes(service: JobsService, checklists: ChecklistsService): Router {
  const router = Router();
  mount(router, 'listJobs', ({ actor, query }) => service.list(actor, query));
  mount(router, 'addJob', ({ actor, body }) => service.add(actor, body));
  mount(router, 'readJob', ({ actor, params }) => service.read(actor, params.jobId));
  mount(router, 'editJob', ({ actor, params, version, body }) => service.edit(actor, params.jobId, version, body));
  mount(router, 'addShift', ({ actor, params, body }) => service.addShift(actor, params.jobId, body));
  mount(router, 'readShift', ({ actor, params }) => service.readShift(actor, params.shiftId));
  mount(router, 'editShiftPlan', ({ actor, params, version, body }) => service.editPlan(actor, params.shiftId, version, body));
  mount(router, 'signBasis', ({ actor, params, body }) => service.signBasis(actor, params.shiftId, body));
  mount(router, 'publishShift', ({ actor, params, version }) => checklists.publish(actor, params.shiftId, version));
  mount(router, 'readText', async ({ actor, params, response }) => {
    const { bytes, sha256 } = await checklists.readText(actor, params.versionId, params.language);
    response.set({ 'Content-Type': 'application/json; charset=utf-8', 'X-Content-SHA256': sha256, 'Cache-Control': 'private, max-age=31536000, immutable' }).send(bytes);
    return undefined;
  });
  return router;
}
