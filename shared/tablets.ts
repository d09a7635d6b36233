import * as z from 'zod';
import { Id, Instant, Line } from './common';

export const Tablet = z.object({
  id: Id,
  name: z.string(),
  isPaired: z.boolean(),
  pairedAt: Instant.nullable(),
  lastHeardAt: Instant.nullable(),
  withdrawnAt: Instant.nullable(),
});
export type Tablet = z.infer<typeof Tablet>;

export const AddTablet = z.strictObject({ name: Line(60) });
/** Shown once; good for ten minutes and one tablet. */
export const PairingCode = z.object({ tablet: Tablet, code: z.string(), expiresAt: Instant });
export type PairingCode = z.infer<typeof PairingCode>;

export const PairTablet = z.strictObject({ code: z.string().trim().min(1, 'Type the code.').max(20) });
export const PairedTablet = z.object({ tabletId: Id, name: z.string(), organisationName: z.string() });
export type PairedTablet = z.infer<typeof PairedTablet>;
