import { L_PER_FT3, M2_PER_FT2, m3PerHFromCfm } from '#compliance/quantities/units';
import { type EquipmentEdit } from '#shared/equipment';
import { type JobEdit } from '#shared/jobs';
import { type Person, PersonEdit } from '#shared/people';
import { type KitEdit } from '#shared/products';
import { type SheetEdit } from '#shared/sheets';

const daysAgo = (days: number): string => new Date(Date.now() - days * 24 * 3600 * 1000).toISOString().slice(0, 10);

/** What of a person the office's page sends back. */
export const editOf = (person: Person): PersonEdit => PersonEdit.strip().parse(person);

/** Bodies as the office's pages send them; every name in them is invented. */
export const personEdit = (name: string, changes: Partial<PersonEdit> = {}): PersonEdit => ({
  name,
  language: 'en',
  employer: 'Marrow & Slate Floors',
  isAdultConfirmed: true,
  isKeptFromIsocyanates: false,
  silicaTrainedOn: daysAgo(200),
  hazcomTrainedOn: daysAgo(200),
  respirators: [{ type: 'half-mask', label: 'Tern H2 half mask, size M', clearedOn: daysAgo(300), fitTestedOn: daysAgo(90) }],
  isActive: true,
  ...changes,
});

export const equipmentEdit = (changes: Partial<EquipmentEdit> = {}): EquipmentEdit => ({
  name: 'Floor grinder G1',
  kind: 'floor-grinder',
  isRideOn: false,
  wheelDiameterMm: null,
  requiredAirflowM3PerH: m3PerHFromCfm(353),
  airflow: null,
  filterEfficiencyPercent: null,
  hasFilterCleaning: null,
  hasCyclone: null,
  hasShroud: true,
  hasWaterFeed: false,
  isHepa: null,
  hasManualOnFile: true,
  ...changes,
});
export const collectorEdit = (): EquipmentEdit =>
  equipmentEdit({
    name: 'Collector C1',
    kind: 'collector',
    requiredAirflowM3PerH: null,
    airflow: { airflowM3PerH: m3PerHFromCfm(412), instrument: 'vane anemometer', place: 'at the hose end', filterState: 'cleaned the same morning', takenBy: 'Dov Lindqvist', takenOn: daysAgo(3) },
    filterEfficiencyPercent: 99.97,
    hasFilterCleaning: true,
    hasCyclone: true,
    hasShroud: null,
    isHepa: true,
  });

export const jobEdit = (changes: Partial<JobEdit> = {}): JobEdit => ({
  name: 'Process hall floor',
  siteName: 'Tollgate Creamery, process hall',
  siteController: 'Tollgate Creamery Cooperative',
  jurisdictionId: 'us-federal',
  timeZone: 'America/Chicago',
  isOpen: true,
  site: {
    setting: 'enclosed',
    roomVolumeM3: 1076,
    areaM2: 600 * M2_PER_FT2,
    thicknessMm: 6.35,
    targetProfile: 5,
    floor: { covering: 'bare-concrete', builtYear: 2011, asbestos: 'not-needed', lead: 'not-needed', surveyReference: 'Bare concrete of 2011; looked at by Dov Lindqvist' },
    engines: { areUsedInside: false, isExhaustLedOutside: null, hasCarbonMonoxideAlarm: null },
    firstAid: { firstAiderName: 'Dov Lindqvist', hasEyewash: true, emergencyNumber: '911', address: '14 Tollgate Road, Superior, WI, north dock' },
    hostHazards: 'Ammonia cooling: leave by the north door when the horn sounds.',
  },
  ...changes,
});

export const kitEdit = (productId: string, changes: Partial<KitEdit> = {}): KitEdit => ({
  name: 'Quarrybond 40',
  volumeL: ((25 * 0.25) / 12) * L_PER_FT3,
  mixMinutesPerKit: 2,
  bucketMinutes: 5,
  parts: [{ productId, part: 'A', form: 'liquid' }],
  ...changes,
});

export const sheetEdit = (changes: Partial<SheetEdit> = {}): SheetEdit => ({
  productName: 'Quarrybond 40 Part A',
  supplier: 'Northlode Resins, Inc.',
  language: 'en',
  revisedOn: '2024-03-18',
  signalWord: 'warning',
  hazardCodes: ['H315', 'H317'],
  precautionaryCodes: ['P280'],
  ingredients: [{ name: 'Castor oil polyol', cas: '8001-79-4', concentration: '30 - 60 %' }],
  limits: [{ substance: 'Respirable crystalline silica', kind: 'OSHA PEL', value: '0.05', unit: 'mg/m3' }],
  protectionWords: [{ topic: 'hands', text: 'Wear nitrile gloves.' }],
  ...changes,
});
