import * as z from 'zod';
import { Id, Instant } from './common';

/** One thing that needs a person. Order is by harm, worst first. `link` is a path of the office. */
export const TodayItem = z.object({
  id: z.string(),
  level: z.enum(['stop', 'caution', 'plain']),
  label: z.string(),
  text: z.string(),
  detail: z.string(),
  aside: z.string(),
  link: z.string(),
  linkText: z.string(),
});
export type TodayItem = z.infer<typeof TodayItem>;
export const Today = z.object({
  items: z.array(TodayItem),
  onSite: z.array(
    z.object({ shiftId: Id, jobId: Id, jobName: z.string(), siteName: z.string(), doing: z.string(), signed: z.number().int(), asked: z.number().int(), level: z.enum(['stop', 'caution', 'done', 'plain']), tabletName: z.string().nullable(), tabletHeardAt: Instant.nullable() }),
  ),
  library: z.object({ sheetsInUse: z.number().int(), waitingForYou: z.number().int(), beingRead: z.number().int() }),
});
export type Today = z.infer<typeof Today>;

export const KeptAside = z.object({ id: Id, receivedAt: Instant, tabletName: z.string(), kind: z.string().nullable(), because: z.string() });
