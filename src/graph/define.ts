import type { Trace } from '../tape/index.ts';
import type { Link, NodeRecord } from './document.ts';
import type { Kind, Literal } from './kind.ts';
import type { SettingSpec } from './setting.ts';

/** The lanes of the board, one for each stage of the work. */
export const BANDS = [
  'quantities',
  'setting-out',
  'arch',
  'loads',
  'statics',
  'members',
  'handover',
] as const;
export type Band = (typeof BANDS)[number];

/** One link must come, any number may, or none need. */
export type Arity = 'one' | 'many' | 'optional';

/** Where links end. */
export interface InputSpec<T, A extends Arity = Arity> {
  readonly kind: Kind<T>;
  readonly arity: A;
  readonly title: string;
  /** What stands in a typed input that has no link, as it is written: "3 m". */
  readonly default?: string;
}

/** Where links start. `many`: a list, whose members go one by one into an input that takes many. */
export interface OutputSpec<T, M extends boolean = boolean> {
  readonly kind: Kind<T>;
  readonly many: M;
  readonly title: string;
}

/** An input that one link, or a typed figure, must fill. */
export function input<T>(kind: Kind<T>, title: string, initial?: string): InputSpec<T, 'one'> {
  return { kind, arity: 'one', title, ...(initial === undefined ? {} : { default: initial }) };
}

/** An input of any number of links, in an order. */
export function many<T>(kind: Kind<T>, title: string): InputSpec<T, 'many'> {
  return { kind, arity: 'many', title };
}

/** An input that may stay empty. */
export function optional<T>(kind: Kind<T>, title: string): InputSpec<T, 'optional'> {
  return { kind, arity: 'optional', title };
}

export function output<T>(kind: Kind<T>, title: string): OutputSpec<T, false> {
  return { kind, many: false, title };
}

export function outputs<T>(kind: Kind<T>, title: string): OutputSpec<T, true> {
  return { kind, many: true, title };
}

// biome-ignore lint/suspicious/noExplicitAny: the members of a record have different types; each is inferred.
export type InputSpecs = Readonly<Record<string, InputSpec<any>>>;
// biome-ignore lint/suspicious/noExplicitAny: as above.
export type OutputSpecs = Readonly<Record<string, OutputSpec<any>>>;
// biome-ignore lint/suspicious/noExplicitAny: as above.
export type SettingSpecs = Readonly<Record<string, SettingSpec<any>>>;

type InputValue<S> =
  S extends InputSpec<infer T, infer A>
    ? A extends 'many'
      ? readonly T[]
      : A extends 'optional'
        ? T | undefined
        : T
    : never;
type OutputValue<S> = S extends OutputSpec<infer T, infer M> ? (M extends true ? readonly T[] : T) : never;

/** What `trace` receives for declared inputs. */
export type InputValues<I extends InputSpecs> = { readonly [K in keyof I]: InputValue<I[K]> };
/** What `trace` receives for declared settings. */
export type SettingValues<S extends SettingSpecs> = {
  readonly [K in keyof S]: S[K] extends SettingSpec<infer T> ? T : never;
};
/** What `trace` returns for declared outputs. */
export type OutputValues<O extends OutputSpecs> = { readonly [K in keyof O]: OutputValue<O[K]> };

/** What a node may ask of the graph that it is traced in. */
export interface NodeContext {
  readonly trace: Trace;
  /** Values of the inputs that `moreInputs` declared. */
  readonly more: Readonly<Record<string, unknown>>;
}

/** A small case of a node, from which its test and its entry in the help are made. */
export interface Example {
  readonly inputs?: Readonly<Record<string, Literal>>;
  readonly settings?: Readonly<Record<string, string | boolean>>;
  /** Nodes and links around it, in which it has the id "this"; for a node that makes no sense alone. */
  readonly around?: { readonly nodes: readonly NodeRecord[]; readonly links: readonly Link[] };
  /** Some or all outputs, with what they must give. */
  readonly gives: Readonly<Record<string, Literal>>;
}

/** A node as its author declares it. */
export interface NodeDeclaration<I extends InputSpecs, S extends SettingSpecs, O extends OutputSpecs> {
  /** Within the pack, in small letters with hyphens: "point-load". */
  readonly name: string;
  readonly title: string;
  readonly band: Band;
  /** One line: what it gives, from what. */
  readonly help: string;
  readonly inputs: I;
  readonly settings?: S;
  readonly outputs: O;
  /** Whether a node of this type can stand on the rail, and as what. */
  readonly rail?: 'slider' | 'reading';
  /** Inputs that depend on the settings, as a formula's do. */
  moreInputs?(settings: SettingValues<S>): InputSpecs;
  /** Writes the node's operations on the trace. Throws a `Refusal` where the structure is at fault. */
  trace(inputs: InputValues<I>, settings: SettingValues<S>, context: NodeContext): OutputValues<O>;
  readonly example: Example;
}

/** A node type as the graph uses it, whatever its inputs and outputs. */
export interface NodeType extends Omit<NodeDeclaration<InputSpecs, SettingSpecs, OutputSpecs>, 'trace'> {
  /** "PACK/NAME". */
  readonly type: string;
  readonly pack: string;
  readonly settings: SettingSpecs;
  trace(
    inputs: Readonly<Record<string, unknown>>,
    settings: Readonly<Record<string, unknown>>,
    context: NodeContext,
  ): Readonly<Record<string, unknown>>;
}

/** A node whose types are not looked at any more. */
export type AnyNodeDeclaration = Omit<NodeType, 'type' | 'pack' | 'settings'> & {
  readonly settings?: SettingSpecs;
};

/** Declares a node. The types of what `trace` takes and gives follow from the declaration. */
export function defineNode<
  const I extends InputSpecs,
  const S extends SettingSpecs,
  const O extends OutputSpecs,
>(node: NodeDeclaration<I, S, O>): AnyNodeDeclaration {
  return Object.freeze(node) as unknown as AnyNodeDeclaration;
}

/** A set of node types that belong together. */
export interface Pack {
  readonly name: string;
  readonly version: string;
  // biome-ignore lint/suspicious/noExplicitAny: a pack's kinds have different types.
  readonly kinds: readonly Kind<any>[];
  readonly nodes: readonly NodeType[];
}

/** Declares a pack. */
export function definePack(pack: {
  readonly name: string;
  readonly version: string;
  // biome-ignore lint/suspicious/noExplicitAny: as above.
  readonly kinds?: readonly Kind<any>[];
  readonly nodes: readonly AnyNodeDeclaration[];
}): Pack {
  const { name, version } = pack;
  const nodes = pack.nodes.map((node) =>
    Object.freeze({ ...node, settings: node.settings ?? {}, type: `${name}/${node.name}`, pack: name }),
  );
  return Object.freeze({ name, version, kinds: pack.kinds ?? [], nodes });
}

/** The node types of several packs, by type. */
export class Library {
  readonly packs: readonly Pack[];
  private readonly types = new Map<string, NodeType>();

  /** @throws Error where two packs have one name. */
  constructor(packs: readonly Pack[]) {
    this.packs = packs;
    for (const node of packs.flatMap((pack) => pack.nodes)) {
      if (this.types.has(node.type)) throw new Error(`two nodes are called ${node.type}`);
      this.types.set(node.type, node);
    }
  }

  get nodes(): readonly NodeType[] {
    return [...this.types.values()];
  }

  find(type: string): NodeType | undefined {
    return this.types.get(type);
  }
}
