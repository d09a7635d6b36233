import { type ShiftFacts, type TaskFacts } from '../facts';
import { met, undecided, unmet, WHO } from '../rule';
import { type ShiftContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { sourced, usFederal } from '../source';
import { sentences, words } from '../words';

/** (e)(2): employers on one site tell each other of the chemicals that may reach the other's people; 1926.16: the prime contractor answers for the site. Here: the host was asked what can hurt the crew; "none" is an answer, silence is not. */
export const hostHazardsRule: ShiftRule<ShiftContext> = {
  id: 'host-hazards-asked',
  title: words('The host\'s hazards', 'Los peligros del lugar'),
  source: usFederal('1910.1200', 'partly', { paragraph: '(e)(2); 1926.16', note: 'Reference-service texts of (e)(2) and WAC 296-901-14010(2); 1926.16 recalled.' }),
  duties: ['GATE-06'],
  topic: 'gate',
  holds: true,
  evaluate({ facts: { hostHazards } }) {
    const inputs = { 'host says': hostHazards };
    if (hostHazards === null || hostHazards.trim() === '') {
      return undecided(words('Nobody asked the host what can hurt us here.', 'Nadie preguntó qué nos puede dañar aquí.'), WHO.competentPerson, { inputs, whatWouldChange: words('Ask, and write down the answer.', 'Pregunte y anote la respuesta.') });
    }
    return met(words(`The host says: ${hostHazards}`, `El lugar dice: ${hostHazards}`), { inputs });
  },
  line: (_context, { outcome }) => (outcome === 'met' ? words('We know the hazards of this place. The host knows ours.', 'Sabemos los peligros de aquí. El lugar sabe los nuestros.') : words('Nobody asked about the hazards of this place.', 'Nadie preguntó por los peligros de aquí.')),
};

/** (g)(4): a competent person inspects the site, materials and equipment often and regularly to carry out the silica plan; 1926.20(b)(2): the same for the whole job. Here: one is named who is on the crew of the day. */
export const competentPersonRule: ShiftRule<ShiftContext> = {
  id: 'competent-person-named',
  title: words('The competent person', 'La persona competente'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(g)(4); 1926.20(b)(2)', note: 'Read in WAC 296-840-140(4)(b).' }),
  duties: ['SIL-19', 'GATE-08'],
  topic: 'gate',
  holds: true,
  evaluate({ facts, peopleById }) {
    const person = facts.competentPersonId === null ? undefined : peopleById.get(facts.competentPersonId);
    const inputs = { 'competent person': person?.name ?? null };
    if (person !== undefined) return met(words(`${person.name} checks the work often and can stop it.`, `${person.name} revisa seguido y puede parar el trabajo.`), { inputs });
    return undecided(words('No competent person is named for today.', 'Hoy no hay persona competente nombrada.'), WHO.safetyOfficer, { inputs, whatWouldChange: words('Name one who is here.', 'Nombre a alguien que esté aquí.') });
  },
  line({ facts, peopleById }, { outcome }) {
    const name = outcome === 'met' ? peopleById.get(facts.competentPersonId ?? '')?.name : undefined;
    return name === undefined ? words('Who is the competent person today?', '¿Quién es hoy la persona competente?') : words(`The competent person today is ${name}.`, `La persona competente hoy es ${name}.`);
  },
};

const machineTasks = ({ tasks }: ShiftFacts, personId: string | undefined): readonly TaskFacts[] => tasks.filter(({ equipmentId, assignments }) => equipmentId !== null && assignments.some((each) => each.personId === personId));

/** (b)(2): frequent and regular inspections by competent persons. Here, a judgement: one who runs a machine cannot inspect at the same time, so somebody is named who is free then. */
export const inspectionCoverRule: ShiftRule<ShiftContext> = {
  id: 'inspection-cover',
  title: words('Who inspects meanwhile', 'Quién revisa mientras tanto'),
  source: usFederal('1926.20', 'partly', { paragraph: '(b)(2)', note: 'Frequent and regular inspections by competent persons the employer names: read. The question of cover is a judgement.' }),
  duties: ['GATE-08'],
  topic: 'people',
  holds: false,
  evaluate({ facts, peopleById }) {
    const person = facts.competentPersonId === null ? undefined : peopleById.get(facts.competentPersonId);
    const machines = machineTasks(facts, person?.id);
    const cover = peopleById.get(facts.inspectionCoverId ?? '');
    const inputs = { 'competent person': person?.name ?? null, 'tasks at a machine': machines.length, 'inspects meanwhile': cover?.name ?? null };
    // Nobody named is `competent-person-named`'s to say.
    if (person === undefined || machines.length === 0) return met(words('Free to inspect all shift.', 'Libre para revisar todo el turno.'), { inputs });
    if (cover !== undefined && cover.id !== person.id) {
      // Free: at no machine and on no other job while the competent person runs one.
      const theirs = [...machineTasks(facts, cover.id).flatMap(({ assignments }) => assignments.filter(({ personId }) => personId === cover.id)), ...cover.elsewhere];
      const ours = machines.flatMap(({ assignments }) => assignments.filter(({ personId }) => personId === person.id));
      const isBusy = ours.some((span) => theirs.some((other) => span.startMinute < other.endMinute && other.startMinute < span.endMinute));
      if (!isBusy) return met(words(`${cover.name} inspects while ${person.name} runs a machine.`, `${cover.name} revisa mientras ${person.name} maneja una máquina.`), { inputs });
      return undecided(words(`${cover.name} is at a machine or on another job while ${person.name} runs one.`, `${cover.name} está en una máquina o en otra obra mientras ${person.name} maneja una.`), WHO.safetyOfficer, { inputs, whatWouldChange: words('Name someone who is free then.', 'Nombre a alguien que esté libre entonces.') });
    }
    return undecided(words(`${person.name} runs a machine today.`, `${person.name} maneja una máquina hoy.`), WHO.safetyOfficer, { inputs, whatWouldChange: words('Name who inspects in that time.', 'Nombre quién revisa en ese tiempo.') });
  },
  line: (_context, { outcome }) => (outcome === 'met' ? words('Inspections are covered.', 'Las revisiones están cubiertas.') : words('Who inspects while the competent person runs a machine?', '¿Quién revisa mientras la persona competente maneja?')),
};

/** No paragraph: which law judges the shift. A place without its own pack, or with an incomplete one, is said on every document. */
export const packRule: ShiftRule<ShiftContext> = {
  id: 'rules-of-the-place',
  title: words('Which law this is', 'Qué ley es esta'),
  source: sourced('Law of the place', 'derived', { note: 'A state plan may replace the federal text (29 CFR 1953, from memory); other countries have their own law.' }),
  duties: ['LOC-01', 'LOC-02'],
  topic: 'gate',
  // Holds through the silica tasks, which stay undecided without a pack.
  holds: false,
  evaluate({ pack }) {
    const inputs = { pack: pack.id, 'pack version': pack.version };
    const law = pack.isComplete ? met(words(`Judged by ${pack.name.en}.`, `Según: ${pack.name.es}.`), { inputs }) : null;
    if (law !== null) return law;
    const gap = pack.gap ?? words('The pack is not complete.', 'Las reglas no están completas.');
    return pack.silica === null
      ? undecided(sentences(gap, pack.orientation?.words ?? null), WHO.localAuthority, { inputs, whatWouldChange: words('A pack for this place.', 'Reglas para este lugar.') })
      : unmet(gap, { inputs, whatWouldChange: words('A complete pack.', 'Reglas completas.') });
  },
  line: ({ pack }, { outcome }) => {
    if (outcome === 'met') return pack.name;
    return pack.silica === null ? words(`No pack for ${pack.name.en}: check the local law.`, `Sin reglas para ${pack.name.es}: revise la ley local.`) : words(`${pack.name.en}: check the local law.`, `${pack.name.es}: revise la ley local.`);
  },
  sourceOf: ({ pack }) => pack.orientation?.source ?? packRule.source,
};
