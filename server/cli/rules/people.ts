import * as z from 'zod';
import { noiseShift } from '#compliance/noise/dose';
import { deratedLevel, deratedLevelDual, protectedLevel, protectedLevelDual } from '#compliance/noise/hearing-protection';
import { TABLE_D2_SOURCE } from '#compliance/noise/noise-tables.data';
import { retention } from '#compliance/records/retention';
import { countRespiratorDays } from '#compliance/respirators/respirator-days';
import { selectRespirator } from '#compliance/respirators/select';
import { calculation, day, jurisdictionId, minutes, unsaid, type Calculation } from './calculation';

const respirator = calculation({
  name: 'respirator',
  summary: 'respirator by hazard ratio from the place’s own factors; after controls',
  schema: z.strictObject({
    jurisdictionId,
    exposureMgPerM3: z.number().min(0).nullable().describe('8-hour average without respirator, mg/m³; null where nobody can estimate it'),
    limitMgPerM3: z.number().positive().nullable().describe('mg/m³; null where the law sets none'),
    idlhMgPerM3: unsaid(z.number().positive().describe('immediately dangerous level, mg/m³')),
    form: z.enum(['particles', 'gas-or-vapor']),
    hasHoodEvidence: z.boolean().default(false).describe('maker’s test evidence for the higher hood factor is on file'),
  }),
  example: { jurisdictionId: 'us-federal', exposureMgPerM3: 0.6, limitMgPerM3: 0.05, idlhMgPerM3: 50, form: 'particles' },
  run: (input) => selectRespirator(input),
});

const noise = calculation({
  name: 'noise',
  summary: 'noise of one person’s shift: Table D-2 fraction (law in construction), general industry and NIOSH beside',
  schema: z.strictObject({ periods: z.array(z.strictObject({ levelDba: z.number().min(0).max(160).describe('dBA, slow'), minutes })).min(1) }),
  example: { periods: [{ levelDba: 97, minutes: 240 }, { levelDba: 90, minutes: 120 }, { levelDba: 85, minutes: 120 }] },
  run: ({ periods }) => ({ ...noiseShift(periods), source: TABLE_D2_SOURCE }),
});

const nrr = z.number().min(0).max(40).describe('noise reduction rating, dB (NRR, not SNR)');
const hearing = calculation({
  name: 'hearing-protection',
  summary: 'level under hearing protection, one protector or plug and muff, by Appendix B and halved',
  schema: z.strictObject({ twaDb: z.number().min(0).max(160).describe('8-hour average, dB'), weighting: z.enum(['A', 'C']).default('A'), nrrDb: nrr, secondNrrDb: unsaid(nrr) }),
  example: { twaDb: 100, nrrDb: 20, secondNrrDb: 12 },
  run: ({ twaDb, weighting, nrrDb, secondNrrDb }) => ({
    protected: secondNrrDb === null ? protectedLevel(twaDb, weighting, nrrDb) : protectedLevelDual(twaDb, weighting, nrrDb, secondNrrDb),
    derated: weighting === 'C' ? null : secondNrrDb === null ? deratedLevel(twaDb, nrrDb) : deratedLevelDual(twaDb, nrrDb, secondNrrDb),
  }),
});

const respiratorDays = calculation({
  name: 'respirator-days',
  summary: 'days on which the silica rule required a respirator of a person, back and ahead; 30 in any 12 months trigger the exam',
  schema: z.strictObject({
    asOf: day,
    days: z.array(z.strictObject({ on: day, basis: z.enum(['silica-table-1', 'silica-assessment', 'sheet', 'other-standard', 'host-rule', 'policy', 'voluntary']) })),
  }),
  example: { asOf: '2026-12-01', days: [{ on: '2026-11-30', basis: 'silica-table-1' }, { on: '2026-12-03', basis: 'sheet' }] },
  run: ({ asOf, days }) => countRespiratorDays(days, asOf),
});

const keep = calculation({
  name: 'retention',
  summary: 'until when a record is kept',
  schema: z.strictObject({
    asOf: day,
    jurisdictionId,
    record: z.enum(['exposure', 'background-data', 'sheet', 'register-of-use', 'medical', 'fit-test', 'noise-measurement', 'audiogram', 'training', 'silica-plan', 'monitoring-of-persons', 'monitoring-other', 'health-record', 'extraction-test']),
    madeOn: day,
    employmentEndedOn: unsaid(day),
    isReplaced: z.boolean().default(false),
    hasSubstitute: z.boolean().default(false).describe('a register of use (for a sheet) or the results (for work papers) are kept'),
  }),
  example: { asOf: '2026-12-01', jurisdictionId: 'us-federal', record: 'exposure', madeOn: '2026-12-01' },
  run: ({ asOf, ...facts }) => retention(facts, asOf),
});

export const PEOPLE_CALCULATIONS: readonly Calculation[] = [respirator, noise, hearing, respiratorDays, keep];
