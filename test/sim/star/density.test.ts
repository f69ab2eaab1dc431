import { expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { massFromDensity } from '../../../sim/star/density.ts';
import { relativeError } from '../relative.ts';

// NASA NSSDCA Earth fact sheet (from memory): 5513 kg/m³, mean radius 6371.0 km, 5.9722e24 kg. Half a unit of 5513 is 9e-5, of the radius 2e-5.
test('the Earth as a ball', () => {
  expect(relativeError(massFromDensity(5513, 6.371e6), 5.9722e24)).toBeLessThan(1.2e-4);
});

test('errors', () => {
  expect(() => massFromDensity(0, 1)).toThrow(SimError);
  expect(() => massFromDensity(1, Number.NaN)).toThrow(SimError);
});
