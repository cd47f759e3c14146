import type { FactoryFunctionMap, MathNode } from 'mathjs';
import { create, parseDependencies } from 'mathjs/number';
import { Refusal } from '../../tape/index.ts';
import { LIMITS } from '../limits.ts';
import { functions, operators } from './functions.ts';

/** A formula after reading: a tree of what is allowed, and nothing else. */
export type Expression =
  | { readonly is: 'number'; readonly value: number }
  | { readonly is: 'name'; readonly name: string }
  | { readonly is: 'call'; readonly name: string; readonly operands: readonly Expression[] };

// Only the parser is taken from the library: nothing of a formula is ever run by it.
const { parse } = create(parseDependencies as FactoryFunctionMap);

const NAME = /^\p{L}[\p{L}\p{N}_]{0,39}$/u;

/**
 * Reads a formula. Its grammar is the library's; what its tree may hold is listed in `functions.ts`.
 *
 * @throws Refusal that says what is not allowed, or where the formula can't be read.
 */
export function parseFormula(text: string): Expression {
  if (text.length > LIMITS.formula) {
    refuse(
      `the formula has ${text.length} signs, more than the ${LIMITS.formula} that are read: split it in two`,
    );
  }
  if (text.trim() === '') refuse('the formula is empty: write one, for example "span / 8"');
  if (bracketDepth(text) > LIMITS.formulaDepth) {
    refuse(`the formula nests brackets more than ${LIMITS.formulaDepth} deep: split it in two`);
  }
  let tree: MathNode;
  try {
    // A line's end behind it is no second expression.
    tree = parse(text.trim());
  } catch (error) {
    return refuse(`the formula can't be read: ${(error as Error).message}`);
  }
  return allowed(tree);
}

/** The free names of a formula, each once, in the order in which they are met. */
export function namesIn(expression: Expression): readonly string[] {
  const names = new Set<string>();
  const visit = (part: Expression): void => {
    if (part.is === 'name') names.add(part.name);
    if (part.is === 'call') part.operands.forEach(visit);
  };
  visit(expression);
  return [...names];
}

/** The library's tree in our terms, or a refusal. Members are read by their known types, and no other is touched. */
function allowed(node: MathNode): Expression {
  const parts = node as unknown as {
    readonly type: string;
    readonly value?: unknown;
    readonly name?: unknown;
    readonly fn?: unknown;
    readonly args?: readonly MathNode[];
    readonly content?: MathNode;
    readonly condition?: MathNode;
    readonly trueExpr?: MathNode;
    readonly falseExpr?: MathNode;
  };
  const operands = (list: readonly (MathNode | undefined)[]) =>
    list.map((part) => (part === undefined ? refuse('the formula is incomplete') : allowed(part)));
  switch (parts.type) {
    case 'ConstantNode':
      if (typeof parts.value === 'number' && Number.isFinite(parts.value)) {
        return { is: 'number', value: parts.value };
      }
      return refuse(`${describe(parts.value)} is no figure that a formula can hold`);
    case 'SymbolNode': {
      const name = String(parts.name);
      if (name === 'pi') return { is: 'number', value: Math.PI };
      if (functions.has(name)) refuse(`${name} is a function: write ${name}(…)`);
      if (!NAME.test(name)) {
        refuse(`"${clip(name)}" is no name for an input: begin with a letter, use letters, figures and _`);
      }
      return { is: 'name', name };
    }
    case 'ParenthesisNode':
      return operands([parts.content])[0] as Expression;
    case 'ConditionalNode':
      return {
        is: 'call',
        name: 'choose',
        operands: operands([parts.condition, parts.trueExpr, parts.falseExpr]),
      };
    case 'OperatorNode': {
      const name = String(parts.fn);
      if (!operators.has(name)) return refuse(`the sign of "${clip(name)}" is not allowed in a formula`);
      return { is: 'call', name, operands: operands(parts.args ?? []) };
    }
    case 'FunctionNode': {
      const called = parts.fn as { readonly type?: unknown; readonly name?: unknown };
      const name = called.type === 'SymbolNode' ? String(called.name) : '';
      if (name === '') return refuse(`${WHAT.AccessorNode} is not allowed in a formula`);
      const known = functions.get(name);
      if (known === undefined) {
        return refuse(
          `the function "${clip(name)}" is not allowed: use one of ${[...functions.keys()].join(', ')}`,
        );
      }
      const count = parts.args?.length ?? 0;
      if (count < known.least || count > known.most) {
        const wanted = known.least === known.most ? known.least : `at least ${known.least}`;
        refuse(`the function ${name} takes ${wanted}, and is given ${count}`);
      }
      return { is: 'call', name, operands: operands(parts.args ?? []) };
    }
    default:
      return refuse(
        `${WHAT[parts.type] ?? 'this'} is not allowed in a formula: it may hold figures, names and signs only`,
      );
  }
}

const WHAT: Readonly<Record<string, string>> = {
  AssignmentNode: 'an assignment (=)',
  FunctionAssignmentNode: 'the definition of a function',
  AccessorNode: 'access to a member',
  IndexNode: 'access to a member',
  ArrayNode: 'a list',
  ObjectNode: 'an object',
  RangeNode: 'a range',
  RelationalNode: 'a chain of comparisons',
  BlockNode: 'more than one expression',
};

function bracketDepth(text: string): number {
  let depth = 0;
  let most = 0;
  for (const sign of text) {
    if ('([{'.includes(sign)) depth += 1;
    if (')]}'.includes(sign)) depth -= 1;
    most = Math.max(most, depth);
  }
  return most;
}

function describe(value: unknown): string {
  return typeof value === 'string' ? `the text "${clip(value)}"` : `the value ${value}`;
}

function clip(text: string): string {
  return text.length <= 40 ? text : `${text.slice(0, 39)}…`;
}

function refuse(message: string): never {
  throw new Refusal('formula', message);
}
