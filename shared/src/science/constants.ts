/** Speed of light, km/s (exact, SI). */
export const SPEED_OF_LIGHT_KMS = 299_792.458;
/** Rest frequency of the 21-cm hyperfine line, MHz. Source: methods in use across HI work; Hellwig et al. (1970). */
export const HI_REST_FREQUENCY_MHZ = 1420.405751768;
/** Newton's constant, kpc km^2 s^-2 per solar mass. */
export const GRAVITATION_KPC_KMS2 = 4.30091e-6;
/** Radians in one degree. */
export const DEGREE = Math.PI / 180;
/** Radians in one second of arc. */
export const ARCSECOND = DEGREE / 3600;
