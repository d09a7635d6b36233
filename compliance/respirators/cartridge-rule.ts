import { sheetRespiratorDemand } from '../ppe/task-respirator';
import { met, notApplicable, undecided, unmet, WHO } from '../rule';
import { type ShiftRule } from '../shift-rule';
import { type TaskContext } from '../shift-context';
import { usFederal } from '../source';
import { words } from '../words';

/**
 * (d)(3)(iii): against gas and vapor (A) supplied air, or (B) cartridges (1) with an end-of-service-life indicator or (2) changed by a schedule that rests on data, and that the program describes.
 * Here: asked where the sheet demands a mask and its parts give isocyanate or solvent vapor.
 * Smell warns of isocyanates too late, so "change it when you smell it" is no schedule.
 */
export const cartridgeRule: ShiftRule<TaskContext> = {
  id: 'cartridge-change-schedule',
  title: words('When the vapor cartridges are changed', 'Cuándo se cambian los cartuchos de vapor'),
  source: usFederal('1910.134', 'read', { paragraph: '(d)(3)(iii)(B)', note: 'An end-of-service-life indicator serves too; none is known for isocyanates.' }),
  duties: ['RES-03', 'ISO-01'],
  topic: 'protection',
  holds: true,
  evaluate(context) {
    const { kit, kitHazards, people } = context;
    const hasVapor = kitHazards !== null && (kitHazards.isocyanateParts.length > 0 || kitHazards.flammableCodes.length > 0);
    const demand = sheetRespiratorDemand(context);
    if (kit === null || !hasVapor || demand.kind !== 'required') return notApplicable(words('No vapor mask is asked.', 'No se pide máscara de vapor.'));
    const onAirLine = people.length > 0 && people.every(({ respirators }) => respirators.some(({ type }) => type === 'supplied-air-hood'));
    const schedule = kit.cartridgeSchedule ?? null;
    const inputs = { kit: kit.name, 'sheet asks': demand.quote, 'all on supplied air': onAirLine, 'changed when': schedule?.change ?? null, 'rests on': schedule?.basedOn ?? null };
    // (A) Supplied air for everyone in the task.
    if (onAirLine) return met(words('Supplied air has no cartridge to change.', 'El aire con línea no lleva cartucho.'), { inputs });
    const opens = words('Write when they are changed and on what data, or use supplied air.', 'Anote cuándo se cambian y con qué datos, o use aire con línea.');
    // (B)(2) A schedule, and the data that it rests on.
    if (schedule === null) return undecided(words(`Nobody wrote when the cartridges for ${kit.name} are changed.`, `Nadie anotó cuándo se cambian los cartuchos para ${kit.name}.`), WHO.safetyOfficer, { inputs, whatWouldChange: opens });
    if (schedule.change.trim() === '' || schedule.basedOn.trim() === '') return unmet(words('The change schedule names no data that it rests on.', 'El plan de cambio no dice en qué datos se basa.'), { inputs, whatWouldChange: opens });
    return met(words(`Change: ${schedule.change}. It rests on: ${schedule.basedOn}.`, `Cambio: ${schedule.change}. Se basa en: ${schedule.basedOn}.`), { inputs });
  },
  line(context, { outcome }) {
    const change = context.kit?.cartridgeSchedule?.change;
    if (outcome !== 'met') return words(`${context.traits.name.en} may not start: no plan to change the cartridges.`, `${context.traits.name.es}: no puede empezar, falta el plan de cambio de cartuchos.`);
    return change === undefined ? words('Air line on and checked.', 'Línea de aire puesta y revisada.') : words(`New cartridges: ${change}.`, `Cartuchos nuevos: ${change}.`);
  },
};
