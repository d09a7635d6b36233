import { met, notApplicable, undecided, unmet, WHO, type Rule } from '../rule';
import { usFederal } from '../source';
import { words } from '../words';
import { noiseShift, type NoisePeriod } from './dose';
import { deratedLevel, deratedLevelDual, protectedLevel, protectedLevelDual } from './hearing-protection';
import { MIXED_LEVELS_SOURCE } from './noise-tables.data';

export interface NoiseFacts {
  /** One person's whole shift, over all jobs. A level nobody knows is null. */
  readonly periods: readonly { readonly levelDba: number | null; readonly minutes: number }[];
}

const round = (value: number): number => Math.round(value * 1_000) / 1_000;

/**
 * 1926.52(a), (d)(1): no more noise than Table D-2 permits; (d)(2)(ii): levels that vary over the shift add up as minutes at each level ÷ minutes permitted there, at most 1; (b): above it controls first, then protectors.
 * Here: one person's whole shift (`noiseShift`, `dose.ts`; the table: `noise-tables.data.ts`). General industry's average and NIOSH's dose stand beside, as advice.
 */
export const noiseInShift: Rule<NoiseFacts> = {
  id: 'noise-in-shift',
  title: words('Noise of the shift within Table D-2', 'Ruido del turno dentro de la Tabla D-2'),
  source: MIXED_LEVELS_SOURCE,
  duties: ['NOI-01', 'NOI-02'],
  evaluate({ periods }) {
    const known = periods.filter((period): period is NoisePeriod => period.levelDba !== null);
    const shift = noiseShift(known);
    const results = { 'Table D-2 fraction': round(shift.construction.fraction), 'general industry, dBA (advice here)': shift.generalIndustryTwaDba === null ? null : round(shift.generalIndustryTwaDba), 'NIOSH dose, % (advice)': round(shift.nioshDosePercent) };
    const inputs = { periods: periods.length, 'periods without level': periods.length - known.length };
    // (d)(1) a level for which the table gives no time, (d)(2)(ii) a fraction above 1; levels nobody knows could only add.
    if (shift.construction.isExceeded) {
      const reason = shift.isAboveTable
        ? words('Some of it is above 115 dBA, for which the table gives no time.', 'Una parte pasa de 115 dBA, para lo que la tabla no da tiempo.')
        : words(`The fraction is ${round(shift.construction.fraction)}: above 1.`, `La fracción es ${round(shift.construction.fraction)}: más de 1.`);
      return unmet(reason, { inputs, results, whatWouldChange: words('Quieter machines or less time first, then hearing protection. Above the table a hearing conservation program is due too.', 'Primero máquinas más silenciosas o menos tiempo, luego protección auditiva. Sobre la tabla se debe también un programa de conservación auditiva.') });
    }
    if (known.length < periods.length) return undecided(words('A machine’s noise level is not known.', 'No se conoce el nivel de ruido de una máquina.'), WHO.maker, { inputs, results, whatWouldChange: words('Measure it, or take the maker’s figure.', 'Mídalo o use la cifra del fabricante.') });
    return met(words(`The fraction is ${round(shift.construction.fraction)}: not above 1.`, `La fracción es ${round(shift.construction.fraction)}: no más de 1.`), { inputs, results });
  },
};

export interface HearingProtectionFacts {
  readonly twaDba: number;
  readonly plugNrrDb: number | null;
  readonly muffNrrDb: number | null;
  /** 1926.101(b): inserted protectors are fitted individually by a competent person. */
  readonly arePlugsFitted: boolean | null;
}

/** Table D-2 for 8 hours, as average of the shift. */
const LIMIT_DBA = 90;

/**
 * 1926.101(a): protectors where noise cannot be brought within Table D-2; (b): plugs are fitted or chosen for each person by a competent one; (c): plain cotton is none.
 * Here: the average under the protector, by 1910.95 Appendix B (`hearing-protection.ts`), is 90 dBA at most; the figure with the halved rating stands beside.
 */
export const hearingProtection: Rule<HearingProtectionFacts> = {
  id: 'hearing-protection',
  title: words('Hearing protection strong enough', 'Protección auditiva suficiente'),
  source: usFederal('1926.101', 'parallel-text', { paragraph: '(a)-(c)', note: 'Michigan rule citing (b); level under the protector by 1910.95 App. B.' }),
  duties: ['NOI-03'],
  evaluate({ twaDba, plugNrrDb, muffNrrDb, arePlugsFitted }) {
    const inputs = { 'average, dBA': twaDba, 'plug NRR': plugNrrDb, 'muff NRR': muffNrrDb };
    // (a) asks protectors only where noise stays above Table D-2; federal construction law has no 85 dBA level.
    if (twaDba <= LIMIT_DBA) return notApplicable(words('Not above 90 dBA: construction law asks for none.', 'No pasa de 90 dBA: la ley de construcción no pide ninguna.'), { inputs, whatWouldChange: words('More noise, a state rule, or the house rule.', 'Más ruido, una regla estatal o la de la casa.') });
    // (a) None is planned, or too weak.
    const single = plugNrrDb ?? muffNrrDb;
    if (single === null) return unmet(words('No hearing protection is planned.', 'No hay protección auditiva prevista.'), { inputs, whatWouldChange: words('Plugs or muffs.', 'Tapones u orejeras.') });
    const isDual = plugNrrDb !== null && muffNrrDb !== null;
    const level = isDual ? protectedLevelDual(twaDba, 'A', plugNrrDb, muffNrrDb) : protectedLevel(twaDba, 'A', single);
    const derated = isDual ? deratedLevelDual(twaDba, plugNrrDb, muffNrrDb) : deratedLevel(twaDba, single);
    const results = { 'under protection, dBA (App. B)': round(level.levelDba), 'under protection, dBA (halved)': round(derated.levelDba) };
    if (level.levelDba > LIMIT_DBA) return unmet(words(`${round(level.levelDba)} dBA remain under it.`, `Quedan ${round(level.levelDba)} dBA debajo.`), { inputs, results, whatWouldChange: words('A higher rating, or plugs under muffs.', 'Un valor más alto, o tapones con orejeras.') });
    // (b)
    if (plugNrrDb !== null && arePlugsFitted !== true) {
      const reason = words('Plugs must be fitted for each person.', 'Los tapones deben ajustarse a cada persona.');
      const extra = { inputs, results, whatWouldChange: words('Have a competent person fit them.', 'Que una persona competente los ajuste.') };
      return arePlugsFitted === null ? undecided(reason, WHO.competentPerson, extra) : unmet(reason, extra);
    }
    return met(words(`${round(level.levelDba)} dBA remain under it.`, `Quedan ${round(level.levelDba)} dBA debajo.`), { inputs, results });
  },
};
