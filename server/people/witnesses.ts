import { sql } from 'drizzle-orm';
import { shifts } from '#drizzle/schema/jobs';
import { people } from '#drizzle/schema/people';
import { type Tx } from '../platform/database';

const recentDays = 30;

/** Who may witness a new PIN: active people who sign in as lead, officer or owner, and competent persons of the last days' and the next shifts. By name. */
export async function readLeads(tx: Tx, now: Date): Promise<{ id: string; name: string }[]> {
  const since = new Date(now.getTime() - recentDays * 24 * 3600 * 1000).toISOString().slice(0, 10);
  const { rows } = await tx.execute<{ id: string; name: string }>(sql`
    SELECT p.id, p.name FROM ${people} p
    WHERE p.organisation_id = ${tx.organisationId} AND p.is_active
      AND (p.id IN (SELECT m.person_id FROM door_members() m WHERE m.role IN ('owner', 'safety-officer', 'crew-lead'))
        OR p.id::text IN (SELECT s.plan->>'competentPersonId' FROM ${shifts} s WHERE s.organisation_id = ${tx.organisationId} AND s.date >= ${since}))
    ORDER BY p.name, p.id`);
  return rows;
}
