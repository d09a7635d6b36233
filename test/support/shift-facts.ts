import { type EquipmentFacts, type ExposureBasis, type KitFacts, type PartFacts, type PersonFacts, type SheetFacts, type ShiftFacts, type TaskFacts } from '#compliance/facts';
import { L_PER_FT3, M2_PER_FT2, m3PerHFromCfm } from '#compliance/quantities/units';

const at = (hours: number, minutes = 0): number => hours * 60 + minutes;

export function sheetFacts(overrides: Partial<SheetFacts> = {}): SheetFacts {
  return { revisionId: 'revision-1', revisedOn: '2025-01-20', signalWord: 'danger', hazardCodes: [], precautionaryCodes: [], casNumbers: [], protectionWords: [], ...overrides };
}

const resin: PartFacts = {
  productId: 'quarrybond-40-a',
  productName: 'Quarrybond 40 part A',
  part: 'A',
  form: 'liquid',
  sheet: sheetFacts({ revisionId: 'a-3', revisedOn: '2024-09-02', signalWord: 'warning', hazardCodes: ['H319'], precautionaryCodes: ['P280', 'P305+P351+P338'], casNumbers: ['100-51-6'], protectionWords: [{ topic: 'eyes', text: 'Wear goggles.' }] }),
};
const hardener: PartFacts = {
  productId: 'quarrybond-40-b',
  productName: 'Quarrybond 40 part B',
  part: 'B',
  form: 'liquid',
  sheet: sheetFacts({
    revisionId: 'b-2',
    hazardCodes: ['H315', 'H317', 'H319', 'H332', 'H334', 'H335', 'H351', 'H373'],
    precautionaryCodes: ['P260', 'P280', 'P342+P311'],
    casNumbers: ['101-68-8', '9016-87-9'],
    protectionWords: [{ topic: 'hands', text: 'Wear nitrile gloves.' }],
  }),
};
const powder: PartFacts = {
  productId: 'quarrybond-40-c',
  productName: 'Quarrybond 40 part C',
  part: 'C',
  form: 'powder',
  sheet: sheetFacts({ revisionId: 'c-1', revisedOn: '2023-05-11', hazardCodes: ['H315', 'H317', 'H318', 'H335', 'H350i', 'H372'], precautionaryCodes: ['P260', 'P280', 'P305+P351+P338'], casNumbers: ['65997-15-1', '14808-60-7'] }),
};

export function kitFacts(overrides: Partial<KitFacts> = {}): KitFacts {
  return { id: 'quarrybond-40', name: 'Quarrybond 40', volumeL: ((25 * 0.25) / 12) * L_PER_FT3, mixMinutesPerKit: 2, bucketMinutes: 5, count: null, parts: [resin, hardener, powder], ...overrides };
}

export function personFacts(overrides: Partial<PersonFacts> = {}): PersonFacts {
  return {
    id: 'dov',
    name: 'Dov Lindqvist',
    language: 'en',
    isLead: false,
    employer: 'Marrow & Slate Floors',
    isAdultConfirmed: true,
    isKeptFromIsocyanates: false,
    silicaTrainedOn: '2026-02-10',
    hazcomTrainedOn: '2026-02-10',
    respirators: [{ type: 'half-mask', label: 'Marrow 7 half mask, M', clearedOn: '2025-06-01', fitTestedOn: '2026-03-15' }],
    elsewhere: [],
    ...overrides,
  };
}

export function equipmentFacts(overrides: Partial<EquipmentFacts> = {}): EquipmentFacts {
  return {
    id: 'grinder',
    name: 'Walk-behind grinder 1',
    kind: 'floor-grinder',
    isRideOn: false,
    wheelDiameterMm: null,
    requiredAirflowM3PerH: null,
    airflow: null,
    filterEfficiencyPercent: null,
    hasFilterCleaning: null,
    hasCyclone: null,
    hasShroud: null,
    hasWaterFeed: null,
    isHepa: null,
    hasManualOnFile: true,
    ...overrides,
  };
}

export function airflowCfm(cfm: number): EquipmentFacts['airflow'] {
  return { airflowM3PerH: m3PerHFromCfm(cfm), instrument: 'vane anemometer', place: 'at the shroud', filterState: 'new on 1 December', takenBy: 'Dov Lindqvist', takenOn: '2026-12-03' };
}

export function taskFacts(overrides: Partial<TaskFacts> & Pick<TaskFacts, 'kind'>): TaskFacts {
  return { id: overrides.kind, assignments: [], equipmentId: null, collectorId: null, dustMethod: null, kitId: null, failedControl: null, ...overrides };
}

export function basisFacts(overrides: Partial<ExposureBasis> = {}): ExposureBasis {
  return {
    id: 'basis-1',
    taskKind: 'shot-blasting',
    kind: 'air-samples',
    exposureMicrogramsPerM3: 38,
    conditions: 'Closed-circuit blaster with its own collector, doors closed, up to three hours.',
    signedBy: 'Ines Halloran',
    signedOn: '2026-11-02',
    endsOn: '2027-05-02',
    interimApf: null,
    ...overrides,
  };
}

