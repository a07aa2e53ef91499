/** Physical constants, SI. Source: CODATA 2018; the speed of light is exact. */

/** Speed of light in vacuum [m/s]. */
export const LIGHT_SPEED = 299_792_458;
/** Magnetic constant [H/m]. */
export const MU0 = 1.25663706212e-6;
/** Electric constant [F/m]. */
export const EPS0 = 1 / (MU0 * LIGHT_SPEED * LIGHT_SPEED);
/** Wave impedance of vacuum [Ω], where papers print 377 or 120 π. */
export const ETA0 = MU0 * LIGHT_SPEED;
