import {
  defineNode,
  type InputSpec,
  input,
  kinds,
  LIMITS,
  namesIn,
  output,
  parseFormula,
  text,
  traceFormula,
} from '../../src/graph/index.ts';
import type { Scalar } from '../../src/tape/index.ts';

export const formula = defineNode({
  name: 'formula',
  title: 'Formula',
  band: 'quantities',
  help: 'A quantity from others by a formula; each name in it becomes an input. It holds plain figures, names, + − * / ^, comparisons and functions such as sqrt, sin, min. Units come with the inputs.',
  inputs: {},
  settings: { formula: text('Formula', 'a + b', LIMITS.formula) },
  outputs: { result: output(kinds.quantity, 'Result') },
  moreInputs: (settings) =>
    Object.fromEntries(
      namesIn(parseFormula(settings.formula)).map((name): [string, InputSpec<Scalar>] => [
        name,
        input(kinds.quantity, name),
      ]),
    ),
  trace(_, settings, { trace, more }) {
    const named = new Map(Object.entries(more) as [string, Scalar][]);
    return { result: traceFormula(parseFormula(settings.formula), named, trace) };
  },
  example: {
    settings: { formula: 'w * span^2 / (8 * rise)' },
    inputs: { w: '6 kN/m', span: '32 m', rise: '8 m' },
    gives: { result: '96 kN' },
  },
});
