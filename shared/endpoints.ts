import type * as z from 'zod';
import { acknowledgementEndpoints, actionEndpoints, tabletDoorEndpoints } from './endpoints-field';
import { libraryKeepingEndpoints } from './endpoints-library';
import { libraryEndpoints, jobEndpoints, peopleEndpoints, sessionEndpoints } from './endpoints-office';
import { type Role } from './common';

/** Who may call: anyone; somebody signed in with one of these roles; or a paired tablet (its device cookie). */
export type Access = 'public' | 'tablet' | readonly Role[];

/** One row of the contract. `body: 'file'` is one multipart field named `file`. `answer: 'bytes'` is not JSON. */
export interface Endpoint {
  readonly method: 'GET' | 'POST' | 'PUT' | 'DELETE';
  readonly path: `/api/${string}`;
  readonly access: Access;
  readonly query?: z.ZodType;
  readonly body?: z.ZodType | 'file';
  readonly answer: z.ZodType | 'nothing' | 'bytes';
  /** Whether the edit must carry If-Match with the version it saw. */
  readonly needsVersion?: true;
}

/** The whole wire contract: routes are mounted from it, and one generated test tries every row. */
export const endpoints = {
  ...sessionEndpoints,
  ...peopleEndpoints,
  ...libraryEndpoints,
  ...jobEndpoints,
  ...actionEndpoints,
  ...acknowledgementEndpoints,
  ...tabletDoorEndpoints,
  ...libraryKeepingEndpoints,
} satisfies Record<string, Endpoint>;
export type EndpointName = keyof typeof endpoints;
