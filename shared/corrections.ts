import * as z from 'zod';
import { Id, Instant } from './common';

/** What a correction explains: where the value stands, or how it is written. */
export const CorrectionRule = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('label'), label: z.string(), where: z.enum(['same-line', 'next-line']), isDayFirst: z.boolean().nullable() }),
  z.object({ kind: z.literal('spelling'), readValue: z.string(), value: z.string() }),
]);
export const correctedFields = ['productName', 'supplier', 'revisedOn'] as const;

/** A correction an officer made on one sheet, remembered for later sheets of the same supplier and layout. */
export const SheetCorrection = z.object({
  id: Id,
  /** The sheet it was made on. */
  revisionId: Id,
  fileName: z.string(),
  field: z.enum(correctedFields),
  rule: CorrectionRule,
  /** What the reader had found; null when nothing. */
  readValue: z.string().nullable(),
  value: z.string(),
  supplier: z.string(),
  correctedAt: Instant,
  correctedBy: z.string(),
  isYours: z.boolean(),
});
export type SheetCorrection = z.infer<typeof SheetCorrection>;

/** What earlier corrections say of a sheet, where it differs from what was read: offered, never applied. */
export const SheetSuggestions = z.object({ items: z.array(z.object({ field: z.enum(correctedFields), value: z.string(), from: SheetCorrection })) });
export type SheetSuggestions = z.infer<typeof SheetSuggestions>;
