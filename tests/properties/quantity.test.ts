import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  allUnits,
  dimension,
  findUnit,
  type Measure,
  measureOf,
  measures,
  printQuantity,
  QuantityError,
  readMeasure,
  readQuantity,
  type System,
  writeQuantity,
} from '../../src/quantity/index.ts';

const measure = fc.constantFrom<Measure>(
  ...Object.values(measures).filter((one): one is Measure => typeof one === 'object'),
);
const system = fc.constantFrom<System>('SI', 'US');

/** Figures of every size that leaves room for any unit's factor, none of them so small as to have lost digits. */
const figure = fc.oneof(
  fc.double({ min: -1e6, max: 1e6, noNaN: true }).map((value) => (Math.abs(value) < 1e-200 ? 0 : value)),
  fc
    .tuple(fc.double({ min: 1, max: 10, noNaN: true }), fc.integer({ min: -200, max: 200 }), fc.boolean())
    .map(
      // Sizes are spread evenly over the powers of ten.
      ([mantissa, power, negative]) => (negative ? -1 : 1) * mantissa * 10 ** power,
    ),
  // Halves of a last digit and the figures beside a power of ten, where rounding carries.
  fc
    .tuple(fc.integer({ min: 0, max: 100_000 }), fc.integer({ min: -12, max: 12 }))
    .map(([digits, power]) => (digits + 0.5) * 10 ** power),
  fc
    .tuple(fc.integer({ min: 1, max: 12 }), fc.integer({ min: -12, max: 12 }))
    .map(([nines, power]) => (10 - 10 ** -nines) * 10 ** power),
);

/** Dividing by a factor, reading the figure and multiplying again each round once. */
const ROUNDING = 4 * Number.EPSILON;

/** Half a step of the last digit that a printed figure shows, in SI units. */
function halfLastDigit(printed: string, m: Measure, s: System): number {
  const { factor } = m.units[s];
  const shown = /^−?(\d+)(?:\.(\d+))?(?:×10(⁻?)([⁰¹²³⁴-⁹]+))?/.exec(printed);
  if (shown === null) throw new Error(`${printed} shows no figure`);
  const [, whole = '', decimals = '', minus = '', raised = ''] = shown;
  // A bare 0 is a figure that was cut at the decimals of its measure.
  if (whole === '0' && decimals === '') return 0.5 * 10 ** -m.decimals * factor;
  const power = Number([...raised].map((digit) => '⁰¹²³⁴⁵⁶⁷⁸⁹'.indexOf(digit)).join(''));
  return 0.5 * 10 ** ((minus === '' ? power : -power) - decimals.length) * factor;
}

function expectReadsBack(value: number, m: Measure, s: System, digits: number, fine: boolean): void {
  const printed = printQuantity(value, m, s, { digits, fine });
  const read = readMeasure(printed, m).value;
  expect(Math.abs(read - value)).toBeLessThanOrEqual(
    halfLastDigit(printed, m, s) + Math.abs(value) * ROUNDING,
  );
  expect(printQuantity(read, m, s, { digits, fine })).toBe(printed);
}

// Fifteen digits are as many as a figure of the machine surely keeps.
const digits = fc.integer({ min: 1, max: 14 });

describe('what is printed', () => {
  it('reads back to within half of its last digit, and prints the same again', () => {
    fc.assert(fc.property(figure, measure, system, digits, fc.boolean(), expectReadsBack), { numRuns: 5000 });
  });

  it('reads back where its dimension has no measure of its own', () => {
    const halves = fc.integer({ min: -9, max: 9 }).map((n) => n / 2);
    const fractions = fc.tuple(fc.integer({ min: -20, max: 20 }), fc.integer({ min: 1, max: 9 }));
    const exponent = fc.oneof(
      halves,
      fractions.map(([above, below]) => above / below),
      fc.integer({ min: -20, max: 20 }),
    );
    fc.assert(
      fc.property(figure, exponent, exponent, exponent, (value, length, mass, time) => {
        const odd = measureOf(dimension(length, mass, time));
        expectReadsBack(value, odd, 'SI', 6, true);
      }),
      { numRuns: 2000 },
    );
  });

  it('is a sign, a figure and a unit behind a non-breaking space, and nothing else', () => {
    fc.assert(
      fc.property(figure, measure, system, digits, fc.boolean(), (value, m, s, figures, fine) => {
        const printed = printQuantity(value, m, s, { digits: figures, fine });
        const { symbol } = m.units[s];
        const behind = symbol === '' || symbol === '°' ? symbol : `\u00a0${symbol}`;
        expect(printed.endsWith(behind)).toBe(true);
        expect(printed.slice(0, printed.length - behind.length)).toMatch(
          /^(?:0|−?\d+(?:\.\d+)?(?:×10⁻?[⁰¹²³⁴-⁹]+)?)$/,
        );
      }),
      { numRuns: 2000 },
    );
  });
});

