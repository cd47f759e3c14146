/**
 * Two points nearer than this, in metres, count as one: a thousandth of a millimetre, far below anything that
 * a building is set out to, and far above the rounding of coordinates of any site (1e-16 of 100 km).
 */
export const COINCIDENT = 1e-6;

/**
 * By how much of their radii two circles may miss each other and still be taken to touch: rounding in the
 * radii and the distance of the centres, each good to about 1e-16, must not turn touching into missing.
 */
export const TOUCHING = 1e-12;

/**
 * Half the common chord of two circles, as a share of the smaller radius, below which they only touch: the
 * speed of the point where they meet grows as the inverse of it, and at 1e-6 has lost half of all digits.
 */
export const GRAZING = 1e-6;

/** By how much of its length a chord may differ from the chord it is moved to: rounding, and nothing else. */
export const RIGID = 1e-9;

/** The sine of the angle between two lines below which they have no definite meeting point. */
export const PARALLEL = 1e-9;
