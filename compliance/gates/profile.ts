import { type ShiftFacts, type TaskKind, type WrittenException } from '../facts';
import { met, notApplicable, undecided, unmet, WHO } from '../rule';
import { METHOD_RANGES, type MethodRangeRow, type SurfaceMethod } from '../surface/profiles.data';
import { ORDER_SOURCE } from '../surface/profile';
import { isPossible, type Interval } from '../silica/minutes';
import { type ShiftContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { sourced } from '../source';
import { listed, words } from '../words';

/** Kinds of work that leave a profile, and the method of the surface table that each is. */
const METHODS: Readonly<Partial<Record<TaskKind, SurfaceMethod>>> = { 'floor-grinding': 'grinding', 'edge-grinding': 'grinding', 'shot-blasting': 'shot-blasting', scarifying: 'scarifying', chipping: 'scabbling' };
const rangeOf = (kind: TaskKind): MethodRangeRow | undefined => METHOD_RANGES.find(({ method }) => method === METHODS[kind]);

const spans = ({ facts }: ShiftContext, ...kinds: readonly string[]): readonly Interval[] => facts.tasks.filter(({ kind }) => kinds.includes(kind)).flatMap(({ assignments }) => assignments.filter(isPossible));

/** Exceptions of the kits that go on the floor; none unless every one of them has its own, whole. */
function writtenExceptions({ tasks, kits }: ShiftFacts): readonly WrittenException[] {
  const laid = new Set(tasks.flatMap(({ kind, kitId }) => (kitId !== null && (kind === 'spreading' || kind === 'priming') ? [kitId] : [])));
  const onFloor = kits.filter(({ id }) => laid.size === 0 || laid.has(id));
  const exceptions = onFloor.flatMap(({ surfaceException }) => (surfaceException && [surfaceException.writtenBy, surfaceException.reference, surfaceException.text].every((each) => each.trim() !== '') ? [surfaceException] : []));
  return exceptions.length === onFloor.length ? exceptions : [];
}

/** ICRI 310.2R: each method gives a range of concrete surface profiles (`METHOD_RANGES`); grinding gives CSP 1 to 3. A coarse grind with primer in place of a rougher profile is the supplier's written exception, never that profile. */
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
    const ranges = facts.tasks.flatMap(({ kind }) => rangeOf(kind) ?? []);
    if (target === null || !Number.isFinite(target) || ranges.length === 0) return notApplicable(words('No work toward a profile.', 'No se trabaja para un perfil.'));
    const roughest = Math.max(...ranges.map(({ maxProfile }) => maxProfile));
    const inputs = { 'profile wanted, CSP': target, 'roughest that the planned work gives, CSP': roughest };
    // Reached by the roughest method planned; else the supplier's exception; else the supplier decides.
    if (target <= roughest) return met(words(`CSP ${target} is wanted.`, `Se pide CSP ${target}.`), { inputs });
    const exceptions = writtenExceptions(facts);
    if (exceptions.length > 0) {
      const names = listed(exceptions.map(({ writtenBy, reference }) => `${writtenBy} (${reference})`));
      return met(words(`The planned work gives CSP ${roughest} at most, not ${target}. Allowed in writing by ${names.en}: ${exceptions.map(({ text }) => text).join(' ')}`, `El trabajo planeado da CSP ${roughest} a lo más, no ${target}. Lo permite por escrito ${names.es}: ${exceptions.map(({ text }) => text).join(' ')}`), {
        inputs: { ...inputs, 'supplier’s written exception': exceptions.map(({ reference }) => reference).join(', ') },
        whatWouldChange: words('The exception is withdrawn, or another product.', 'Se retira la excepción, u otro producto.'),
      });
    }
    return undecided(
      words(`The planned work gives CSP ${roughest} at most, not ${target}. A coarse grind with primer is the supplier's written exception.`, `El trabajo planeado da CSP ${roughest} a lo más, no ${target}. Pulido grueso con primario es excepción escrita del proveedor.`),
      WHO.supplier,
      { inputs, whatWouldChange: words('Shot blast, or keep the supplier\'s written exception.', 'Granalle, o guarde la excepción escrita del proveedor.') },
    );
  },
  line: ({ facts }, { outcome, inputs }) =>
    outcome === 'met' && inputs['supplier’s written exception'] !== undefined
      ? words(`Not CSP ${facts.targetProfile}: the supplier allows it in writing.`, `No es CSP ${facts.targetProfile}: el proveedor lo permite por escrito.`)
      : outcome === 'met' ? words(`Profile wanted: CSP ${facts.targetProfile}.`, `Perfil pedido: CSP ${facts.targetProfile}.`) : words('This work does not give the profile that is wanted.', 'Este trabajo no da el perfil que se pide.'),
};

/** Grinding takes a blasted profile off again: grind first, then blast. */
export const grindThenBlastRule: ShiftRule<ShiftContext> = {
  id: 'grind-then-blast',
  title: words('Grind, then blast', 'Primero pulir, luego granallar'),
  source: ORDER_SOURCE,
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
