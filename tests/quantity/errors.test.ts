import { describe, expect, it } from 'vitest';
import { findUnit, measures, QuantityError, readMeasure, readQuantity } from '../../src/quantity/index.ts';

/** What a person is told; fails where nothing is wrong, or where another error than that of a quantity comes up. */
function told(read: () => unknown): string {
  try {
    read();
  } catch (error) {
    expect(error).toBeInstanceOf(QuantityError);
    return (error as QuantityError).message;
  }
  throw new Error('nothing was said to be wrong');
}

const EXAMPLES = {
  number: '0.4',
  angle: '12°',
  length: '12 m',
  area: '12 m²',
  volume: '12 m³',
  mass: '12 kg',
  time: '12 s',
  force: '12 kN',
  moment: '12 kN·m',
  lineLoad: '12 kN/m',
  areaLoad: '12 kN/m²',
  density: '12 kg/m³',
} as const;
const names = Object.keys(EXAMPLES) as (keyof typeof EXAMPLES)[];

describe('a quantity of another kind', () => {
  const pairs = names.flatMap((has) =>
    names.filter((wanted) => wanted !== has).map((w) => [has, w] as const),
  );

  it.each(
    // A bare figure where something with a unit is wanted is told about its unit, below.
    pairs.filter(([has]) => has !== 'number'),
  )('(%s where %s is wanted) is told as what it is and what is wanted', (has, wanted) => {
    expect(told(() => readMeasure(EXAMPLES[has], measures[wanted]))).toContain(
      `"${EXAMPLES[has]}" is ${measures[has].called} where ${measures[wanted].called} is wanted`,
    );
  });

  it.each([
    ['3 m³/s', 'a quantity in m³·s⁻¹'],
    ['5 lb·ft', 'a quantity in m·kg'],
    ['2 m^0.5', 'a quantity in m^0.5'],
  ])('%s that has no name is told in base units', (text, words) => {
    expect(told(() => readMeasure(text, measures.length))).toContain(words);
  });

  it.each(['5 rad²', '5 °·°', '5 1/rad', '5 °/°'])('%s is no angle', (text) => {
    expect(told(() => readMeasure(text, measures.angle))).toContain(
      'is a plain number where an angle is wanted',
    );
  });

  it.each(['500 kg', '500 g', '0.5 t', '500 lb'])(
    '%s where a force is wanted is told which units a force has',
    (text) => {
      expect(told(() => readMeasure(text, measures.force))).toBe(
        `"${text}" is a mass where a force is wanted (a force is in kN, N, lbf, kip)`,
      );
    },
  );
});

describe('a figure without its unit', () => {
  it.each(names.filter((name) => name !== 'number'))(
    'where %s is wanted is shown with a unit, and what is shown can be read',
    (name) => {
      const message = told(() => readMeasure(' −12.5 ', measures[name]));
      expect(message).toContain(`has no unit where ${measures[name].called} is wanted: write for example "`);
      const shown = /write for example "(.*)"$/.exec(message)?.[1] ?? '';
      expect(readMeasure(shown, measures[name]).unit).toEqual(measures[name].units.SI);
    },
  );
});

