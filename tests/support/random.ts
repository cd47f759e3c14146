/** Random figures from a seed, so that a failure can be run again (xorshift32; Marsaglia 2003). */
export function randomFrom(seed: number): {
  (low: number, high: number): number;
  whole(low: number, high: number): number;
} {
  let state = (Math.imul(seed + 1, 0x9e3779b1) | 1) >>> 0;
  const next = (): number => {
    state ^= state << 13;
    state >>>= 0;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return state / 2 ** 32;
  };
  for (let i = 0; i < 8; i++) next();
  const uniform = (low: number, high: number): number => low + (high - low) * next();
  return Object.assign(uniform, {
    whole: (low: number, high: number) => Math.floor(uniform(low, high + 1)),
  });
}
