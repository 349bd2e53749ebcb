/** One international knot, exactly 1852 m in an hour (BIPM, SI Brochure, non-SI units), in which some laws are printed. */
export const KNOT = 1852 / 3600
