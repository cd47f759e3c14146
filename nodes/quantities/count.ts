import { defineNode, input, kinds, optionalQuantity, output } from '../../src/graph/index.ts';
import { measures } from '../../src/quantity/index.ts';

export const count = defineNode({
  name: 'count',
  title: 'Count',
  band: 'quantities',
  help: 'A whole number: of bays, of segments. Changing it changes the structure of the graph.',
  rail: 'slider',
  inputs: { value: input(kinds.count, 'Count', '8') },
  settings: {
    lower: optionalQuantity('Lower bound', measures.number),
    upper: optionalQuantity('Upper bound', measures.number),
    step: optionalQuantity('Step', measures.number),
  },
  outputs: { value: output(kinds.count, 'Count') },
  trace: ({ value }) => ({ value }),
  example: { inputs: { value: '8' }, gives: { value: '8' } },
});
