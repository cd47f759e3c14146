import { type Measure, NONE, nameDimension } from '../quantity/index.ts';
import { Refusal, type Scalar, Trace } from '../tape/index.ts';
import type { Figures, Mark } from './mark.ts';

/** What a link of a kind is drawn as: each is a line type of the drawing. */
export type LineType = 'numbers' | 'geometry' | 'structure' | 'virtual' | 'results';

/** Plain data from which an example's value of a kind is made: "3 m", ["3 m", "0 m"], … */
export type Literal = string | readonly Literal[];

/** The type of the values that a link carries. */
export interface Kind<T> {
  readonly name: string;
  /** With its article, for queries: "a point". */
  readonly called: string;
  readonly line: LineType;
  /** For kinds whose value is one scalar of a known dimension: how it is typed and printed. */
  readonly measure?: Measure;
  /** How a value is typed where no link brings one. `counts`: as a whole number that is known while tracing. */
  readonly typed?: 'measure' | 'any' | 'counts';
  /** Other kinds that a value of this one can stand for. */
  readonly alsoAs?: readonly Conversion<T>[];
  /** What a value draws, from its figures. */
  readonly draw?: (figures: Figures<T>) => readonly Mark[];
  /** Makes a value from an example's literal; `quantity` reads one figure. */
  readonly literal?: (literal: Literal, quantity: (text: Literal) => Scalar, trace: Trace) => T;
}

/** A kind that a value can stand for, and how. */
export interface Conversion<T> {
  // biome-ignore lint/suspicious/noExplicitAny: the kinds of a conversion's ends are only known one by one.
  readonly kind: Kind<any>;
  readonly convert: (value: T, trace: Trace) => unknown;
}

/** Declares a kind. */
export function defineKind<T>(kind: Kind<T>): Kind<T> {
  return Object.freeze(kind);
}

const same = <T>(value: T): T => value;

/** Any quantity, of whatever dimension; what it is shows while tracing. */
export const quantity: Kind<Scalar> = defineKind<Scalar>({
  name: 'quantity',
  called: 'a quantity',
  line: 'numbers',
  typed: 'any',
  literal: (literal, read) => read(literal),
});

/** Declares a kind whose value is one scalar: it also stands for a quantity. */
export function scalarKind(
  name: string,
  measure: Measure,
  options: { readonly line?: LineType; readonly also?: readonly Kind<Scalar>[] } = {},
): Kind<Scalar> {
  return defineKind<Scalar>({
    name,
    called: measure.name === name ? measure.called : `a ${name}`,
    line: options.line ?? 'numbers',
    measure,
    typed: 'measure',
    alsoAs: [quantity, ...(options.also ?? [])].map((kind) => ({ kind, convert: same })),
    literal: (literal, read) => read(literal),
  });
}

/**
 * How a value of one kind becomes a value of another: undefined where it can't. A quantity may become any
 * kind of its dimension; whether it does is seen when the conversion is called, which may throw a `Refusal`.
 */
export function conversion(
  from: Kind<unknown>,
  to: Kind<unknown>,
): ((value: unknown, trace: Trace) => unknown) | undefined {
  if (from === to) return same;
  const direct = from.alsoAs?.find(({ kind }) => kind === to);
  if (direct !== undefined) return direct.convert;
  const { measure } = to;
  if (from === quantity && measure !== undefined && to.typed === 'measure') {
    return (value) => {
      const scalar = value as Scalar;
      if (scalar.dimension !== measure.dimension) {
        const has = nameDimension(scalar.dimension);
        throw new Refusal('wrong-kind', `${has} is linked where ${measure.called} is wanted`);
      }
      return scalar;
    };
  }
  return undefined;
}

/** A count as a plain number of the trace. */
export function countAsNumber(count: number, trace: Trace): Scalar {
  return trace.constant(count, NONE);
}

/** Every scalar in a value of any kind, in a fixed order. */
export function scalarsIn(value: unknown): Scalar[] {
  const found: Scalar[] = [];
  walk(value, (scalar) => found.push(scalar));
  return found;
}

function walk(value: unknown, visit: (scalar: Scalar) => void): void {
  if (typeof value !== 'object' || value === null || value instanceof Trace) return;
  if (isScalar(value)) visit(value);
  else if (Array.isArray(value)) for (const part of value) walk(part, visit);
  else for (const part of Object.values(value)) walk(part, visit);
}

/** A value with every scalar replaced by its figure: plain data to draw from. Functions are left out. */
export function resolve(value: unknown, figure: (scalar: Scalar) => number): unknown {
  if (typeof value === 'function') return undefined;
  if (typeof value !== 'object' || value === null) return value;
  if (isScalar(value)) return figure(value);
  if (Array.isArray(value)) return value.map((part) => resolve(part, figure));
  return Object.fromEntries(
    Object.entries(value)
      .filter(([, part]) => typeof part !== 'function')
      .map(([key, part]) => [key, resolve(part, figure)]),
  );
}

function isScalar(value: object): value is Scalar {
  return 'trace' in value && value.trace instanceof Trace && 'index' in value;
}
