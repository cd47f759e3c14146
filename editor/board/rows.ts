import { type InputSpec, nodesById, type OutputSpec, type SettingSpec } from '../../src/graph/index.ts';
import type { Store } from '../store/store.ts';

/** A slip's measures on the board, in board units: what the links are drawn by, and the style sheet repeats. */
export const SLIP = { width: 240, head: 30, row: 24, foot: 6 } as const;

/** One line of a slip. */
export type Row =
  | { readonly row: 'input'; readonly name: string; readonly spec: InputSpec<unknown> }
  | { readonly row: 'setting'; readonly name: string; readonly spec: SettingSpec<unknown> }
  | { readonly row: 'output'; readonly name: string; readonly spec: OutputSpec<unknown> };

/** The lines of a node's slip, from top to bottom. */
export function rowsOf(store: Store, id: string): Row[] {
  const node = store.session.live.traced.nodes.get(id);
  if (node?.type === undefined) return [];
  const { settings, outputs } = node.type;
  return [
    ...Object.entries(node.inputs).map(([name, spec]): Row => ({ row: 'input', name, spec })),
    ...Object.entries(settings).map(([name, spec]): Row => ({ row: 'setting', name, spec })),
    ...Object.entries(outputs).map(([name, spec]): Row => ({ row: 'output', name, spec })),
  ];
}

export function slipHeight(rows: number): number {
  return SLIP.head + rows * SLIP.row + SLIP.foot;
}

/** Where a link meets a slip: at the left for an input, at the right for an output; undefined if it has no such row. */
export function portPlace(
  store: Store,
  id: string,
  side: 'input' | 'output',
  name: string,
  place: readonly [number, number] = placeOf(store, id),
): readonly [number, number] | undefined {
  const index = rowsOf(store, id).findIndex((row) => row.row === side && row.name === name);
  if (index === -1) return undefined;
  const y = place[1] + SLIP.head + (index + 0.5) * SLIP.row;
  return [place[0] + (side === 'output' ? SLIP.width : 0), y];
}

/** Where a node lies on the board. */
export function placeOf(store: Store, id: string): readonly [number, number] {
  return nodesById(store.document).get(id)?.place ?? [0, 0];
}