describe('a unit that is not known', () => {
  it.each([
    ['3 parsecs', '"parsecs"'],
    ['3 KN', '"KN"'],
    ['3 kN/', '"kN/"'],
    ['3 /m', '"/m"'],
    ['3 kN//m', '"kN//m"'],
    ['3 kN·', '"kN·"'],
    ['3 m/1', '"m/1"'],
    ['3 m^', '"m^"'],
    ['3 m^2^2', '"m^2^2"'],
    ['3 m²⁻', '"m²⁻"'],
    ['3 ·', '"·"'],
    ['3 constructor', '"constructor"'],
    ['3 __proto__', '"__proto__"'],
    ['1.5 ft 6 in', '"ft 6 in"'],
    // A second figure is not dropped in silence.
    ['5 1', '"1"'],
    ['5 1 m', '"1 m"'],
    ['5 1·m', '"1·m"'],
    ['5 1/1', '"1/1"'],
    ['5 000 m', '"000 m"'],
    ['1.2.3 m', '".3 m"'],
    ['0x1F m', '"x1F m"'],
    // A power of ten that lost its raised figures: 3×10² or 3 × 102?
    ['3x102 m', '"x102 m"'],
    ['3x1000 m', '"x1000 m"'],
    ['3×10⁻ m', '"×10⁻ m"'],
    // Powers that no machine figure holds.
    ['5 mm^99·mm^99', '"mm^99·mm^99"'],
    ['0 km^99·km^99', '"km^99·km^99"'],
  ])('in "%s" is named, with units that are', (text, named) => {
    expect(told(() => readQuantity(text))).toBe(
      `${named} is no unit that is known here: write for example m, ft, kN, kip or °`,
    );
  });

  it('is no unit when asked for by itself, nor is nothing', () => {
    for (const text of ['', ' ', '1', '/', '1/', '1/1', '·', 'm/', '²'])
      expect(findUnit(text)).toBeUndefined();
  });
});

describe('a comma', () => {
  it.each(['9,5 m', '9 ,5 m', '1,000 m', '1,000,000.5 N', '9,5'])('in %s is told to be a point', (text) => {
    expect(told(() => readQuantity(text))).toBe(
      `"${text}" has a comma: write the decimal sign as a point and no thousands`,
    );
  });
});

describe('what is no finite figure', () => {
  it.each(['Infinity', '-Infinity m', '∞ m', 'NaN', 'NaN m'])('%s is no figure', (text) => {
    expect(told(() => readQuantity(text))).toBe(`"${text}" does not begin with a figure`);
  });

  const nines = '9'.repeat(400);
  it.each([
    ['1e999 m', measures.length],
    ['-1e999', measures.number],
    ['1×10⁹⁹⁹ m', measures.length],
    ['1e306 kN', measures.force],
    ['1e300 km^3', measures.volume],
    [`${nines} m`, measures.length],
    [`${nines} ft 6 in`, measures.length],
    [`6 ft ${nines} in`, measures.length],
    [`${nines}/2 in`, measures.length],
    [`${nines}/${nines} in`, measures.length],
  ])('%s is too large', (text, measure) => {
    expect(told(() => readMeasure(text, measure))).toContain('is too large a figure');
  });

  it('nor is one that its assumed unit makes too large', () => {
    expect(readMeasure('1e306', measures.number, 'SI').value).toBe(1e306);
    expect(told(() => readMeasure('1e306', measures.force, 'SI'))).toBe('"1e306" is too large a figure');
  });

  it.each(['1/0 in', '0/0"', '3 1/0 in', '3 ft 1/0 in', '3\' 2 1/00"'])('%s divides by nothing', (text) => {
    expect(told(() => readQuantity(text))).toBe(`"${text}" divides an inch by nothing`);
  });
});

describe('what does not begin with a figure', () => {
  it.each(['m', 'three m', '--5 m', '+-5 m', '- 5 m', '.', '. m', 'e5 m', '²', '½ in', '$5'])(
    '%s',
    (text) => {
      expect(told(() => readQuantity(text))).toBe(`"${text}" does not begin with a figure`);
    },
  );

  it.each(['', ' ', '\u00a0', '\n'])('nor does nothing at all', (text) => {
    expect(told(() => readQuantity(text))).toBe('nothing is written: write a figure with its unit');
  });
});

describe('a long text', () => {
  it.each([
    'x'.repeat(1e5),
    `1 ${'x'.repeat(1e5)}`,
    '0'.repeat(1e5),
    '9'.repeat(1e5),
    `1,${'5'.repeat(1e5)}`,
    `1/${'0'.repeat(1e5)} in`,
    `1 kN${' '.repeat(1e5)}`,
  ])('is cut short in what is told', (text) => {
    const message = told(() => readMeasure(text, measures.length));
    expect(message.length).toBeLessThan(200);
  });
});
