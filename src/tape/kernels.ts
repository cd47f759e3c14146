import { Op } from './operation.ts';

/**
 * One way of carrying out an operation on whole rows of numbers. A row is `count` values of one register, one
 * for each variant; `r`, `a`, `b` and `c` are where the rows of the result and of the operands begin in `m`.
 * Another way (SIMD, say) is another table of functions of this type that give the same bits.
 */
export type Kernel = (m: Float64Array, r: number, a: number, b: number, c: number, count: number) => void;

/** Kernels by the number of the operation. */
export type Kernels = ReadonlyMap<number, Kernel>;

// One loop a function, and not a loop that is handed a function: only so does the engine keep each one tight.

const add: Kernel = (m, r, a, b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = m[a + i]! + m[b + i]!;
};
const subtract: Kernel = (m, r, a, b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = m[a + i]! - m[b + i]!;
};
const multiply: Kernel = (m, r, a, b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = m[a + i]! * m[b + i]!;
};
const divide: Kernel = (m, r, a, b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = m[a + i]! / m[b + i]!;
};
const negate: Kernel = (m, r, a, _b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = -m[a + i]!;
};
const absolute: Kernel = (m, r, a, _b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = Math.abs(m[a + i]!);
};
const squareRoot: Kernel = (m, r, a, _b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = Math.sqrt(m[a + i]!);
};
const sine: Kernel = (m, r, a, _b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = Math.sin(m[a + i]!);
};
const cosine: Kernel = (m, r, a, _b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = Math.cos(m[a + i]!);
};
const arctangent: Kernel = (m, r, a, b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = Math.atan2(m[a + i] as number, m[b + i] as number);
};
const exponential: Kernel = (m, r, a, _b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = Math.exp(m[a + i]!);
};
const logarithm: Kernel = (m, r, a, _b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = Math.log(m[a + i]!);
};
const power: Kernel = (m, r, a, b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = m[a + i]! ** m[b + i]!;
};
const below: Kernel = (m, r, a, b, _c, count) => {
  for (let i = 0; i < count; i++)
    m[r + i] = m[a + i]! < m[b + i]! ? 1 : m[a + i]! >= m[b + i]! ? 0 : Number.NaN;
};
const atMost: Kernel = (m, r, a, b, _c, count) => {
  for (let i = 0; i < count; i++)
    m[r + i] = m[a + i]! <= m[b + i]! ? 1 : m[a + i]! > m[b + i]! ? 0 : Number.NaN;
};
const choose: Kernel = (m, r, a, b, c, count) => {
  for (let i = 0; i < count; i++)
    m[r + i] = m[a + i] === 1 ? m[b + i]! : m[a + i] === 0 ? m[c + i]! : Number.NaN;
};
const guard: Kernel = (m, r, a, b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = m[b + i] === 1 ? m[a + i]! : Number.NaN;
};
const damp: Kernel = (m, r, a, b, _c, count) => {
  for (let i = 0; i < count; i++) m[r + i] = m[a + i] === 0 ? 0 : m[a + i]! * m[b + i]!;
};

/** The kernels in plain JavaScript. */
export const plainKernels: Kernels = new Map([
  [Op.add, add],
  [Op.subtract, subtract],
  [Op.multiply, multiply],
  [Op.divide, divide],
  [Op.negate, negate],
  [Op.absolute, absolute],
  [Op.squareRoot, squareRoot],
  [Op.sine, sine],
  [Op.cosine, cosine],
  [Op.arctangent, arctangent],
  [Op.exponential, exponential],
  [Op.logarithm, logarithm],
  [Op.power, power],
  [Op.below, below],
  [Op.atMost, atMost],
  [Op.choose, choose],
  [Op.guard, guard],
  [Op.damp, damp],
]);
