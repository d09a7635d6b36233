import { type KitAnswer } from './answer';
import { type KitFacts } from './facts';
import { countKits, KIT_RULES } from './quantities/kit-rules';
import { type ShiftContext } from './shift-context';
import { ask, present } from './shift-rule';

/** Kits, minutes and dumps of one kit, with the hazards of its parts together. */
export function answerKit(shift: ShiftContext, kit: KitFacts, day: string): KitAnswer {
  const hazards = shift.hazardsByKit.get(kit.id);
  const count = countKits(shift, kit);
  return {
    kitId: kit.id,
    kits: count?.kits ?? null,
    mixingMinutes: count?.mixingMinutes ?? null,
    powderDumps: count?.powderDumps ?? null,
    hazardCodes: hazards?.codes ?? [],
    pictograms: hazards?.pictograms ?? [],
    partsWithoutSheet: hazards?.partsWithoutSheet ?? [],
    findings: present(KIT_RULES.map((rule) => ask(rule, { ...shift, kit }, { pack: shift.pack, day, about: kit.id }))),
  };
}
