import * as z from 'zod';
import { consumableBases, consumableKinds, consumableUnits, dustMethods, settings, taskKinds, type ShiftFacts, type EquipmentFacts, type KitFacts, type PersonFacts, type ExposureBasis } from '#compliance/facts';
import { PinState, TimeDoubt } from './acknowledgements';
import { Id, Instant, Line, LocalDate, PageQuery, Paragraph, SearchText, Version } from './common';

const survey = z.enum(['absent', 'present', 'unknown', 'not-needed']);
const known = z.boolean().nullable();

/** What is true of the place for the whole job. SI units; pages keep the unit a person typed. */
export const SiteFacts = z.strictObject({
  setting: z.enum(settings),
  roomVolumeM3: z.number().positive('Must be above 0.').max(10_000_000).nullable(),
  areaM2: z.number().positive('Must be above 0.').max(1_000_000).nullable(),
  thicknessMm: z.number().positive('Must be above 0.').max(200).nullable(),
  targetProfile: z.number().int().min(1).max(10).nullable(),
  floor: z.strictObject({
    covering: z.enum(['bare-concrete', 'tile', 'black-mastic', 'old-coating', 'unknown']),
    builtYear: z.number().int().min(1700).max(2200).nullable(),
    asbestos: survey,
    lead: survey,
    surveyReference: Line(200).nullable(),
  }),
  engines: z.strictObject({ areUsedInside: known, isExhaustLedOutside: known, hasCarbonMonoxideAlarm: known }),
  firstAid: z.strictObject({ firstAiderName: Line(120).nullable(), hasEyewash: known, emergencyNumber: Line(60).nullable(), address: Line(200).nullable() }),
  hostHazards: Paragraph(2000).nullable(),
  /** Mask that the site or its owner asks in dusty work beside the law. Optional: jobs kept before it was asked lack it. */
  siteMaskRule: Line(160).nullable().optional(),
});
export type SiteFacts = z.infer<typeof SiteFacts>;

export const JobEdit = z.strictObject({
  name: Line(120),
  siteName: Line(160),
  /** Who controls the site. */
  siteController: Line(160).nullable(),
  jurisdictionId: z.string().regex(/^[a-z0-9-]{2,40}$/),
  timeZone: z.string().refine((zone) => isTimeZone(zone), 'Choose a time zone.'),
  isOpen: z.boolean(),
  site: SiteFacts,
});
export type JobEdit = z.infer<typeof JobEdit>;

const isTimeZone = (zone: string): boolean => {
  try {
    return Boolean(new Intl.DateTimeFormat('en', { timeZone: zone }));
  } catch {
    return false;
  }
};

/** One day's signing in a line: signed of asked on the newest version. */
export const ShiftSummary = z.object({
  id: Id,
  date: LocalDate,
  publishedVersion: z.number().int().nullable(),
  asked: z.number().int(),
  signed: z.number().int(),
  openActions: z.number().int(),
});
export type ShiftSummary = z.infer<typeof ShiftSummary>;
export const JobSummary = z.object({
  id: Id,
  name: z.string(),
  siteName: z.string(),
  jurisdictionId: z.string(),
  isOpen: z.boolean(),
  version: Version,
  latestShift: ShiftSummary.nullable(),
});
export type JobSummary = z.infer<typeof JobSummary>;
export const Job = JobEdit.extend({ id: Id, version: Version, shifts: z.array(ShiftSummary) });
export type Job = z.infer<typeof Job>;
export const JobsQuery = PageQuery.extend({ q: SearchText.optional(), isOpen: z.enum(['true', 'false']).optional() });

const minuteOfDay = z.number().int().min(0).max(2880);
const assignments = z
  .array(
    z
      .strictObject({ personId: Id, startMinute: minuteOfDay, endMinute: minuteOfDay })
      .refine((a) => a.endMinute > a.startMinute, 'The end must come after the start.'),
  )
  .max(60);
/** A rate that somebody stated; the program knows none of its own. */
export const ConsumableRate = z.strictObject({
  item: z.enum(consumableKinds),
  amount: z.number().positive('Must be above 0.').max(100_000),
  unit: z.enum(consumableUnits),
  per: z.enum(consumableBases),
  statedBy: Line(160).min(1, 'Say who states it, or which paper.'),
});
export const Task = z.strictObject({
  id: Id,
  kind: z.enum(taskKinds),
  assignments,
  /** Time worked so far, as somebody logged it; counts beside the plan. */
  logged: assignments.optional(),
  equipmentId: Id.nullable(),
  collectorId: Id.nullable(),
  dustMethod: z.enum(dustMethods).nullable(),
  kitId: Id.nullable(),
});
/** What a person plans for one day; stored as sent, edited under If-Match. */
export const ShiftPlan = z.strictObject({
  competentPersonId: Id.nullable(),
  /** Who inspects while the competent person runs a machine. */
  inspectionCoverId: Id.nullable().optional(),
  personIds: z.array(Id).max(60),
  tasks: z.array(Task).max(60),
  kits: z.array(z.strictObject({ kitId: Id, count: z.number().int().min(0).max(10_000).nullable() })).max(20),
  consumableRates: z.array(ConsumableRate).max(consumableKinds.length).optional(),
});
export type ShiftPlan = z.infer<typeof ShiftPlan>;
export const AddShift = z.strictObject({ date: LocalDate, /** Copies people, tasks and kits of this shift. */ copyFromShiftId: Id.nullable() });

