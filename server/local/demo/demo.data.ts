import { L_PER_FT3, M2_PER_FT2, m3PerHFromCfm } from '#compliance/quantities/units';
import { type Role } from '#shared/common';
import { type EquipmentEdit } from '#shared/equipment';
import { type SiteFacts } from '#shared/jobs';
import { type PersonEdit } from '#shared/people';

/** The invented scenario: every person, place, product and figure is made up. */
export const organisationName = 'Marrow & Slate Floors';
/** One password for all demo sign-ins; the start command prints it. */
export const demoPassword = 'plaster brass terrazzo';
export const demoPins: Readonly<Record<string, string>> = { 'Dov Lindqvist': '2468', 'Marisol Tena': '1357', 'Abe Kowalczyk': '9753', 'Tomasz Reyes': '8642', 'Per Aldana': '7531' };

export const signIns: readonly { name: string; role: Role; email: string }[] = [
  { name: 'Hazel Marrow', role: 'owner', email: 'owner@marrowslate.example' },
  { name: 'Ines Halloran', role: 'safety-officer', email: 'officer@marrowslate.example' },
  { name: 'Dov Lindqvist', role: 'crew-lead', email: 'lead@marrowslate.example' },
  { name: 'Wilma Brandt-Osei', role: 'auditor', email: 'auditor@marrowslate.example' },
];

/** `daysAgo` fields become dates when the demo is loaded. */
export function demoPeople(daysAgo: (days: number) => string): readonly PersonEdit[] {
  const crew = (name: string, language: 'en' | 'es', fitTested: number): PersonEdit => ({
    name,
    language,
    employer: organisationName,
    isAdultConfirmed: true,
    isKeptFromIsocyanates: false,
    silicaTrainedOn: daysAgo(210),
    hazcomTrainedOn: daysAgo(210),
    respirators: [{ type: 'half-mask', label: 'Tern H2 half mask, size M', clearedOn: daysAgo(400), fitTestedOn: daysAgo(fitTested) }],
    isActive: true,
  });
  const office = (name: string): PersonEdit => ({ ...crew(name, 'en', 0), respirators: [], silicaTrainedOn: null, hazcomTrainedOn: null });
  return [
    office('Hazel Marrow'),
    office('Ines Halloran'),
    office('Wilma Brandt-Osei'),
    crew('Dov Lindqvist', 'en', 120),
    crew('Marisol Tena', 'es', 90),
    crew('Abe Kowalczyk', 'en', 150),
    crew('Tomasz Reyes', 'es', 356),
    { ...crew('Per Aldana', 'en', 60), isKeptFromIsocyanates: true },
    crew('Junie Okafor', 'en', 30),
  ];
}

const unknown = { wheelDiameterMm: null, requiredAirflowM3PerH: null, airflow: null, filterEfficiencyPercent: null, hasFilterCleaning: null, hasCyclone: null, hasShroud: null, hasWaterFeed: null, isHepa: null, isRideOn: false, hasManualOnFile: true } as const;
export function demoEquipment(daysAgo: (days: number) => string): Readonly<Record<'grinder' | 'grinderCollector' | 'edger' | 'edgerVacuum' | 'blaster' | 'blasterCollector' | 'mixer' | 'mixerExtraction', EquipmentEdit>> {
  const reading = (cfm: number, place: string) => ({ airflowM3PerH: Math.round(m3PerHFromCfm(cfm) * 10) / 10, instrument: 'Vane anemometer VA-3', place, filterState: 'cleaned the same morning', takenBy: 'Dov Lindqvist', takenOn: daysAgo(6) });
  return {
    grinder: { ...unknown, name: 'Floor grinder G1, 25 in', kind: 'floor-grinder', requiredAirflowM3PerH: m3PerHFromCfm(353), hasShroud: true, hasWaterFeed: false },
    grinderCollector: { ...unknown, name: 'Collector C1', kind: 'collector', airflow: reading(412, 'at the grinder’s hose end'), filterEfficiencyPercent: 99.97, hasFilterCleaning: true, hasCyclone: true, isHepa: true },
    edger: { ...unknown, name: 'Edge grinder E1, 5 in', kind: 'edge-grinder', wheelDiameterMm: 127, hasShroud: true, hasWaterFeed: false },
    edgerVacuum: { ...unknown, name: 'Vacuum V2', kind: 'vacuum', airflow: reading(176, 'at the shroud'), filterEfficiencyPercent: 99.97, hasFilterCleaning: true, hasCyclone: false, isHepa: true },
    blaster: { ...unknown, name: 'Shot blaster S1, 15 in', kind: 'shot-blaster', requiredAirflowM3PerH: m3PerHFromCfm(600) },
    blasterCollector: { ...unknown, name: 'Collector C2', kind: 'collector', airflow: reading(640, 'at the blaster’s hose end'), filterEfficiencyPercent: 99.9, hasFilterCleaning: true, hasCyclone: true, isHepa: false },
    mixer: { ...unknown, name: 'Paddle mixer M1', kind: 'mixer' },
    mixerExtraction: { ...unknown, name: 'Bucket extraction B1', kind: 'bucket-extraction', airflow: reading(150, 'at the bucket rim'), filterEfficiencyPercent: 99.97, hasFilterCleaning: true, hasCyclone: false, isHepa: true },
  };
}

