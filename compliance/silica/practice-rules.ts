import { met, notApplicable, unmet } from '../rule';
import { type ShiftRule } from '../shift-rule';
import { isIndoors } from '../shift-context';
import { commonPractice, usFederal } from '../source';
import { words } from '../words';
import { isSilicaWork, type SilicaTask } from './silica-context';

const checkedAtStart = words('Checked at the start of the task.', 'Se revisa al empezar la tarea.');
const notForThisTask = notApplicable(words('Not for this task.', 'No es para esta tarea.'));

/** (c)(2)(i): Table 1 work indoors or in an enclosed area has a means of exhaust, as needed so that visible dust does not gather. */
export const exhaustIndoorsRule: ShiftRule<SilicaTask> = {
  id: 'silica-exhaust-indoors',
  title: words('Exhaust indoors', 'Extracción adentro'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(c)(2)(i)', note: 'Read in WAC 296-840-110(2)(a).' }),
  duties: ['SIL-05'],
  topic: 'control',
  holds: false,
  evaluate: (context) => (context.silica.kind === 'table-1' && isIndoors(context) ? met(checkedAtStart, { inputs: { setting: context.facts.setting } }) : notForThisTask),
  line: () => words('Exhaust to outside. No cloud you can see.', 'Aire sucio para afuera. Sin nube a la vista.'),
};

/** (c)(2)(ii): Table 1 work by a wet method has water enough that visible dust is kept down; the paragraph names no figure. */
export const waterFlowRule: ShiftRule<SilicaTask> = {
  id: 'silica-water-flow',
  title: words('Water enough', 'Agua suficiente'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(c)(2)(ii)', note: 'Read in WAC 296-840-110(2)(b) and OAR 437-002-1057(2).' }),
  duties: ['SIL-05'],
  topic: 'control',
  holds: false,
  evaluate: ({ silica }) => (silica.kind === 'table-1' && silica.option.method === 'water' ? met(checkedAtStart) : notForThisTask),
  line: () => words('Water on full. No dust you can see.', 'Agua bien abierta. Sin polvo a la vista.'),
};

const NO_BETTER_WAY = words('Only where no wet or vacuum way can work, or a hood takes the blown dust. The competent person writes down why.', 'Solo si no sirve ni mojar ni aspirar, o una campana atrapa lo soplado. La persona competente anota por qué.');

/**
 * Where it could add to silica exposure: (f)(1) no dry sweeping or brushing unless wet, HEPA vacuum and other ways are not feasible;
 * (f)(2) no compressed air on clothing or surfaces unless (i) with ventilation that catches the cloud or (ii) no other way is feasible.
 * Here: both exceptions are for the competent person, under "what would change this", not for the crew line.
 */
export const housekeepingRule: ShiftRule<SilicaTask> = {
  id: 'silica-housekeeping',
  title: words('No dry sweeping, no blown air', 'Sin barrer en seco, sin soplar'),
  source: usFederal('1926.1153', 'read', { paragraph: '(f)(1), (f)(2)', note: 'Quoted in full on silica-safe.org. Holds where it could add to silica exposure.' }),
  duties: ['SIL-15'],
  topic: 'housekeeping',
  holds: false,
  evaluate: (context) => (isSilicaWork(context) ? met(words('Dry sweeping and blown air put the dust back in the air.', 'Barrer en seco y soplar levanta el polvo otra vez.'), { whatWouldChange: NO_BETTER_WAY }) : notForThisTask),
  line: () => words('HEPA vacuum or wet. No dry sweeping. No blown air.', 'Aspiradora HEPA o mojado. Sin barrer en seco. Sin soplar.'),
};

/** (g)(1)(iv): the written plan says how access is restricted, when necessary, so that few are exposed and little. Here: asked at every dusty silica task. */
export const accessRule: ShiftRule<SilicaTask> = {
  id: 'silica-access',
  title: words('Others kept out of the dust', 'Otros lejos del polvo'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(g)(1)(iv)', note: 'Read in WAC 296-840-140(4)(a): "when necessary". The agency reads that as where a mask is required or the limit is passed (81 FR 16803, quoted in its questions and answers); notForThisTask it is good practice.' }),
  duties: ['GATE-07'],
  topic: 'access',
  holds: false,
  evaluate: (context) => (isSilicaWork(context) && context.traits.isDusty ? met(words('Other people here must not breathe our dust.', 'Otra gente aquí no debe respirar nuestro polvo.')) : notForThisTask),
  line: () => words('Door closed, sign up, neighbors told.', 'Puerta cerrada, aviso puesto, vecinos avisados.'),
};

const OPEN_NOZZLE = words('An open nozzle, or a blaster that leaks: then the operator wears a blasting hood with supplied air.', 'Una boquilla abierta o una máquina que fuga: entonces el operador usa capucha de granallado con aire.');

/** 1926.1153(d)(3)(ii): where silica is blasted or blasts, 1926.57(f) holds too: dust kept in and drawn off, the operator protected. Here: a closed wheel blaster, and the shot that lies on the floor after it. */
export const blastingRule: ShiftRule<SilicaTask> = {
  id: 'shot-blasting-safeguards',
  title: words('Shot blasting safeguards', 'Cuidados al granallar'),
  source: usFederal('1926.57', 'parallel-text', { paragraph: '(f)', note: 'Read in WAC 296-818-20010 and -30010: a closed machine with exhaust stands between nozzle and operator, so the blasting hood of (f)(5)(ii) is not asked. 1926.1153(d)(3)(ii), which points here, recalled.' }),
  duties: ['SIL-13'],
  topic: 'control',
  holds: false,
  evaluate: ({ task }) =>
    task.kind === 'shot-blasting' || task.kind === 'shot-pick-up'
      ? met(words('A wheel blaster is abrasive blasting too. Shot underfoot is a fall.', 'Una granalladora también es chorro abrasivo. Pisar granalla es caerse.'), { whatWouldChange: task.kind === 'shot-blasting' ? OPEN_NOZZLE : null })
      : notForThisTask,
  line: ({ task }) =>
    task.kind === 'shot-blasting'
      ? words('Seals whole, collector on before the wheel, and on after it stops.', 'Sellos enteros, colector prendido antes de la rueda y después de pararla.')
      : words('Shot and dust picked up by magnet and vacuum.', 'Granalla y polvo: con imán y aspiradora.'),
};

/** No law cited: dust of powder emptied into the mixing bucket is caught where it rises. Here: extraction for a bucket is on the list of equipment. */
export const bucketDustRule: ShiftRule<SilicaTask> = {
  id: 'powder-dust-at-bucket',
  title: words('Dust caught at the bucket', 'Polvo atrapado en el balde'),
  source: commonPractice('Extraction at the mixing bucket; bags cut low and folded in.'),
  duties: ['SIL-12'],
  topic: 'control',
  holds: false,
  evaluate({ task, facts, tool, collector }) {
    if (task.kind !== 'powder-mixing') return notForThisTask;
    const hasExtraction = facts.equipment.some(({ kind }) => kind === 'bucket-extraction') || tool?.kind === 'bucket-extraction' || collector?.kind === 'bucket-extraction';
    const inputs = { 'extraction at the bucket': hasExtraction };
    return hasExtraction
      ? met(words('Dust is caught before it spreads.', 'El polvo se atrapa antes de salir.'), { inputs })
      : unmet(words('No extraction for the bucket is on the list.', 'No hay extracción para el balde en la lista.'), { inputs, whatWouldChange: words('Bring extraction for the bucket.', 'Traiga extracción para el balde.') });
  },
  line: (_context, { outcome }) =>
    outcome === 'met'
      ? words('Extraction at the bucket. Bags cut low and folded in.', 'Extracción en el balde. Bolsa: corte bajo y doblada.')
      : words('No extraction at the bucket. Cut bags low and fold them in.', 'Sin extracción en el balde. Corte la bolsa abajo y dóblela.'),
};
