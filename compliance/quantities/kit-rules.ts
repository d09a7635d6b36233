import { type KitFacts } from '../facts';
import { LEAST_AMOUNT } from '../gates/possible';
import { met, notApplicable, undecided, unmet } from '../rule';
import { type ShiftContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { usFederal } from '../source';
import { listed, words } from '../words';
import { KIT_COVERAGE_SOURCE, KIT_MIXING_SOURCE, kitsFor, mixingOf, statedCoverageFt2 } from './kits';

export interface KitOfShift extends ShiftContext {
  readonly kit: KitFacts;
}

export interface KitCount {
  readonly kits: number;
  readonly mixingMinutes: number;
  readonly powderDumps: number;
}

const isAmount = (value: number | null): value is number => value !== null && Number.isFinite(value) && value >= 0;
const isPositive = (value: number | null): value is number => isAmount(value) && value >= LEAST_AMOUNT;

/** Kits, minutes and dumps (bags of powder emptied); null where area, thickness or a count by hand is missing or cannot be. */
export function countKits({ facts }: ShiftContext, kit: KitFacts): KitCount | null {
  const { areaM2, thicknessMm } = facts;
  // A count by hand goes before the sum of area × thickness ÷ volume of a kit.
  const kits = kit.count !== null ? kit.count : isAmount(areaM2) && isPositive(thicknessMm) && isPositive(kit.volumeL) ? kitsFor(areaM2, thicknessMm, kit.volumeL) : null;
  if (!isAmount(kits) || !isAmount(kit.mixMinutesPerKit)) return null;
  return { kits, ...mixingOf({ kits, mixMinutesPerKit: kit.mixMinutesPerKit, powderParts: kit.parts.filter(({ form }) => form === 'powder').length }) };
}

/** Trade arithmetic: area × thickness ÷ volume of a kit, rounded up, gives kits (`kitsFor`); kits × minutes a kit give mixing time, kits × powder parts the dumps (`mixingOf`). */
export const kitCountRule: ShiftRule<KitOfShift> = {
  id: 'kit-count',
  title: words('Kits, mixing minutes and dumps', 'Kits, minutos de mezcla y vaciadas'),
  source: KIT_COVERAGE_SOURCE,
  duties: [],
  topic: 'gate',
  holds: false,
  evaluate(context) {
    const { facts, kit } = context;
    const count = countKits(context, kit);
    const inputs = { 'area, m²': facts.areaM2, 'thickness, mm': facts.thicknessMm, 'volume of a kit, L': kit.volumeL, 'counted by hand': kit.count, 'mixing, minutes a kit': kit.mixMinutesPerKit };
    if (count === null) {
      return undecided(words('Area or thickness is missing.', 'Falta el área o el espesor.'), words('the crew lead', 'el líder'), { inputs, whatWouldChange: words('Give area and thickness.', 'Dé área y espesor.') });
    }
    const coverage = isPositive(facts.thicknessMm) && isPositive(kit.volumeL) ? statedCoverageFt2(kit.volumeL, facts.thicknessMm) : null;
    const byHand = kit.count !== null || coverage === null;
    return met(byHand ? words('Counted by hand.', 'Contado a mano.') : words(`One kit covers about ${coverage} ft² here. Kits are rounded up.`, `Un kit cubre como ${coverage} ft² aquí. Los kits se redondean hacia arriba.`), {
      inputs,
      results: { kits: count.kits, 'mixing, minutes': count.mixingMinutes, 'powder dumps': count.powderDumps },
    });
  },
  line(context) {
    const { kit } = context;
    const count = countKits(context, kit);
    if (count === null) return words(`${kit.name}: kits not counted.`, `${kit.name}: kits sin contar.`);
    return words(`${kit.name}: ${count.kits} kits, ${count.mixingMinutes} min of mixing, ${count.powderDumps} dumps.`, `${kit.name}: ${count.kits} kits, ${count.mixingMinutes} min de mezcla, ${count.powderDumps} vaciadas.`);
  },
};

/** The supplier's time in the bucket, in minutes: mixed material is out of it before. */
export const bucketTimeRule: ShiftRule<KitOfShift> = {
  id: 'kit-bucket-time',
  title: words('Time in the bucket', 'Tiempo en el balde'),
  source: KIT_MIXING_SOURCE,
  duties: [],
  topic: 'control',
  holds: false,
  evaluate: ({ kit }) =>
    !isPositive(kit.bucketMinutes) ? notApplicable(words('No time is set.', 'Sin tiempo fijado.')) : met(words('Mixed material heats up in the bucket.', 'La mezcla se calienta en el balde.'), { inputs: { 'bucket time, minutes': kit.bucketMinutes } }),
  line: ({ kit }) => words(`Out of the bucket within ${kit.bucketMinutes} minutes.`, `Fuera del balde antes de ${kit.bucketMinutes} minutos.`),
};

/**
 * (g)(1): a safety data sheet in the workplace for each hazardous chemical that is used.
 * Here: each part of the kit whose sheet nobody has confirmed is named; its tasks are held by `sheet-for-every-product`, so a kit with all its sheets needs no line.
 */
export const kitSheetsRule: ShiftRule<KitOfShift> = {
  id: 'kit-sheets',
  title: words('Sheets of the kit\'s parts', 'Hojas de las partes del kit'),
  source: usFederal('1910.1200', 'read', { paragraph: '(g)(1)' }),
  duties: ['HAZ-04'],
  topic: 'gate',
  holds: false,
  evaluate({ kit, hazardsByKit }) {
    const missing = hazardsByKit.get(kit.id)?.partsWithoutSheet ?? [];
    return missing.length === 0
      ? notApplicable(words('Every part has its sheet.', 'Cada parte tiene su hoja.'))
      : unmet(words('Its hazards are not known here.', 'Aquí no se saben sus peligros.'), { inputs: { 'products without a confirmed sheet': missing.join(', ') }, whatWouldChange: words('Get the sheet and confirm it.', 'Consiga la hoja y confírmela.') });
  },
  line({ kit, hazardsByKit }) {
    const names = listed(hazardsByKit.get(kit.id)?.partsWithoutSheet ?? []);
    return words(`No confirmed sheet: ${names.en}.`, `Sin hoja confirmada: ${names.es}.`);
  },
};

export const KIT_RULES: readonly ShiftRule<KitOfShift>[] = [kitCountRule, bucketTimeRule, kitSheetsRule];
