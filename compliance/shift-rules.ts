import { enginesRule } from './gates/engines';
import { eyewashRule, firstAidRule } from './gates/first-aid';
import { floorRule, floorTaskRule } from './gates/floor';
import { manualRule } from './gates/machines';
import { flammableRule, sheetsRule, symptomRule, vaporRule } from './gates/materials';
import { adultRule, doubleBookingRule, employerRule, hazardTrainingRule, keptFromIsocyanatesRule, maskReadyRule, silicaTrainingRule, type PersonInTask } from './gates/people';
import { possibleFactsRule } from './gates/possible';
import { grindThenBlastRule, profileRule } from './gates/profile';
import { competentPersonRule, hostHazardsRule, inspectionCoverRule, packRule } from './gates/site';
import { protectionRule } from './ppe/protection-rule';
import { consumableRule } from './quantities/consumables';
import { KIT_RULES } from './quantities/kit-rules';
import { cartridgeRule } from './respirators/cartridge-rule';
import { type ListedRule } from './rule';
import { basisRule, combinedExposureRule, overLimitRule, samplingDayRule } from './silica/basis-rule';
import { accessRule, blastingRule, bucketDustRule, exhaustIndoorsRule, housekeepingRule, waterFlowRule } from './silica/practice-rules';
import { type SilicaTask } from './silica/silica-context';
import { table1ControlRule, table1RespiratorRule, table1RowRule, table1WholeRule } from './silica/table1-rules';
import { type ShiftContext } from './shift-context';
import { type ShiftRule } from './shift-rule';

/** Rules about the whole shift, in the order of the page. */
export const SHIFT_RULES: readonly ShiftRule<ShiftContext>[] = [possibleFactsRule, packRule, competentPersonRule, hostHazardsRule, floorRule, enginesRule, firstAidRule, profileRule, grindThenBlastRule, inspectionCoverRule];

/** Rules about one task. */
export const TASK_RULES: readonly ShiftRule<SilicaTask>[] = [
  floorTaskRule,
  table1RowRule,
  table1WholeRule,
  basisRule,
  combinedExposureRule,
  sheetsRule,
  flammableRule,
  eyewashRule,
  manualRule,
  bucketDustRule,
  blastingRule,
  waterFlowRule,
  exhaustIndoorsRule,
  overLimitRule,
  samplingDayRule,
  accessRule,
  housekeepingRule,
  symptomRule,
  vaporRule,
  cartridgeRule,
];

/** Rules about one person in one task. */
export const PERSON_IN_TASK_RULES: readonly ShiftRule<PersonInTask>[] = [adultRule, silicaTrainingRule, hazardTrainingRule, keptFromIsocyanatesRule, maskReadyRule, table1RespiratorRule];

/** Every rule that speaks on a shift, for lists of rules. */
export const LISTED_SHIFT_RULES: readonly ListedRule[] = [...SHIFT_RULES, ...TASK_RULES, ...PERSON_IN_TASK_RULES, ...KIT_RULES, table1ControlRule, protectionRule, employerRule, doubleBookingRule, consumableRule];
