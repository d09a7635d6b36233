import { type Shift } from '#shared/jobs';

const id = (last: number) => `0190a0a0-0000-7000-8000-${String(last).padStart(12, '0')}`;

/** One lead, one grinder with its collector, two hours of grinding: a shift for specs of the page. */
export const shiftIds = { shift: id(1), job: id(2), dov: id(3), task: id(4), grinder: id(5), collector: id(6) } as const;

export function shiftFixture(change: Partial<Shift> = {}): Shift {
  const machine = {
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
  };
  return {
    id: shiftIds.shift,
    jobId: shiftIds.job,
    date: '2026-12-03',
    version: 4,
    plan: {
      competentPersonId: shiftIds.dov,
      personIds: [shiftIds.dov],
      tasks: [
        {
          id: shiftIds.task,
          kind: 'floor-grinding',
          assignments: [{ personId: shiftIds.dov, startMinute: 420, endMinute: 540 }],
          equipmentId: shiftIds.grinder,
          collectorId: shiftIds.collector,
          dustMethod: 'vacuum',
          kitId: null,
        },
      ],
      kits: [],
    },
    job: {
      id: shiftIds.job,
      name: 'Process hall floor',
      siteName: 'Tollgate Creamery',
      jurisdictionId: 'us-federal',
      timeZone: 'America/Chicago',
      version: 1,
      site: {
        setting: 'enclosed',
        roomVolumeM3: 1076,
        areaM2: 55.74,
        thicknessMm: 6.35,
        targetProfile: 3,
        floor: { covering: 'bare-concrete', builtYear: 2011, asbestos: 'not-needed', lead: 'not-needed', surveyReference: 'Ines Halloran, 1 Dec 2026' },
        engines: { areUsedInside: false, isExhaustLedOutside: null, hasCarbonMonoxideAlarm: null },
        firstAid: { firstAiderName: 'Dov Lindqvist', hasEyewash: true, emergencyNumber: '911', address: '1 Tollgate Road, Superior' },
        hostHazards: 'ammonia: muster at the east gate',
      },
    },
    context: {
      people: [
        {
          id: shiftIds.dov,
          name: 'Dov Lindqvist',
          language: 'en',
          isLead: true,
          employer: null,
          isAdultConfirmed: true,
          isKeptFromIsocyanates: false,
          silicaTrainedOn: '2026-05-05',
          hazcomTrainedOn: '2026-05-05',
          respirators: [],
          elsewhere: [],
        },
      ],
      kits: [],
      equipment: [
        { ...machine, id: shiftIds.grinder, name: 'Floor grinder G1', kind: 'floor-grinder', requiredAirflowM3PerH: 600 },
        {
          ...machine,
          id: shiftIds.collector,
          name: 'Collector C1',
          kind: 'collector',
          airflow: { airflowM3PerH: 700, instrument: 'vane anemometer', place: 'hose inlet', filterState: 'new', takenBy: 'Dov Lindqvist', takenOn: '2026-11-25' },
          filterEfficiencyPercent: 99.97,
          hasFilterCleaning: true,
          isHepa: true,
        },
      ],
      bases: [],
      failedControls: {},
    },
    versions: [],
    hasUnpublishedChanges: true,
    openActions: [],
    ...change,
  };
}
