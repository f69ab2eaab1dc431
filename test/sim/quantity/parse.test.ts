import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  type Distribution,
  dimensions,
  formatQuantity,
  normalQuantile,
  parseQuantity,
  type Quantity,
  type QuantitySpec,
} from '../../../sim/quantity/index.ts';
import { unitTable } from '../../../sim/quantity/unitTable.ts';

const number: QuantitySpec = { dimension: 'number' };
const length: QuantitySpec = { dimension: 'length' };
const temperature: QuantitySpec = { dimension: 'temperature' };
const heat: QuantitySpec = { dimension: 'arealHeatCapacity' };
const angle: QuantitySpec = { dimension: 'angle', min: 0, max: Math.PI, isotropic: true };
const au = 149597870700;

describe('numbers and units', () => {
  test.each([
    ['0.48 au', length, 0.48 * au, 'au'],
    ['0.48au', length, 0.48 * au, 'au'],
    [' 0.48  au ', length, 0.48 * au, 'au'],
    ['1e4 km', length, 1e7, 'km'],
    ['1.5E+3 m', length, 1500, 'm'],
    ['+.5 m', length, 0.5, 'm'],
    ['5. m', length, 5, 'm'],
    ['-3', number, -3, '1'],
    ['−3', number, -3, '1'],
    ['1/4', number, 0.25, '1'],
    ['-2/3', number, -2 / 3, '1'],
    ['¼', number, 0.25, '1'],
    ['⅔', number, 2 / 3, '1'],
    ['0.5 A.U.', length, 0.5 * au, 'au'],
    ['2 rearth', length, 2 * 6.3781e6, 'Rearth'],
    ['30 %', number, 0.3, '%'],
    ['30%', number, 0.3, '%'],
    ['-10 degC', temperature, 263.15, 'degC'],
    ['20 °C', temperature, 293.15, 'degC'],
    ['89.2°', angle, (89.2 * Math.PI) / 180, 'deg'],
    ['2.1 R⊕', length, 2.1 * 6.3781e6, 'Rearth'],
    ['1004 J kg⁻¹ K⁻¹', { dimension: 'specificHeat' }, 1004, 'J/kg/K'],
    ['1.3 S0', { dimension: 'flux' }, 1.3 * 1361, 'S0'],
    ['26 h', { dimension: 'time' }, 93600, 'h'],
    ['11 m/s2', { dimension: 'acceleration' }, 11, 'm/s2'],
    ['12 km/s', { dimension: 'speed' }, 12000, 'km/s'],
    ['5 bar', { dimension: 'pressure' }, 5e5, 'bar'],
    ['4 Mearth', { dimension: 'mass' }, 4 * 5.972167867791379e24, 'Mearth'],
    ['2 W/m/K', { dimension: 'conductivity' }, 2, 'W/m/K'],
    ['2.09 W/m2/K', { dimension: 'heatTransferCoefficient' }, 2.09, 'W/m2/K'],
    ['2200 tiu', { dimension: 'thermalInertia' }, 2200, 'tiu'],
    ['5.51 g/cm3', { dimension: 'density' }, 5510, 'g/cm3'],
    ['0.52 Lsun', { dimension: 'power' }, 0.52 * 3.828e26, 'Lsun'],
  ] as [string, QuantitySpec, number, string][])('%s', (text, spec, si, unit) => {
    const quantity = parseQuantity(text, spec);
    expect(quantity).toMatchObject({ text: text.trim(), unit, distribution: { form: 'exact' } });
    expect(Math.abs(quantity.value - si)).toBeLessThanOrEqual(4e-16 * Math.abs(si)); // two roundings
  });

  test('a plain number where the key takes one', () => {
    expect(parseQuantity(0.62, number)).toEqual({
      text: '0.62',
      unit: '1',
      value: 0.62,
      distribution: { form: 'exact' },
    });
    expect(parseQuantity(1e21, number).value).toBe(1e21);
  });
});

