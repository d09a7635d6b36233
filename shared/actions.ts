import * as z from 'zod';
import { Id, Instant, PageQuery, Paragraph, Version } from './common';

/** A corrective action: opened by a "No", a refusal or a person; someone owns it; restart needs its evidence. */
export const CorrectiveAction = z.object({
  id: Id,
  jobId: Id,
  jobName: z.string(),
  shiftId: Id,
  shiftDate: z.string(),
  taskId: Id.nullable(),
  taskName: z.string().nullable(),
  text: z.string(),
  openedAt: Instant,
  openedBy: z.string(),
  ownerPersonId: Id.nullable(),
  ownerName: z.string().nullable(),
  resolvedAt: Instant.nullable(),
  resolvedBy: z.string().nullable(),
  evidence: z.string().nullable(),
  version: Version,
});
export type CorrectiveAction = z.infer<typeof CorrectiveAction>;
export const ActionsQuery = PageQuery.extend({ state: z.enum(['open', 'resolved']).optional(), shiftId: Id.optional() });
export const ResolveAction = z.strictObject({ evidence: Paragraph(2000).min(5, 'Say what was done and how it was checked.') });
export const AssignAction = z.strictObject({ ownerPersonId: Id });
