import { sql } from 'drizzle-orm';
import { type APIResponse } from 'playwright-core';
import { v7 as newId } from 'uuid';
import { organisations } from '#drizzle/schema/organisations';
import { people } from '#drizzle/schema/people';
import { roles, type Role } from '#shared/common';
import { type EndpointName } from '#shared/endpoints';
import { endpoints } from '#shared/endpoints';
import { createDatabase } from '#server/platform/database';
import { hashPassword } from '#server/session/passwords';
import { type Seat } from './browser';
import { personEdit } from './edits';
import { type RunningService } from './running-service';

export const password = 'plaster brass terrazzo';
export const names: Readonly<Record<Role, string>> = { owner: 'Hazel Marrow', 'safety-officer': 'Ines Halloran', 'crew-lead': 'Dov Lindqvist', auditor: 'Wilma Brandt-Osei' };

export interface SignIns {
  readonly organisationName: string;
  readonly emails: Readonly<Record<Role, string>>;
  /** Ids of the four and of the crew, by name. */
  readonly personIds: Readonly<Record<string, string>>;
}

/** A fresh organisation with one sign-in of each role and a crew without; everything else is done on its pages. */
export async function addOrganisation(service: RunningService, crew: readonly string[] = [], organisationName = 'Marrow & Slate Floors'): Promise<SignIns> {
  const database = createDatabase(service.appDatabaseUrl, { max: 1 });
  const id = newId();
  const everyone = [...Object.values(names), ...crew].map((name) => ({ id: newId(), name }));
  const personIds = Object.fromEntries(everyone.map((person) => [person.name, person.id]));
  const emails = Object.fromEntries(roles.map((role) => [role, `${role}-${id}@marrowslate.example`])) as Record<Role, string>;
  const hash = await hashPassword(password);
  try {
    await database.inOrganisation(id, async (tx) => {
      await tx.insert(organisations).values({ organisationId: id, name: organisationName, auditorEmails: [], phone: '555-0142' });
      await tx.insert(people).values(everyone.map((person) => ({ organisationId: id, id: person.id, ...personEdit(person.name) })));
      for (const role of roles) await tx.execute(sql`SELECT door_set_login(${personIds[names[role]]}, ${emails[role]}, ${role}, ${hash})`);
    });
  } finally {
    await database.close();
  }
  return { organisationName, emails, personIds };
}

/** One row of the contract, called with the session of whoever sits there, as their own page would call it. */
export function callFrom({ page }: Seat, name: EndpointName, { params = {}, body, version }: { params?: Readonly<Record<string, string>>; body?: unknown; version?: number } = {}): Promise<APIResponse> {
  const { method, path } = endpoints[name];
  const address = path.replace(/:(\w+)/g, (_, param: string) => encodeURIComponent(params[param] ?? ''));
  return page.request.fetch(address, {
    method,
    headers: { Origin: new URL(page.url()).origin, ...(version === undefined ? {} : { 'If-Match': `"${version}"` }) },
    ...(body === undefined ? {} : { data: body }),
  });
}

/** The answer of a call that must succeed. */
export async function answerOf<T>(response: Promise<APIResponse>): Promise<T> {
  const answer = await response;
  if (!answer.ok()) throw new Error(`${answer.url()} answered ${answer.status()}: ${await answer.text()}`);
  return (await answer.json()) as T;
}
