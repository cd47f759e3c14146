import { type Measure, nameDimension, QuantityError, readMeasure, readQuantity } from '../quantity/index.ts';
import { plainQuery, type Query, Refusal, type Scalar, Trace } from '../tape/index.ts';
import type { InputSpec, InputSpecs, Library, NodeType, OutputSpec } from './define.ts';
import { type GraphDocument, type Link, type NodeRecord, nodesById } from './document.ts';
import { conversion, type Kind, scalarsIn } from './kind.ts';
import { LIMITS } from './limits.ts';
import { orderNodes } from './order.ts';

/** A typed figure of a node that is an input of the tape: changing it only runs the tape. */
export interface TypedFigure {
  readonly node: string;
  readonly input: string;
  readonly scalar: Scalar;
  /** What it is read as; undefined where any quantity will do. */
  readonly measure: Measure | undefined;
  /** In SI units. */
  readonly value: number;
}

/** A node after tracing. */
export interface TracedNode {
  readonly record: NodeRecord;
  /** Undefined where no pack has it. */
  readonly type: NodeType | undefined;
  /** Declared inputs and those that the settings add. */
  readonly inputs: InputSpecs;
  /** The nodes that it reads from. */
  readonly sources: readonly string[];
  /** Values by output; undefined where the node is at fault or waits for another. */
  readonly outputs: Readonly<Record<string, unknown>> | undefined;
}

/** A document written on a trace. */
export interface TracedGraph {
  readonly trace: Trace;
  readonly nodes: ReadonlyMap<string, TracedNode>;
  /** In the order of the tape's inputs. */
  readonly figures: readonly TypedFigure[];
  /** What is wrong with the structure. What is wrong with the figures shows when the tape runs. */
  readonly queries: readonly Query[];
}

/** Writes a whole document on a trace. Never throws for what is wrong with the graph: that becomes queries. */
export function traceGraph(document: GraphDocument, library: Library): TracedGraph {
  return new GraphTracer(document, library).all();
}

class GraphTracer {
  private readonly document: GraphDocument;
  private readonly library: Library;
  private readonly trace = new BoundedTrace();
  private readonly nodes = new Map<string, TracedNode>();
  private readonly figures: TypedFigure[] = [];
  private readonly queries: Query[] = [];
  private readonly linksInto = new Map<string, Link[]>();

  constructor(document: GraphDocument, library: Library) {
    this.document = document;
    this.library = library;
  }

  all(): TracedGraph {
    const known = nodesById(this.document);
    for (const link of this.document.links) {
      const target = link.to[0];
      if (!known.has(target)) {
        this.query(
          undefined,
          'link-nowhere',
          `A link leads to a node "${target}" that the graph does not have: remove the link`,
        );
      }
      const list = this.linksInto.get(target);
      if (list === undefined) this.linksInto.set(target, [link]);
      else list.push(link);
    }
    const { order, loops, behindLoops } = orderNodes(this.document);
    for (const id of order) this.node(known.get(id) as NodeRecord);
    for (const [id, shown] of this.shownLoops(loops)) {
      this.query(id, 'loop', `The links run in a loop (${shown}): remove one of them`);
    }
    for (const id of [...loops.keys(), ...behindLoops]) {
      const record = known.get(id) as NodeRecord;
      const type = this.library.find(record.type);
      this.keep(record, type, type?.inputs ?? {}, undefined);
    }
    for (const id of this.document.rail) {
      if (!known.has(id)) {
        this.query(
          undefined,
          'rail',
          `The rail names a node "${id}" that the graph does not have: take it off the rail`,
        );
      }
    }
    return { trace: this.trace, nodes: this.nodes, figures: this.figures, queries: this.queries };
  }

  private node(record: NodeRecord): void {
    const type = this.library.find(record.type);
    if (type === undefined) {
      const pack = record.type.split('/')[0] ?? '';
      const text = this.library.packs.some(({ name }) => name === pack)
        ? `The pack "${pack}" has no node "${record.type}": replace the node. Its data is kept`
        : `No pack is loaded that has the node "${record.type}": load the pack "${pack}". The node's data is kept`;
      this.query(record.id, 'unknown-node', text);
      this.keep(record, undefined, {}, undefined);
      return;
    }
    this.trace.owner = record.id;
    let inputs: InputSpecs = type.inputs;
    let outputs: Readonly<Record<string, unknown>> | undefined;
    const faults = this.queries.length;
    this.attempt(record, () => {
      const settings = readSettings(type, record);
      const more = type.moreInputs?.(settings) ?? {};
      inputs = { ...type.inputs, ...more };
      const values = this.inputValues(record, inputs);
      if (values === undefined || this.queries.length > faults) return;
      const given = type.trace(pick(values, type.inputs), settings, {
        trace: this.trace,
        more: pick(values, more),
      });
      this.check(type, given);
      outputs = given;
    });
    this.trace.owner = undefined;
    this.checkNames(record, type);
    this.keep(record, type, inputs, outputs);
  }

