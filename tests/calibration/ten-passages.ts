/** Ten invented passages: speeds in m/s, distances, depths and heights in m. Other libraries were given the same. */
export const SPEEDS = [2.1, 2.8, 3.3, 3.9, 4.4, 4.6, 5.2, 5.7, 6.1, 2.5]
export const DISTANCES = [25, 60, 31, 72, 40, 22, 55, 35, 66, 48]
export const DEPTHS = [3.2, 4.1, 5.5, 3.7, 4.9, 5.8, 3.4, 4.4, 5.1, 4.6]
export const MEASURED = [0.11, 0.19, 0.36, 0.38, 0.66, 0.92, 0.81, 1.27, 1.11, 0.15]
export const COMPUTED = [0.12, 0.17, 0.33, 0.35, 0.55, 0.71, 0.7, 0.98, 0.93, 0.15]
export const COMPUTED_BY_ANOTHER = [0.1, 0.2, 0.25, 0.45, 0.5, 0.85, 0.6, 1.3, 0.8, 0.17]
