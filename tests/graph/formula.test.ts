import { all, create, type FactoryFunctionMap } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { open, texts } from '../support/graphs.ts';
import { randomFrom } from '../support/random.ts';

/** A formula node with figures typed into its names. */
function formula(text: string, values: Record<string, string> = {}) {
  const session = open([{ id: 'f', type: 'quantities/formula', values, settings: { formula: text } }]);
  return {
    value: session.value('f', 'result'),
    queries: texts(session).map((line) => line.replace(/^f: /, '')),
  };
}

describe('a formula', () => {
  it('has an input for each of its names, once', () => {
    const session = open([
      { id: 'f', type: 'quantities/formula', settings: { formula: 'sqrt(a^2 + b^2) + a * pi + αβ_1' } },
    ]);
    expect(Object.keys(session.live.traced.nodes.get('f')?.inputs ?? {})).toEqual(['a', 'b', 'αβ_1']);
    expect(texts(session)).toHaveLength(3);
  });

  it('computes with units', () => {
    expect(formula('w * l^2 / 8', { w: '5 kN/m', l: '6 m' }).value).toBeCloseTo(22_500, 9);
    expect(formula('sqrt(a * b)', { a: '4 m', b: '9 m' }).value).toBe(6);
    expect(formula('a > b ? a : b', { a: '4 m', b: '30 ft' }).value).toBeCloseTo(9.144, 12);
    expect(formula('tan(a)', { a: '45°' }).value).toBeCloseTo(1, 14);
    expect(formula('min(a, b, c) / max(a, b)', { a: '3 m', b: '2 m', c: '1 m' }).value).toBeCloseTo(
      1 / 3,
      14,
    );
  });

  it.each([
    ['a + b', { a: '3 m', b: '2 kN' }, "A force can't be added to a length"],
    ['a + 1', { a: '3 m' }, "A plain number can't be added to a length"],
    ['sin(a)', { a: '3 m' }, 'The sine is wanted where a length stands: divide it first'],
    ['a ^ b', { a: '3 m', b: '2' }, 'An exponent that varies needs plain numbers'],
    ['2 ^ a', { a: '3 m' }, 'An exponent that varies needs plain numbers'],
    ['a ? 1 : 2', { a: '3 m' }, 'A length is no yes or no: compare it with something'],
    ['a > 1 ? a : 2', { a: '3' }, ''],
    ['atan2(a, b)', { a: '3 m', b: '1 kN' }, 'A length across and a force along have no angle'],
  ])('%s checks dimensions', (text, values, words) => {
    const { queries, value } = formula(text, values);
    if (words === '') expect(queries).toEqual([]);
    else {
      expect(queries[0]).toContain(words);
      expect(value).toBeUndefined();
    }
  });

  it.each([
    ['a = 3', 'An assignment (=) is not allowed'],
    ['f(x) = x', 'The definition of a function is not allowed'],
    ['a.b', 'Access to a member is not allowed'],
    ['a["constructor"]', 'Access to a member is not allowed'],
    ['constructor.constructor("x")', 'The function "" is not allowed'],
    ['import(a)', 'The function "import" is not allowed: use one of abs, sqrt'],
    ['evaluate("1")', 'The function "evaluate" is not allowed'],
    ['toString(a)', 'The function "toString" is not allowed'],
    ['"text"', 'The text "text" is no figure'],
    ['[1, 2]', 'A list is not allowed'],
    ['{a: 1}', 'An object is not allowed'],
    ['1:3', 'A range is not allowed'],
    ['a; b', 'More than one expression is not allowed'],
    ['a < b < c', 'A chain of comparisons is not allowed'],
    ['a to b', 'The sign of "to" is not allowed'],
    ['a!', 'The sign of "factorial" is not allowed'],
    ['a mod 2', 'The sign of "mod" is not allowed'],
    ["a'", 'is not allowed'],
    ['1e400', 'The value Infinity is no figure'],
    ['true', 'The value true is no figure'],
    ['null', 'The value null is no figure'],
    ['__proto__', '"__proto__" is no name for an input'],
    ['a ^ 1000000000', 'The exponent 1000000000 is beyond ±100'],
    ['sin()', 'The function sin takes 1, and is given 0'],
    ['atan2(1)', 'The function atan2 takes 2, and is given 1'],
    ['a +', "The formula can't be read: Unexpected end of expression"],
    ['', 'The formula is empty: write one'],
    [`${'('.repeat(10_000)}a${')'.repeat(10_000)}`, 'has 20001 signs, more than the 1000 that are read'],
    [`${'('.repeat(400)}a${')'.repeat(400)}`, 'nests brackets more than 40 deep'],
  ])('%s is refused in words', (text, words) => {
    const { queries, value } = formula(text, { a: '3', b: '2', c: '1' });
    expect(queries[0]).toContain(words);
    expect(value).toBeUndefined();
  });

  it('that chains as many signs as it may hold is read', () => {
    expect(formula(`${'-'.repeat(998)}a`, { a: '3' }).value).toBe(3);
    expect(formula(`a${'+a'.repeat(499)}`, { a: '1' }).value).toBe(500);
  });

  it.each([
    ['1 / (a - b)', 'The formula divides by 0: change what it divides by'],
    ['(a - b) ^ -2', 'The formula divides by 0'],
    ['sqrt(b - a - 1)', 'The formula takes the square root of −1.000: make it 0 or more'],
    ['log(a - b)', 'The formula takes the logarithm of 0: make it more than 0'],
    ['(0 - a) ^ 0.5', 'The formula takes the power of −2.000: make it more than 0'],
    ['(0 - a) ^ b', 'The formula takes the power of −2.000'],
    ['asin(a)', 'No angle has 2.000 for its sine or cosine: bring it between −1 and 1'],
    ['atan2(a - b, a - b)', 'The formula asks for the direction of a vector of length 0'],
  ])('%s outside its domain is a query with the figure', (text, words) => {
    const { queries, value } = formula(text, { a: '2', b: '2' });
    expect(queries[0]).toContain(words);
    expect(value).toBeUndefined();
  });

  it('that does not choose a bad branch does not mind it', () => {
    expect(formula('a > 0 ? sqrt(a) : sqrt(0 - a)', { a: '-9' })).toEqual({ value: 3, queries: [] });
  });
});

