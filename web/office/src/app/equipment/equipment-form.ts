import { type NonNullableFormBuilder } from '@angular/forms';
import { equipmentKinds, type EquipmentKind } from '#compliance/facts';
import { type Equipment, type EquipmentEdit } from '#shared/equipment';
import { type Choice } from '../pieces/fields/choice-field';

const names: Readonly<Record<EquipmentKind, string>> = {
  'floor-grinder': 'floor grinder',
  'edge-grinder': 'edge grinder',
  'shot-blaster': 'shot blaster',
  scarifier: 'scarifier',
  'walk-behind-saw': 'walk-behind saw',
  'handheld-saw': 'handheld saw',
  drill: 'drill',
  'chipping-hammer': 'chipping hammer',
  collector: 'dust collector',
  vacuum: 'vacuum',
  mixer: 'mixer',
  'bucket-extraction': 'bucket extraction',
  'air-mover': 'air mover',
};
export const kindChoices: readonly Choice<EquipmentKind>[] = equipmentKinds.map((value) => ({ value, label: names[value] }));
export const kindName = (kind: EquipmentKind): string => names[kind];

export const emptyEquipment: EquipmentEdit = {
  name: '',
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
  hasManualOnFile: false,
};

export function editOf({ id: _id, version: _version, ...edit }: Equipment): EquipmentEdit {
  return edit;
}

type Reading = NonNullable<EquipmentEdit['airflow']>;

/** The form holds the reading's fields always; whether there is a reading is its own tick. */
export function equipmentForm(builder: NonNullableFormBuilder, edit: EquipmentEdit) {
  return builder.group({
    name: builder.control(edit.name),
    kind: builder.control(edit.kind),
    isRideOn: builder.control(edit.isRideOn),
    wheelDiameterMm: builder.control(edit.wheelDiameterMm),
    requiredAirflowM3PerH: builder.control(edit.requiredAirflowM3PerH),
    airflow: readingGroup(builder, edit.airflow),
    filterEfficiencyPercent: builder.control(edit.filterEfficiencyPercent),
    hasFilterCleaning: builder.control(edit.hasFilterCleaning),
    hasCyclone: builder.control(edit.hasCyclone),
    hasShroud: builder.control(edit.hasShroud),
    hasWaterFeed: builder.control(edit.hasWaterFeed),
    isHepa: builder.control(edit.isHepa),
    hasManualOnFile: builder.control(edit.hasManualOnFile),
  });
}

function readingGroup(builder: NonNullableFormBuilder, reading: Reading | null) {
  return builder.group({
    airflowM3PerH: builder.control<number | null>(reading?.airflowM3PerH ?? null),
    instrument: builder.control(reading?.instrument ?? ''),
    place: builder.control(reading?.place ?? ''),
    filterState: builder.control(reading?.filterState ?? ''),
    takenBy: builder.control(reading?.takenBy ?? ''),
    takenOn: builder.control(reading?.takenOn ?? ''),
  });
}
