import { COINCIDENT } from '../geometry/index.ts';

/**
 * How far the crown hinge must lie off the line of the springings, as a share of their distance. Below it the
 * thrust is more than a million times the load and the arch is a mechanism for every practical purpose.
 */
export const HINGES_IN_LINE = 1e-6;

/**
 * How near to a hinge, in metres, a cut counts as being at the hinge, where there is no moment. Twice what counts as
 * one point: the way along an arc and its chord are not the same, and from the cut to the hinge there must be a chord.
 */
export const AT_HINGE = 2 * COINCIDENT;

/**
 * By how much, as a share of the way along the axis, two places may differ by rounding and still be one: a point on
 * an arc is found to about 1e-16 of its coordinates, which on a building site may be 100 km.
 */
export const SAME_PLACE = 1e-10;

/**
 * How far a load may stand off the axis, as a share of the axis, before it has to be said where it is tied: a
 * coordinate typed to the millimetre or the hundredth of a foot is well within a thousandth.
 */
export const OFF_AXIS = 1e-3;

/** By how much of the axis the moved point of a load may miss the load while nothing is moved: rounding only. */
export const UNMOVED = 1e-9;

/**
 * The sine at the middle hinge of the released mechanism below which it is driven from its other end: at 0 it
 * is at a dead point, where the far hinge can't be followed.
 */
export const DEAD_POINT = 0.05;
