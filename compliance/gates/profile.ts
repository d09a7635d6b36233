import { met, notApplicable, undecided, unmet, WHO } from '../rule';
import { isPossible, type Interval } from '../silica/minutes';
import { type ShiftContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { commonPractice, sourced } from '../source';
import { words } from '../words';

/** Roughest profile that grinding gives (ICRI 310.2R). */
export const GRINDING_TOP_PROFILE = 3;

const spans = ({ facts }: ShiftContext, ...kinds: readonly string[]): readonly Interval[] => facts.tasks.filter(({ kind }) => kinds.includes(kind)).flatMap(({ assignments }) => assignments.filter(isPossible));

/** Grinding gives CSP 1 to 3. A coarse grind with primer in place of a rougher profile is the supplier's written exception, never that profile. */
export const profileRule: ShiftRule<ShiftContext> = {
  id: 'floor-profile',
  title: words('The floor profile wanted', 'El perfil de piso que se pide'),
  source: sourced('ICRI 310.2R', 'from-memory', { note: 'Grinding gives CSP 1 to 3; the product data sheet prevails.' }),
  duties: [],
  topic: 'gate',
  holds: false,
  evaluate(context) {
    const { facts } = context;
    const target = facts.targetProfile;
    const doesGrind = facts.tasks.some(({ kind }) => kind === 'floor-grinding' || kind === 'edge-grinding');
    if (target === null || !doesGrind) return notApplicable(words('No grinding toward a profile.', 'No se pule para un perfil.'));
    const doesRougher = facts.tasks.some(({ kind }) => kind === 'shot-blasting' || kind === 'scarifying' || kind === 'chipping');
    const inputs = { 'profile wanted, CSP': target, 'rougher work in the shift': doesRougher };
    if (target <= GRINDING_TOP_PROFILE || doesRougher) return met(words(`CSP ${target} is wanted.`, `Se pide CSP ${target}.`), { inputs });
    return undecided(
      words(`Grinding gives CSP 1 to 3, not ${target}. A coarse grind with primer is the supplier's written exception.`, `Pulir da CSP 1 a 3, no ${target}. Pulido grueso con primario es excepción escrita del proveedor.`),
      WHO.supplier,
      { inputs, whatWouldChange: words('Shot blast, or keep the supplier\'s written exception.', 'Granalle, o guarde la excepción escrita del proveedor.') },
    );
  },
  line: ({ facts }, { outcome }) =>
    outcome === 'met' ? words(`Profile wanted: CSP ${facts.targetProfile}.`, `Perfil pedido: CSP ${facts.targetProfile}.`) : words('Grinding alone does not give this profile.', 'Solo pulir no da este perfil.'),
};

/** Grinding takes a blasted profile off again: grind first, then blast. */
export const grindThenBlastRule: ShiftRule<ShiftContext> = {
  id: 'grind-then-blast',
  title: words('Grind, then blast', 'Primero pulir, luego granallar'),
  source: commonPractice('Grinding takes a blasted profile off again.'),
  duties: [],
  topic: 'gate',
  holds: false,
  evaluate(context) {
    const grinding = spans(context, 'floor-grinding');
    const blasting = spans(context, 'shot-blasting');
    if (grinding.length === 0 || blasting.length === 0) return notApplicable(words('Not both in this shift.', 'No están los dos en este turno.'));
    const lastGrind = Math.max(...grinding.map(({ endMinute }) => endMinute));
    const firstBlast = Math.min(...blasting.map(({ startMinute }) => startMinute));
    const inputs = { 'grinding ends, minute of the day': lastGrind, 'blasting starts, minute of the day': firstBlast };
    return lastGrind <= firstBlast
      ? met(words('The blasted floor keeps its profile.', 'El piso granallado guarda su perfil.'), { inputs })
      : unmet(words('Grinding takes a blasted profile off again.', 'Pulir quita el perfil granallado.'), { inputs, whatWouldChange: words('Put the grinding before the blasting.', 'Ponga el pulido antes del granallado.') });
  },
  line: () => words('Grind first, then blast.', 'Primero pulir, luego granallar.'),
};
