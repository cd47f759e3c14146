import { type SVGTemplateResult, svg } from 'lit';
import type { LineType, Link } from '../../src/graph/index.ts';
import type { Store } from '../store/store.ts';
import { placeOf, portPlace } from './rows.ts';
import type { Place } from './skeleton.ts';

/** Links run as leader lines: a short level stub, a straight run, a level stub. */
export function leader(from: readonly [number, number], to: readonly [number, number]): string {
  const stub = 18;
  return `M${from[0]} ${from[1]}H${from[0] + stub}L${to[0] - stub} ${to[1]}H${to[0]}`;
}

/** The line type of the kind that a link carries. */
export function lineOf(store: Store, { from }: Link): LineType {
  return store.session.live.traced.nodes.get(from[0])?.type?.outputs[from[1]]?.kind.line ?? 'numbers';
}

/** Every link of the document, drawn by the model's places, or by where its nodes are being dragged to. */
export function drawLinks(store: Store, dragged: ReadonlyMap<string, Place>): SVGTemplateResult[] {
  const place = (id: string): readonly [number, number] => {
    const at = dragged.get(id);
    return at === undefined ? placeOf(store, id) : [at.x, at.y];
  };
  return store.document.links.flatMap((link) => {
    const [[source, output], [target, input]] = [link.from, link.to];
    const from = portPlace(store, source, 'output', output, place(source));
    const to = portPlace(store, target, 'input', input, place(target));
    if (from === undefined || to === undefined) return [];
    const line = lineOf(store, link);
    const path = leader(from, to);
    const near = store.selection.has(source) || store.selection.has(target) ? 'near' : '';
    const drawn = svg`<path class="link ${line} ${near}" d=${path} />`;
    // A double line is a thick one with a thin one of the ground upon it.
    return line === 'results' ? [drawn, svg`<path class="link inner" d=${path} />`] : [drawn];
  });
}
