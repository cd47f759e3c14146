/** What the types of a declaration promise its author. The compiler runs these: a promise broken is a type error. */
import { expectTypeOf } from 'vitest';
import {
  choice,
  defineKind,
  defineNode,
  flag,
  input,
  type Kind,
  kinds,
  many,
  optional,
  optionalQuantity,
  output,
  outputs,
  text,
} from '../../src/graph/index.ts';
import { measures } from '../../src/quantity/index.ts';
import type { Scalar } from '../../src/tape/index.ts';

interface Beam {
  readonly depth: Scalar;
}

const beam: Kind<Beam> = defineKind<Beam>({ name: 'beam', called: 'a beam', line: 'structure' });

const declared = {
  name: 'beams',
  title: 'Beams',
  band: 'members',
  help: 'Beams.',
  example: { gives: {} },
} as const;

const inputs = {
  depth: input(kinds.length, 'Depth', '1 m'),
  beam: input(beam, 'Beam'),
  others: many(beam, 'Others'),
  spare: optional(beam, 'Spare'),
  bays: input(kinds.count, 'Bays', '3'),
};

defineNode({
  ...declared,
  inputs,
  settings: {
    grade: choice('Grade', { low: 'low', high: 'high' }, 'low'),
    planed: flag('Planed', true),
    note: text('Note', ''),
    least: optionalQuantity('Least', measures.length),
  },
  outputs: { beam: output(beam, 'Beam'), depths: outputs(kinds.length, 'Depths') },
  trace(given, settings) {
    // Inputs and settings have the types that were declared, and no more.
    expectTypeOf(given.depth).toEqualTypeOf<Scalar>();
    expectTypeOf(given.beam).toEqualTypeOf<Beam>();
    expectTypeOf(given.others).toEqualTypeOf<readonly Beam[]>();
    expectTypeOf(given.spare).toEqualTypeOf<Beam | undefined>();
    expectTypeOf(given.bays).toEqualTypeOf<number>();
    expectTypeOf<keyof typeof given>().toEqualTypeOf<'depth' | 'beam' | 'others' | 'spare' | 'bays'>();
    expectTypeOf(settings.grade).toEqualTypeOf<'low' | 'high'>();
    expectTypeOf(settings.planed).toEqualTypeOf<boolean>();
    expectTypeOf(settings.note).toEqualTypeOf<string>();
    expectTypeOf(settings.least).toEqualTypeOf<number | undefined>();
    return { beam: given.beam, depths: [given.depth] };
  },
});

// An output of another kind than declared.
defineNode({
  ...declared,
  inputs,
  outputs: { beam: output(beam, 'Beam') },
  // @ts-expect-error a scalar is no beam
  trace: ({ depth }) => ({ beam: depth }),
});

// An output too few.
defineNode({
  ...declared,
  inputs,
  outputs: { beam: output(beam, 'Beam'), depth: output(kinds.length, 'Depth') },
  // @ts-expect-error the depth is missing
  trace: (given) => ({ beam: given.beam }),
});

// One where a list was declared.
defineNode({
  ...declared,
  inputs,
  outputs: { depths: outputs(kinds.length, 'Depths') },
  // @ts-expect-error a scalar is no list
  trace: ({ depth }) => ({ depths: depth }),
});

// A list where one was declared.
defineNode({
  ...declared,
  inputs,
  outputs: { depth: output(kinds.length, 'Depth') },
  // @ts-expect-error a list is no scalar
  trace: ({ depth }) => ({ depth: [depth] }),
});

// A raw number where a scalar was declared: it would have no dimension.
defineNode({
  ...declared,
  inputs,
  outputs: { depth: output(kinds.length, 'Depth') },
  // @ts-expect-error a number is no scalar
  trace: ({ bays }) => ({ depth: bays }),
});

// An input that was not declared.
defineNode({
  ...declared,
  inputs,
  outputs: { depth: output(kinds.length, 'Depth') },
  // @ts-expect-error there is no breadth
  trace: ({ breadth }) => ({ depth: breadth }),
});

// What may be missing has to be looked at.
defineNode({
  ...declared,
  inputs,
  outputs: { depth: output(kinds.length, 'Depth') },
  // @ts-expect-error the spare may be undefined
  trace: ({ spare }) => ({ depth: spare.depth }),
});

// A choice that is not among its options, and a default that is not.
defineNode({
  ...declared,
  inputs,
  settings: {
    grade: choice('Grade', { low: 'low', high: 'high' }, 'low'),
    // @ts-expect-error there is no middle
    other: choice('Other', { low: 'low', high: 'high' }, 'middle'),
  },
  outputs: { depth: output(kinds.length, 'Depth') },
  trace({ depth }, { grade }) {
    // @ts-expect-error there is no middle
    if (grade === 'middle') return { depth: depth.negated() };
    return { depth };
  },
});

// A kind's literal has to make what the kind carries.
defineKind<Beam>({
  name: 'beam',
  called: 'a beam',
  line: 'structure',
  // @ts-expect-error a scalar is no beam
  literal: (literal, quantity) => quantity(literal),
});

// What a kind draws has figures where its values have scalars.
defineKind<Beam>({
  name: 'beam',
  called: 'a beam',
  line: 'structure',
  draw: (figures) => {
    expectTypeOf(figures.depth).toEqualTypeOf<number>();
    return [];
  },
});
