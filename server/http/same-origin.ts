import { type RequestHandler } from 'express';
import { ForbiddenError } from '../errors';

/** Every change must show that it comes from our own pages: browsers send Origin or Sec-Fetch-Site with it and other sites cannot forge them. */
export const demandSameOrigin =
  (publicUrl: string): RequestHandler =>
  (request, _response, next) => {
    if (request.method === 'GET' || request.method === 'HEAD' || request.method === 'OPTIONS') return next();
    const site = request.headers['sec-fetch-site'];
    const origin = request.headers.origin;
    const own = [new URL(publicUrl).origin, `${request.protocol}://${request.headers.host}`];
    const fits = (site === undefined || site === 'same-origin') && (origin === undefined || own.includes(origin)) && (site !== undefined || origin !== undefined);
    if (!fits) throw new ForbiddenError('This change did not come from a page of this service. Open the page here and try again.');
    next();
  };
