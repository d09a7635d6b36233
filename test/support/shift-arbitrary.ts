import fc from 'fast-check';
import { consumableBases, consumableKinds, consumableUnits, dustMethods, equipmentKinds, fitTestKinds, respiratorTypes, settings, taskKinds, type ShiftFacts } from '#compliance/facts';

const orNull = <T>(value: fc.Arbitrary<T>): fc.Arbitrary<T | null> => fc.option(value, { nil: null });
const text = fc.constantFrom('', ' ', 'bare concrete', 'Ines Halloran', 'Quarrybond 40', '<b>', '«ñ»');
const date = fc.constantFrom('2025-12-03', '2026-12-02', '2026-12-03', '2026-12-04', '2027-01-31', '2026-02-30', 'soon', '');
/** Includes numbers that cannot be: the rules must name them, never throw. */
const amount = fc.oneof(fc.integer({ min: 0, max: 2000 }), fc.double({ min: 0, max: 5000, noNaN: true }), fc.constantFrom(-1, 0, Number.NaN, Number.POSITIVE_INFINITY));
const minute = fc.oneof(fc.integer({ min: 0, max: 1500 }), fc.constantFrom(-1, Number.NaN, 99_999));
const id = (prefix: string): fc.Arbitrary<string> => fc.integer({ min: 1, max: 3 }).map((number) => `${prefix}${number}`);
const anyBoolean = orNull(fc.boolean());

const assignment = fc.record({ personId: id('person-'), startMinute: minute, endMinute: minute });
const task = fc.record({
  id: id('task-'),
  kind: fc.constantFrom(...taskKinds),
  assignments: fc.array(assignment, { maxLength: 3 }),
  logged: fc.array(assignment, { maxLength: 2 }),
  equipmentId: orNull(id('machine-')),
  collectorId: orNull(id('machine-')),
  dustMethod: orNull(fc.constantFrom(...dustMethods)),
  kitId: orNull(id('kit-')),
  failedControl: orNull(text),
});
const person = fc.record({
  id: id('person-'),
  name: text,
  language: fc.constantFrom('en' as const, 'es' as const),
  isLead: fc.boolean(),
  employer: orNull(text),
  isAdultConfirmed: fc.boolean(),
  isKeptFromIsocyanates: fc.boolean(),
  silicaTrainedOn: orNull(date),
  silicaTrainedBy: orNull(text),
  hazcomTrainedOn: orNull(date),
  hazcomTrainedBy: orNull(text),
  respirators: fc.array(fc.record({ type: fc.constantFrom(...respiratorTypes), label: text, clearedOn: orNull(date), fitTestedOn: orNull(date), fitTestKind: orNull(fc.constantFrom(...fitTestKinds)) }), { maxLength: 2 }),
  elsewhere: fc.array(fc.record({ jobName: text, kind: fc.constantFrom(...taskKinds), startMinute: minute, endMinute: minute }), { maxLength: 2 }),
});
export const hazardCode = fc.constantFrom('H314', 'H315', 'H317', 'H318', 'H319', 'H225', 'H226', 'H334', 'H350i', 'H302+H332', 'EUH204', 'H372', 'H999', 'no code');
const sheet = fc.record({
  revisionId: text,
  revisedOn: orNull(date),
  signalWord: orNull(fc.constantFrom('danger' as const, 'warning' as const, 'none' as const)),
  hazardCodes: fc.array(hazardCode, { maxLength: 4 }),
  precautionaryCodes: fc.array(fc.constantFrom('P280', 'P284', 'P285', 'P305+P351+P338'), { maxLength: 2 }),
  casNumbers: fc.array(fc.constantFrom('101-68-8', '65997-15-1', '14808-60-7', 'x'), { maxLength: 2 }),
  protectionWords: fc.array(fc.record({ topic: fc.constantFrom('eyes' as const, 'hands' as const, 'skin' as const, 'respiratory' as const, 'hearing' as const), text: fc.constantFrom('Wear it.', 'Not required.', 'If ventilation is poor, wear a mask.', '') }), { maxLength: 2 }),
});
const part = fc.record({ productId: text, productName: text, part: fc.constantFrom('A', 'B', 'C'), form: fc.constantFrom('liquid' as const, 'powder' as const, 'paste' as const), sheet: orNull(sheet) });
const kit = fc.record({ id: id('kit-'), name: text, volumeL: amount, mixMinutesPerKit: amount, bucketMinutes: orNull(amount), count: orNull(amount), surfaceException: orNull(fc.record({ writtenBy: text, reference: text, text })), cartridgeSchedule: orNull(fc.record({ change: text, basedOn: text })), parts: fc.array(part, { maxLength: 3 }) });
const reading = fc.record({ airflowM3PerH: amount, instrument: text, place: text, filterState: text, takenBy: text, takenOn: date });
const equipment = fc.record({
  id: id('machine-'),
  name: text,
  kind: fc.constantFrom(...equipmentKinds),
  isRideOn: fc.boolean(),
  wheelDiameterMm: orNull(amount),
  requiredAirflowM3PerH: orNull(amount),
  airflow: orNull(reading),
  filterEfficiencyPercent: orNull(amount),
  hasFilterCleaning: anyBoolean,
  hasCyclone: anyBoolean,
  hasShroud: anyBoolean,
  hasWaterFeed: anyBoolean,
  isHepa: anyBoolean,
  hasManualOnFile: fc.boolean(),
});
const basis = fc.record({
  id: id('basis-'),
  taskKind: fc.constantFrom(...taskKinds),
  kind: fc.constantFrom('objective-data' as const, 'air-samples' as const, 'sampling-day' as const, 'below-action-level' as const),
  exposureMicrogramsPerM3: orNull(amount),
  conditions: text,
  signedBy: text,
  signedOn: date,
  endsOn: date,
  interimApf: orNull(amount),
});
const survey = fc.constantFrom('absent' as const, 'present' as const, 'unknown' as const, 'not-needed' as const);

