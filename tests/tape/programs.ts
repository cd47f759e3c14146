import { NONE } from '../../src/quantity/index.ts';
import {
  arctangent,
  derivative,
  finish,
  gradient,
  guard,
  guardSlope,
  Op,
  type Scalar,
  say,
  type Tape,
  Trace,
} from '../../src/tape/index.ts';
import { randomFrom } from '../support/random.ts';

/**
 * Values at which the ways of running could differ: signed zeros, subnormals, the least and the greatest figures,
 * halves (roots and powers), multiples of π, what has no bound and what is no number.
 */
export const SPECIAL: readonly number[] = [
  ...[0, -0, 1, -1, 0.5, -0.5, 2, -2, 3, -7.25, 0.1],
  ...[Number.MIN_VALUE, -Number.MIN_VALUE, 2.2250738585072014e-308, -2.2e-308],
  ...[Number.MAX_VALUE, -Number.MAX_VALUE, 1e200, 1e-200, 1 + Number.EPSILON, 1 - Number.EPSILON / 2],
  ...[Math.PI, -Math.PI / 2, 1e22, 710, -746],
  ...[Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, Number.NaN],
];

/** A random program over all operations, all of its results being outputs. */
export function randomProgram(seed: number, length = 60): Tape {
  const { trace, results } = randomTrace(seed, length);
  return finish(trace, results);
}

/** The derivatives of some results of a random program, both ways. */
export function gradientProgram(seed: number, length = 40): Tape {
  const { trace, inputs, results } = randomTrace(seed, length);
  const some = results.slice(-3);
  const [first] = inputs as [Scalar];
  return finish(trace, [...derivative(some, first), ...some.flatMap((result) => gradient(result, inputs))]);
}

function randomTrace(seed: number, length: number) {
  const random = randomFrom(seed);
  const trace = new Trace();
  const inputs = Array.from({ length: 4 }, (_, i) => trace.input(`input ${i}`, NONE));
  const results: Scalar[] = [...inputs, trace.constant(0.75, NONE), trace.constant(-2, NONE)];
  const any = (): Scalar => results[random.whole(0, results.length - 1)] as Scalar;
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
    () => any().power(random.whole(-6, 8) / 2),
    () => any().below(any()).scalar,
    () => any().atMost(any()).scalar,
    () => any().below(any()).choose(any(), any()),
    () => any().most(any()),
    () => guard(any(), any().atMost(any()), say('never')`${any()} is too much`),
    () => guardSlope(any(), any().atMost(any()), say('never')`${any()} is too much`),
    () => trace.mark(any()),
    () => trace.apply(Op.damp, any(), any()),
  ];
  const write = (): Scalar => (writers[random.whole(0, writers.length - 1)] as () => Scalar)();
  for (let i = 0; i < length; i++) results.push(write());
  return { trace, inputs, results };
}
