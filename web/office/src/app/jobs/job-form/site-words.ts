import { listPlaces } from '#compliance/jurisdictions/pack';
import { type SiteFacts } from '#shared/jobs';
import { type Choice } from '../../pieces/fields/choice-field';
import { withUnit } from '../../pieces/units';

export const settingChoices: readonly Choice<SiteFacts['setting']>[] = [
  { value: 'indoors', label: 'indoors' },
  { value: 'enclosed', label: 'indoors, enclosed' },
  { value: 'outdoors', label: 'outdoors' },
];

export const coveringChoices: readonly Choice<SiteFacts['floor']['covering']>[] = [
  { value: 'unknown', label: 'not known yet' },
  { value: 'bare-concrete', label: 'bare concrete' },
  { value: 'tile', label: 'tile' },
  { value: 'black-mastic', label: 'black mastic' },
  { value: 'old-coating', label: 'old coating' },
];

export const surveyChoices: readonly Choice<SiteFacts['floor']['asbestos']>[] = [
  { value: 'unknown', label: 'not known yet' },
  { value: 'absent', label: 'surveyed: none' },
  { value: 'present', label: 'surveyed: present' },
  { value: 'not-needed', label: 'no survey needed' },
];

/** Places with a pack first. A place without one is offered honestly: it decides nothing by rule. */
export const jurisdictionChoices: readonly Choice<string>[] = [
  ...listPlaces().map(({ id, name, hasPack, isComplete }) => ({ value: id, label: isComplete ? name.en : `${name.en}: ${hasPack ? 'pack incomplete' : 'no pack'}` })),
  { value: 'no-pack', label: 'another place: no pack' },
];

export function jurisdictionName(id: string): string {
  return jurisdictionChoices.find((choice) => choice.value === id)?.label ?? `${id}: no pack`;
}

/** Time zones of the United States, with the one already chosen and the browser's own. */
export function timeZoneChoices(chosen: string): readonly Choice<string>[] {
  const own = Intl.DateTimeFormat().resolvedOptions().timeZone;
  const usual = ['America/New_York', 'America/Chicago', 'America/Denver', 'America/Phoenix', 'America/Los_Angeles', 'America/Anchorage', 'Pacific/Honolulu'];
  return [...new Set([chosen, own, ...usual])].map((value) => ({ value, label: value.replace(/_/g, ' ') }));
}

const surveyed: Readonly<Record<SiteFacts['floor']['asbestos'], string>> = { unknown: 'not known', absent: 'none', present: 'present', 'not-needed': 'no survey needed' };

/** The floor as one phrase: what it is, how old, what was looked for. */
export function floorWords({ floor }: SiteFacts): string {
  if (floor.covering === 'unknown') return 'floor not checked yet';
  const covering = coveringChoices.find((choice) => choice.value === floor.covering)?.label ?? floor.covering;
  const age = floor.builtYear === null ? 'age not known' : `of ${floor.builtYear}`;
  const survey = floor.asbestos === floor.lead ? (floor.asbestos === 'not-needed' ? surveyed[floor.asbestos] : `asbestos and lead ${surveyed[floor.asbestos]}`) : `asbestos ${surveyed[floor.asbestos]}, lead ${surveyed[floor.lead]}`;
  return `floor: ${covering} ${age}, ${survey}`;
}

/** Where the work is: setting, room, area and thickness. */
export function settingWords(site: SiteFacts): string {
  return [
    settingChoices.find((choice) => choice.value === site.setting)?.label,
    site.roomVolumeM3 === null ? null : withUnit('room', site.roomVolumeM3),
    site.areaM2 === null ? null : withUnit('area', site.areaM2),
    site.thicknessMm === null ? null : `${withUnit('thickness', site.thicknessMm)} thick`,
    site.targetProfile === null ? null : `CSP ${site.targetProfile}`,
  ]
    .filter(Boolean)
    .join(', ');
}