describe('against the evaluation of mathjs', () => {
  const math = create(all as FactoryFunctionMap);

  /** A random formula over the allowed signs and functions, of plain numbers. */
  function randomFormula(random: ReturnType<typeof randomFrom>, depth: number): string {
    if (depth === 0) return ['a', 'b', 'c', '2', '0.5', 'pi'][random.whole(0, 5)] as string;
    const part = () => randomFormula(random, depth - 1);
    const forms: readonly (() => string)[] = [
      () => `(${part()} + ${part()})`,
      () => `(${part()} - ${part()})`,
      () => `${part()} * ${part()}`,
      () => `(${part()}) / (${part()})`,
      () => `-(${part()})`,
      () => `(${part()})^${random.whole(-3, 3)}`,
      () => `sqrt(abs(${part()}))`,
      () => `sin(${part()})`,
      () => `cos(${part()})`,
      () => `atan2(${part()}, ${part()})`,
      () => `atan(${part()})`,
      () => `min(${part()}, ${part()})`,
      () => `max(${part()}, ${part()}, ${part()})`,
      () => `hypot(${part()}, ${part()})`,
      () => `exp(sin(${part()}))`,
      () => `log(1 + abs(${part()}))`,
      () => `(${part()} < ${part()} ? ${part()} : ${part()})`,
    ];
    return (forms[random.whole(0, forms.length - 1)] as () => string)();
  }

  it('500 random formulas have the same value, or none in either', () => {
    const random = randomFrom(5);
    let compared = 0;
    for (let i = 0; i < 500; i++) {
      const text = randomFormula(random, 4);
      if (text.length > 900) continue;
      const figures = {
        a: random.whole(-30, 30) / 10,
        b: random.whole(-30, 30) / 10,
        c: random.whole(1, 30) / 10,
      };
      const wanted = math.evaluate(text, { ...figures }) as unknown;
      const { value, queries } = formula(
        text,
        Object.fromEntries(Object.entries(figures).map(([name, figure]) => [name, String(figure)])),
      );
      if (typeof value === 'number') {
        compared += 1;
        // Both round in 1e-16 an operation, of intermediate figures that may be far larger than the result.
        expect(typeof wanted, text).toBe('number');
        expect(Math.abs(value - (wanted as number)), text).toBeLessThan(1e-9 * Math.max(1, Math.abs(value)));
      } else {
        expect(queries.length, text).toBeGreaterThan(0);
      }
    }
    expect(compared).toBeGreaterThan(350);
  });
});
