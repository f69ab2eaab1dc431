/** The pattern that editors check: it passes what the reader reads, and stops a number without its unit. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { parseQuantity, quantityPattern, unitsInWords } from '../../../sim/quantity/index.ts';
import { unitTable } from '../../../sim/quantity/unitTable.ts';

const pattern = new RegExp(quantityPattern({ dimension: 'length' }));

test.each([
  '0.48 au',
  '5km',
  '.5 A.U.',
  '1e3 m',
  '2.5e−1 R⊕',
  '1 ± 0.1 au',
  '1 au +/- 0.1 au',
  '1 +0.2 -0.1 au',
  '1 au +0.2 au -0.1 au',
  '1 to 2 au',
  '1 km to 2 au log',
  '< 3 m (95%)',
])('reads and passes: %s', (text) => {
  expect(parseQuantity(text, { dimension: 'length' }).value).toBeGreaterThan(0);
  expect(text).toMatch(pattern);
});

test.each(['W/m2', 'W m-2', 'W m⁻²', 'J/(m2 s)', 'J/m2/s^1', 'S0'])('a unit in any spelling: %s', (unit) => {
  expect(parseQuantity(`3 ${unit}`, { dimension: 'flux' }).value).toBeGreaterThan(0);
  expect(`3 ${unit}`).toMatch(new RegExp(quantityPattern({ dimension: 'flux' })));
});

test('every unit of the table passes', () => {
  const names = unitTable.flatMap(({ symbol, aliases }) => [symbol, ...aliases]).filter((name) => name !== '1');
  expect(names.length).toBeGreaterThan(80);
  for (const name of names) expect(`3 ${name}`).toMatch(pattern);
});

test('a number alone never passes, however it is written', () => {
  const number = fc.double({ noNaN: true, noDefaultInfinity: true });
  fc.assert(
    fc.property(number, (value) => !pattern.test(String(value))),
    { seed: 1 },
  );
  for (const text of [
    '',
    'au',
    '5e3',
    '51',
    '1 ± 2',
    '1 to 2',
    '1 to 2 log',
    '< 3 (95%)',
    '1 +0.2 -0.1',
    'au 5',
    '1,5 au',
  ])
    expect(text).not.toMatch(pattern);
});

test('spreads and isotropic only where they are welcome', () => {
  expect('1 ± 0.1 au').not.toMatch(new RegExp(quantityPattern({ dimension: 'length', spread: false })));
  expect('isotropic').not.toMatch(pattern);
  expect('isotropic').toMatch(new RegExp(quantityPattern({ dimension: 'angle', isotropic: true })));
});

test('a long text is refused in no time', () => {
  const started = performance.now();
  expect(pattern.test(`${'1 - '.repeat(20_000)},`)).toBe(false);
  expect(performance.now() - started).toBeLessThan(5000);
});

test('units in words, the usual first', () => {
  expect(unitsInWords({ dimension: 'length' })).toMatch(/^au, km, m, /);
  expect(unitsInWords({ dimension: 'flux' })).toBe('W/m2, S0');
});
