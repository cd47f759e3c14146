/** Floor 1: scalars, traces, tapes, derivatives, and the ways of running a tape. */
export { Block, type BlockInput } from './block.ts';
export { derivative, substitute } from './derivative.ts';
export { gradient } from './gradient.ts';
export { type Kernel, type Kernels, plainKernels } from './kernels.ts';
export { Op, operation, operations } from './operation.ts';
export { printTape } from './print.ts';
export { asAngle, plainQuery, type Query, type QueryDraft, queryText, Refusal, say } from './query.ts';
export { evaluate, outputsOf, registersFor, run } from './run.ts';
export { arctangent, Condition, guard, guardSlope, hypotenuse, Scalar, sum } from './scalar.ts';
export { failedGuards, finish, operationCount, registerCount, STRIDE, type Tape } from './tape.ts';
export { type TapeInput, Trace } from './trace.ts';
