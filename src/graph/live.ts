import { quotientDimension } from '../quantity/index.ts';
import {
  evaluate,
  failedGuards,
  finish,
  gradient,
  operationCount,
  plainQuery,
  type Query,
  registersFor,
  run,
  type Scalar,
  type Tape,
} from '../tape/index.ts';
import type { Library } from './define.ts';
import type { GraphDocument } from './document.ts';
import { resolve, scalarsIn } from './kind.ts';
import { type TracedGraph, traceGraph } from './traceGraph.ts';

/** How a node stands: giving figures, at fault itself, or waiting for another that is. */
export type NodeState = 'ready' | 'query' | 'waits';

/** A document traced and run: its figures, and what is wrong with it. */
export class LiveGraph {
  readonly traced: TracedGraph;
  private readonly tape: Tape;
  private readonly registers: Float64Array;
  private readonly inputs: Float64Array;
  /** Register of each scalar that the tape gives, by its index on the trace. */
  private readonly register = new Map<number, number>();
  private readonly scalars = new Map<string, readonly Scalar[]>();
  private readonly gradients = new Map<string, Tape>();
  private places: ReadonlyMap<string, number> | undefined;
  private found: readonly Query[] = [];
  private readonly states = new Map<string, NodeState>();

  constructor(document: GraphDocument, library: Library) {
    this.traced = traceGraph(document, library);
    for (const [id, node] of this.traced.nodes) this.scalars.set(id, scalarsIn(node.outputs));
    const outputs = [...this.scalars.values()].flat();
    this.tape = finish(this.traced.trace, outputs);
    for (const [i, scalar] of outputs.entries())
      this.register.set(scalar.index, this.tape.outputs[i] as number);
    this.registers = registersFor(this.tape);
    this.inputs = Float64Array.from(this.traced.figures, ({ value }) => value);
    this.run();
  }

  /** How many operations a run takes. */
  get operations(): number {
    return operationCount(this.tape);
  }

  /** All that is wrong: first with the structure, then with the figures. */
  get queries(): readonly Query[] {
    return this.found;
  }

  /**
   * Gives typed figures other values, in SI units, and runs the tape.
   *
   * @param values by the place of the figure in `traced.figures`.
   */
  set(values: ReadonlyMap<number, number>): void {
    for (const [place, value] of values) this.inputs[place] = value;
    this.run();
  }

  /** The place of a typed figure in `traced.figures`; undefined where it is linked, or not read by the tape. */
  placeOf(id: string, input: string): number | undefined {
    if (this.places === undefined) {
      this.places = new Map(this.traced.figures.map((figure, i) => [key(figure.node, figure.input), i]));
    }
    return this.places.get(key(id, input));
  }

  state(id: string): NodeState {
    return this.states.get(id) ?? 'waits';
  }

  /**
   * The figures of a node's output, as plain data of the shape that its kind has, in SI units; undefined where
   * the node is at fault or waits, so that no NaN gets out.
   */
  value(id: string, output: string): unknown {
    const outputs = this.traced.nodes.get(id)?.outputs;
    if (outputs === undefined || !Object.hasOwn(outputs, output)) return undefined;
    const value = outputs[output];
    const finite = scalarsIn(value).every((scalar) => Number.isFinite(this.figure(scalar)));
    return finite ? resolve(value, (scalar) => this.figure(scalar)) : undefined;
  }

  /** The scalar behind an output whose value is one scalar. */
  scalarOf(id: string, output: string): Scalar | undefined {
    const outputs = this.traced.nodes.get(id)?.outputs;
    const [scalar, ...others] = scalarsIn(outputs?.[output]);
    return others.length === 0 ? scalar : undefined;
  }

  /**
   * How strongly typed figures move an output: its derivative by each, in SI units, where the figures are now.
   * Undefined where the output waits; an entry is NaN-free but undefined where the slope is unbounded.
   *
   * @param places of the figures in `traced.figures`.
   */
  pull(id: string, output: string, places: readonly number[]): readonly (number | undefined)[] | undefined {
    const scalar = this.scalarOf(id, output);
    if (scalar === undefined || !Number.isFinite(this.figure(scalar))) return undefined;
    const wanted = JSON.stringify([id, output, places]);
    let tape = this.gradients.get(wanted);
    if (tape === undefined) {
      const inputs = places.map((place) => this.traced.figures[place]?.scalar as Scalar);
      tape = finish(this.traced.trace, gradient(scalar, inputs));
      this.gradients.set(wanted, tape);
    }
    return [...evaluate(tape, this.inputs)].map((slope) => (Number.isFinite(slope) ? slope : undefined));
  }

  /** The dimension of a pull: of the output ÷ of the figure. */
  pullDimension(id: string, output: string, place: number) {
    const scalar = this.scalarOf(id, output);
    const figure = this.traced.figures[place];
    return scalar && figure && quotientDimension(scalar.dimension, figure.scalar.dimension);
  }

  private figure(scalar: Scalar): number {
    return this.registers[this.register.get(scalar.index) ?? -1] ?? Number.NaN;
  }

  private run(): void {
    run(this.tape, this.inputs, this.registers);
    const queries = [...this.traced.queries, ...failedGuards(this.tape, this.registers)];
    const atFault = new Set(queries.map(({ owner }) => owner));
    // A node without figures waits if anything that it reads from, however far back, is at fault. The nodes
    // come in the order of their links, so that what is behind has been seen before.
    const troubled = new Set<string>();
    for (const [id, node] of this.traced.nodes) {
      const figures = this.scalars.get(id) ?? [];
      const ready =
        node.outputs !== undefined && figures.every((scalar) => Number.isFinite(this.figure(scalar)));
      const behindTrouble = node.sources.some((source) => troubled.has(source));
      if (!ready && !behindTrouble && !atFault.has(id)) {
        queries.push(plainQuery(id, 'not-finite', NOT_FINITE));
        atFault.add(id);
      }
      if (behindTrouble || atFault.has(id)) troubled.add(id);
      this.states.set(id, atFault.has(id) ? 'query' : ready ? 'ready' : 'waits');
    }
    this.found = queries;
  }
}

const NOT_FINITE =
  'A figure here grows beyond all bounds: look for a division by nothing or a very large figure among the inputs';

function key(node: string, input: string): string {
  return JSON.stringify([node, input]);
}
