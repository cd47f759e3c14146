import { NONE } from '../../quantity/index.ts';
import { Refusal, type Scalar, type Trace } from '../../tape/index.ts';
import { choose, functions, operators } from './functions.ts';
import type { Expression } from './parse.ts';

export { type Expression, namesIn, parseFormula } from './parse.ts';

/**
 * Writes a formula on a trace.
 *
 * @param named the value of each free name.
 * @throws Refusal where dimensions do not go together: "a force can't be added to a length".
 */
export function traceFormula(
  expression: Expression,
  named: ReadonlyMap<string, Scalar>,
  trace: Trace,
): Scalar {
  switch (expression.is) {
    case 'number':
      return trace.constant(expression.value, NONE);
    case 'name': {
      const value = named.get(expression.name);
      if (value === undefined)
        throw new Refusal('formula', `the formula's name "${expression.name}" has no value`);
      return value;
    }
    case 'call': {
      const operands = expression.operands.map((operand) => traceFormula(operand, named, trace));
      if (expression.name === 'choose') return choose(operands);
      const called = functions.get(expression.name) ?? operators.get(expression.name);
      if (called === undefined) throw new Refusal('formula', `nothing is called "${expression.name}"`);
      return called.write(operands);
    }
  }
}
