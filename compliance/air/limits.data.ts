import { sourced, usFederal, type Source } from '../source';

/** Whose figure it is. Construction and general industry differ; 'acgih', 'niosh' and 'aiha' are advice, not law. */
export type LimitScope = 'construction' | 'general-industry' | 'any-work' | 'advice';
export type LimitKind = 'twa-8h' | 'twa-10h' | 'action-level-8h' | 'ceiling' | 'ceiling-10-min' | 'stel-15-min' | 'idlh';
export type LimitUnit = 'mg/m3' | 'ug/m3' | 'ppm' | 'ppb' | 'mppcf';

export interface LimitRow {
  readonly id: string;
  readonly substanceId: string;
  /** A jurisdiction id, or 'acgih', 'niosh', 'aiha' for advice. */
  readonly jurisdictionId: string;
  readonly scope: LimitScope;
  readonly kind: LimitKind;
  /** null where the authority is known to set none. */
  readonly value: number | null;
  readonly unit: LimitUnit;
  readonly fraction: 'respirable' | 'total' | 'vapor' | null;
  readonly source: Source;
}

type Rest = [scope: LimitScope, kind: LimitKind, value: number | null, unit: LimitUnit, fraction: LimitRow['fraction'], source: Source];
const row = (substanceId: string, jurisdictionId: string, ...[scope, kind, value, unit, fraction, source]: Rest): LimitRow => ({
  id: `limit/${substanceId}/${jurisdictionId}/${scope}/${kind}${fraction === null ? '' : `/${fraction}`}`,
  substanceId,
  jurisdictionId,
  scope,
  kind,
  value,
  unit,
  fraction,
  source,
});

/** (k): obligations from 23 June 2017. Enforcement, not the rule, waited until 23 September. */
const SILICA_IN_FORCE = '2017-06-23';
const silica = (paragraph: string): Source => usFederal('1926.1153', 'read', { paragraph, inForceFrom: SILICA_IN_FORCE, note: 'To be followed from 23 June 2017 by (k), which was not seen itself; enforced from 23 September 2017: OSHA memorandum of 25 June 2018.' });
const NIOSH_MDI = sourced('NIOSH pocket guide and IDLH documentation, MDI', 'read');
const OSHA_CHEMICAL_PAGE = (section: string): Source => usFederal(section, 'partly', { note: 'As shown on the OSHA chemical page, which lists construction and general industry apart.' });
const MDA = (paragraph: string): Source => usFederal('1926.60', 'partly', { paragraph, note: 'Figures read in the proposal of 12 May 1989; that the final text kept them is recalled.' });

