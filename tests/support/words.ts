/** Words for which this project has another or none at all, American spellings, and praise. */
export const NOT_OUR_WORDS = new RegExp(
  [
    'apex|abutments?|foundations?|parameters?|parametric|canvas|ports?|sockets?|plugins?|presets?|variants?',
    'dashboards?|widgets?|sensitivity|solver|snapshots?|tags?|tension line|force line|pop-?up',
    'center|centers|meters?|colou?red|color|gray|fiber|analyz\\w+|labor|sill',
    'successful(ly)?|powerful|easy|easily|simply|amazing|beautiful|please|oops',
  ]
    .map((group) => `\\b(${group})\\b`)
    .join('|'),
  'i',
);
