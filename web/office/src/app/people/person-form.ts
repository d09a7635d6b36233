import { type NonNullableFormBuilder } from '@angular/forms';
import { type PersonEdit, type Person } from '#shared/people';
import { type Choice } from '../pieces/fields/choice-field';

type RespiratorValue = PersonEdit['respirators'][number];

export const languageChoices: readonly Choice<PersonEdit['language']>[] = [
  { value: 'en', label: 'English' },
  { value: 'es', label: 'Español' },
];
export const respiratorChoices: readonly Choice<RespiratorValue['type']>[] = [
  { value: 'filtering-facepiece', label: 'filtering facepiece' },
  { value: 'half-mask', label: 'half mask' },
  { value: 'full-facepiece', label: 'full facepiece' },
  { value: 'papr-loose', label: 'powered air, loose-fitting' },
  { value: 'papr-hood', label: 'powered air, hood' },
  { value: 'papr-half-mask', label: 'powered air, half mask' },
  { value: 'papr-full-facepiece', label: 'powered air, full facepiece' },
  { value: 'supplied-air-hood', label: 'supplied air, hood' },
];

export const fitTestChoices: readonly Choice<RespiratorValue['fitTestKind']>[] = [
  { value: null, label: 'not known yet' },
  { value: 'qualitative', label: 'taste or smell' },
  { value: 'quantitative', label: 'counted, with a fit factor' },
];

export const emptyPerson: PersonEdit = {
  name: '',
  language: 'en',
  employer: null,
  isAdultConfirmed: false,
  isKeptFromIsocyanates: false,
  silicaTrainedOn: null,
  silicaTrainedBy: null,
  hazcomTrainedOn: null,
  hazcomTrainedBy: null,
  respirators: [],
  isActive: true,
};
export const emptyRespirator: RespiratorValue = { type: 'half-mask', label: '', clearedOn: null, fitTestedOn: null, fitTestKind: null };

export function editOf({ name, language, employer, isAdultConfirmed, isKeptFromIsocyanates, silicaTrainedOn, silicaTrainedBy = null, hazcomTrainedOn, hazcomTrainedBy = null, respirators, isActive }: Person | PersonEdit): PersonEdit {
  return { name, language, employer, isAdultConfirmed, isKeptFromIsocyanates, silicaTrainedOn, silicaTrainedBy, hazcomTrainedOn, hazcomTrainedBy, respirators, isActive };
}

export const respiratorGroup = (builder: NonNullableFormBuilder, { type, label, clearedOn, fitTestedOn, fitTestKind = null }: RespiratorValue) =>
  builder.group({ type: builder.control(type), label: builder.control(label), clearedOn: builder.control(clearedOn), fitTestedOn: builder.control(fitTestedOn), fitTestKind: builder.control(fitTestKind) });

export function personForm(builder: NonNullableFormBuilder, person: PersonEdit) {
  return builder.group({
    name: builder.control(person.name),
    language: builder.control(person.language),
    employer: builder.control(person.employer),
    isAdultConfirmed: builder.control(person.isAdultConfirmed),
    isKeptFromIsocyanates: builder.control(person.isKeptFromIsocyanates),
    silicaTrainedOn: builder.control(person.silicaTrainedOn),
    silicaTrainedBy: builder.control(person.silicaTrainedBy ?? null),
    hazcomTrainedOn: builder.control(person.hazcomTrainedOn),
    hazcomTrainedBy: builder.control(person.hazcomTrainedBy ?? null),
    respirators: builder.array(person.respirators.map((respirator) => respiratorGroup(builder, respirator))),
    isActive: builder.control(person.isActive),
  });
}
