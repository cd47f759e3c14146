import { builtIn } from '../../nodes/index.ts';
import type { InputSpec, Kind, Literal, NodeType } from '../../src/graph/index.ts';
import { scalarsIn, traceGraph } from '../../src/graph/index.ts';
import { type Dimension, readQuantity } from '../../src/quantity/index.ts';
import {
  evaluate,
  finish,
  gradient,
  queryText,
  registersFor,
  run,
  type Scalar,
  type Tape,
  Trace,
} from '../../src/tape/index.ts';
import { graphOf } from './graphs.ts';

/** A node's example on a trace, its figures being the tape's inputs. */
export interface TracedExample {
  readonly trace: Trace;
  readonly figures: readonly Scalar[];
  readonly values: readonly number[];
  readonly outputs: Readonly<Record<string, unknown>>;
}

export function traceExample(node: NodeType): TracedExample {
  const trace = new Trace();
  const figures: Scalar[] = [];
  const values: number[] = [];
  const read = (literal: Literal): Scalar => {
    const { value, unit } = readQuantity(literal as string);
    const scalar = trace.input(`figure ${figures.length}`, unit.dimension);
    figures.push(scalar);
    values.push(value);
    return scalar;
  };
  const { settings = {}, inputs = {} } = node.example;
  const chosen = Object.fromEntries(
    Object.entries(node.settings).map(([name, spec]) => [name, spec.read(settings[name] ?? spec.default)]),
  );
  const specs = { ...node.inputs, ...(node.moreInputs?.(chosen) ?? {}) };
  const given = Object.fromEntries(
    Object.entries(specs).map(([name, spec]): [string, unknown] => [
      name,
      inputValue(spec, inputs[name] ?? spec.default, read, trace),
    ]),
  );
  const outputs = node.trace(given, chosen, { trace, more: given });
  return { trace, figures, values, outputs };
}

/** A node's example among the nodes around it, all typed figures being the tape's inputs. */
export function traceSurroundings(node: NodeType): TracedExample {
  const { nodes = [], links = [] } = node.example.around ?? {};
  const document = { ...graphOf([...nodes, { id: 'this', type: node.type }]), links };
  const { trace, figures, nodes: traced, queries } = traceGraph(document, builtIn);
  const outputs = traced.get('this')?.outputs;
  if (outputs === undefined) throw new Error(queries.map((query) => queryText(query)).join('; '));
  return {
    trace,
    figures: figures.map(({ scalar }) => scalar),
    values: figures.map(({ value }) => value),
    outputs,
  };
}

function inputValue(
  spec: InputSpec<unknown>,
  literal: Literal | undefined,
  read: (literal: Literal) => Scalar,
  trace: Trace,
): unknown {
  if (literal === undefined) return spec.arity === 'many' ? [] : undefined;
  const one = (part: Literal): unknown => make(spec.kind, part, read, trace);
  return spec.arity === 'many' ? (literal as readonly Literal[]).map(one) : one(literal);
}

function make(
  kind: Kind<unknown>,
  literal: Literal,
  read: (literal: Literal) => Scalar,
  trace: Trace,
): unknown {
  if (kind.literal === undefined) throw new Error(`the kind ${kind.name} can't be written in an example`);
  return kind.literal(literal, read, trace);
}

/** The figures that an example states for an output, flattened in the order of the kind's scalars. */
export function statedFigures(node: NodeType, output: string): number[] {
  const spec = node.outputs[output];
  const literal = node.example.gives[output];
  if (spec === undefined || literal === undefined) throw new Error(`the example states no ${output}`);
  const trace = new Trace();
  const read = (part: Literal): Scalar => {
    const { value, unit } = readQuantity(part as string);
    return trace.constant(value, unit.dimension);
  };
  const values = spec.many ? (literal as readonly Literal[]) : [literal];
  return values.flatMap((value) => {
    const made = make(spec.kind, value, read, trace);
    if (typeof made === 'number') return [made];
    return [...evaluate(finish(trace, scalarsIn(made)), [])];
  });
}

/** How far the outputs are from scaling by their dimensions when length, mass and time are measured in other units. */
export function unitGap(
  { trace, figures, values, outputs }: TracedExample,
  [length, mass, time]: readonly [length: number, mass: number, time: number],
): number {
  const scalars = scalarsIn(outputs);
  const tape = finish(trace, scalars);
  const scale = (d: Dimension): number => length ** d.length * mass ** d.mass * time ** d.time;
  const plain = evaluate(tape, values);
  const scaled = evaluate(
    tape,
    values.map((value, i) => value * scale((figures[i] as Scalar).dimension)),
  );
  // What is 0 but for rounding is measured by the largest output of its dimension.
  const largest = Math.max(...values.map(Math.abs), 1);
  const sizes = new Map<Dimension, number>();
  for (const [i, { dimension }] of scalars.entries()) {
    sizes.set(dimension, Math.max(sizes.get(dimension) ?? 1e-4 * largest, Math.abs(plain[i] as number)));
  }
  return Math.max(
    0,
    ...scalars.map(({ dimension }, i) => {
      const [wanted, found] = [(plain[i] as number) * scale(dimension), scaled[i] as number];
      return Math.abs(found - wanted) / ((sizes.get(dimension) as number) * scale(dimension));
    }),
  );
}

/**
 * How far gradients are from differences, as a share of the largest slope of the output. Where an output has a kink
 * (a load that passes a station, a station that passes a knee), the slope of either side will do.
 */
export function slopeGap({ trace, figures, values, outputs }: TracedExample): number {
  let worst = 0;
  const largest = Math.max(...values.map(Math.abs), 1);
  for (const scalar of scalarsIn(outputs)) {
    const slopes = [...evaluate(finish(trace, gradient(scalar, figures)), values)];
    const tape = finish(trace, [scalar]);
    const differences = values.map((_, k) => oneSidedDifferences(tape, values, k));
    // A slope that is far below what the figures themselves amount to is rounding.
    const size = Math.max(
      ...differences.flatMap((sides, k) =>
        sides.filter(Number.isFinite).map((d) => Math.abs(d * reach(values[k] as number))),
      ),
      1e-4 * largest,
    );
    for (const [k, slope] of slopes.entries()) {
      const sides = differences[k] as number[];
      // Beside the example the node may say a query, as a rigid group does of a chord that grows.
      if (!sides.every(Number.isFinite)) continue;
      const mean = sides.reduce((sum, side) => sum + side, 0) / sides.length;
      const gap = Math.min(...[...sides, mean].map((d) => Math.abs(slope - d)));
      worst = Math.max(worst, (gap * reach(values[k] as number)) / size);
    }
  }
  return worst;
}

function reach(value: number): number {
  return Math.max(Math.abs(value), 1);
}

/** The slopes before and behind the present value of one input. */
function oneSidedDifferences(tape: Tape, values: readonly number[], k: number): number[] {
  const registers = registersFor(tape);
  const step = 1e-6 * reach(values[k] as number);
  const at = (shift: number): number => {
    run(
      tape,
      values.map((value, i) => (i === k ? value + shift : value)),
      registers,
    );
    return registers[tape.outputs[0] as number] as number;
  };
  const here = at(0);
  return [(at(step) - here) / step, (here - at(-step)) / step];
}
