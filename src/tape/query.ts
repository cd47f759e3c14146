import { type Measure, measureOf, measures, printQuantity, type System } from '../quantity/index.ts';
import type { Scalar } from './scalar.ts';

/** A query while tracing: its figures are still handles. `parts` has one text more than there are figures. */
export interface QueryDraft {
  readonly code: string;
  readonly parts: readonly string[];
  readonly figures: readonly { readonly scalar: Scalar; readonly measure: Measure }[];
}

/** What is wrong at a place, in words and figures: data first, its text is made by `queryText`. */
export interface Query {
  /** Who raised it: a node's id, or undefined outside a graph. */
  readonly owner: string | undefined;
  /** What sort of trouble it is, for programs: "circles-apart". */
  readonly code: string;
  readonly parts: readonly string[];
  readonly figures: readonly { readonly value: number; readonly measure: Measure }[];
}

type Figure = Scalar | AngleFigure | string | number;

interface AngleFigure {
  readonly angle: Scalar;
}

/** Marks a scalar in a query's words as an angle, to be printed in degrees. */
export function asAngle(scalar: Scalar): AngleFigure {
  return { angle: scalar };
}

/**
 * Words for a query, with live figures in them:
 * ``say('circles-apart')`The two circles miss each other by ${gap}: lengthen one of the radii` ``.
 *
 * Say what is wrong, where, by how much, and what to change.
 */
export function say(code: string): (parts: TemplateStringsArray, ...figures: Figure[]) => QueryDraft {
  return (parts, ...figures) => {
    const texts = [parts[0] ?? ''];
    const live: { scalar: Scalar; measure: Measure }[] = [];
    for (const [i, figure] of figures.entries()) {
      const after = parts[i + 1] ?? '';
      if (typeof figure === 'string' || typeof figure === 'number') {
        texts.push(`${texts.pop()}${figure}${after}`);
        continue;
      }
      live.push(
        'angle' in figure
          ? { scalar: figure.angle, measure: measures.angle }
          : { scalar: figure, measure: measureOf(figure.dimension) },
      );
      texts.push(after);
    }
    return { code, parts: texts, figures: live };
  };
}

/** A query without live figures. */
export function plainQuery(owner: string | undefined, code: string, text: string): Query {
  return { owner, code, parts: [text], figures: [] };
}

/** The query's text, its figures with units of the system. A figure that is not finite is left as "?". */
export function queryText(query: Query, system: System = 'SI'): string {
  return query.parts
    .map((part, i) => {
      const figure = query.figures[i];
      if (figure === undefined) return part;
      if (!Number.isFinite(figure.value)) return `${part}?`;
      return part + printQuantity(figure.value, figure.measure, system, { fine: true });
    })
    .join('');
}

/** Thrown while tracing where the structure itself is at fault: the graph shows it as a query of the node. */
export class Refusal extends Error {
  override name = 'Refusal';
  readonly code: string;
  constructor(code: string, message: string) {
    super(message);
    this.code = code;
  }
}
