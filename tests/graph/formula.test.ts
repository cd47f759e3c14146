import { describe, expect, it } from 'vitest';
import { open, texts } from '../support/graphs.ts';

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
    ['a and 1', { a: '3 m' }, 'A length is no yes or no: compare it with something'],
    ['a < b', { a: '3 m', b: '2 kN' }, "A force can't be compared with a length"],
    ['max(a, b)', { a: '3 m', b: '2 kN' }, "A force can't be compared with a length"],
    ['hypot(a, b)', { a: '3 m', b: '2 kN' }, "can't be added to"],
    ['1 > 0 ? a : b', { a: '3 m', b: '2 kN' }, 'A choice between a length and a force has no one dimension'],
    ['a - a * a', { a: '3 m' }, "An area can't be taken from a length"],
    ['log(a)', { a: '3 m' }, 'The logarithm is wanted where a length stands: divide it first'],
    ['a ^ 3 / 1 + a', { a: '3 m' }, "A length can't be added to a volume"],
    ['sqrt(a) * sqrt(a) + a', { a: '3 m' }, ''],
    ['(a ^ 0.5) ^ 2 - a', { a: '3 m' }, ''],
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
    ['constructor.constructor("x")', 'Access to a member is not allowed'],
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
    ['a == b', 'The sign of "equal" is not allowed'],
    ['a != b', 'The sign of "unequal" is not allowed'],
    ['a xor b', 'The sign of "xor" is not allowed'],
    ['a | b', 'The sign of "bitOr" is not allowed'],
    ['~a', 'The sign of "bitNot" is not allowed'],
    ['a << 2', 'The sign of "leftShift" is not allowed'],
    ['a .* b', 'The sign of "dotMultiply" is not allowed'],
    ['a ?? b', 'The sign of "nullish" is not allowed'],
    ['a?.b', 'Access to a member is not allowed'],
    ['a.constructor', 'Access to a member is not allowed'],
    ['valueOf(a)', 'The function "valueOf" is not allowed'],
    ['hasOwnProperty("a")', 'The function "hasOwnProperty" is not allowed'],
    ['__proto__(a)', 'The function "__proto__" is not allowed'],
    ['new a()', 'The function "a" is not allowed'],
    ['a => b', "The formula can't be read"],
    ['a && b', "The formula can't be read"],
    ['a \n b', 'More than one expression is not allowed'],
    ['NaN', 'The value NaN is no figure'],
    ['Infinity', 'The value Infinity is no figure'],
    ['undefined', 'The value undefined is no figure'],
    ['a ^ -101', 'The exponent -101 is beyond ±100'],
    ['min()', 'The function min takes at least 1, and is given 0'],
    [`max(${'a, '.repeat(20)}a)`, 'The function max takes at least 1, and is given 21'],
    ['sqrt(a, b)', 'The function sqrt takes 1, and is given 2'],
    ['   ', 'The formula is empty: write one'],
    ['$a', '"$a" is no name for an input'],
    ['a'.repeat(41), 'is no name for an input'],
    ['a + 1'.repeat(201), 'has 1005 signs, more than the 1000 that are read'],
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
    ['(0 - a) ^ 0.5', 'The formula takes the power with a fraction of −2.000: make it 0 or more'],
    ['(a - b) ^ -0.5', 'The formula takes the power with a fraction of 0: make it more than 0'],
    ['(0 - a) ^ b', 'The formula takes the power with a fraction of −2.000'],
    ['asin(a)', 'No angle has 2.000 for its sine or cosine: bring it between −1 and 1'],
    ['atan2(a - b, a - b)', 'The formula asks for the direction of a vector of length 0'],
  ])('%s outside its domain is a query with the figure', (text, words) => {
    const { queries, value } = formula(text, { a: '2', b: '2' });
    expect(queries[0]).toContain(words);
    expect(value).toBeUndefined();
  });

  it('says how far outside its domain it is, in units', () => {
    const values = { a: '2 m', b: '2.5 m' };
    expect(formula('sqrt(a - b)', values).queries).toEqual([
      'The formula takes the square root of −0.5000\u00a0m: make it 0 or more',
    ]);
    expect(formula('acos(b / a)', values).queries).toEqual([
      'No angle has 1.250 for its sine or cosine: bring it between −1 and 1',
    ]);
    expect(formula('acos(-b / a)', values).queries[0]).toContain('No angle has −1.250');
  });

  it.each([
    ['acos(a)', 'acos(1)', 0],
    ['acos(-a)', 'acos(-1)', Math.PI],
    ['asin(a)', 'asin(1)', Math.PI / 2],
    ['sqrt(a - 1)', 'sqrt(0)', 0],
    ['a ^ 0', '0 ^ 0', 1],
  ])('%s at the edge of its domain is a figure, typed or not', (text, constant, value) => {
    expect(formula(text, { a: '1' })).toEqual({ value, queries: [] });
    expect(formula(constant)).toEqual({ value, queries: [] });
  });

  it.each(['1 / 0', 'sqrt(-1)', 'log(0)', 'acos(2)', 'atan2(0, 0)', '0 ^ -1', '(-8) ^ (1 / 3)'])(
    '%s without any input is a query, not a fault',
    (text) => {
      const { value, queries } = formula(text);
      expect(value).toBeUndefined();
      expect(queries).toHaveLength(1);
      expect(queries[0]).not.toContain('fault of its pack');
    },
  );

  it('may name its inputs by words that mean something to the language', () => {
    const text = 'constructor + toString * valueOf - prototype';
    const values = { constructor: '1', toString: '2', valueOf: '3', prototype: '4' };
    expect(formula(text, values)).toEqual({ value: 3, queries: [] });
    // Nothing is taken for typed that was not.
    expect(formula(text, {}).queries).toHaveLength(4);
  });

  it('may stand on a line of its own', () => {
    expect(formula('\n  a * 2\n', { a: '3' })).toEqual({ value: 6, queries: [] });
  });

  it('changes its inputs with its text, and what was typed stays', () => {
    const session = open([
      { id: 'f', type: 'quantities/formula', values: { a: '3', b: '4' }, settings: { formula: 'a + b' } },
    ]);
    session.edit({ edit: 'set-setting', id: 'f', setting: 'formula', value: 'a * 2' });
    expect(session.value('f', 'result')).toBe(6);
    session.edit({ edit: 'set-setting', id: 'f', setting: 'formula', value: 'a * ' });
    expect(session.state('f')).toBe('query');
    session.edit({ edit: 'set-setting', id: 'f', setting: 'formula', value: 'a * b' });
    expect(session.value('f', 'result')).toBe(12);
  });

  it('that does not choose a bad branch does not mind it', () => {
    expect(formula('a > 0 ? sqrt(a) : sqrt(0 - a)', { a: '-9' })).toEqual({ value: 3, queries: [] });
  });
});
