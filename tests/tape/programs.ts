import { NONE } from '../../src/quantity/index.ts';
import { arctangent, finish, guard, Op, type Scalar, say, type Tape, Trace } from '../../src/tape/index.ts';
import { randomFrom } from '../support/random.ts';

/** Values at which the ways of running could differ: signed zeros, the least and greatest figures, none at all. */
export const SPECIAL = [
  0,
  -0,
  1,
  -1,
  5e-324,
  -2.2e-308,
  1e308,
  -1e308,
  0.1,
  3.5,
  -7.25,
  1e-9,
  Number.NaN,
  Infinity,
];

/** A random program over all operations, and how many inputs it has. */
export function randomProgram(seed: number, length = 60): Tape {
  const random = randomFrom(seed);
  const trace = new Trace();
  const known: Scalar[] = Array.from({ length: 4 }, (_, i) => trace.input(`input ${i}`, NONE));
  known.push(trace.constant(0.75, NONE), trace.constant(-2, NONE));
  const any = (): Scalar => known[random.whole(0, known.length - 1)] as Scalar;
  const writers: (() => Scalar)[] = [
    () => any().plus(any()),
    () => any().minus(any()),
    () => any().times(any()),
    () => any().over(any()),
    () => any().negated(),
    () => any().absolute(),
    () => any().squareRoot(),
    () => any().sine(),
    () => any().cosine(),
    () => arctangent(any(), any()),
    () => any().exponential(),
    () => any().logarithm(),
    () => any().power(random.whole(-3, 4) + 0.5),
    () => any().below(any()).scalar,
    () => any().atMost(any()).scalar,
    () => any().below(any()).choose(any(), any()),
    () => guard(any(), any().atMost(any()), say('never')`${any()} is too much`),
    () => trace.apply(Op.damp, any(), any()),
  ];
  for (let i = 0; i < length; i++)
    known.push((writers[random.whole(0, writers.length - 1)] as () => Scalar)());
  return finish(trace, known);
}
