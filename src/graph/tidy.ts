import { BANDS, type Library } from './define.ts';
import { type GraphDocument, nodesById } from './document.ts';
import { orderNodes } from './order.ts';

/** The measures of slips on the board that `tidyPlaces` lays out by. */
export interface SlipMeasures {
  readonly width: number;
  readonly gap: number;
  height(id: string): number;
}

/**
 * Places for all nodes in the bands of their types: within a band each node stands to the right of those of the
 * band that it reads from, and beneath each other in the order of what they read, so that links cross little.
 */
export function tidyPlaces(
  document: GraphDocument,
  library: Library,
  measures: SlipMeasures,
): ReadonlyMap<string, readonly [x: number, y: number]> {
  const { order, loops, behindLoops } = orderNodes(document);
  const known = nodesById(document);
  const bandOf = (id: string): number => {
    const band = library.find(known.get(id)?.type ?? '')?.band;
    return band === undefined ? 0 : BANDS.indexOf(band);
  };
  const sources = new Map<string, string[]>();
  for (const { from, to } of document.links) {
    if (!known.has(from[0])) continue;
    const list = sources.get(to[0]);
    if (list === undefined) sources.set(to[0], [from[0]]);
    else list.push(from[0]);
  }

  const step = new Map<string, number>();
  const columns: string[][][] = BANDS.map(() => []);
  for (const id of [...order, ...loops.keys(), ...behindLoops]) {
    const band = bandOf(id);
    const own = (sources.get(id) ?? []).filter((source) => bandOf(source) === band && step.has(source));
    const at = own.reduce((most, source) => Math.max(most, (step.get(source) ?? 0) + 1), 0);
    step.set(id, at);
    const columnsOfBand = columns[band] as string[][];
    while (columnsOfBand.length <= at) columnsOfBand.push([]);
    columnsOfBand[at]?.push(id);
  }

  const places = new Map<string, readonly [number, number]>();
  let x = 0;
  for (const band of columns) {
    for (const column of band) {
      const middle = (id: string): number => {
        const ys = (sources.get(id) ?? []).flatMap((source) => places.get(source)?.[1] ?? []);
        return ys.length === 0 ? Number.POSITIVE_INFINITY : ys.reduce((sum, y) => sum + y, 0) / ys.length;
      };
      let y = 0;
      for (const id of column.toSorted((a, b) => compare(middle(a), middle(b)))) {
        places.set(id, [x, y]);
        y += measures.height(id) + measures.gap;
      }
      x += measures.width + measures.gap * 2;
    }
    if (band.length > 0) x += measures.gap * 3;
  }
  return places;
}

/** Of two infinities neither is the less. */
function compare(a: number, b: number): number {
  return a === b ? 0 : a - b;
}
