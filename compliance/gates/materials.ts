import { met, notApplicable, undecided, unmet, WHO } from '../rule';
import { isPossible } from '../silica/minutes';
import { TASKS } from '../silica/tasks.data';
import { type TaskContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { sourced, usFederal } from '../source';
import { inside, listed, words } from '../words';

const noKit = notApplicable(words('No kit in this task.', 'Sin kit en esta tarea.'));

/** (g)(1): a safety data sheet in the workplace for each hazardous chemical that is used. Here: a task that handles a kit starts when every part has a confirmed sheet whose codes are known; a part without is named. */
export const sheetsRule: ShiftRule<TaskContext> = {
  id: 'sheet-for-every-product',
  title: words('A sheet for every product', 'Una hoja para cada producto'),
  source: usFederal('1910.1200', 'read', { paragraph: '(g)(1)' }),
  duties: ['HAZ-04'],
  topic: 'gate',
  holds: true,
  evaluate({ traits, task, kit, kitHazards }) {
    if (!traits.touchesKit) return noKit;
    if (kit === null || kitHazards === null) {
      return undecided(words('Nobody chose the kit, so its hazards are not known.', 'Nadie eligió el kit, así que no se saben sus peligros.'), WHO.safetyOfficer, { inputs: { kit: task.kitId }, whatWouldChange: words('Choose the kit.', 'Elija el kit.') });
    }
    const missing = kitHazards.partsWithoutSheet;
    const inputs = { kit: kit.name, 'products without a confirmed sheet': missing.join(', ') || null };
    if (missing.length > 0) {
      const names = listed(missing);
      return unmet(words(`No confirmed safety data sheet: ${names.en}.`, `Sin hoja de seguridad confirmada: ${names.es}.`), { inputs, whatWouldChange: words('Get the sheet and confirm it.', 'Consiga la hoja y confírmela.') });
    }
    if (kit.parts.length === 0) return undecided(words('The kit has no parts on file.', 'El kit no tiene partes anotadas.'), WHO.safetyOfficer, { inputs, whatWouldChange: words('Add its parts.', 'Agregue sus partes.') });
    if (kitHazards.unknownCodes.length > 0) {
      const texts = kitHazards.unknownCodes.map(({ productName, text }) => `${productName}: ${text}`).join('; ');
      return undecided(words(`A hazard code nobody knows: ${texts}.`, `Un código de peligro que nadie conoce: ${texts}.`), WHO.safetyOfficer, { inputs: { ...inputs, 'unknown codes': texts }, whatWouldChange: words('Look at the sheet again.', 'Mire la hoja otra vez.') });
    }
    return met(words('Every part has its confirmed sheet.', 'Cada parte tiene su hoja confirmada.'), { inputs });
  },
  line: ({ traits }, { outcome }) =>
    outcome === 'met' ? words('Safety data sheets are here for every part.', 'Hay hoja de seguridad de cada parte.') : words(`${traits.name.en} may not start: a sheet is missing.`, `${traits.name.es}: no puede empezar, falta una hoja.`),
};

/**
 * (f)(3): flammable liquids of category 1 to 3 (H224, H225, H226) are used only where no open flame or other source of ignition is within 50 feet, more where conditions ask it.
 * Here: distance is for the crew line; in the plan, no task with sparks runs at the same time, and indoors no engine.
 */
export const flammableRule: ShiftRule<TaskContext> = {
  id: 'flammable-vapor-and-sparks',
  title: words('Flammable vapor and sparks', 'Vapor inflamable y chispas'),
  source: usFederal('1926.152', 'parallel-text', { paragraph: '(f)(3)', note: 'Read in 8 CCR 1935(c), same words: categories 1 to 3, no open flame or other ignition within 50 feet, more where conditions warrant it.' }),
  duties: ['GATE-03'],
  topic: 'gate',
  holds: true,
  evaluate({ traits, task, facts, kitHazards }) {
    if (!traits.touchesKit || kitHazards === null || kitHazards.flammableCodes.length === 0) return notApplicable(words('No flammable liquid on the sheets.', 'Ningún líquido inflamable en las hojas.'));
    const spans = task.assignments.filter(isPossible);
    // Other tasks that make sparks and share a minute with this one.
    const sparks = facts.tasks.filter(
      (other) => other.id !== task.id && TASKS[other.kind].isIgnition && other.assignments.some((theirs) => isPossible(theirs) && spans.some((ours) => theirs.startMinute < ours.endMinute && ours.startMinute < theirs.endMinute)),
    );
    const names = listed([...new Set(sparks.map(({ kind }) => TASKS[kind].name.en))].sort());
    const namesEs = listed([...new Set(sparks.map(({ kind }) => TASKS[kind].name.es))].sort());
    const codes = kitHazards.flammableCodes.join(', ');
    const inputs = { 'on the sheets': codes, 'tasks with sparks at the same time': names.en || null, 'engines inside': facts.engines.areUsedInside };
    const apart = words('Keep sparks and vapor apart in time.', 'Separe las chispas y el vapor en el tiempo.');
    if (sparks.length > 0) return unmet(words(`The liquid catches fire (${codes}). At the same time: ${inside(names).en}.`, `El líquido se prende (${codes}). Al mismo tiempo: ${inside(namesEs).es}.`), { inputs, whatWouldChange: apart });
    if (facts.setting !== 'outdoors' && facts.engines.areUsedInside === true) return unmet(words(`The liquid catches fire (${codes}), and engines run inside.`, `El líquido se prende (${codes}) y hay motores adentro.`), { inputs, whatWouldChange: apart });
    return met(words(`The liquid catches fire (${codes}). No sparks at the same time.`, `El líquido se prende (${codes}). Sin chispas al mismo tiempo.`), { inputs });
  },
  line: ({ traits }, { outcome }) =>
    outcome === 'met' ? words('Air moving before the lid comes off. No flame, no grinder within 50 feet.', 'Aire andando antes de abrir. Sin llama ni pulidora a 50 pies.') : words(`${traits.name.en} may not start: sparks near flammable vapor.`, `${traits.name.es}: no puede empezar, hay chispas cerca del vapor.`),
};

/** (d)(3)(iii): against gas and vapor, supplied air or a cartridge with a change schedule. Here: said where the sheets show isocyanate or a flammable liquid, since a dust filter stops neither; the schedule is `cartridge-change-schedule`. */
export const vaporRule: ShiftRule<TaskContext> = {
  id: 'vapor-apart-from-dust',
  title: words('Vapor decided apart from dust', 'El vapor se decide aparte del polvo'),
  source: usFederal('1910.134', 'read', { paragraph: '(d)(3)(iii)', note: 'Gas and vapor: supplied air, or a cartridge with a written change schedule.' }),
  duties: ['RES-03', 'ISO-01'],
  topic: 'protection',
  holds: false,
  evaluate({ traits, kitHazards }) {
    if (!traits.touchesKit || kitHazards === null) return noKit;
    const { isocyanateParts, flammableCodes } = kitHazards;
    if (isocyanateParts.length === 0 && flammableCodes.length === 0) return notApplicable(words('No isocyanate and no solvent on the sheets.', 'Ni isocianato ni solvente en las hojas.'));
    const names = isocyanateParts.map(({ productName }) => productName).join(', ');
    const inputs = { 'isocyanate or sensitizer': names || null, 'flammable liquid': flammableCodes.join(', ') || null };
    return met(
      isocyanateParts.length > 0
        ? words(`${names}: the vapor can make you allergic for life.`, `${names}: el vapor puede dar alergia de por vida.`)
        : words('The solvent gives off vapor.', 'El solvente suelta vapor.'),
      { inputs, whatWouldChange: words('An air reading, or what the sheet says of masks.', 'Una medición del aire, o lo que diga la hoja.') },
    );
  },
  line: () => words('P100 and N95 stop dust, not vapor. Doors open, fan to outside, before the lid comes off.', 'P100 y N95 detienen polvo, no vapor. Puertas abiertas y aire para afuera antes de abrir.'),
};

/** P333+P313 (H317, skin) and P342+P311 (H334, breath): who shows signs of allergy is seen to. Here: the crew is told to stop and say so. */
export const symptomRule: ShiftRule<TaskContext> = {
  id: 'sensitizer-symptoms',
  title: words('Say it when skin or breath is off', 'Avise si la piel o el aire fallan'),
  source: sourced('Regulation (EC) 1272/2008 Annex IV / UN GHS P333+P313, P342+P311', 'partly', { note: 'Response statements for H317 and H334.' }),
  duties: ['ISO-01'],
  topic: 'people',
  holds: false,
  evaluate({ traits, kitHazards }) {
    if (!traits.touchesKit || kitHazards === null) return noKit;
    const codes = ['H317', 'H334'].filter((code) => kitHazards.single.has(code));
    if (codes.length === 0 && kitHazards.isocyanateParts.length === 0) return notApplicable(words('No sensitizer on the sheets.', 'Ningún sensibilizante en las hojas.'));
    return met(codes.length === 0 ? words('An isocyanate is listed on the sheet.', 'La hoja lista un isocianato.') : words(`On the sheet: ${codes.join(', ')}.`, `En la hoja: ${codes.join(', ')}.`), { inputs: { 'on the sheets': codes.join(', ') || null } });
  },
  line: () => words('Rash, cough or tight chest: stop and tell the lead.', 'Ronchas, tos o pecho apretado: pare y avise.'),
};
