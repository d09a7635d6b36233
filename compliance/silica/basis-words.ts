import { type ExposureBasis } from '../facts';
import { type Words } from '../outcome';
import { sentences, words } from '../words';
import { type BasisFault } from './basis';
import { type Undecided } from './decision';

/** What is said of a signed basis that settles nothing. */
const FAULTS: Readonly<Record<BasisFault, Words>> = {
  'no-exposure': words('The signed basis names no figure.', 'La base firmada no da una cifra.'),
  'no-conditions': words('The signed basis names no conditions.', 'La base firmada no da condiciones.'),
  'not-below-action-level': words('The signed basis says "below the action level", but its figure is not.', 'La base firmada dice «bajo el nivel de acción», pero su cifra no lo está.'),
  'no-action-level': words('This place has no action level.', 'Este lugar no tiene nivel de acción.'),
  'no-interim-respirator': words('The sampling day names no mask. Its signer must write one.', 'El día de muestreo no dice qué máscara. Quien firma debe escribirla.'),
  'no-factors': words('It is over the limit, and no mask factors of this place are on file.', 'Pasa el límite, y no hay factores de máscara de este lugar.'),
  'beyond-every-respirator': words('The figure is past what any mask can stop.', 'La cifra pasa lo que detiene cualquier máscara.'),
};

export const BASIS_KINDS: Readonly<Record<ExposureBasis['kind'], Words>> = {
  'objective-data': words('Objective data', 'Datos objetivos'),
  'air-samples': words('Air samples', 'Muestras de aire'),
  'sampling-day': words('Sampling day', 'Día de muestreo'),
  'below-action-level': words('Below the action level', 'Bajo el nivel de acción'),
};

export const WHAT_OPENS_IT = words(
  'A qualified person signs a basis with conditions and an end date, or plans a sampling day.',
  'Una persona calificada firma una base con condiciones y fecha final, o planea un día de muestreo.',
);

export function undecidedReason({ fault, ended }: Undecided): Words {
  const gap = fault !== null ? FAULTS[fault] : ended === null ? null : words(`The basis of ${ended.signedBy} ended on ${ended.endsOn}.`, `La base de ${ended.signedBy} terminó el ${ended.endsOn}.`);
  return sentences(words('No air sample or objective data for this setting.', 'No hay muestra de aire ni datos objetivos para este lugar.'), gap);
}

export function decidedReason(basis: ExposureBasis): Words {
  const kind = BASIS_KINDS[basis.kind];
  return words(
    `${kind.en}, signed by ${basis.signedBy} on ${basis.signedOn}, good to ${basis.endsOn}. Conditions: ${basis.conditions}`,
    `${kind.es}, firmado por ${basis.signedBy} el ${basis.signedOn}, vale hasta ${basis.endsOn}. Condiciones: ${basis.conditions}`,
  );
}