describe('what is written', () => {
  const COMPOUND = ['kN/m2', 'kip*ft', 'lb/ft^3', 'N·mm', 'kg·m⁻³', '1/m', 'm^0.5', '°/m', 'in⁴', 'kN / m'];
  const units = [...allUnits, ...COMPOUND.map((text) => findUnit(text))];
  const unit = fc.constantFrom(...units).map((known) => {
    if (known === undefined) throw new Error('a compound unit is not known');
    return known;
  });

  it('reads back as the same value to fourteen figures, in the same unit', () => {
    fc.assert(
      fc.property(figure, unit, (value, u) => {
        const read = readQuantity(writeQuantity(value, u));
        expect(read.unit).toEqual(u);
        expect(Math.abs(read.value - value)).toBeLessThanOrEqual(Math.abs(value) * 1e-14);
      }),
      { numRuns: 5000 },
    );
  });

  it('reads back in the units of every measure in both systems', () => {
    fc.assert(
      fc.property(figure, measure, system, (value, m, s) => {
        const { value: read } = readMeasure(writeQuantity(value, m.units[s]), m);
        expect(Math.abs(read - value)).toBeLessThanOrEqual(Math.abs(value) * 1e-14);
      }),
      { numRuns: 3000 },
    );
  });

  it('is written the same again', () => {
    fc.assert(
      fc.property(figure, unit, (value, u) => {
        const written = writeQuantity(value, u);
        expect(writeQuantity(readQuantity(written).value, u)).toBe(written);
      }),
      { numRuns: 3000 },
    );
  });
});

describe('feet and inches', () => {
  it('are a whole number of sixty-fourths of an inch, however they are typed', () => {
    const marks = fc.constantFrom(
      (feet: number, inches: number, n: number) => `${feet} ft ${inches} ${n}/64 in`,
      (feet: number, inches: number, n: number) => `${feet}'-${inches} ${n}/64"`,
      (feet: number, inches: number, n: number) => `${feet}′ ${inches} ${n}/64″`,
      (feet: number, inches: number, n: number) => `${feet} feet ${inches + n / 64} inches`,
      (feet: number, inches: number, n: number) => `${feet * 12 + inches} ${n}/64 inch`,
    );
    fc.assert(
      fc.property(
        fc.nat(9999),
        fc.nat(11),
        fc.nat(63),
        marks,
        fc.constantFrom('', '-', '−', '+'),
        (feet, inches, n, mark, sign) => {
          const { value } = readMeasure(sign + mark(feet, inches, n), measures.length);
          const expected = ((feet * 12 + inches) * 64 + n) * (0.0254 / 64);
          expect(Math.abs(value)).toBeCloseTo(expected, 10);
          expect(value < 0).toBe(expected > 0 && (sign === '-' || sign === '−'));
        },
      ),
      { numRuns: 2000 },
    );
  });
});

describe('any text at all', () => {
  /** Reads a text that may be nothing; returns whether it was a quantity. */
  function survives(text: string): boolean {
    let readable = false;
    const attempts = [
      () => readQuantity(text),
      ...[measures.length, measures.number, measures.angle, measures.force].flatMap((m) => [
        () => readMeasure(text, m),
        () => readMeasure(text, m, 'SI'),
        () => readMeasure(text, m, 'US'),
      ]),
    ];
    for (const attempt of attempts) {
      try {
        const { value, unit } = attempt();
        expect(Number.isFinite(value)).toBe(true);
        expect(unit.factor > 0 && Number.isFinite(unit.factor)).toBe(true);
        readable = true;
      } catch (error) {
        if (!(error instanceof QuantityError)) throw error;
        // A message is read on one line of a screen, whatever was pasted.
        expect(error.message.length).toBeLessThan(200);
      }
    }
    return readable;
  }

  it('is a finite quantity or an error in words', () => {
    const text = fc.oneof(
      fc.string({ maxLength: 40 }),
      fc.string({ unit: 'binary', maxLength: 40 }),
      fc.string({ unit: 'grapheme', maxLength: 40 }),
      fc.string({
        unit: fc.constantFrom(...'0123456789.,-−+eE×x^/*·⋅° \'"′″²³⁴⁻⁺mkNftinpsrad%\u00a0'),
        maxLength: 24,
      }),
    );
    fc.assert(
      fc.property(text, (any) => void survives(any)),
      { numRuns: 5000 },
    );
  });

  it('made of figures, units and signs is often a quantity, and never worse than an error in words', () => {
    const token = fc.oneof(
      fc.constantFrom(...allUnits.map(({ symbol }) => symbol), 'feet', 'inches', 'kips', "'", '"', '′', '″'),
      fc.constantFrom(
        '/',
        '·',
        '*',
        ' ',
        '^',
        '²',
        '³',
        '⁻¹',
        '^-2',
        '^0.5',
        '^99',
        '⁹⁹',
        '-',
        '1',
        '1/2',
        '.',
      ),
    );
    const start = fc.oneof(
      fc.constantFrom('1', '-2.5', '−3', '.5', '4e3', '4e999', '5×10⁻³', '6x10^4', '1 ft', "31'-6", '3/4 '),
      fc.nat().map(String),
    );
    let read = 0;
    let runs = 0;
    fc.assert(
      fc.property(start, fc.array(token, { maxLength: 6 }), (figures, tokens) => {
        runs += 1;
        if (survives(figures + tokens.join(''))) read += 1;
      }),
      { numRuns: 5000 },
    );
    // Should few of these texts be quantities, then the property above has tried nothing but errors.
    expect(read / runs).toBeGreaterThan(0.1);
  });
});
