/** Exact by definition: 1 in = 25.4 mm, so 1 ft = 0.3048 m. */
export const MM_PER_INCH = 25.4;
export const M_PER_FOOT = 0.3048;
export const M2_PER_FT2 = M_PER_FOOT ** 2;
export const L_PER_FT3 = M_PER_FOOT ** 3 * 1000;
/** 1 ft³/min in m³/h. */
export const M3_PER_H_PER_CFM = M_PER_FOOT ** 3 * 60;

export const inchesFromMm = (mm: number): number => mm / MM_PER_INCH;
export const cfmFromM3PerH = (m3PerH: number): number => m3PerH / M3_PER_H_PER_CFM;
export const m3PerHFromCfm = (cfm: number): number => cfm * M3_PER_H_PER_CFM;
export const ft2FromM2 = (m2: number): number => m2 / M2_PER_FT2;
export const m2FromFt2 = (ft2: number): number => ft2 * M2_PER_FT2;
export const ft3FromL = (liters: number): number => liters / L_PER_FT3;
export const litersFromFt3 = (ft3: number): number => ft3 * L_PER_FT3;
