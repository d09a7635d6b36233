import { LIMIT_ROWS, type LimitRow } from '../air/limits.data';
import { type Words } from '../outcome';
import { eachLanguage, words } from '../words';
import { PACKS, packAreas, type AreaCoverage, type JurisdictionPack, type PackArea } from './packs.data';
import { PLACES_WITHOUT_PACK, type PlaceWithoutPack } from './places.data';

export type FoundPack =
  | { readonly kind: 'pack'; readonly pack: JurisdictionPack; readonly isComplete: boolean; /** Stands on every document while the pack is incomplete. */ readonly gap: Words | null }
  | {
      readonly kind: 'no-pack';
      readonly jurisdictionId: string;
      /** null for a place nobody entered. */
      readonly place: PlaceWithoutPack | null;
      /** The place's own silica figure where one was found: for orientation, it decides nothing. */
      readonly orientation: readonly LimitRow[];
      readonly gap: Words;
      /** Whether it is a US state, where the federal text is shown for orientation. */
      readonly isUs: boolean;
    };

/** The pack of a place, or its absence said plainly. Never another place's pack. */
export function findPack(jurisdictionId: string): FoundPack {
  const pack = PACKS.find((each) => each.id === jurisdictionId);
  if (pack !== undefined) {
    const gap = gapOf(pack);
    return { kind: 'pack', pack, isComplete: gap === null, gap };
  }
  const place = PLACES_WITHOUT_PACK.find((each) => each.id === jurisdictionId) ?? null;
  const isUs = place?.isUsState ?? jurisdictionId.startsWith('us-');
  return {
    kind: 'no-pack',
    jurisdictionId,
    place,
    isUs,
    orientation: LIMIT_ROWS.filter((row) => row.substanceId === 'rcs' && row.jurisdictionId === jurisdictionId),
    gap: isUs
      ? words('No pack: federal text shown for orientation, check the state’s.', 'Sin reglas propias: el texto federal es solo de guía; consulte las del estado.')
      : words('No pack for this place: nothing here is decided by it. Check the local law.', 'Sin reglas para este lugar: aquí no se decide nada con ellas. Consulte la ley local.'),
  };
}

const AREA_WORDS: Readonly<Record<PackArea, Words>> = {
  'silica-limits': words('silica limits', 'límites de sílice'),
  'silica-table-1': words('silica Table 1', 'Tabla 1 de sílice'),
  'silica-assessment': words('silica assessment', 'evaluación de sílice'),
  'respirator-factors': words('respirator factors', 'factores de respiradores'),
  'respirator-program': words('respirator program', 'programa de respiradores'),
  'hazard-communication': words('hazard communication', 'comunicación de peligros'),
  'limits-of-substances': words('limits of substances', 'límites de sustancias'),
  noise: words('noise', 'ruido'),
  protection: words('protective equipment', 'equipo de protección'),
  records: words('records', 'registros'),
  medical: words('medical surveillance', 'vigilancia médica'),
  meetings: words('safety meetings', 'reuniones de seguridad'),
};

/** Coverage of every area, in a fixed order; an area the pack leaves out counts as missing. */
export function coverageOf(pack: JurisdictionPack): readonly AreaCoverage[] {
  return packAreas.map((area) => pack.coverage.find((each) => each.area === area) ?? { area, state: 'missing', note: null, source: null });
}

function gapOf(pack: JurisdictionPack): Words | null {
  const open = coverageOf(pack).filter((each) => each.state !== 'complete');
  if (open.length === 0) return null;
  const names = eachLanguage((language) => open.map((each) => AREA_WORDS[each.area][language]).join(', '));
  return words(
    `The ${pack.name.en} pack is incomplete (${names.en}): check the local text.`,
    `Las reglas de ${pack.name.es} están incompletas (${names.es}): consulte el texto local.`,
  );
}

/** Every place the program knows, with or without a pack, for lists. */
export function listPlaces(): readonly { readonly id: string; readonly name: Words; readonly hasPack: boolean; readonly isComplete: boolean }[] {
  return [
    ...PACKS.map((pack) => ({ id: pack.id, name: pack.name, hasPack: true, isComplete: gapOf(pack) === null })),
    ...PLACES_WITHOUT_PACK.map((place) => ({ id: place.id, name: place.name, hasPack: false, isComplete: false })),
  ];
}
