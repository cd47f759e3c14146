import type { Literal } from '../../src/graph/index.ts';

/**
 * A gable frame for the examples of this pack: columns of 4 m, a crown 3 m above them, a span of 12 m. With
 * 10 kN down at 3 m from the left its thrust is Pa/2f over the height of the crown, 10·3/(2·7) kN (statics by
 * hand), its knee moment that thrust times the column.
 */
export const exampleArch: Literal = [
  ['springing', ['0 m', '0 m']],
  ['knee', ['0 m', '4 m']],
  ['crown', ['6 m', '7 m']],
  ['knee', ['12 m', '4 m']],
  ['springing', ['12 m', '0 m']],
];

export const exampleLoads: Literal = [
  [
    ['3 m', '5.5 m'],
    ['0 kN', '-10 kN'],
  ],
];

/** 10·3/(2·7). */
export const exampleThrust = '2.142857142857143 kN';
/** 4 m of column times the thrust; the extrados is in tension. */
export const exampleKneeMoment = '-8.571428571428571 kN*m';

/** An arch with a column and a rafter of 4 m and 5 m on its left, for examples of axes and stations. */
export const smallArch: Literal = [
  ['springing', ['0 m', '0 m']],
  ['knee', ['0 m', '4 m']],
  ['crown', ['3 m', '8 m']],
  ['springing', ['6 m', '0 m']],
];
