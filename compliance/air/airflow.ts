import { checkNumber } from '../input-error';
import { type Words } from '../outcome';
import { WHO } from '../rule';
import { usFederal, type Source } from '../source';
import { inchesFromMm, m3PerHFromCfm } from '../quantities/units';

/** Table 1 rows (xi) and (xii): cubic feet a minute for each inch of wheel diameter. The one place of this figure. */
export const CFM_PER_INCH_OF_WHEEL = 25;
export const HANDHELD_SOURCE = usFederal('1926.1153', 'partly', { paragraph: '(c)(1) Table 1 rows (xi), (xii)', note: '25 cfm per inch of wheel diameter, at the shroud in real use; the latter is a reading of OSHA guidance, recalled.' });
export const WALK_BEHIND_SOURCE = usFederal('1926.1153', 'read', { paragraph: '(c)(1) Table 1 row (xiii)', note: 'The rule gives no figure; the maker of the machine recommends the airflow.' });

export type AirflowDemand =
  | { readonly isDecided: true; readonly requiredM3PerH: number; readonly reason: Words; readonly source: Source }
  | { readonly isDecided: false; readonly reason: Words; readonly whoDecides: Words; readonly source: Source };

/** Least collector airflow for a handheld grinder with a wheel of `wheelDiameterIn` inches, in cfm. */
export function handheldAirflowCfm(wheelDiameterIn: number): number {
  return checkNumber('wheelDiameterIn', wheelDiameterIn, { above: 0, max: 40 }) * CFM_PER_INCH_OF_WHEEL;
}

/**
 * What a collector must move: 25 cfm per inch of wheel for a handheld grinder (more where the maker asks more), the maker's figure for every other tool.
 * A missing wheel size or maker's figure is undecided.
 */
export function airflowDemand(tool: {
  readonly isHandheldGrinder: boolean;
  readonly wheelDiameterMm: number | null;
  readonly makerAirflowM3PerH: number | null;
}): AirflowDemand {
  const { isHandheldGrinder, wheelDiameterMm, makerAirflowM3PerH } = tool;
  if (makerAirflowM3PerH !== null) checkNumber('makerAirflowM3PerH', makerAirflowM3PerH, { above: 0 });
  if (!isHandheldGrinder) {
    if (makerAirflowM3PerH === null) {
      return { isDecided: false, reason: { en: 'The maker’s airflow for this machine is not on file.', es: 'Falta el caudal de aire que indica el fabricante de esta máquina.' }, whoDecides: WHO.maker, source: WALK_BEHIND_SOURCE };
    }
    return { isDecided: true, requiredM3PerH: makerAirflowM3PerH, reason: { en: 'The maker’s figure for this machine.', es: 'La cifra del fabricante de esta máquina.' }, source: WALK_BEHIND_SOURCE };
  }
  if (wheelDiameterMm === null) {
    return { isDecided: false, reason: { en: 'The wheel size is not known.', es: 'No se conoce el diámetro del disco.' }, whoDecides: WHO.competentPerson, source: HANDHELD_SOURCE };
  }
  const inches = inchesFromMm(checkNumber('wheelDiameterMm', wheelDiameterMm, { above: 0, max: 1_000 }));
  const cfm = handheldAirflowCfm(inches);
  return {
    isDecided: true,
    requiredM3PerH: Math.max(m3PerHFromCfm(cfm), makerAirflowM3PerH ?? 0),
    reason: { en: `25 cfm for each inch of wheel: ${Math.round(cfm)} cfm.`, es: `25 cfm por cada pulgada de disco: ${Math.round(cfm)} cfm.` },
    source: HANDHELD_SOURCE,
  };
}

/** Whether a measured airflow meets a demand; a hair's breadth of unit rounding (1 in 10,000) does not fail it. */
export function meetsAirflow(measuredM3PerH: number, requiredM3PerH: number): boolean {
  return checkNumber('measuredM3PerH', measuredM3PerH, { min: 0 }) >= checkNumber('requiredM3PerH', requiredM3PerH, { above: 0 }) * 0.9999;
}
