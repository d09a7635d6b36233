import { type Words } from '../outcome';
import { sourced, type Source } from '../source';

export const PRECAUTIONARY_SOURCE: Source = sourced('UN GHS Annex 3 section 2', 'partly', { note: 'Wording of P260 to P285 compared in several lists; P265 and the revision of withdrawal recalled.' });
export const PRECAUTIONARY_ES_SOURCE: Source = sourced('UN GHS Annex 3 section 2, Spanish edition', 'from-memory', { note: 'Compare with the annex.' });

/** A precautionary statement that bears on protection, ventilation, hygiene or first aid. */
export interface PrecautionaryRow {
  readonly id: string;
  readonly text: Words;
  readonly topic: string;
  /** Withdrawn codes still stand on old sheets. */
  readonly isWithdrawn: boolean;
  readonly status: string;
  readonly note: string;
  readonly source: Source;
}

const row = (id: string, en: string, es: string, topic: string, status: string, note: string): PrecautionaryRow => ({
  id,
  text: { en, es },
  topic,
  isWithdrawn: status.startsWith('withdrawn'),
  status,
  note,
  source: PRECAUTIONARY_SOURCE,
});

export const PRECAUTIONARY_ROWS: readonly PrecautionaryRow[] = [
  row('P260', 'Do not breathe dust/fume/gas/mist/vapors/spray.', 'No respirar polvos/humos/gases/nieblas/vapores/aerosoles.', 'inhalation', 'current', 'Choose the applicable conditions. Strong form; typical triggers H330, H314 (if dust or mist), H370-H373.'),
  row('P261', 'Avoid breathing dust/fume/gas/mist/vapors/spray.', 'Evitar respirar polvos/humos/gases/nieblas/vapores/aerosoles.', 'inhalation', 'current', 'Choose the applicable conditions. Weak form; typical triggers H331, H332, H334, H317, H335, H336. Omit where P260 is given.'),
  row('P262', 'Do not get in eyes, on skin, or on clothing.', 'Evitar todo contacto con los ojos, la piel o la ropa.', 'skin and eyes', 'current', 'Typical trigger H310, H311.'),
  row('P263', 'Avoid contact during pregnancy and while nursing.', 'Evitar todo contacto con la sustancia durante el embarazo y la lactancia.', 'reproductive', 'current', 'Typical trigger H362. Older wording: during pregnancy/while nursing.'),
  row('P264', 'Wash hands [and ...] thoroughly after handling.', 'Lavarse las manos [y …] cuidadosamente después de la manipulación.', 'hygiene', 'current', 'Supplier names the body parts to wash; older wording: Wash ... thoroughly after handling. Text in brackets is variable, so match by code, not by string.'),
  row('P265', 'Do not touch eyes.', 'No tocarse los ojos.', 'skin and eyes', 'current (recent GHS revisions only)', 'Accompanies P264 for H318/H319/H320 in newer sheets.'),
  row('P270', 'Do not eat, drink or smoke when using this product.', 'No comer, beber o fumar mientras se manipula este producto.', 'hygiene', 'current', 'Typical triggers H300-H302, H362, H370-H372.'),
  row('P271', 'Use only outdoors or in a well-ventilated area.', 'Utilizar solo al aire libre o en un lugar bien ventilado.', 'ventilation', 'current', 'Typical triggers H330-H332, H335, H336. Ventilation control, not a respirator demand.'),
  row('P272', 'Contaminated work clothing should not be allowed out of the workplace.', 'La ropa de trabajo contaminada no debe salir del lugar de trabajo.', 'clothing', 'current', 'Typical trigger H317.'),
  row('P273', 'Avoid release to the environment.', 'No dispersar en el medio ambiente.', 'environment', 'current', 'Typical triggers H400-H413. Optional under the US rule; not a PPE demand.'),
  row('P280', 'Wear protective gloves/protective clothing/eye protection/face protection/hearing protection/...', 'Usar guantes/ropa de protección/equipo de protección para los ojos/la cara/los oídos/…', 'ppe', 'current', 'Supplier selects the items; the code alone does not say which. Read the chosen items from SDS section 2 or 8. Hearing protection and the open list were added in later revisions.'),
  row('P281', 'Use personal protective equipment as required.', 'Utilizar el equipo de protección individual obligatorio.', 'ppe', 'withdrawn (removed in GHS Rev.5)', 'Still met on old sheets; treat as "see section 8".'),
  row('P282', 'Wear cold insulating gloves and either face shield or eye protection.', 'Usar guantes aislantes contra el frío y equipo de protección para la cara o los ojos.', 'ppe', 'current', 'Typical trigger H281.'),
  row('P283', 'Wear fire resistant or flame retardant clothing.', 'Usar ropa resistente al fuego o ignífuga.', 'ppe', 'current', 'Typical triggers H270-H272.'),
  row('P284', '[In case of inadequate ventilation] wear respiratory protection.', '[En caso de ventilación insuficiente,] usar equipo de protección respiratoria.', 'respirator', 'current', 'Typical triggers H330, H334. The bracketed condition applies only where the sheet explains what ventilation is adequate; without it the demand is unconditional.'),
  row('P285', 'In case of inadequate ventilation wear respiratory protection.', 'En caso de ventilación insuficiente, usar equipo de protección respiratoria.', 'respirator', 'withdrawn (merged into P284 in GHS Rev.5)', 'Still met on old sheets; always conditional on ventilation.'),
  row('P304+P340', 'IF INHALED: Remove person to fresh air and keep comfortable for breathing.', 'EN CASO DE INHALACIÓN: Transportar a la persona al aire libre y mantenerla en una posición que le facilite la respiración.', 'response, inhalation', 'current', 'Response statement kept for first-aid notices.'),
  row('P302+P352', 'IF ON SKIN: Wash with plenty of water/...', 'EN CASO DE CONTACTO CON LA PIEL: Lavar con abundante agua/…', 'response, skin', 'current', 'Response statement kept for first-aid notices.'),
  row('P303+P361+P353', 'IF ON SKIN (or hair): Take off immediately all contaminated clothing. Rinse skin with water [or shower].', 'EN CASO DE CONTACTO CON LA PIEL (o el pelo): Quitar inmediatamente toda la ropa contaminada. Enjuagar la piel con agua [o ducharse].', 'response, skin', 'current', 'Typical trigger H314.'),
  row('P305+P351+P338', 'IF IN EYES: Rinse cautiously with water for several minutes. Remove contact lenses, if present and easy to do. Continue rinsing.', 'EN CASO DE CONTACTO CON LOS OJOS: Enjuagar con agua cuidadosamente durante varios minutos. Quitar las lentes de contacto cuando estén presentes y pueda hacerse con facilidad. Proseguir con el lavado.', 'response, eyes', 'current', 'Typical triggers H314, H318, H319. Suggests an eyewash need.'),
  row('P333+P313', 'If skin irritation or rash occurs: Get medical advice/attention.', 'En caso de irritación cutánea o sarpullido: consultar a un médico.', 'response, skin', 'current', 'Typical trigger H317.'),
  row('P342+P311', 'If experiencing respiratory symptoms: Call a POISON CENTER/doctor/...', 'En caso de síntomas respiratorios: llamar a un CENTRO DE TOXICOLOGÍA/médico/…', 'response, inhalation', 'current', 'Typical trigger H334. Suggests stop-work and medical referral for the affected worker.'),
  row('P362+P364', 'Take off contaminated clothing and wash it before reuse.', 'Quitar la ropa contaminada y lavarla antes de volverla a usar.', 'response, clothing', 'current', 'P363 (wash contaminated clothing before reuse) is the older form.'),
];
