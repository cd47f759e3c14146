import {
  type AnyNodeDeclaration,
  defineNode,
  input,
  type Kind,
  optionalQuantity,
  output,
} from '../../src/graph/index.ts';
import type { Scalar } from '../../src/tape/index.ts';

/** A figure that a person types or slides, with bounds and a step for its slider. */
export function figureNode(declaration: {
  readonly name: string;
  readonly title: string;
  readonly help: string;
  readonly kind: Kind<Scalar>;
  readonly initial: string;
}): AnyNodeDeclaration {
  const { name, title, help, kind, initial } = declaration;
  const { measure } = kind;
  if (measure === undefined) throw new Error(`the kind ${kind.name} has no measure to bound`);
  return defineNode({
    name,
    title,
    band: 'quantities',
    help,
    rail: 'slider',
    inputs: { value: input(kind, title, initial) },
    settings: {
      lower: optionalQuantity('Lower bound', measure),
      upper: optionalQuantity('Upper bound', measure),
      step: optionalQuantity('Step', measure),
    },
    outputs: { value: output(kind, title) },
    trace: ({ value }) => ({ value }),
    example: { inputs: { value: initial }, gives: { value: initial } },
  });
}