describe('uncertain forms', () => {
  const normal = (sigma: number): Distribution => ({ form: 'normal', sigma });
  const uniform = (low: number, high: number): Distribution => ({ form: 'uniform', low, high });
  const forms: [text: string, spec: QuantitySpec, value: number, distribution: Distribution][] = [
    ['0.62 ± 0.03', number, 0.62, normal(0.03)],
    ['0.62±0.03', number, 0.62, normal(0.03)],
    ['0.62 +/- 0.03', number, 0.62, normal(0.03)],
    ['0.62+/-0.03', number, 0.62, normal(0.03)],
    ['5 ± 1 %', number, 0.05, normal(0.01)],
    ['4 ± 1 km', length, 4000, normal(1000)],
    ['4 km ± 20 m', length, 4000, normal(20)],
    ['10 degC ± 2 degC', temperature, 283.15, normal(2)],
    ['10 ± 2 degC', temperature, 283.15, normal(2)],
    ['10 degC ± 2 K', temperature, 283.15, normal(2)],
    ['283 K ± 2 °C', temperature, 283, normal(2)],
    ['4 W m-2 ± 1 W m-2', { dimension: 'flux' }, 4, normal(1)],
    ['0.62 +0.03 -0.05', number, 0.62, { form: 'splitNormal', up: 0.03, down: 0.05 }],
    ['0.62 +0.03 −0.05', number, 0.62, { form: 'splitNormal', up: 0.03, down: 0.05 }],
    ['0.62+0.03-0.05', number, 0.62, { form: 'splitNormal', up: 0.03, down: 0.05 }],
    ['-2 +1e-1 -2e-1', number, -2, { form: 'splitNormal', up: 0.1, down: 0.2 }],
    ['4 +2 -1 km', length, 4000, { form: 'splitNormal', up: 2000, down: 1000 }],
    ['4 km +20 m -10 m', length, 4000, { form: 'splitNormal', up: 20, down: 10 }],
    ['4 W m-2 +2 W m-2 -1 W m-2', { dimension: 'flux' }, 4, { form: 'splitNormal', up: 2, down: 1 }],
    ['0.1 to 0.5', number, 0.3, uniform(0.1, 0.5)],
    ['-1 to 3', number, 1, uniform(-1, 3)],
    ['1 to 3 km', length, 2000, uniform(1000, 3000)],
    ['500 m to 1.5 km', length, 1000, uniform(500, 1500)],
    ['0 to 100 degC', temperature, 323.15, uniform(273.15, 373.15)],
    ['1e5 to 1e9 J/m2/K log', heat, 1e7, { form: 'logUniform', low: 1e5, high: 1e9 }],
    ['1e5 J/m2/K to 1e9 J/m2/K log', heat, 1e7, { form: 'logUniform', low: 1e5, high: 1e9 }],
    ['1 to 100 log', number, 10, { form: 'logUniform', low: 1, high: 100 }],
    // z(0.75) / z(0.975) from tables of the normal distribution: 0.67449 / 1.95996
    [
      '< 0.12 (95%)',
      number,
      (0.12 * 0.6744897501960817) / 1.959963984540054,
      { form: 'upperLimit', limit: 0.12, confidence: 0.95 },
    ],
    [
      '<0.12(95 %)',
      number,
      (0.12 * 0.6744897501960817) / 1.959963984540054,
      { form: 'upperLimit', limit: 0.12, confidence: 0.95 },
    ],
    ['< 2 km (50%)', length, 2000, { form: 'upperLimit', limit: 2000, confidence: 0.5 }],
    ['isotropic', angle, Math.PI / 2, { form: 'isotropic' }],
  ];
  test.each(forms)('%s', (text, spec, value, distribution) => {
    const quantity = parseQuantity(text, spec);
    expect(quantity.distribution).toEqual(expectClose(distribution));
    expect(quantity.value).toBeCloseTo(value, 12 - Math.ceil(Math.log10(Math.abs(value) + 1)));
    expect(quantity.text).toBe(text);
  });

  test('the unit of a mixed form is that of the value', () => {
    expect(parseQuantity('4 km ± 20 m', length).unit).toBe('km');
    expect(parseQuantity('4 ± 1 km', length).unit).toBe('km');
    expect(parseQuantity('isotropic', angle).unit).toBe('deg');
  });

  test("a limit's median leaves half of the half-normal below it", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-3, max: 1e3, noNaN: true }),
        fc.integer({ min: 1, max: 999 }),
        (limit, permille) => {
          const { value } = parseQuantity(`< ${limit} (${permille / 10}%)`, number);
          const sigma = limit / normalQuantile((1 + permille / 1000) / 2);
          expect(value / sigma).toBeCloseTo(0.6744897501960817, 10);
        },
      ),
      { seed: 1 },
    );
  });

  test("a range's centre lies inside it, and splits a log range into equal factors", () => {
    const end = fc.double({ min: 1e-300, max: 1e300, noNaN: true });
    fc.assert(
      fc.property(end, end, fc.boolean(), (a, b, log) => {
        fc.pre(a !== b);
        const { value, distribution } = parseQuantity(
          `${Math.min(a, b)} to ${Math.max(a, b)}${log ? ' log' : ''}`,
          number,
        );
        if (distribution.form !== 'uniform' && distribution.form !== 'logUniform') throw new Error(distribution.form);
        expect(value).toBeGreaterThanOrEqual(distribution.low * (1 - 1e-15));
        expect(value).toBeLessThanOrEqual(distribution.high * (1 + 1e-15));
        if (log) expect(value / distribution.low / (distribution.high / value)).toBeCloseTo(1, 10);
      }),
      { seed: 1 },
    );
  });
});