/** Limits and ceilings for what floor work sets free, in force or advised. Places other than those with a pack are for orientation. */
export const LIMIT_ROWS: readonly LimitRow[] = [
  row('rcs', 'us-federal', 'construction', 'twa-8h', 50, 'ug/m3', 'respirable', silica('(d)(1)')),
  row('rcs', 'us-federal', 'construction', 'action-level-8h', 25, 'ug/m3', 'respirable', silica('(b)')),
  row('rcs', 'us-california', 'construction', 'twa-8h', 50, 'ug/m3', 'respirable', sourced('8 CCR 1532.3', 'read', { note: 'Table 1 rows (i) to (v) and limit compared.' })),
  row('rcs', 'us-california', 'construction', 'action-level-8h', 25, 'ug/m3', 'respirable', sourced('8 CCR 1532.3', 'read')),
  row('rcs', 'us-oregon', 'construction', 'twa-8h', 50, 'ug/m3', 'respirable', sourced('OAR 437-002-1053 to -1065', 'read')),
  row('rcs', 'us-oregon', 'construction', 'action-level-8h', 25, 'ug/m3', 'respirable', sourced('OAR 437-002-1053 to -1065', 'read')),
  row('rcs', 'us-washington', 'construction', 'twa-8h', 50, 'ug/m3', 'respirable', sourced('WAC 296-840', 'read')),
  row('rcs', 'us-washington', 'construction', 'action-level-8h', 25, 'ug/m3', 'respirable', sourced('WAC 296-840', 'read')),
  row('rcs', 'great-britain', 'any-work', 'twa-8h', 0.1, 'mg/m3', 'respirable', sourced('EH40 workplace exposure limit', 'partly', { note: 'Several UK texts; there is no action level.' })),
  row('rcs', 'european-union', 'any-work', 'twa-8h', 0.1, 'mg/m3', 'respirable', sourced('Directive 2004/37/EC Annex III (Directive 2017/2398)', 'read', { note: 'Binding minimum; member states may be lower.' })),
  row('rcs', 'canada-ontario', 'any-work', 'twa-8h', 0.1, 'mg/m3', 'respirable', sourced('O. Reg. 490/09 Table 1', 'read', { note: 'Quartz; cristobalite 0.05. Section 14 excepts construction: check the current text.' })),
  row('rcs', 'canada-british-columbia', 'any-work', 'twa-8h', 0.025, 'mg/m3', 'respirable', sourced('British Columbia OHS Regulation, industry table of 2011', 'read')),
  row('rcs', 'canada-alberta', 'any-work', 'twa-8h', 0.025, 'mg/m3', 'respirable', sourced('Alberta OHS Code Part 4, industry table of 2011', 'read')),
  row('rcs', 'australia', 'any-work', 'twa-8h', 0.05, 'mg/m3', 'respirable', sourced('Australian workplace exposure limits', 'partly', { inForceFrom: '2026-12-01', note: 'Union, consultancy and calendar texts; not the gazette. The figure was the same before.' })),
  row('rcs', 'new-zealand', 'any-work', 'twa-8h', 0.025, 'mg/m3', 'respirable', sourced('New Zealand workplace exposure standards', 'read', { inForceFrom: '2023-01-01', note: 'Since 2023 (day not known); advisory unless prescribed.' })),
  row('rcs', 'acgih', 'advice', 'twa-8h', 0.025, 'mg/m3', 'respirable', sourced('ACGIH TLV', 'read')),
  row('rcs', 'niosh', 'advice', 'twa-10h', 0.05, 'mg/m3', 'respirable', sourced('NIOSH REL', 'read', { note: 'Up to a 10-hour average.' })),
  row('rcs', 'niosh', 'advice', 'idlh', 50, 'mg/m3', 'respirable', sourced('NIOSH IDLH, quartz', 'from-memory', { note: 'Cristobalite and tridymite 25 mg/m³.' })),

  row('portland-cement', 'us-federal', 'construction', 'twa-8h', 50, 'mppcf', null, OSHA_CHEMICAL_PAGE('1926.55')),
  row('portland-cement', 'us-federal', 'general-industry', 'twa-8h', 15, 'mg/m3', 'total', OSHA_CHEMICAL_PAGE('1910.1000')),
  row('portland-cement', 'us-federal', 'general-industry', 'twa-8h', 50, 'mppcf', null, usFederal('1910.1000', 'read', { paragraph: 'Table Z-3' })),
  row('portland-cement', 'acgih', 'advice', 'twa-8h', 1, 'mg/m3', 'respirable', sourced('ACGIH TLV', 'from-memory', { note: 'An older page shows 10 mg/m³.' })),
  row('portland-cement', 'niosh', 'advice', 'twa-10h', 10, 'mg/m3', 'total', sourced('NIOSH REL', 'read')),
  row('portland-cement', 'niosh', 'advice', 'idlh', 5000, 'mg/m3', null, sourced('NIOSH IDLH', 'read')),

  row('calcium-hydroxide', 'us-federal', 'construction', 'twa-8h', null, 'mg/m3', null, OSHA_CHEMICAL_PAGE('1926.55')),
  row('calcium-hydroxide', 'us-federal', 'general-industry', 'twa-8h', 15, 'mg/m3', 'total', OSHA_CHEMICAL_PAGE('1910.1000')),
  row('calcium-hydroxide', 'us-federal', 'general-industry', 'twa-8h', 5, 'mg/m3', 'respirable', OSHA_CHEMICAL_PAGE('1910.1000')),
  row('calcium-hydroxide', 'acgih', 'advice', 'twa-8h', 5, 'mg/m3', null, sourced('ACGIH TLV', 'read')),
  row('calcium-hydroxide', 'niosh', 'advice', 'twa-10h', 5, 'mg/m3', null, sourced('NIOSH REL', 'read')),

  row('mdi', 'us-federal', 'construction', 'ceiling', 0.02, 'ppm', 'vapor', usFederal('1926.55', 'read', { paragraph: 'App. A', note: 'Ceiling 0.02 ppm (0.2 mg/m³).' })),
  row('mdi', 'us-federal', 'general-industry', 'ceiling', 0.02, 'ppm', 'vapor', usFederal('1910.1000', 'read', { paragraph: 'Table Z-1' })),
  row('mdi', 'acgih', 'advice', 'twa-8h', 0.005, 'ppm', 'vapor', sourced('ACGIH TLV', 'read')),
  row('mdi', 'niosh', 'advice', 'twa-10h', 0.005, 'ppm', 'vapor', NIOSH_MDI),
  row('mdi', 'niosh', 'advice', 'ceiling-10-min', 0.02, 'ppm', 'vapor', NIOSH_MDI),
  row('mdi', 'niosh', 'advice', 'idlh', 75, 'mg/m3', null, NIOSH_MDI),
  row('polymeric-mdi', 'us-federal', 'construction', 'twa-8h', null, 'ppm', null, sourced('OSHA chemical page, polymeric MDI', 'read', { note: 'No limit: judge by MDI monomer and total isocyanate groups.' })),

  row('badge', 'us-federal', 'construction', 'twa-8h', null, 'mg/m3', null, usFederal('1926.55', 'from-memory')),
  row('bisphenol-f-resin', 'us-federal', 'construction', 'twa-8h', null, 'mg/m3', null, usFederal('1926.55', 'from-memory')),
  row('ipda', 'us-federal', 'construction', 'twa-8h', null, 'ppm', null, usFederal('1926.55', 'from-memory')),
  row('benzyl-alcohol', 'us-federal', 'construction', 'twa-8h', null, 'ppm', null, usFederal('1926.55', 'from-memory')),
  row('benzyl-alcohol', 'aiha', 'advice', 'twa-8h', 10, 'ppm', 'vapor', sourced('AIHA WEEL', 'from-memory')),

  row('mda', 'us-federal', 'construction', 'twa-8h', 10, 'ppb', null, MDA('(c)')),
  row('mda', 'us-federal', 'construction', 'stel-15-min', 100, 'ppb', null, MDA('(c)')),
  row('mda', 'us-federal', 'construction', 'action-level-8h', 5, 'ppb', null, MDA('(b)')),

  row('carbon-monoxide', 'us-federal', 'construction', 'twa-8h', 50, 'ppm', 'vapor', usFederal('1926.55', 'from-memory', { paragraph: 'App. A', note: '55 mg/m³.' })),
];
