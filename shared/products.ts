import * as z from 'zod';
import { Id, Line, LocalDate, PageQuery, SearchText, Version } from './common';

export const Product = z.object({
  id: Id,
  name: z.string(),
  supplier: z.string(),
  version: Version,
  /** The confirmed current sheet; null when there is none. */
  sheet: z.object({ revisionId: Id, revisedOn: LocalDate.nullable(), signalWord: z.string().nullable(), hazardCodes: z.array(z.string()), pictograms: z.array(z.string()) }).nullable(),
});
export type Product = z.infer<typeof Product>;
export const AddProduct = z.strictObject({ name: Line(200), supplier: Line(200) });
export const ProductsQuery = PageQuery.extend({ q: SearchText.optional() });

export const partForms = ['liquid', 'powder', 'paste'] as const;
/** The supplier's written word that a lesser preparation is enough. It counts when all three are there. */
export const SurfaceException = z.strictObject({ writtenBy: Line(120).nullable(), reference: Line(160).nullable(), text: Line(400).nullable() });
/** When vapor cartridges are changed and the data it rests on; both must be said. */
export const CartridgeSchedule = z.strictObject({ change: Line(200).nullable(), basedOn: Line(200).nullable() });
export const KitEdit = z.strictObject({
  name: Line(120),
  /** Mixed volume of one kit, litres. */
  volumeL: z.number().positive('Must be above 0.').max(1000),
  mixMinutesPerKit: z.number().min(0).max(60),
  bucketMinutes: z.number().positive('Must be above 0.').max(240).nullable(),
  surfaceException: SurfaceException.optional(),
  cartridgeSchedule: CartridgeSchedule.optional(),
  parts: z
    .array(z.strictObject({ productId: Id, part: Line(20), form: z.enum(partForms) }))
    .min(1, 'Add at least one part.')
    .max(12),
});
export type KitEdit = z.infer<typeof KitEdit>;
export const Kit = z.object({
  id: Id,
  name: z.string(),
  volumeL: z.number(),
  mixMinutesPerKit: z.number(),
  bucketMinutes: z.number().nullable(),
  surfaceException: SurfaceException,
  cartridgeSchedule: CartridgeSchedule,
  version: Version,
  parts: z.array(z.object({ productId: Id, productName: z.string(), part: z.string(), form: z.enum(partForms), hasSheet: z.boolean(), hazardCodes: z.array(z.string()) })),
  /** Union over the parts' confirmed sheets, for protection. */
  hazardCodes: z.array(z.string()),
  pictograms: z.array(z.string()),
});
export type Kit = z.infer<typeof Kit>;
