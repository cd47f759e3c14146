/** Times of several acts, taken in turn, so that a machine that slows down slows them all. */
export interface Times {
  /** The median time of one call, in microseconds. */
  median(name: string): number;
  /** The median, over the rounds, of the one's time over the other's. */
  ratio(name: string, to: string): number;
}

/** Runs every act for a while, in turn, round after round. */
export function measure(acts: Readonly<Record<string, () => void>>, rounds = 15, milliseconds = 20): Times {
  const calls = new Map<string, number>();
  const times = new Map<string, number[]>();
  for (const [name, act] of Object.entries(acts)) {
    let count = 1;
    while (timeOf(act, count) < milliseconds) count *= 2;
    calls.set(name, count);
    times.set(name, []);
  }
  for (let round = 0; round < rounds; round++) {
    for (const [name, act] of Object.entries(acts)) {
      const count = calls.get(name) ?? 1;
      times.get(name)?.push((timeOf(act, count) * 1000) / count);
    }
  }
  const of = (name: string): number[] => times.get(name) ?? [];
  return {
    median: (name) => median(of(name)),
    ratio: (name, to) => median(of(name).map((time, i) => time / (of(to)[i] ?? Number.NaN))),
  };
}

function timeOf(act: () => void, count: number): number {
  const start = performance.now();
  for (let i = 0; i < count; i++) act();
  return performance.now() - start;
}

function median(list: readonly number[]): number {
  return list.toSorted((a, b) => a - b)[Math.floor(list.length / 2)] ?? Number.NaN;
}

/** A line of a report: what, and how much. */
export function report(what: string, figure: string): void {
  console.log(`${what.padEnd(58)} ${figure}`);
}
