import { type RespiratorAnswer } from '../answer';
import { type Words } from '../outcome';
import { usFederal } from '../source';
import { words } from '../words';
import { type SilicaDecision } from './decision';
import { type RespiratorFactors } from './shift-pack';
import { FOUR_HOURS_MINUTES, table1Apf, type Table1Place } from './table1';

/** Plain name of the least protective class that has the factor; outside the US only the factor, as names and factors differ. */
export function apfName(apf: number, factors: RespiratorFactors | null): Words {
  if (factors === null || !factors.isUs) return words(`mask with factor ${apf} or more`, `máscara con factor ${apf} o más`);
  if (apf <= 10) return words('half mask, P100', 'media máscara, P100');
  if (apf <= 25) return words('powered hood or loose face shield', 'capucha o careta con motor');
  if (apf <= 50) return words('full face mask, P100', 'máscara completa, P100');
  if (apf <= 1000) return words('powered full face mask', 'máscara completa con motor');
  return words('supplied air, full face', 'aire con línea, cara completa');
}

const QUALIFIED = usFederal('1910.134', 'read', { paragraph: '(d)(1)(iii)', note: 'Quoted word for word in a public list of safety codes, and WAC 296-842-13005: what cannot be reasonably estimated counts as immediately dangerous.' });
const SCOPE = usFederal('1926.1153', 'read', { paragraph: '(a)' });
const OUTSIDE_TABLE_1 = usFederal('1926.1153', 'parallel-text', { paragraph: '(e)(1)', note: 'Read in WAC 296-840-125.' });

export const UNDECIDED_RESPIRATOR: RespiratorAnswer = { outcome: 'undecided', apf: null, label: words('undecided: qualified person', 'sin decidir: persona calificada'), source: QUALIFIED };

/** The silica rule's respirator for one person in one task; `table1Minutes` is the person's Table 1 sum over all jobs of the shift. */
export function silicaRespirator(decision: SilicaDecision, place: Table1Place, table1Minutes: number, factors: RespiratorFactors | null): RespiratorAnswer {
  switch (decision.kind) {
    case 'none':
      return { outcome: 'none-required', apf: null, label: words('none', 'ninguna'), source: SCOPE };
    case 'housekeeping':
      return { outcome: 'none-required', apf: null, label: words('none', 'ninguna'), source: usFederal('1926.1153', 'partly', { paragraph: '(f)', note: 'That wet or vacuumed clean-up needs no mask is a judgement; where dust is seen, assess it under (d).' }) };
    case 'incidental':
      return { outcome: 'none-required', apf: null, label: words('none, part of Table 1 work', 'ninguna, parte del trabajo de la Tabla 1'), source: usFederal('1926.1153', 'partly', { paragraph: '(c)(1)', note: 'That emptying the collector belongs to the Table 1 work is a judgement; no text says so.' }) };
    case 'table-1':
      return table1Respirator(decision, place, table1Minutes, factors);
    case 'basis':
      return basisRespirator(decision.decision, factors);
    default:
      return UNDECIDED_RESPIRATOR;
  }
}

function table1Respirator({ option }: Extract<SilicaDecision, { kind: 'table-1' }>, place: Table1Place, table1Minutes: number, factors: RespiratorFactors | null): RespiratorAnswer {
  const respirator = option[place] ?? { upTo4Hours: null, over4Hours: null };
  const apf = table1Apf(respirator, table1Minutes);
  if (apf !== null) {
    const name = apfName(apf, factors);
    const isOver = table1Minutes > FOUR_HOURS_MINUTES && respirator.upTo4Hours !== apf;
    return { outcome: 'required', apf, label: isOver ? words(`Over 4 h: ${name.en}`, `Más de 4 h: ${name.es}`) : name, source: option.source };
  }
  const label = respirator.over4Hours === null ? words('none under Table 1', 'ninguna en la Tabla 1') : words('none until 4 h', 'ninguna hasta 4 h');
  return { outcome: 'none-required', apf: null, label, source: option.source };
}

function basisRespirator(decision: Extract<SilicaDecision, { kind: 'basis' }>['decision'], factors: RespiratorFactors | null): RespiratorAnswer {
  if (decision.kind === 'outside-scope') return { outcome: 'none-required', apf: null, label: words('none for silica', 'ninguna por sílice'), source: SCOPE };
  if (decision.apf === null) return { outcome: 'none-required', apf: null, label: words('none: not above the limit', 'ninguna: no pasa el límite'), source: OUTSIDE_TABLE_1 };
  const name = apfName(decision.apf, factors);
  if (decision.kind === 'sampling-day') {
    return { outcome: 'required', apf: decision.apf, label: words(`${name.en}, as ${decision.basis.signedBy} wrote`, `${name.es}, como escribió ${decision.basis.signedBy}`), source: QUALIFIED };
  }
  return { outcome: 'required', apf: decision.apf, label: name, source: OUTSIDE_TABLE_1 };
}
