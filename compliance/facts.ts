/**
 * The facts of one shift at one job: the only thing the rules look at.
 * Quantities are SI with the unit in the name; times are minutes from local midnight of `date` (may pass 1440 for a night shift).
 * `null` means "nobody has said", never "none".
 */
export interface ShiftFacts {
  readonly jurisdictionId: string;
  /** Local date of the shift, ISO. */
  readonly date: string;
  readonly jobName: string;
  readonly siteName: string;
  readonly setting: Setting;
  readonly roomVolumeM3: number | null;
  readonly areaM2: number | null;
  readonly thicknessMm: number | null;
  /** Concrete surface profile wanted, 1 to 10. */
  readonly targetProfile: number | null;
  readonly floor: FloorFacts;
  /** Engines or fuel heaters that will run inside. */
  readonly engines: EngineFacts;
  readonly firstAid: FirstAidFacts;
  /** The host's hazards toward the crew, in the host's words; null when nobody asked yet. */
  readonly hostHazards: string | null;
  /** Mask that the site or its owner demands in dusty work beside the law, in their words; absent or null where nobody named such a rule. */
  readonly siteMaskRule?: string | null;
  readonly competentPersonId: string | null;
  /** Who inspects while the competent person runs a machine; absent or null when nobody is named. */
  readonly inspectionCoverId?: string | null;
  readonly people: readonly PersonFacts[];
  readonly tasks: readonly TaskFacts[];
  readonly kits: readonly KitFacts[];
  readonly equipment: readonly EquipmentFacts[];
  readonly bases: readonly ExposureBasis[];
  /** What the shift uses up, by rates that a person stated; absent where nobody stated any. */
  readonly consumableRates?: readonly ConsumableRate[];
}

export const settings = ['indoors', 'enclosed', 'outdoors'] as const;
export type Setting = (typeof settings)[number];

export const taskKinds = [
  'floor-grinding',
  'edge-grinding',
  'shot-blasting',
  'scarifying',
  'joint-sawing',
  'handheld-sawing',
  'crack-chasing',
  'mortar-removal',
  'chipping',
  'drilling',
  'powder-mixing',
  'liquid-mixing',
  'priming',
  'spreading',
  'quartz-broadcast',
  'quartz-pick-up',
  'shot-pick-up',
  'collector-emptying',
  'sanding-coating',
  'mastic-scraping',
  'tool-washing',
  'slurry-handling',
  'clean-up',
  'inspection',
  'break',
] as const;
export type TaskKind = (typeof taskKinds)[number];

export const dustMethods = ['vacuum', 'water', 'none'] as const;
export type DustMethod = (typeof dustMethods)[number];

/** A kind of work in the shift, with who does it and when. */
export interface TaskFacts {
  readonly id: string;
  readonly kind: TaskKind;
  readonly assignments: readonly Assignment[];
  /** Time worked so far as somebody logged it; absent or empty when nothing is logged. Counts beside the plan, never instead of it. */
  readonly logged?: readonly Assignment[];
  /** The machine or hand tool; null when none is chosen. */
  readonly equipmentId: string | null;
  /** The dust collector or vacuum on it. */
  readonly collectorId: string | null;
  readonly dustMethod: DustMethod | null;
  /** The kit that is mixed or spread. */
  readonly kitId: string | null;
  /** A control that failed on the day ("No" on a critical line): Table 1 is lost until it is restored. */
  readonly failedControl: string | null;
}

export interface Assignment {
  readonly personId: string;
  readonly startMinute: number;
  readonly endMinute: number;
}

export interface FloorFacts {
  readonly covering: 'bare-concrete' | 'tile' | 'black-mastic' | 'old-coating' | 'unknown';
  readonly builtYear: number | null;
  readonly asbestos: Survey;
  readonly lead: Survey;
  /** Report number or who looked and when. */
  readonly surveyReference: string | null;
}
/** `not-needed` only where a competent person recorded why (bare concrete, known age). */
export type Survey = 'absent' | 'present' | 'unknown' | 'not-needed';

export interface EngineFacts {
  readonly areUsedInside: boolean | null;
  readonly isExhaustLedOutside: boolean | null;
  readonly hasCarbonMonoxideAlarm: boolean | null;
}

export interface FirstAidFacts {
  readonly firstAiderName: string | null;
  readonly hasEyewash: boolean | null;
  readonly emergencyNumber: string | null;
  readonly address: string | null;
}

export interface PersonFacts {
  readonly id: string;
  readonly name: string;
  readonly language: 'en' | 'es';
  readonly isLead: boolean;
  readonly employer: string | null;
  readonly isAdultConfirmed: boolean;
  /** Whether a clinician's limit keeps this person from isocyanates: the limit, never the finding. */
  readonly isKeptFromIsocyanates: boolean;
  readonly silicaTrainedOn: string | null;
  /** Trainer or employer who certifies it; absent or null where nobody is named. */
  readonly silicaTrainedBy?: string | null;
  readonly hazcomTrainedOn: string | null;
  readonly hazcomTrainedBy?: string | null;
  readonly respirators: readonly PersonRespirator[];
  /** Work on other jobs of the same day: the person, not the job, carries the minutes. */
  readonly elsewhere: readonly ElsewhereFacts[];
}

