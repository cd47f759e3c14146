import {
  Block,
  evaluate,
  finish,
  gradient,
  operationCount,
  registersFor,
  run,
} from '../../src/tape/index.ts';
import { INPUTS, LOADS, STATIONS } from './reference/case.ts';
import { plainReference } from './reference/plain.ts';
import { traceReference } from './reference/traced.ts';
import { measure, report } from './time.ts';

const { trace, inputs, outputs, kneeMoment } = traceReference();
const tape = finish(trace, outputs);
const registers = registersFor(tape);
const given = Float64Array.from(INPUTS);

// What is timed must be right: both versions give the same figures.
run(tape, given, registers);
const byTape = evaluate(tape, given);
const byHand = plainReference(INPUTS);
const largest = Math.max(...byHand.map(Math.abs));
const gap = Math.max(...byHand.map((figure, i) => Math.abs(figure - (byTape[i] as number)) / largest));

const slopes = gradient(kneeMoment, inputs);
const gradientTape = finish(trace, [kneeMoment, ...slopes]);
const kneeTape = finish(trace, [kneeMoment]);
const gradientRegisters = registersFor(gradientTape);
const kneeRegisters = registersFor(kneeTape);

const WIDTH = 1024;
const block = new Block(tape, WIDTH);
const rows = INPUTS.map((value, i) =>
  Float64Array.from({ length: WIDTH }, (_, k) => value * (1 + 1e-4 * ((k + i) % 7))),
);

let sink = 0;
const times = measure({
  plain: () => {
    sink += plainReference(INPUTS)[0] as number;
  },
  run: () => run(tape, given, registers),
  knee: () => run(kneeTape, given, kneeRegisters),
  gradient: () => run(gradientTape, given, gradientRegisters),
  trace: () => {
    const made = traceReference();
    sink += finish(made.trace, made.outputs).code.length;
  },
  block: () => {
    sink += (block.run(rows, WIDTH)[0] as Float64Array)[0] as number;
  },
});

/** Prints the engine's figures on the reference arch. */
export function engine(): void {
  console.log(`Reference arch: two knees, ${LOADS.length} loads, ${STATIONS.length} stations, both routes`);
  const per = (name: string, to: string, share = 1) =>
    `1/${(times.ratio(to, name) * share).toFixed(1)} of ${to}`;
  report('operations on the tape', String(operationCount(tape)));
  report('largest gap to the plain version, of the largest figure', gap.toExponential(1));
  report('plain: TypeScript on objects', `${times.median('plain').toFixed(1)} µs`);
  report('run: the tape once', `${times.median('run').toFixed(1)} µs, ${per('run', 'plain')}`);
  report(
    'trace: from mechanics to a finished tape',
    `${(times.median('trace') / 1000).toFixed(2)} ms, ${times.ratio('trace', 'run').toFixed(0)} runs`,
  );
  report(
    'knee: the knee moment alone',
    `${times.median('knee').toFixed(2)} µs, ${operationCount(kneeTape)} operations`,
  );
  report(
    `gradient: the knee moment to all ${inputs.length} inputs, with itself`,
    `${times.median('gradient').toFixed(2)} µs, ${operationCount(gradientTape)} operations, ${times.ratio('gradient', 'knee').toFixed(1)} times knee`,
  );
  report(
    `block: ${WIDTH} variants, plain JavaScript, ${block.rows} rows`,
    `${(times.median('block') / WIDTH).toFixed(2)} µs a variant, ${per('block', 'plain', WIDTH)}, ${per('block', 'run', WIDTH)}`,
  );
  report('checksum', sink.toExponential(6));
}
