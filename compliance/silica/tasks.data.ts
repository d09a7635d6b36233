import { type TaskKind } from '../facts';
import { type Words } from '../outcome';
import { words } from '../words';

/** How the silica rule meets a kind of work. */
export type SilicaPath =
  /** Stands in Table 1 with the right machine and dust control. */
  | 'table-1'
  /** Cuts or blasts concrete outside Table 1: the alternative method, (d). */
  | 'assessed'
  /** May or may not reach the action level: first the scope question, (a). */
  | 'scope'
  /** Part of other work: decided with it. */
  | 'incidental'
  /** Housekeeping rule, (f). */
  | 'housekeeping'
  /** No dry silica dust is made. */
  | 'none';

export interface TaskTraits {
  readonly name: Words;
  readonly silica: SilicaPath;
  /** Sparks, open motors or hot surfaces: kept from flammable vapor. */
  readonly isIgnition: boolean;
  /** Opens the floor itself: asbestos and lead must be settled first. */
  readonly disturbsFloor: boolean;
  readonly isLoud: boolean;
  /** Works with the kit's unhardened parts. */
  readonly touchesKit: boolean;
  readonly isDusty: boolean;
  /** Work, as against a break or an inspection: held when the shift is held. */
  readonly isWork: boolean;
}

type Trait = 'ignition' | 'floor' | 'loud' | 'kit' | 'dusty' | 'rest';

const task = (name: Words, silica: SilicaPath, ...traits: readonly Trait[]): TaskTraits => ({
  name,
  silica,
  isIgnition: traits.includes('ignition'),
  disturbsFloor: traits.includes('floor'),
  isLoud: traits.includes('loud'),
  touchesKit: traits.includes('kit'),
  isDusty: traits.includes('dusty'),
  isWork: !traits.includes('rest'),
});

/** Every kind of work of the shift. Names are the trade's; the traits are common practice, no source, save the silica path (reference of each rule). */
export const TASKS: Readonly<Record<TaskKind, TaskTraits>> = {
  'floor-grinding': task(words('Floor grinding', 'Pulir el piso'), 'table-1', 'ignition', 'floor', 'loud', 'dusty'),
  'edge-grinding': task(words('Edge grinding', 'Pulir las orillas'), 'table-1', 'ignition', 'floor', 'loud', 'dusty'),
  'shot-blasting': task(words('Shot blasting', 'Granallar el piso'), 'assessed', 'ignition', 'floor', 'loud', 'dusty'),
  scarifying: task(words('Scarifying', 'Escarificar el piso'), 'table-1', 'ignition', 'floor', 'loud', 'dusty'),
  'joint-sawing': task(words('Joint sawing', 'Cortar juntas'), 'table-1', 'ignition', 'floor', 'loud', 'dusty'),
  'handheld-sawing': task(words('Handheld sawing', 'Cortar con sierra de mano'), 'table-1', 'ignition', 'floor', 'loud', 'dusty'),
  'crack-chasing': task(words('Crack chasing', 'Abrir grietas'), 'table-1', 'ignition', 'floor', 'loud', 'dusty'),
  'mortar-removal': task(words('Mortar removal', 'Quitar mortero'), 'table-1', 'ignition', 'floor', 'loud', 'dusty'),
  chipping: task(words('Chipping', 'Picar concreto'), 'table-1', 'ignition', 'floor', 'loud', 'dusty'),
  drilling: task(words('Drilling', 'Taladrar'), 'table-1', 'ignition', 'floor', 'loud', 'dusty'),
  'powder-mixing': task(words('Powder mixing', 'Mezclar polvo'), 'scope', 'kit', 'dusty'),
  'liquid-mixing': task(words('Liquid mixing', 'Mezclar líquidos'), 'none', 'kit'),
  priming: task(words('Priming', 'Dar el primario'), 'none', 'kit'),
  spreading: task(words('Spreading', 'Extender la mezcla'), 'none', 'kit'),
  'quartz-broadcast': task(words('Quartz broadcast', 'Regar cuarzo'), 'scope', 'kit', 'dusty'),
  'quartz-pick-up': task(words('Quartz pick-up', 'Recoger cuarzo'), 'scope', 'dusty'),
  'shot-pick-up': task(words('Shot pick-up', 'Recoger granalla'), 'incidental', 'dusty'),
  'collector-emptying': task(words('Collector emptying', 'Vaciar el colector'), 'incidental', 'dusty'),
  'sanding-coating': task(words('Sanding a cured coat', 'Lijar la capa curada'), 'scope', 'ignition', 'floor', 'loud', 'dusty'),
  'mastic-scraping': task(words('Mastic scraping', 'Raspar pegamento viejo'), 'none', 'floor'),
  'tool-washing': task(words('Tool washing', 'Lavar herramienta'), 'none', 'kit'),
  'slurry-handling': task(words('Slurry handling', 'Recoger lodo'), 'housekeeping'),
  'clean-up': task(words('Clean-up', 'Limpieza'), 'housekeeping'),
  inspection: task(words('Inspection', 'Inspección'), 'none', 'rest'),
  break: task(words('Break', 'Descanso'), 'none', 'rest'),
};