/** The demo shift: process hall floor, day 3. Floor grinding and edges stand in Table 1; shot blasting and powder mixing wait for a basis. */
export function shiftFacts(overrides: Partial<ShiftFacts> = {}): ShiftFacts {
  const work = (personId: string, startMinute: number, endMinute: number) => ({ personId, startMinute, endMinute });
  return {
    jurisdictionId: 'us-federal',
    date: '2026-12-03',
    jobName: 'Process hall floor, day 3',
    siteName: 'Tollgate Creamery, 412 Tollgate Road, Superior, Wisconsin',
    setting: 'enclosed',
    roomVolumeM3: (38_000 * L_PER_FT3) / 1000,
    areaM2: 600 * M2_PER_FT2,
    thicknessMm: 6.35,
    targetProfile: 5,
    floor: { covering: 'bare-concrete', builtYear: 2011, asbestos: 'not-needed', lead: 'not-needed', surveyReference: 'bare concrete of 2011, no tile or mastic; looked at by Dov Lindqvist, 2026-12-01' },
    engines: { areUsedInside: false, isExhaustLedOutside: null, hasCarbonMonoxideAlarm: null },
    firstAid: { firstAiderName: 'Tomasz Reyes', hasEyewash: true, emergencyNumber: '911', address: '412 Tollgate Road, dock door 3' },
    hostHazards: 'Ammonia plant next door; leave by the north door when the horn sounds.',
    competentPersonId: 'dov',
    people: [
      personFacts({ isLead: true }),
      personFacts({ id: 'marisol', name: 'Marisol Tena', language: 'es' }),
      personFacts({ id: 'abe', name: 'Abe Kowalczyk' }),
      personFacts({ id: 'tomasz', name: 'Tomasz Reyes', language: 'es' }),
      personFacts({ id: 'per', name: 'Per Aldana', elsewhere: [{ jobName: 'Freight shed', kind: 'floor-grinding', startMinute: at(8, 5), endMinute: at(11, 30) }] }),
    ],
    tasks: [
      taskFacts({ kind: 'inspection', assignments: [work('dov', at(6, 30), at(7)), work('dov', at(9, 30), at(10))] }),
      taskFacts({ kind: 'floor-grinding', assignments: [work('dov', at(7), at(9, 10))], equipmentId: 'grinder', collectorId: 'collector', dustMethod: 'vacuum' }),
      taskFacts({ kind: 'edge-grinding', assignments: [work('marisol', at(7), at(7, 45))], equipmentId: 'edger', collectorId: 'edge-vacuum', dustMethod: 'vacuum' }),
      taskFacts({ kind: 'collector-emptying', assignments: [work('marisol', at(7, 54), at(9))], collectorId: 'collector' }),
      taskFacts({ kind: 'shot-blasting', assignments: [work('abe', at(9, 30), at(12))], equipmentId: 'blaster', collectorId: 'collector' }),
      taskFacts({ kind: 'powder-mixing', assignments: [work('marisol', at(12, 36), at(14, 6)), work('tomasz', at(12, 36), at(14, 6))], equipmentId: 'mixer', collectorId: 'bucket-extraction', kitId: 'quarrybond-40' }),
      taskFacts({ kind: 'spreading', assignments: [work('dov', at(12, 42), at(14, 12)), work('per', at(12, 42), at(14, 12))], kitId: 'quarrybond-40' }),
      taskFacts({ kind: 'shot-pick-up', assignments: [work('abe', at(12, 42), at(13, 36))], equipmentId: 'edge-vacuum' }),
      taskFacts({ kind: 'clean-up', assignments: ['dov', 'marisol', 'abe', 'tomasz'].map((id) => work(id, at(14, 12), at(15))), equipmentId: 'edge-vacuum' }),
    ],
    kits: [kitFacts()],
    equipment: [
      equipmentFacts({ requiredAirflowM3PerH: m3PerHFromCfm(353) }),
      equipmentFacts({ id: 'collector', name: 'Collector 2', kind: 'collector', airflow: airflowCfm(412), filterEfficiencyPercent: 99.97, hasFilterCleaning: true, hasCyclone: true, isHepa: true }),
      equipmentFacts({ id: 'edger', name: 'Edge grinder, 5 in', kind: 'edge-grinder', wheelDiameterMm: 127, hasShroud: true }),
      equipmentFacts({ id: 'edge-vacuum', name: 'Vacuum 4', kind: 'vacuum', airflow: airflowCfm(176), filterEfficiencyPercent: 99.97, hasFilterCleaning: true, hasCyclone: false, isHepa: true }),
      equipmentFacts({ id: 'blaster', name: 'Shot blaster 1', kind: 'shot-blaster' }),
      equipmentFacts({ id: 'mixer', name: 'Mixer 2', kind: 'mixer' }),
      equipmentFacts({ id: 'bucket-extraction', name: 'Bucket extraction', kind: 'bucket-extraction' }),
    ],
    bases: [],
    ...overrides,
  };
}
