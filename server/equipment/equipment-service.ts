import { and, asc, eq, gt, or, sql } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import type * as z from 'zod';
import { equipment } from '#drizzle/schema/jobs';
import { type Page, type PageQuery } from '#shared/common';
import { type Equipment, type EquipmentEdit } from '#shared/equipment';
import { type Deps } from '../deps';
import { ConflictError, NotFoundError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { readCursor, toPage } from '../paging';
import { type Tx } from '../platform/database';

type EquipmentRow = typeof equipment.$inferSelect;
export const toEquipment = (row: EquipmentRow): Equipment => ({ ...(row.facts as Omit<EquipmentEdit, 'name'>), id: row.id, name: row.name, version: row.version });
export const listAllEquipment = async (tx: Tx): Promise<Equipment[]> =>
  (await tx.select().from(equipment).where(eq(equipment.organisationId, tx.organisationId)).orderBy(asc(equipment.name), asc(equipment.id))).map(toEquipment);

export function equipmentService({ database }: Deps) {
  return {
    list: (actor: PersonActor, { after, limit }: z.output<typeof PageQuery>): Promise<Page<Equipment>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'text', 'id');
        const rows = await tx
          .select()
          .from(equipment)
          .where(
            and(
              eq(equipment.organisationId, tx.organisationId),
              cursor ? or(gt(equipment.name, String(cursor[0])), and(eq(equipment.name, String(cursor[0])), gt(equipment.id, String(cursor[1])))) : undefined,
            ),
          )
          .orderBy(asc(equipment.name), asc(equipment.id))
          .limit(limit + 1);
        return toPage(rows, limit, (row) => [row.name, row.id], toEquipment);
      }),
    add: (actor: PersonActor, { name, ...facts }: EquipmentEdit): Promise<Equipment> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer', 'crew-lead');
        const [row] = await tx.insert(equipment).values({ organisationId: tx.organisationId, id: newId(), name, facts }).returning();
        return toEquipment(row as EquipmentRow);
      }),
    edit: (actor: PersonActor, id: string, version: number, { name, ...facts }: EquipmentEdit): Promise<Equipment> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer', 'crew-lead');
        const own = and(eq(equipment.organisationId, tx.organisationId), eq(equipment.id, id));
        const [row] = await tx
          .update(equipment)
          .set({ name, facts, version: sql`${equipment.version} + 1` })
          .where(and(own, eq(equipment.version, version)))
          .returning();
        if (row) return toEquipment(row);
        const [current] = await tx.select().from(equipment).where(own);
        if (!current) throw new NotFoundError('machine');
        throw new ConflictError('Somebody changed this machine after you opened it. Compare, then save again.', toEquipment(current));
      }),
  };
}
export type EquipmentService = ReturnType<typeof equipmentService>;
