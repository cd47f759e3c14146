/** What is read of a file before it is refused: far above any real graph, and within seconds of work. */
export const LIMITS = {
  /** Signs of a file. */
  signs: 30_000_000,
  /** Levels of brackets in a file. */
  depth: 64,
  nodes: 50_000,
  links: 200_000,
  /** Operations that all nodes together write: lists that double from node to node would write without end. */
  operations: 2_000_000,
  /** Signs of a formula. */
  formula: 1_000,
  /** Levels of brackets in a formula. */
  formulaDepth: 40,
} as const;
