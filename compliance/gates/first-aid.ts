import { met, notApplicable, undecided, unmet, WHO } from '../rule';
import { type ShiftContext, type TaskContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { usFederal } from '../source';
import { sentences, words } from '../words';

const isWritten = (text: string | null): boolean => text !== null && text.trim() !== '';

/**
 * (c): without a clinic near, a person with a valid first-aid certificate is at the site; (e), (f): a way to call an ambulance, its number posted.
 * Here: the first-aider, the emergency number and the address to send help to are written down before work.
 */
export const firstAidRule: ShiftRule<ShiftContext> = {
  id: 'first-aid-named',
  title: words('First aid, number and address', 'Primeros auxilios, número y dirección'),
  source: usFederal('1926.50', 'partly', { paragraph: '(c), (e), (f); 1926.23, .35', note: '1926.50 read, in the wording of (f) before 2019: without a clinic near, (c) asks a valid first-aid certificate; the other sections recalled.' }),
  duties: ['GATE-05'],
  topic: 'gate',
  holds: true,
  evaluate({ facts: { firstAid } }) {
    const inputs = { 'first-aider': firstAid.firstAiderName, 'emergency number': firstAid.emergencyNumber, address: firstAid.address };
    if (isWritten(firstAid.firstAiderName) && isWritten(firstAid.emergencyNumber) && isWritten(firstAid.address)) {
      return met(words(`First aid: ${firstAid.firstAiderName}. Call ${firstAid.emergencyNumber}. Send them to ${firstAid.address}.`, `Primeros auxilios: ${firstAid.firstAiderName}. Llame al ${firstAid.emergencyNumber}. Mándelos a ${firstAid.address}.`), { inputs });
    }
    const missing = sentences(
      // (c)
      isWritten(firstAid.firstAiderName) ? null : words('No first-aider is named.', 'Nadie da primeros auxilios.'),
      // (f)
      isWritten(firstAid.emergencyNumber) ? null : words('No emergency number.', 'Falta el número de emergencia.'),
      // (e): help that is called must find the place.
      isWritten(firstAid.address) ? null : words('No address to send help to.', 'Falta la dirección para la ayuda.'),
    );
    return undecided(missing, WHO.competentPerson, { inputs, whatWouldChange: words('Write down what is missing.', 'Anote lo que falta.') });
  },
  line: ({ facts: { firstAid } }, { outcome }) =>
    outcome === 'met'
      ? words(`First aid today, card valid: ${firstAid.firstAiderName}. Call ${firstAid.emergencyNumber}.`, `Primeros auxilios hoy, carnet vigente: ${firstAid.firstAiderName}. Llame al ${firstAid.emergencyNumber}.`)
      : words('First aid, number or address not named.', 'Faltan primeros auxilios, número o dirección.'),
};

/** Corrosive by the sheet: H314 severe skin burns and eye damage, H318 serious eye damage. */
const BURNS_EYES = ['H314', 'H318'];

/**
 * (g): where corrosive material may reach eyes or body, suitable means to drench or flush them quickly are in the work area.
 * Here: corrosive is a kit whose sheets carry H314 or H318, or with cement in a powder part (wet cement, whatever its sheet says); the means is the one answer `hasEyewash`.
 */
export const eyewashRule: ShiftRule<TaskContext> = {
  id: 'eyewash-in-reach',
  title: words('Eyewash for what burns', 'Lavaojos para lo que quema'),
  source: usFederal('1926.50', 'read', { paragraph: '(g)', note: 'Read.' }),
  duties: ['GATE-05', 'PPE-02'],
  topic: 'gate',
  holds: true,
  evaluate({ facts, traits, kitHazards }) {
    // Exposed: the task handles a kit, and its confirmed sheets or its cement say that it burns. A kit without sheets is held by `sheet-for-every-product`.
    const codes = kitHazards === null ? [] : BURNS_EYES.filter((code) => kitHazards.single.has(code));
    const isWetCement = kitHazards?.isWetCement ?? false;
    if (traits.touchesKit && kitHazards === null) return notApplicable(words('No kit is chosen yet: its sheets say what burns.', 'Falta elegir el kit: sus hojas dicen qué quema.'));
    if (!traits.touchesKit || (codes.length === 0 && !isWetCement)) return notApplicable(words('Nothing here burns eyes.', 'Aquí nada quema los ojos.'));
    const inputs = { 'on the sheets': codes.join(', ') || null, 'wet cement': isWetCement, eyewash: facts.firstAid.hasEyewash };
    const reason = isWetCement && codes.length === 0 ? words('Wet cement burns eyes and skin.', 'El cemento mojado quema ojos y piel.') : words(`The sheet says it burns eyes (${codes.join(', ')}).`, `La hoja dice que quema los ojos (${codes.join(', ')}).`);
    // Flushing in the work area: yes; then no, or nobody looked.
    if (facts.firstAid.hasEyewash === true) return met(reason, { inputs });
    const extra = { inputs, whatWouldChange: words('Bring and check the eyewash.', 'Traiga y revise el lavaojos.') };
    return facts.firstAid.hasEyewash === false ? unmet(reason, extra) : undecided(sentences(reason, words('Nobody checked the eyewash.', 'Nadie revisó el lavaojos.')), WHO.competentPerson, extra);
  },
  line: ({ traits }, { outcome }) =>
    outcome === 'met' ? words('Eyewash and wash water here, checked.', 'Lavaojos y agua aquí, revisados.') : words(`${traits.name.en} may not start: no checked eyewash.`, `${traits.name.es}: no puede empezar, falta lavaojos revisado.`),
};