export type AddShift = z.infer<typeof AddShift>;

export const basisKinds = ['objective-data', 'air-samples', 'sampling-day', 'below-action-level'] as const;
export const SignBasis = z
  .strictObject({
    taskKind: z.enum(taskKinds),
    kind: z.enum(basisKinds),
    exposureMicrogramsPerM3: z.number().min(0).max(100_000).nullable(),
    conditions: Paragraph(2000).min(10, 'Say under which conditions this holds.'),
    endsOn: LocalDate,
    interimApf: z.number().positive().max(10_000).nullable(),
    /** Typed name of the signer: the act of signing. Must match the signed-in person's name. */
    typedName: Line(120),
  })
  .refine((b) => b.kind === 'sampling-day' || b.exposureMicrogramsPerM3 !== null, { path: ['exposureMicrogramsPerM3'], message: 'Give the 8-hour average the basis supports.' })
  .refine((b) => b.kind !== 'sampling-day' || b.interimApf !== null, { path: ['interimApf'], message: 'Name the interim protection for the sampling day.' });
export type SignBasis = z.infer<typeof SignBasis>;

export const PublishedVersion = z.object({
  id: Id,
  number: z.number().int(),
  publishedAt: Instant,
  publishedBy: z.string(),
  manifestSha256: z.string(),
  texts: z.array(z.object({ language: z.enum(['en', 'es']), sha256: z.string() })),
  asked: z.array(z.object({ personId: Id, name: z.string(), language: z.enum(['en', 'es']), state: z.enum(['not-yet', 'signed', 'could-not-sign', 'not-confirmed']), at: Instant.nullable(), pinState: PinState.nullable().default(null) })),
  /** Briefings and start checks, as they arrived. */
  answers: z.array(z.object({ id: Id, kind: z.enum(['briefing', 'start-check']), taskId: Id.nullable(), personName: z.string(), at: Instant, receivedAt: Instant, noCount: z.number().int(), pinState: PinState, timeDoubt: TimeDoubt.nullable() })).default([]),
});
export type PublishedVersion = z.infer<typeof PublishedVersion>;

/**
 * Everything the shift page needs to compute the same answer as the server: stored plan and site, and the context they point at
 * (already the types of compliance/facts.ts, so not checked again field by field here).
 */
export const Shift = z.object({
  id: Id,
  jobId: Id,
  date: LocalDate,
  version: Version,
  plan: ShiftPlan,
  job: z.object({ id: Id, name: z.string(), siteName: z.string(), jurisdictionId: z.string(), timeZone: z.string(), site: SiteFacts, version: Version }),
  context: z.object({
    people: z.array(z.custom<PersonFacts>()),
    kits: z.array(z.custom<KitFacts>()),
    equipment: z.array(z.custom<EquipmentFacts>()),
    bases: z.array(z.custom<ExposureBasis>()),
    /** Task id → the control that failed, from open corrective actions. */
    failedControls: z.record(z.string(), z.string()),
  }),
  versions: z.array(PublishedVersion),
  /** Whether the plan or its context differs from the newest published version. */
  hasUnpublishedChanges: z.boolean(),
  openActions: z.array(z.object({ id: Id, taskId: Id.nullable(), text: z.string(), openedAt: Instant, openedBy: z.string() })),
});
export type Shift = z.infer<typeof Shift>;

/** The facts the rules look at, from what is stored: the same function in the browser and on the server. */
export function assembleFacts(shift: Pick<Shift, 'date' | 'plan' | 'job' | 'context'>): ShiftFacts {
  const { plan, job, context } = shift;
  const wanted = new Set(plan.personIds);
  return {
    jurisdictionId: job.jurisdictionId,
    date: shift.date,
    jobName: job.name,
    siteName: job.siteName,
    ...job.site,
    competentPersonId: plan.competentPersonId,
    inspectionCoverId: plan.inspectionCoverId ?? null,
    consumableRates: plan.consumableRates ?? [],
    people: context.people.filter((p) => wanted.has(p.id)).map((p) => ({ ...p, isLead: p.id === plan.competentPersonId })),
    tasks: plan.tasks.map((t) => ({ ...t, failedControl: context.failedControls[t.id] ?? null })),
    kits: plan.kits.flatMap(({ kitId, count }) => context.kits.filter((k) => k.id === kitId).map((k) => ({ ...k, count }))),
    equipment: context.equipment,
    bases: context.bases,
  };
}