export interface PersonRespirator {
  readonly type: RespiratorType;
  /** Maker, model, style and size as one label. */
  readonly label: string;
  readonly clearedOn: string | null;
  readonly fitTestedOn: string | null;
  /** By taste or smell, or counted with a fit factor; absent while nobody has said. */
  readonly fitTestKind?: FitTestKind | null;
}
export const fitTestKinds = ['qualitative', 'quantitative'] as const;
export type FitTestKind = (typeof fitTestKinds)[number];
export const respiratorTypes = ['filtering-facepiece', 'half-mask', 'full-facepiece', 'papr-loose', 'papr-hood', 'papr-half-mask', 'papr-full-facepiece', 'supplied-air-hood'] as const;
export type RespiratorType = (typeof respiratorTypes)[number];

export interface ElsewhereFacts {
  readonly jobName: string;
  readonly kind: TaskKind;
  readonly startMinute: number;
  readonly endMinute: number;
}

export interface KitFacts {
  readonly id: string;
  readonly name: string;
  /** Mixed volume of one kit. */
  readonly volumeL: number;
  readonly mixMinutesPerKit: number;
  /** How long mixed material may stay in the bucket. */
  readonly bucketMinutes: number | null;
  /** Kits on this job when the count is fixed by hand; null computes it from area and thickness. */
  readonly count: number | null;
  readonly parts: readonly PartFacts[];
  /** The supplier's written word that a lesser preparation is enough for this product; absent or null without one. */
  readonly surfaceException?: WrittenException | null;
  /** When vapor cartridges are changed in work with this kit, and the data it rests on; absent or null where nobody wrote it. */
  readonly cartridgeSchedule?: CartridgeSchedule | null;
}

/** For example a coarse grind with primer in place of a blasted profile: recorded as the exception it is. */
export interface WrittenException {
  readonly writtenBy: string;
  readonly reference: string;
  readonly text: string;
}

export interface CartridgeSchedule {
  readonly change: string;
  readonly basedOn: string;
}

export const consumableKinds = ['shot', 'diamonds', 'blades', 'collector-bags', 'hepa-filters', 'cartridges', 'tape'] as const;
export type ConsumableKind = (typeof consumableKinds)[number];
export const consumableUnits = ['pieces', 'lb', 'kg', 'ft', 'm'] as const;
export const consumableBases = ['ft2', 'm2', 'hour', 'kit', 'person'] as const;

/** A stated rate: so much of a thing for each m², machine hour, kit or person. */
export interface ConsumableRate {
  readonly item: ConsumableKind;
  readonly amount: number;
  readonly unit: (typeof consumableUnits)[number];
  readonly per: (typeof consumableBases)[number];
  /** Who says so, or which paper: the supplier's sheet, the maker's manual, a person's own count. */
  readonly statedBy: string;
}

export interface PartFacts {
  readonly productId: string;
  readonly productName: string;
  /** Letter or word on the container: A, B, C. */
  readonly part: string;
  readonly form: 'liquid' | 'powder' | 'paste';
  /** The confirmed current sheet; null when the product has none: it is named, never silently used. */
  readonly sheet: SheetFacts | null;
}

export interface SheetFacts {
  readonly revisionId: string;
  readonly revisedOn: string | null;
  readonly signalWord: 'danger' | 'warning' | 'none' | null;
  /** The product's own statements, as on section 2, e.g. H350i, H302+H332. */
  readonly hazardCodes: readonly string[];
  readonly precautionaryCodes: readonly string[];
  readonly casNumbers: readonly string[];
  readonly protectionWords: readonly { readonly topic: 'eyes' | 'hands' | 'skin' | 'respiratory' | 'hearing'; readonly text: string }[];
}

export const equipmentKinds = ['floor-grinder', 'edge-grinder', 'shot-blaster', 'scarifier', 'walk-behind-saw', 'handheld-saw', 'drill', 'chipping-hammer', 'collector', 'vacuum', 'mixer', 'bucket-extraction', 'air-mover'] as const;
export type EquipmentKind = (typeof equipmentKinds)[number];

export interface EquipmentFacts {
  readonly id: string;
  readonly name: string;
  readonly kind: EquipmentKind;
  readonly isRideOn: boolean;
  readonly wheelDiameterMm: number | null;
  /** Maker's airflow for this machine's collector. */
  readonly requiredAirflowM3PerH: number | null;
  readonly airflow: AirflowReading | null;
  readonly filterEfficiencyPercent: number | null;
  readonly hasFilterCleaning: boolean | null;
  readonly hasCyclone: boolean | null;
  readonly hasShroud: boolean | null;
  readonly hasWaterFeed: boolean | null;
  readonly isHepa: boolean | null;
  readonly hasManualOnFile: boolean;
}

/** Airflow with instrument, place, filter state, who and when: a bare number is not a reading. */
export interface AirflowReading {
  readonly airflowM3PerH: number;
  readonly instrument: string;
  readonly place: string;
  readonly filterState: string;
  readonly takenBy: string;
  readonly takenOn: string;
}

/** A signed decision about the exposure of a task that Table 1 does not cover. */
export interface ExposureBasis {
  readonly id: string;
  readonly taskKind: TaskKind;
  readonly kind: 'objective-data' | 'air-samples' | 'sampling-day' | 'below-action-level';
  /** 8-h TWA without respirator, µg/m³ respirable crystalline silica, the basis supports; null on a sampling day. */
  readonly exposureMicrogramsPerM3: number | null;
  readonly conditions: string;
  readonly signedBy: string;
  readonly signedOn: string;
  readonly endsOn: string;
  /** Respirator named by the signer for a sampling day; never filled in by the program. */
  readonly interimApf: number | null;
  /** Whether the signed figure already counts the Table 1 minutes of the same people; absent means it does not. */
  readonly includesTable1Work?: boolean;
}
