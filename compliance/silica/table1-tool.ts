import { type EquipmentFacts, type TaskKind } from '../facts';
import { type Table1Tool } from './table1.data';

/**
 * The Table 1 heading that a machine falls under in this work; null where none fits.
 * A driven grinder fits no heading ("walk-behind milling machines and floor grinders"): a competent person decides (judgement).
 * An edge grinder counts as handheld, the stricter row; a wheeled edger that is walked behind is for the competent person to say.
 */
export function table1Tool(kind: TaskKind, tool: EquipmentFacts): Table1Tool | null {
  switch (tool.kind) {
    case 'floor-grinder':
      return tool.isRideOn ? null : 'walk-behind-grinder-or-mill';
    case 'scarifier':
      return tool.isRideOn ? 'small-drivable-mill' : 'walk-behind-grinder-or-mill';
    case 'edge-grinder':
      return kind === 'mortar-removal' ? 'mortar-removal-grinder' : 'handheld-grinder';
    case 'walk-behind-saw':
      return tool.isRideOn ? 'drivable-saw' : 'walk-behind-saw';
    case 'handheld-saw':
      return 'handheld-power-saw';
    case 'drill':
      return 'drill';
    case 'chipping-hammer':
      return 'chipping-tool';
    default:
      return null;
  }
}
