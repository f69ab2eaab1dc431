import { describe, expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { parseQuantity, type QuantitySpec } from '../../../sim/quantity/index.ts';

const number: QuantitySpec = { dimension: 'number' };
const fraction: QuantitySpec = { dimension: 'number', min: 0, below: 1 };
const length: QuantitySpec = { dimension: 'length', positive: true };
const temperature: QuantitySpec = { dimension: 'temperature' };
const heat: QuantitySpec = { dimension: 'arealHeatCapacity', positive: true };
const angle: QuantitySpec = { dimension: 'angle', min: 0, max: Math.PI };
const side = 'Write one unit at the end, or one behind each number';
const forms = 'Write a spread as `± 0.03` or `+0.03 -0.05`';

const bad: [input: string | number, spec: QuantitySpec, what: string, mend: string][] = [
  // no number
  ['', number, 'a number is missing', 'Write e.g. `0.3`'],
  ['  ', length, 'a number is missing', 'Write e.g. `0.3 au`'],
  ['au', length, '`au` is not a number', 'Write e.g. `0.3 au`'],
  [
    '> 5',
    number,
    '`> 5` is a lower limit, which leaves open how large it may be',
    'Write a range with both ends, e.g. `0.3 to 0.5`',
  ],
  ['e5', number, '`e5` is not a number', 'Write e.g. `0.3`'],
  ['± 0.1', number, 'a number is missing', 'Write e.g. `0.3`'],
  ['0.3 ±', number, 'a number is missing', 'Write e.g. `0.3`'],
  [Number.NaN, number, '`NaN` is not a number', 'Write e.g. `0.3`'],
  [Number.POSITIVE_INFINITY, number, '`Infinity` is not a number', 'Write e.g. `0.3`'],
  // odd numbers
  ['1e999 au', length, '`1e999` is not a finite number', 'Write a smaller one'],
  ['1e300 au', length, '`1e300 au` is too large to compute with', 'Write a smaller number'],
  ['0,48 au', length, '`0,48 au` has a comma', 'Write a decimal point and no thousands separator'],
  [
    '1 000 km',
    length,
    '`1 000 km` has two numbers side by side',
    'Write one number with a decimal point, as in `1234.5`',
  ],
  ['4×10^7 J/m2/K', heat, '`4×10^7 J/m2/K` has a power of ten written out', 'Write it as in `4e7`'],
  ['4 x 10^7 J/m2/K', heat, '`4 x 10^7 J/m2/K` has a power of ten written out', 'Write it as in `4e7`'],
  ['0.62(3)', number, '`0.62(3)` has more than a number and a unit', forms],
  ['0.62 - 0.05', number, '`0.62 - 0.05` has more than a number and a unit', forms],
  ['0.62 -0.05 +0.03', number, '`0.62 -0.05 +0.03` has more than a number and a unit', forms],
  ['9'.repeat(201), number, 'the text is 201 characters long', 'Write a number and its unit'],
  // units
  ['0.48', length, '`0.48` has no unit', 'Write e.g. `0.48 au` or `0.48 km`'],
  [0.48, length, '`0.48` has no unit', 'Write e.g. `0.48 au` or `0.48 km`'],
  [4e7, heat, '`40000000` has no unit', 'Write e.g. `40000000 J/m2/K`'],
  ['0.48 aus', length, '`aus` is not a unit', 'Did you mean `au`'],
  ['20 C', temperature, '`C` is not a unit', 'Use `K` or `degC`'],
  ['0.62 furlong', number, '`furlong` is not a unit', 'Leave the unit out'],
  ['0.48 kg', length, '`0.48 kg` is a mass, not a length', 'Write e.g. `0.48 au`'],
  ['0.48 au', number, '`0.48 au` is a length, not a pure number', 'Write e.g. `0.48`'],
  ['30 %', length, '`30 %` is a pure number, not a length', 'Write e.g. `30 au`'],
  ['3 kg m2', length, '`3 kg m2` is a quantity in m2 kg, not a length', 'Write e.g. `3 au`'],
  ['3 rad', number, '`3 rad` is an angle, not a pure number', 'Write e.g. `3`'],
  ['3 ± 1 kg', length, '`3 kg` is a mass, not a length', 'Write e.g. `3 au`'],
  ['0.5 Lsun ± 2 %', { dimension: 'power' }, '`2 %` is a pure number, not a power', 'Write e.g. `2 Lsun`'],
  ['0.3 au ± 0.1', length, '`0.3 au ± 0.1` has a unit on some numbers only', side],
  ['5 % ± 1', number, '`5 % ± 1` has a unit on some numbers only', side],
  ['4 km +20 -10 m', length, '`4 km +20 -10 m` has a unit on some numbers only', side],
  ['1 au to 2', length, '`1 au to 2` has a unit on some numbers only', side],
  // spreads, ranges, limits
  ['0.62 ± 0', number, 'the spread in `0.62 ± 0` is not above zero', 'Write a positive spread, or leave it out'],
  ['0.62 ± -0.1', number, 'the spread in `0.62 ± -0.1` is not above zero', 'Write a positive spread, or leave it out'],
  [
    '0.62 +0 -0.1',
    number,
    'the spread in `0.62 +0 -0.1` is not above zero',
    'Write a positive spread, or leave it out',
  ],
  ['0.6 ± 0.1 ± 0.2', number, '`0.6 ± 0.1 ± 0.2` has more than one spread', 'Write e.g. `0.3 ± 0.1`'],
  ['0.5 to 0.1', number, '`0.5 to 0.1` does not rise', 'Write the smaller number first'],
  ['0.5 to 0.5', number, '`0.5 to 0.5` does not rise', 'Write the smaller number first'],
  ['1 to 2 to 3 au', length, '`1 to 2 to 3 au` has more than two ends', 'Write e.g. `0.3 to 0.5 au`'],
  ['0 to 5 log', number, '`0 to 5 log` does not start above zero', 'Start a log range above zero'],
  ['5 log', number, '`log` belongs to a range', 'Write e.g. `1e5 to 1e9 J/m2/K log`'],
  ...['lgo', 'Log', 'lg', 'ln', '(log)', 'log10', 'logarithmic', 'log-uniform'].map(
    (word): [string, QuantitySpec, string, string] => [
      `1 to 5 ${word}`,
      number,
      `\`${word}\` at the end of \`1 to 5 ${word}\` is no unit and not \`log\``,
      'Write e.g. `1e5 to 1e9 J/m2/K log`',
    ],
  ),
  [
    '> 0.1 (95%)',
    number,
    '`> 0.1 (95%)` is a lower limit, which leaves open how large it may be',
    'Write a range with both ends, e.g. `0.3 to 0.5`',
  ],
  [
    '≥ 1 au',
    length,
    '`≥ 1 au` is a lower limit, which leaves open how large it may be',
    'Write a range with both ends, e.g. `0.3 to 0.5 au`',
  ],
  ['< 0.12', number, '`< 0.12` does not say how sure it is', 'Write a limit as in `< 0.12 (95%)`'],
  ['< 0.12 (0.95)', number, '`< 0.12 (0.95)` does not say how sure it is', 'Write a limit as in `< 0.12 (95%)`'],
  ['< 0.12 (100%)', number, 'a confidence of 100% is impossible', 'Write one between 0% and 100%'],
  ['< -0.12 (95%)', number, 'the limit in `< -0.12 (95%)` is not above zero', 'Write a positive limit'],
  ['< 20 degC (95%)', temperature, 'a limit in degC has no natural zero', 'Write a range, or the limit in K'],
  ['isotropic', angle, '`isotropic` is for the direction of an axis', 'Write e.g. `0.3 deg`'],
  ['0.62 ± 0.03', { ...number, spread: false }, '`0.62 ± 0.03` is uncertain', 'Write a single value here'],
  // bounds
  ['1', fraction, '`1` is out of bounds', 'Keep it at least 0 and below 1'],
  ['-0.1', fraction, '`-0.1` is out of bounds', 'Keep it at least 0 and below 1'],
  ['0.5 to 1.2', fraction, '`1.2` is out of bounds', 'Keep it at least 0 and below 1'],
  ['120 %', fraction, '`120 %` is out of bounds', 'Keep it at least 0 % and below 100 %'],
  ['0 au', length, '`0 au` is out of bounds', 'Keep it above 0 au'],
  ['200 deg', angle, '`200 deg` is out of bounds', 'Keep it at least 0 deg and at most 180 deg'],
  ['100 to 200 deg', angle, '`200 deg` is out of bounds', 'Keep it at least 0 deg and at most 180 deg'],
  ['-300 degC', temperature, '`-300 degC` is below absolute zero', 'Write a temperature above 0 K'],
  ['-5 to 5 K', temperature, '`-5 K` is below absolute zero', 'Write a temperature above 0 K'],
  [
    '< 5 au (95%)',
    { ...length, min: 4e11 },
    'the median of < 5 au (95%) is out of bounds',
    'Keep it above 0 au and at least 2.67383 au',
  ],
];

describe('bad quantities', () => {
  test.each(bad)('%s', (input, spec, what, mend) => {
    let thrown: unknown;
    try {
      parseQuantity(input, spec);
    } catch (error) {
      thrown = error;
    }
    expect(thrown).toBeInstanceOf(SimError);
    expect(thrown).toMatchObject({ where: spec.dimension, what, mend });
  });

  test('every message is made of sentences without a full stop of their own', () => {
    for (const [, , what, mend] of bad) {
      expect(`${what}|${mend}`).not.toMatch(/\.(\||$)/);
      expect(mend[0]).toMatch(/[A-Z]/);
    }
  });
});
