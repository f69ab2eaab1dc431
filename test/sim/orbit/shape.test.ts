import fc from 'fast-check';
import { expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { shapeFromComponents, shapeFromRootComponents } from '../../../sim/orbit/shape.ts';

test('a 3-4-5 orbit', () => {
  const shape = shapeFromComponents(0.3, 0.4);
  expect(shape.eccentricity).toBeCloseTo(0.5, 15);
  expect(shape.argumentOfPeriapsis).toBeCloseTo(Math.atan2(4, 3), 15);
});

test('both pairs give back the orbit that they were made of', () => {
  const e = fc.double({ min: 1e-9, max: 0.9999, noNaN: true });
  const omega = fc.double({ min: 0, max: 6.28, noNaN: true });
  fc.assert(
    fc.property(e, omega, (eccentricity, argument) => {
      const [cos, sin] = [Math.cos(argument), Math.sin(argument)];
      for (const shape of [
        shapeFromComponents(eccentricity * cos, eccentricity * sin),
        shapeFromRootComponents(Math.sqrt(eccentricity) * cos, Math.sqrt(eccentricity) * sin),
      ]) {
        expect(Math.abs(shape.eccentricity / eccentricity - 1)).toBeLessThan(1e-15);
        expect(Math.abs(shape.argumentOfPeriapsis - argument)).toBeLessThan(2e-15);
      }
    }),
  );
});

test('the angle is in [0, 2π), and 0 for a circle', () => {
  expect(shapeFromComponents(0, 0)).toEqual({ eccentricity: 0, argumentOfPeriapsis: 0 });
  expect(shapeFromComponents(0.1, -1e-20).argumentOfPeriapsis).toBeLessThan(2 * Math.PI);
  expect(shapeFromRootComponents(0, -0.5).argumentOfPeriapsis).toBeCloseTo(1.5 * Math.PI, 15);
});

test('errors', () => {
  expect(() => shapeFromComponents(0.8, 0.7)).toThrow(SimError);
  expect(() => shapeFromRootComponents(0.8, 0.7)).toThrow(SimError);
  expect(() => shapeFromComponents(Number.NaN, 0)).toThrow(SimError);
});
