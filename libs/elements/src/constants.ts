/** Speed of light in vacuum, m/s (exact by definition of the metre). */
export const lightSpeedMPerS = 299_792_458;
/** Decibels in a neper: 20 log10 e. */
export const dbPerNeper = 20 * Math.LOG10E;