  private keep(
    record: NodeRecord,
    type: NodeType | undefined,
    inputs: InputSpecs,
    outputs: TracedNode['outputs'],
  ): void {
    const sources = (this.linksInto.get(record.id) ?? []).map(({ from }) => from[0]);
    this.nodes.set(record.id, { record, type, inputs, sources, outputs });
  }

  /** What is written for a setting or an input that the node does not have would do nothing, and nobody would know. */
  private checkNames(record: NodeRecord, type: NodeType): void {
    for (const name of Object.keys(record.settings ?? {})) {
      if (Object.hasOwn(type.settings, name)) continue;
      const known = Object.keys(type.settings).join(', ') || 'none';
      this.query(
        record.id,
        'no-setting',
        `A setting "${name}" is written that the node does not have: it has ${known}`,
      );
    }
    // The inputs of a formula come and go with its text, and what was typed into them is kept.
    if (type.moreInputs !== undefined) return;
    for (const name of Object.keys(record.values ?? {})) {
      if (Object.hasOwn(type.inputs, name)) continue;
      const known = Object.keys(type.inputs).join(', ') || 'none';
      this.query(
        record.id,
        'no-input',
        `A figure is written for an input "${name}" that the node does not have: it has ${known}`,
      );
    }
  }

  /** Throws where a node does not give what it declares: that is a query here, and not at the next node. */
  private check(type: NodeType, given: Readonly<Record<string, unknown>> | undefined): void {
    for (const [name, { many }] of Object.entries(type.outputs)) {
      const value = given?.[name];
      if (value === undefined || (many && !Array.isArray(value))) {
        throw new Error(`it gives no ${many ? 'list ' : ''}"${name}"`);
      }
      this.trace.mustOwn(scalarsIn(value));
    }
  }

  /** The value of every input; undefined where one waits for a node that is at fault. */
  private inputValues(record: NodeRecord, specs: InputSpecs): Record<string, unknown> | undefined {
    let waits = false;
    const byInput = new Map<string, Link[]>();
    for (const link of this.linksInto.get(record.id) ?? []) {
      const name = link.to[1];
      if (!Object.hasOwn(specs, name)) {
        this.query(
          record.id,
          'no-input',
          `A link ends at an input "${name}" that the node does not have: remove the link`,
        );
        continue;
      }
      const list = byInput.get(name);
      if (list === undefined) byInput.set(name, [link]);
      else list.push(link);
    }
    const values: Record<string, unknown> = {};
    for (const [name, spec] of Object.entries(specs)) {
      const links = byInput.get(name) ?? [];
      if (spec.arity !== 'many' && links.length > 1) {
        this.query(
          record.id,
          'too-many-links',
          `Input "${spec.title}" takes one link and has ${links.length}: remove all but one`,
        );
        continue;
      }
      if (links.length === 0 && spec.arity !== 'many') {
        values[name] = this.typed(record, name, spec);
        continue;
      }
      const brought: unknown[] = [];
      for (const link of links) {
        const found = this.attempt(record, () => this.brought(link, spec));
        if (found === undefined) waits = true;
        else for (const value of found) brought.push(value);
      }
      values[name] = spec.arity === 'many' ? brought : brought[0];
    }
    return waits ? undefined : values;
  }

  /** What a link brings to an input: a list, of one or more; undefined where its source is at fault or waits. */
  private brought(link: Link, spec: InputSpec<unknown>): unknown[] | undefined {
    const [id, port] = link.from;
    const source = this.nodes.get(id);
    if (source === undefined) {
      throw new Refusal(
        'link-from-nowhere',
        `Input "${spec.title}" is linked to a node "${id}" that the graph does not have: link another output, or remove the link`,
      );
    }
    if (source.type === undefined) return undefined;
    const specs = source.type.outputs;
    const output: OutputSpec<unknown> | undefined = Object.hasOwn(specs, port) ? specs[port] : undefined;
    if (output === undefined) {
      throw new Refusal(
        'no-output',
        `Input "${spec.title}" is linked to an output "${port}" that "${this.nameOf(id)}" does not have: link another output, or remove the link`,
      );
    }
    const from: Kind<unknown> = output.kind;
    const convert = conversion(from, spec.kind);
    if (convert === undefined) {
      throw new Refusal(
        'wrong-kind',
        `${capital(from.called)} is linked to input "${spec.title}", which takes ${spec.kind.called}: link another output`,
      );
    }
    if (source.outputs === undefined) return undefined;
    const value = source.outputs[port];
    const list = output.many ? (value as unknown[]) : [value];
    if (list.length !== 1 && spec.arity !== 'many') {
      throw new Refusal(
        'wrong-kind',
        `A list of ${list.length} is linked to input "${spec.title}", which takes one ${spec.kind.name}: link a single output`,
      );
    }
    try {
      return list.map((one) => convert(one, this.trace));
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      throw new Refusal(error.code, `Input "${spec.title}": ${error.message}: link another output`);
    }
  }

