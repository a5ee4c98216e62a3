/**
 * Magnetic constant mu0, H/m. The value before 2019, exact to 2 parts in 10^10 still; the tables that the laws are
 * checked against were made with it.
 */
export const MU0 = 4e-7 * Math.PI;

/** Speed of light c, m/s, exact (SI). */
export const SPEED_OF_LIGHT = 299_792_458;
