import * as z from 'zod';
import { equipmentKinds } from '#compliance/facts';
import { Id, Line, LocalDate, Version } from './common';

export const AirflowReading = z.strictObject({
  airflowM3PerH: z.number().positive('Must be above 0.').max(100_000),
  instrument: Line(120),
  place: Line(120),
  filterState: Line(120),
  takenBy: Line(120),
  takenOn: LocalDate,
});
const known = z.boolean().nullable();
export const EquipmentEdit = z.strictObject({
  name: Line(120),
  kind: z.enum(equipmentKinds),
  isRideOn: z.boolean(),
  wheelDiameterMm: z.number().positive('Must be above 0.').max(2000).nullable(),
  requiredAirflowM3PerH: z.number().positive('Must be above 0.').max(100_000).nullable(),
  airflow: AirflowReading.nullable(),
  filterEfficiencyPercent: z.number().min(0).max(100).nullable(),
  hasFilterCleaning: known,
  hasCyclone: known,
  hasShroud: known,
  hasWaterFeed: known,
  isHepa: known,
  hasManualOnFile: z.boolean(),
});
export type EquipmentEdit = z.infer<typeof EquipmentEdit>;
export const Equipment = EquipmentEdit.extend({ id: Id, version: Version });
export type Equipment = z.infer<typeof Equipment>;
