import { type KitAnswer } from './answer';
import { type KitFacts } from './facts';
import { LEAST_AMOUNT } from './gates/possible';
import { type Finding } from './outcome';
import { KIT_COVERAGE_SOURCE, KIT_MIXING_SOURCE, kitsFor, mixingOf, statedCoverageFt2 } from './quantities/kits';
import { type ShiftContext } from './shift-context';
import { eachLanguage, listed, words } from './words';

const isAmount = (value: number | null): value is number => value !== null && Number.isFinite(value) && value >= 0;
const isPositive = (value: number | null): value is number => isAmount(value) && value >= LEAST_AMOUNT;

function countOf({ facts }: ShiftContext, kit: KitFacts): number | null {
  if (kit.count !== null) return isAmount(kit.count) ? kit.count : null;
  const { areaM2, thicknessMm } = facts;
  return isAmount(areaM2) && isPositive(thicknessMm) && isPositive(kit.volumeL) ? kitsFor(areaM2, thicknessMm, kit.volumeL) : null;
}

/** Kits, minutes and dumps of one kit, with the hazards of its parts together. */
export function answerKit(shift: ShiftContext, kit: KitFacts): KitAnswer {
  const hazards = shift.hazardsByKit.get(kit.id);
  const kits = countOf(shift, kit);
  const powderParts = kit.parts.filter(({ form }) => form === 'powder').length;
  const mixing = kits === null || !isAmount(kit.mixMinutesPerKit) ? null : mixingOf({ kits, mixMinutesPerKit: kit.mixMinutesPerKit, powderParts });
  const missing = hazards?.partsWithoutSheet ?? [];
  return {
    kitId: kit.id,
    kits,
    mixingMinutes: mixing?.mixingMinutes ?? null,
    powderDumps: mixing?.powderDumps ?? null,
    hazardCodes: hazards?.codes ?? [],
    pictograms: hazards?.pictograms ?? [],
    partsWithoutSheet: missing,
    findings: [countFinding(shift, kit, kits, mixing), ...(kit.bucketMinutes === null ? [] : [bucketFinding(shift, kit, kit.bucketMinutes)]), ...(missing.length === 0 ? [] : [sheetFinding(shift, kit, missing)])],
  };
}

const blank = { topic: 'gate', taskId: null, personId: null, isHolding: false, whatWouldChange: null, whoDecides: null } as const;

function countFinding({ facts, pack }: ShiftContext, kit: KitFacts, kits: number | null, mixing: { readonly mixingMinutes: number; readonly powderDumps: number } | null): Finding {
  const inputs = { 'area, m²': facts.areaM2, 'thickness, mm': facts.thicknessMm, 'volume of a kit, L': kit.volumeL, 'counted by hand': kit.count, 'mixing, minutes a kit': kit.mixMinutesPerKit };
  const common = { ...blank, id: `kit-count/${kit.id}`, ruleId: 'kit-count', inputs, source: KIT_COVERAGE_SOURCE, packVersion: pack.version };
  if (kits === null || mixing === null) {
    return {
      ...common,
      outcome: 'undecided',
      text: words(`${kit.name}: kits not counted.`, `${kit.name}: kits sin contar.`),
      reason: words('Area or thickness is missing.', 'Falta el área o el espesor.'),
      whatWouldChange: words('Give area and thickness.', 'Dé área y espesor.'),
      whoDecides: words('the crew lead', 'el jefe de cuadrilla'),
    };
  }
  const coverage = isPositive(facts.thicknessMm) && isPositive(kit.volumeL) ? statedCoverageFt2(kit.volumeL, facts.thicknessMm) : null;
  return {
    ...common,
    outcome: 'met',
    text: words(`${kit.name}: ${kits} kits, ${mixing.mixingMinutes} min of mixing, ${mixing.powderDumps} dumps.`, `${kit.name}: ${kits} kits, ${mixing.mixingMinutes} min de mezcla, ${mixing.powderDumps} vaciadas.`),
    reason: coverage === null ? words('Counted by hand.', 'Contado a mano.') : words(`One kit covers about ${coverage} ft² here. Kits are rounded up.`, `Un kit cubre como ${coverage} ft² aquí. Los kits se redondean hacia arriba.`),
    inputs: { ...inputs, kits, 'mixing, minutes': mixing.mixingMinutes, 'powder dumps': mixing.powderDumps },
  };
}

function bucketFinding({ pack }: ShiftContext, kit: KitFacts, bucketMinutes: number): Finding {
  return {
    ...blank,
    id: `kit-bucket-time/${kit.id}`,
    ruleId: 'kit-bucket-time',
    topic: 'control',
    outcome: 'met',
    text: words(`Out of the bucket within ${bucketMinutes} minutes.`, `Fuera del balde antes de ${bucketMinutes} minutos.`),
    reason: words('Mixed material heats up in the bucket.', 'La mezcla se calienta en el balde.'),
    inputs: { 'bucket time, minutes': bucketMinutes },
    source: KIT_MIXING_SOURCE,
    packVersion: pack.version,
  };
}

function sheetFinding({ pack }: ShiftContext, kit: KitFacts, missing: readonly string[]): Finding {
  const names = listed(missing);
  return {
    ...blank,
    id: `kit-sheets/${kit.id}`,
    ruleId: 'sheet-for-every-product',
    outcome: 'unmet',
    text: eachLanguage((language) => (language === 'en' ? `No confirmed sheet: ${names.en}.` : `Sin hoja confirmada: ${names.es}.`)),
    reason: words('Its hazards are not known here.', 'Aquí no se saben sus peligros.'),
    inputs: { 'products without a confirmed sheet': missing.join(', ') },
    whatWouldChange: words('Get the sheet and confirm it.', 'Consiga la hoja y confírmela.'),
    source: { citation: '29 CFR 1910.1200', paragraph: '(g)(1)', verified: 'read' },
    packVersion: pack.version,
  };
}