export const kit = { name: 'Quarrybond 40', volumeL: Math.round(((25 * 0.25) / 12) * L_PER_FT3 * 1000) / 1000, mixMinutesPerKit: 2, bucketMinutes: 5, cartridgeSchedule: { change: 'new ones before each day of resin', basedOn: 'service-life table of the mask’s maker, read by Ines Halloran' } };

const square = (feet2: number) => Math.round(feet2 * M2_PER_FT2 * 100) / 100;
const cubic = (feet3: number) => Math.round((feet3 * L_PER_FT3) / 10) / 100;
const firstAid = (address: string) => ({ firstAiderName: 'Dov Lindqvist', hasEyewash: true, emergencyNumber: '911', address });
const noEngines = { areUsedInside: false, isExhaustLedOutside: null, hasCarbonMonoxideAlarm: null };
export const sites: Readonly<Record<'creamery' | 'kitchen' | 'freight', { name: string; siteName: string; siteController: string; site: SiteFacts }>> = {
  creamery: {
    name: 'Process hall floor',
    siteName: 'Tollgate Creamery, process hall',
    siteController: 'Tollgate Creamery Cooperative',
    site: {
      setting: 'enclosed',
      roomVolumeM3: cubic(38_000),
      areaM2: square(600),
      thicknessMm: 6.35,
      targetProfile: 5,
      floor: { covering: 'bare-concrete', builtYear: 2011, asbestos: 'not-needed', lead: 'not-needed', surveyReference: 'Bare concrete of 2011, no tile or mastic; looked at by Dov Lindqvist' },
      engines: noEngines,
      firstAid: firstAid('14 Tollgate Road, Superior, WI, loading dock on the north side'),
      hostHazards: 'Ammonia cooling: leave by the north door when the horn sounds, muster at the flag pole. Floor drains go to the creamery’s own treatment: nothing of ours goes down them.',
    },
  },
  kitchen: {
    name: 'Harbor Street Kitchen',
    siteName: 'Harbor Street Kitchen',
    siteController: 'Harbor Street Kitchen',
    site: {
      setting: 'indoors',
      roomVolumeM3: cubic(9_600),
      areaM2: square(320),
      thicknessMm: 6.35,
      targetProfile: 5,
      floor: { covering: 'tile', builtYear: 1974, asbestos: 'unknown', lead: 'unknown', surveyReference: null },
      engines: noEngines,
      firstAid: firstAid('208 Harbor Street, Superior, WI, alley door'),
      hostHazards: null,
    },
  },
  freight: {
    name: 'Freight shed, bay 7',
    siteName: 'Bay 7, Union Depot freight shed',
    siteController: 'Union Depot Storage',
    site: {
      setting: 'indoors',
      roomVolumeM3: cubic(120_000),
      areaM2: square(1_900),
      thicknessMm: null,
      targetProfile: 3,
      floor: { covering: 'bare-concrete', builtYear: 1998, asbestos: 'absent', lead: 'absent', surveyReference: 'Survey 2209 of the depot' },
      engines: { areUsedInside: true, isExhaustLedOutside: true, hasCarbonMonoxideAlarm: true },
      firstAid: { firstAiderName: 'Per Aldana', hasEyewash: true, emergencyNumber: '911', address: '2 Depot Lane, Superior, WI, gate 7' },
      hostHazards: 'Fork trucks in bays 5 and 6 all day: stay behind the barrier, high-visibility vests outside it.',
    },
  },
};
