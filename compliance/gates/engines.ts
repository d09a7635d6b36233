import { met, notApplicable, undecided, unmet, WHO } from '../rule';
import { isIndoors, type ShiftContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { usFederal } from '../source';
import { words } from '../words';

/**
 * 1926.55(a): carbon monoxide stays within the limit of App. A; 1926.154(a): fresh air for heaters inside.
 * Here: indoors, engines and fuel heaters run only with their exhaust led outside and an alarm worn; electric first.
 */
export const enginesRule: ShiftRule<ShiftContext> = {
  id: 'engines-indoors',
  title: words('Engines and heaters indoors', 'Motores y calentadores adentro'),
  source: usFederal('1926.55', 'from-memory', { paragraph: 'App. A; 1926.154', note: 'Carbon monoxide 50 ppm in construction.' }),
  duties: ['GATE-02'],
  topic: 'gate',
  holds: true,
  evaluate(context) {
    const { engines } = context.facts;
    if (!isIndoors(context)) return notApplicable(words('Work is outdoors.', 'El trabajo es afuera.'));
    const inputs = { 'engines inside': engines.areUsedInside, 'exhaust led outside': engines.isExhaustLedOutside, 'carbon monoxide alarm': engines.hasCarbonMonoxideAlarm };
    if (engines.areUsedInside === null) {
      return undecided(words('Nobody said whether engines run inside.', 'Nadie dijo si hay motores adentro.'), WHO.competentPerson, { inputs, whatWouldChange: words('Say yes or no.', 'Diga sí o no.') });
    }
    if (!engines.areUsedInside) return met(words('No engine and no fuel heater inside.', 'Ni motor ni calentador de gas adentro.'), { inputs });
    // Both are needed; one "no" is unmet, one unsaid is a question.
    if (engines.isExhaustLedOutside === true && engines.hasCarbonMonoxideAlarm === true) return met(words('Exhaust goes outside; the alarm is worn.', 'El humo sale afuera; la alarma va puesta.'), { inputs });
    const reason = words('Exhaust gas kills without smell. It must go outside, and an alarm must be worn.', 'El humo mata sin oler. Debe salir afuera, y la alarma va puesta.');
    const extra = { inputs, whatWouldChange: words('Lead it outside and wear the alarm, or use electric.', 'Sáquelo afuera y use alarma, o use eléctrico.') };
    return engines.isExhaustLedOutside === false || engines.hasCarbonMonoxideAlarm === false ? unmet(reason, extra) : undecided(reason, WHO.competentPerson, extra);
  },
  line: ({ facts }, { outcome }) =>
    outcome !== 'met'
      ? words('Engines inside: exhaust or alarm not settled.', 'Motores adentro: falta aclarar humo o alarma.')
      : facts.engines.areUsedInside === true
        ? words('Exhaust led outside. CO alarm worn and on.', 'Humo llevado afuera. Alarma de CO puesta y prendida.')
        : words('No engines and no fuel heaters inside.', 'Sin motores ni calentadores de gas adentro.'),
};