  /** The value of an input without a link: what is typed, or its default, or nothing where it may be empty. */
  private typed(record: NodeRecord, name: string, spec: InputSpec<unknown>): unknown {
    const { kind } = spec;
    const written = Object.hasOwn(record.values ?? {}, name) ? record.values?.[name] : spec.default;
    if (kind.typed === undefined || written === undefined) {
      if (spec.arity === 'optional') return undefined;
      const remedy = kind.typed === undefined ? `link ${kind.called}` : `type ${kind.called} or link one`;
      this.query(record.id, 'no-link', `Input "${spec.title}" has nothing linked to it: ${remedy}`);
      return undefined;
    }
    return this.attempt(record, () => {
      try {
        if (kind.typed === 'counts') return readCount(written);
        const measure = kind.typed === 'any' ? undefined : kind.measure;
        const { value, unit } = measure === undefined ? readQuantity(written) : readMeasure(written, measure);
        const scalar = this.trace.input(`${record.id}.${name}`, unit.dimension);
        this.figures.push({ node: record.id, input: name, scalar, measure, value });
        return scalar;
      } catch (error) {
        if (error instanceof QuantityError) {
          throw new Refusal('figure', `Input "${spec.title}": ${error.message}`);
        }
        throw error;
      }
    });
  }

  /** Does something for a node; what it throws becomes the node's query. */
  private attempt<T>(record: NodeRecord, act: () => T): T | undefined {
    try {
      return act();
    } catch (error) {
      if (error instanceof Refusal) this.query(record.id, error.code, capital(error.message));
      else {
        const text = error instanceof Error ? error.message : String(error);
        this.query(record.id, 'node-failed', `The node failed (${text}): this is a fault of its pack`);
      }
      return undefined;
    }
  }

  /** Each node's loop in words, made once for all nodes of a loop. */
  private shownLoops(loops: ReadonlyMap<string, readonly string[]>): [id: string, shown: string][] {
    const words = new Map<readonly string[], string>();
    return [...loops].map(([id, loop]) => {
      let shown = words.get(loop);
      if (shown === undefined) {
        const around = [...loop, loop[0] as string];
        const some = around.length > 8 ? [...around.slice(0, 4), undefined, ...around.slice(-3)] : around;
        shown = some.map((member) => (member === undefined ? '…' : `"${this.nameOf(member)}"`)).join(' → ');
        words.set(loop, shown);
      }
      return [id, shown];
    });
  }

  private query(owner: string | undefined, code: string, text: string): void {
    this.queries.push(plainQuery(owner, code, text));
  }

  private nameOf(id: string): string {
    const record = nodesById(this.document).get(id);
    return record === undefined ? id : nodeName(record, this.library);
  }
}

/** A trace on which nodes can write no more than the limit. */
class BoundedTrace extends Trace {
  private written = 0;

  override apply(...[code, a, b, c]: Parameters<Trace['apply']>): Scalar {
    // What no node writes, such as a gradient, is bounded by what the nodes wrote.
    if (this.owner !== undefined) {
      this.written += 1;
      if (this.written > LIMITS.operations) {
        throw new Refusal(
          'too-large',
          `with this node the graph comes to more than ${LIMITS.operations / 1e6} million operations: link fewer points and loads, or take nodes out`,
        );
      }
    }
    return super.apply(code, a, b, c);
  }
}

/** What a person calls a node: its own name, or its type's title. */
export function nodeName(record: NodeRecord, library: Library): string {
  return record.name ?? library.find(record.type)?.title ?? record.type;
}

/** The settings of a node, read; what is not written has its default. @throws Refusal where one is at fault. */
export function readSettings(type: NodeType, record: NodeRecord): Record<string, unknown> {
  return Object.fromEntries(
    Object.entries(type.settings).map(([name, spec]) => {
      const written = Object.hasOwn(record.settings ?? {}, name) ? record.settings?.[name] : spec.default;
      return [name, spec.read(written)];
    }),
  );
}

/** The most of something that a graph may count: enough for any hall, and no trap for the machine. */
const MOST_COUNTED = 10_000;

function readCount(text: string): number {
  const { value, unit } = readQuantity(text);
  if (unit.symbol !== '')
    throw new QuantityError(`"${text}" is ${nameDimension(unit.dimension)} where a count is wanted`);
  if (!Number.isInteger(value) || value < 0 || value > MOST_COUNTED) {
    throw new QuantityError(`"${text}" is no count: write a whole number from 0 to ${MOST_COUNTED}`);
  }
  return value;
}

function pick(values: Record<string, unknown>, specs: InputSpecs): Record<string, unknown> {
  return Object.fromEntries(Object.keys(specs).map((name) => [name, values[name]]));
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
