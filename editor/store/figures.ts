import type { Kind } from '../../src/graph/index.ts';
import { measureOf, measures, printQuantity } from '../../src/quantity/index.ts';
import type { Store } from './store.ts';

/** The figures of a node's output in few words: a quantity, a point's coordinates, how many there are; "" if it waits. */
export function shownOutput(store: Store, id: string, output: string): string {
  const { session, system } = store;
  const spec = session.live.traced.nodes.get(id)?.type?.outputs[output];
  const value = session.value(id, output);
  if (spec === undefined || value === undefined) return '';
  if (spec.many) return `${(value as unknown[]).length} ×`;
  if (typeof value === 'number') {
    const scalar = session.live.scalarOf(id, output);
    const measure =
      spec.kind.measure ?? (scalar === undefined ? measures.number : measureOf(scalar.dimension));
    return spec.kind.typed === 'counts' ? String(value) : printQuantity(value, measure, system);
  }
  return shownShape(spec.kind, value, store);
}

function shownShape(kind: Kind<unknown>, value: unknown, { system }: Store): string {
  const length = (metres: number): string => printQuantity(metres, measures.length, system);
  if (kind.name === 'point') {
    const { x, y } = value as { x: number; y: number };
    return `${length(x)}, ${length(y)}`;
  }
  if (kind.name === 'circle') return `radius ${length((value as { radius: number }).radius)}`;
  return '';
}
