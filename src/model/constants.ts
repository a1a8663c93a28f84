/** Physical constants, SI. */

/**
 * [H/m] Magnetic constant, 4e-7 pi: the exact value until 2019. The 2019 SI makes it a measured quantity
 * 1.3e-10 higher in relative terms (CODATA 2022), below any tolerance of a conductor.
 */
export const MU0 = 4e-7 * Math.PI;

/** [m/s] Speed of light in vacuum, exact (SI). */
export const SPEED_OF_LIGHT = 299792458;
