/**
 * The reference arch of the bench: springings at two levels, a knee on each side, 12 loads on the axis and 78
 * stations. Invented figures; what is measured is the time.
 */
export const KEY_POINTS = [
  [0, 0],
  [2.4, 6.1],
  [13.2, 10.3],
  [24.1, 6.8],
  [27, 1.9],
] as const;

export const LEFT_SEGMENTS = 2;

/** Segment, ratio of the way along it, force across and up in N. */
export const LOADS = Array.from(
  { length: 12 },
  (_, i) => [i % 4, ((i * 7 + 3) % 12) / 12, ((i % 3) - 1) * 2_000, -9_000 - 500 * i] as const,
);

/** Segment and ratio of each station: 78 over the four segments. */
export const STATIONS = [20, 19, 20, 19].flatMap((count, segment) =>
  Array.from({ length: count }, (_, i) => [segment, i / (count - 1)] as const),
);

export const PERTURBATION = 0.035;

/** The figures that vary: coordinates of the key points, then ratios, forces across and up of the loads. */
export const INPUTS: readonly number[] = [
  ...KEY_POINTS.flat(),
  ...LOADS.flatMap(([, ratio, across, up]) => [ratio, across, up]),
  PERTURBATION,
];
