/** Wire sizes. Kept in mm; a gauge number means nothing without its system. */

/**
 * American wire gauge (ASTM B258): d = 0.127 mm x 92^((36 - n)/39). n from -3 (0000) to 40.
 */
export function awgToMm(n: number): number {
  return 0.127 * 92 ** ((36 - n) / 39)
}

/** The gauge number (a fraction in general) of a diameter in mm > 0; the inverse of the ASTM B258 formula. */
export function mmToAwg(mm: number): number {
  return 36 - 39 * Math.log(mm / 0.127) / Math.log(92)
}

/** British Standard Wire Gauge (BS 3737:1964, withdrawn), inches by number: a table and no formula. 27 to 30 from memory. */
const SWG_INCHES: Record<number, number> = {
  10: 0.128, 11: 0.116, 12: 0.104, 13: 0.092, 14: 0.08, 15: 0.072, 16: 0.064, 17: 0.056, 18: 0.048, 19: 0.04, 20: 0.036, 21: 0.032, 22: 0.028, 23: 0.024, 24: 0.022, 25: 0.02, 26: 0.018,
  27: 0.0164, 28: 0.0148, 29: 0.0136, 30: 0.0124,
}

/** Diameter in mm of an SWG number from 10 to 30, or null. */
export function swgToMm(n: number): number | null {
  const inches = SWG_INCHES[n]
  return inches === undefined ? null : inches * 25.4
}

export interface NearGauge { system: 'AWG' | 'SWG', number: number, mm: number, /** What was asked less what the gauge is, mm. */ off: number }

/** The whole gauge numbers nearest to a diameter in mm. */
export function nearestGauges(mm: number): NearGauge[] {
  const awg = Math.max(-3, Math.min(40, Math.round(mmToAwg(mm))))
  const swg = Object.keys(SWG_INCHES).map(Number).reduce((best, n) => Math.abs((swgToMm(n) ?? 0) - mm) < Math.abs((swgToMm(best) ?? 0) - mm) ? n : best, 20)
  return [{ system: 'AWG', number: awg, mm: awgToMm(awg), off: mm - awgToMm(awg) }, { system: 'SWG', number: swg, mm: swgToMm(swg) ?? 0, off: mm - (swgToMm(swg) ?? 0) }]
}
