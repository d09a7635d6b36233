import { type Words } from '../outcome';
import { sourced, type Source } from '../source';
import { words } from '../words';

/** A place without its own pack: its limit stands in air/limits.data.ts for orientation, and its points tell where it differs. */
export interface PlaceWithoutPack {
  readonly id: string;
  readonly name: Words;
  /** A US state plan may replace the federal text; elsewhere federal text means nothing. */
  readonly isUsState: boolean;
  readonly points: readonly { readonly text: Words; readonly source: Source }[];
}

const point = (en: string, es: string, source: Source) => ({ text: words(en, es), source });

export const PLACES_WITHOUT_PACK: readonly PlaceWithoutPack[] = [
  {
    id: 'us-oregon',
    name: words('Oregon', 'Oregón'),
    isUsState: true,
    points: [point('Own text, OAR 437-002-1053 to -1065; medical surveillance at 30 respirator days.', 'Texto propio, OAR 437-002-1053 a -1065; vigilancia médica a los 30 días de respirador.', sourced('OAR 437-002-1062', 'read'))],
  },
  {
    id: 'us-washington',
    name: words('Washington', 'Washington'),
    isUsState: true,
    points: [
      point('Adds regulated areas and warning signs.', 'Añade zonas reguladas y letreros de advertencia.', sourced('WAC 296-840', 'read')),
      point('Noise program at 85 dBA as 8-hour average; its reach to construction is recalled.', 'Programa de ruido a 85 dBA como promedio de 8 horas; su alcance en construcción, de memoria.', sourced('WAC 296-817', 'partly')),
      point('Regular safety meetings in construction.', 'Reuniones de seguridad periódicas en construcción.', sourced('WAC 296-155', 'from-memory')),
    ],
  },
  { id: 'us-michigan', name: words('Michigan', 'Míchigan'), isUsState: true, points: [point('State plan, at least as effective as the federal rule: check its text.', 'Plan estatal, al menos tan eficaz como la norma federal: consulte su texto.', sourced('State plan principle', 'from-memory'))] },
  { id: 'us-other-state-plan', name: words('another state with its own plan', 'otro estado con plan propio'), isUsState: true, points: [point('At least as effective as the federal rule: check the state’s text.', 'Al menos tan eficaz como la norma federal: consulte el texto del estado.', sourced('State plan principle', 'from-memory'))] },
  {
    id: 'european-union',
    name: words('European Union', 'Unión Europea'),
    isUsState: false,
    points: [
      point('Silica limit is a binding minimum; member states may be lower.', 'El límite de sílice es un mínimo obligatorio; los países pueden tener uno más bajo.', sourced('Directive 2004/37/EC Annex III', 'read')),
      point('Diisocyanates: 6 µg NCO/m³ over 8 hours, 12 short-term; until 31 December 2028 10 and 20.', 'Diisocianatos: 6 µg NCO/m³ en 8 horas, 12 de corta duración; hasta el 31 de diciembre de 2028, 10 y 20.', sourced('Directive 2024/869', 'read')),
      point('More than 0.1 % of monomeric diisocyanate: trained users only, renewed every five years.', 'Más de 0.1 % de diisocianato monomérico: solo usuarios capacitados, con renovación cada cinco años.', sourced('Regulation 2020/1149', 'read', { inForceFrom: '2023-08-24' })),
      point('Cement holds at most 2 mg/kg of soluble chromium VI.', 'El cemento tiene como máximo 2 mg/kg de cromo VI soluble.', sourced('REACH Annex XVII', 'read')),
      point('Protection factors are national.', 'Los factores de protección son nacionales.', sourced('EN 529', 'from-memory')),
    ],
  },
  { id: 'canada-ontario', name: words('Ontario', 'Ontario'), isUsState: false, points: [point('The silica regulation leaves out construction, where the ministry’s guideline is followed: check the current text.', 'El reglamento de sílice excluye la construcción, donde se sigue la guía del ministerio: consulte el texto vigente.', sourced('O. Reg. 490/09 s. 14', 'partly', { note: 'Heading read; the guideline recalled.' }))] },
  { id: 'canada-british-columbia', name: words('British Columbia', 'Columbia Británica'), isUsState: false, points: [point('Exposure control plan, monitoring and training for silica processes; grinding, blasting and concrete dressing are among them.', 'Plan de control, mediciones y capacitación para procesos con sílice; entre ellos pulir, granallar y labrar concreto.', sourced('OHS Regulation 6.110 to 6.115', 'partly', { note: 'That the sections exist, and the list of processes, were read.' }))] },
  { id: 'canada-alberta', name: words('Alberta', 'Alberta'), isUsState: false, points: [point('OHS Code Part 4.', 'Código OHS, parte 4.', sourced('Alberta OHS Code Part 4', 'partly', { note: 'That the part exists was read.' }))] },
  { id: 'canada-other', name: words('elsewhere in Canada', 'el resto de Canadá'), isUsState: false, points: [point('As of 2011: 0.025 mg/m³ federally and in MB, NS, NL, PE; 0.05 in SK; 0.1 in QC, since lowered. Uncertain.', 'En 2011: 0.025 mg/m³ a nivel federal y en MB, NS, NL, PE; 0.05 en SK; 0.1 en QC, rebajado después. Incierto.', sourced('industry table of 2011', 'partly', { note: 'Figures read as of 2011; the change in Quebec recalled.' }))] },
  {
    id: 'australia',
    name: words('Australia', 'Australia'),
    isUsState: false,
    points: [
      point('Processing of silica substances is controlled: isolation, cab, wet, extraction; a high-risk assessment decides on plan, monitoring and health checks.', 'El trabajo con sustancias de sílice debe controlarse: aislamiento, cabina, agua, extracción; una evaluación de alto riesgo decide sobre plan, mediciones y salud.', sourced('Model WHS Regulations, crystalline silica', 'read', { inForceFrom: '2024-09-01', note: 'Applies once a state has adopted it; Victoria has its own rules.' })),
      point('Protection factors of AS/NZS 1715 differ.', 'Los factores de AS/NZS 1715 son otros.', sourced('AS/NZS 1715', 'from-memory')),
    ],
  },
  { id: 'new-zealand', name: words('New Zealand', 'Nueva Zelanda'), isUsState: false, points: [point('The limit is advisory unless prescribed; the duty is what is reasonably practicable.', 'El límite es orientativo salvo que se prescriba; el deber es lo razonablemente practicable.', sourced('Health and Safety at Work Act', 'partly', { note: 'Ministry text on the limit; the duty recalled.' }))] },
];