describe('round trips', () => {
  const compound = ['W/m2', 'J/m2/K', 'J/kg/K', 'W/m/K', 'W/m2/K', 'kg/m3', 'g/cm3', 'm/s2', 'J/m2/K/s^0.5', 'km/s'];
  const unit = fc.constantFrom(
    ...unitTable.map(({ symbol }) => symbol).filter((symbol) => !/J$|arcmin/.test(symbol)),
    ...compound,
  );
  const size = fc.double({ min: 1e-9, max: 1e9, noNaN: true });

  test('what is printed in a unit reads back as the same number', () => {
    fc.assert(
      fc.property(unit, size, (symbol, value) => {
        const first = parseAs(`${value} ${symbol === '1' ? '' : symbol}`);
        const again = parseAs(formatQuantity(first.value, first.unit, 17));
        // factor, divisor and offset each round once on either way
        expect(Math.abs(again.value - first.value)).toBeLessThanOrEqual(
          8 * Number.EPSILON * Math.max(first.value, first.unit === 'degC' ? 273.15 : 0),
        );
        expect(again.unit).toBe(first.unit);
      }),
      { seed: 1, numRuns: 500 },
    );
  });

  test('six digits print the number that was typed', () => {
    fc.assert(
      fc.property(
        unit,
        fc.integer({ min: 1, max: 999_999 }),
        fc.integer({ min: -3, max: 5 }),
        (symbol, digits, power) => {
          fc.pre(symbol !== 'degC' || power >= -2); // the offset eats what lies beyond the sixteenth digit of 273.15
          const typed = Number(`${digits}e${power - 3}`);
          const { value } = parseAs(`${typed} ${symbol === '1' ? '' : symbol}`);
          expect(Number.parseFloat(formatQuantity(value, symbol))).toBe(typed);
        },
      ),
      { seed: 1, numRuns: 500 },
    );
  });

  test('random text gives a finite quantity or a SimError, nothing else', () => {
    const scraps = fc.constantFrom(
      '0.5',
      '1e9',
      '-',
      '+',
      '±',
      ' to ',
      'log',
      '<',
      '(95%)',
      ' ',
      'au',
      'W/m2',
      '%',
      '/',
      '^',
      'm',
      'degC',
      '1e999',
      '.',
      'e',
    );
    const text = fc.oneof(
      fc.string({ maxLength: 30 }),
      fc.array(scraps, { maxLength: 8 }).map((parts) => parts.join('')),
    );
    const names = Object.keys(dimensions) as (keyof typeof dimensions)[];
    fc.assert(
      fc.property(text, fc.constantFrom(...names), (input, dimension) => {
        try {
          const { value, distribution } = parseQuantity(input, { dimension });
          const numbers = Object.values(distribution).filter((entry) => typeof entry === 'number');
          return [value, ...numbers].every(Number.isFinite);
        } catch (error) {
          return (
            error instanceof Error &&
            error.name === 'SimError' &&
            !/NaN|undefined|null/.test(error.message.replace(input, ''))
          );
        }
      }),
      { seed: 1, numRuns: 5000 },
    );
  });
});

/** Reads text whose dimension is found by trying them all: exactly one must take it. */
function parseAs(text: string): Quantity {
  const readings = (Object.keys(dimensions) as (keyof typeof dimensions)[]).flatMap((dimension) => {
    try {
      return [parseQuantity(text, { dimension })];
    } catch {
      return [];
    }
  });
  if (readings.length !== 1) throw new Error(`${readings.length} dimensions read ${text}`);
  return readings[0]!;
}

function expectClose(distribution: Distribution): object {
  const close = (entry: string | number) => (typeof entry === 'number' ? expect.closeTo(entry, 9) : entry);
  return Object.fromEntries(Object.entries(distribution).map(([key, entry]) => [key, close(entry)]));
}
