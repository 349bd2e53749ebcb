/** g, standard acceleration of gravity, m/s² (CGPM 1901, exact by convention). */
export const GRAVITY = 9.80665

/** rho of fresh water, kg/m³ (common practice, rounded). */
export const FRESH_WATER_DENSITY = 1000

/** rho of sea water, kg/m³ (common practice, rounded). */
export const SEA_WATER_DENSITY = 1025
