/** Speed of light in vacuum, m/s (exact by definition). */
export const speedOfLight = 299792458;
/** Permeability of vacuum as the check values use it, H/m. */
export const vacuumPermeability = 4e-7 * Math.PI;
/** Wave impedance of vacuum, ohm. */
export const vacuumImpedance = vacuumPermeability * speedOfLight;
/** Decibels in a neper. */
export const decibelsPerNeper = 20 * Math.LOG10E;