/** Any facts that fit the types, possible or not. */
export const anyShiftFacts: fc.Arbitrary<ShiftFacts> = fc.record({
  jurisdictionId: fc.constantFrom('us-federal', 'us-california', 'great-britain', 'nowhere', ''),
  date,
  jobName: text,
  siteName: text,
  setting: fc.constantFrom(...settings),
  roomVolumeM3: orNull(amount),
  areaM2: orNull(amount),
  thicknessMm: orNull(amount),
  targetProfile: orNull(amount),
  floor: fc.record({ covering: fc.constantFrom('bare-concrete' as const, 'tile' as const, 'black-mastic' as const, 'old-coating' as const, 'unknown' as const), builtYear: orNull(amount), asbestos: survey, lead: survey, surveyReference: orNull(text) }),
  engines: fc.record({ areUsedInside: anyBoolean, isExhaustLedOutside: anyBoolean, hasCarbonMonoxideAlarm: anyBoolean }),
  firstAid: fc.record({ firstAiderName: orNull(text), hasEyewash: anyBoolean, emergencyNumber: orNull(text), address: orNull(text) }),
  hostHazards: orNull(text),
  siteMaskRule: orNull(text),
  competentPersonId: orNull(id('person-')),
  inspectionCoverId: orNull(id('person-')),
  people: fc.array(person, { maxLength: 3 }),
  tasks: fc.array(task, { maxLength: 4 }),
  kits: fc.array(kit, { maxLength: 2 }),
  equipment: fc.array(equipment, { maxLength: 3 }),
  bases: fc.array(basis, { maxLength: 2 }),
  consumableRates: fc.array(fc.record({ item: fc.constantFrom(...consumableKinds), amount, unit: fc.constantFrom(...consumableUnits), per: fc.constantFrom(...consumableBases), statedBy: text }), { maxLength: 3 }),
});
