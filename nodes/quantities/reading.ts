import { choice, defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { nameDimension } from '../../src/quantity/index.ts';
import { Refusal } from '../../src/tape/index.ts';

export const reading = defineNode({
  name: 'reading',
  title: 'Reading',
  band: 'handover',
  help: 'A result for the rail, with or without a limit. The margin is how far the limit is away: below 0 it is not met.',
  rail: 'reading',
  inputs: {
    value: input(kinds.quantity, 'Value'),
    limit: input(kinds.quantity, 'Limit', '0'),
    within: input(kinds.number, 'Target met within', '1 %'),
  },
  settings: {
    rule: choice(
      'Kind of limit',
      { none: 'no limit', 'at most': 'at most', 'at least': 'at least', target: 'a target' },
      'none',
    ),
  },
  outputs: {
    value: output(kinds.quantity, 'Value'),
    limit: output(kinds.quantity, 'Limit'),
    margin: output(kinds.quantity, 'Margin'),
  },
  trace({ value, limit, within }, { rule }) {
    if (rule === 'none') return { value, limit: value, margin: value.minus(value) };
    if (limit.dimension !== value.dimension) {
      const [is, wanted] = [nameDimension(limit.dimension), nameDimension(value.dimension)];
      throw new Refusal(
        'limit',
        `the limit is ${is} where the value is ${wanted}: write the limit with its unit`,
      );
    }
    switch (rule) {
      case 'at most':
        return { value, limit, margin: limit.minus(value) };
      case 'at least':
        return { value, limit, margin: value.minus(limit) };
      case 'target':
        return {
          value,
          limit,
          margin: limit.absolute().times(within).minus(value.minus(limit).absolute()),
        };
    }
  },
  example: {
    inputs: { value: '232 kN·m', limit: '250 kN·m' },
    settings: { rule: 'at most' },
    gives: { value: '232 kN·m', margin: '18 kN·m' },
  },
});
