/**
 * Limits that count where neither the request nor the segment gives one. Each has its unit, its source and what is
 * recalled or chosen in it.
 */
export const POLICY = {
  /** V/V_L: the knee of Schijf's curve, drawdown doubles from 0.90 to 1.00; Rock Manual f_v 0.90 (from memory) */
  maxCriticalRatio: 0.9,
  /** F_nh: CEM II-7, the deep-water pattern holds below about 0.7; PIANC (from memory) */
  maxDepthFroudeNumber: 0.7,
  /** m, on unprotected soil: Nanson et al. (1994), Regulated Rivers 9(1) 1-14, maximum in boat wake trains */
  soilWaveHeight: 0.3,
  /** m, secondary waves on reed: between the levels tried by Coops et al. (1996), own choice */
  reedWaveHeight: 0.15,
  /** m, riprap of unknown stone: common practice, no source */
  riprapWaveHeight: 0.5,
  /** m, moored small craft: MIL-HDBK-1025/5 gives 0.30 to 0.46 m in berthing areas */
  mooredCraftWaveHeight: 0.3,
  /** net clearance after squat over draught: common practice, no source */
  minUnderKeelClearanceRatio: 0.1,
  /** m, net clearance after squat at least: common practice, no source */
  minUnderKeelClearance: 0.2,
  /** s, period from which the rule for long wake wash is meant: Parnell & Kofoed-Hansen (2001) (from memory) */
  longWavePeriod: 4.5,
} as const
