import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { emptySheet } from '../../../../sim/findings/sheet.ts';
import { orbitClock } from '../../../../sim/models/lumped/clock.ts';
import { at, lumpedColumns } from '../../../../sim/models/lumped/columns.ts';
import { lumpedFindingsInto } from '../../../../sim/models/lumped/findings.ts';
import { lumpedModel } from '../../../../sim/models/lumped/index.ts';
import { plainSolver } from '../../../../sim/models/lumped/plain.ts';
import { smoothSolver } from '../../../../sim/models/lumped/smooth.ts';
import type { Trajectory } from '../../../../sim/models/lumped/trajectory.ts';
import { curveValuesInto } from '../../../../sim/solve/curve.ts';
import { finding, periodic, plusMinus, state, world } from './worlds.ts';

// `tolerance` is a promise: the relative error of temperature at every moment. The reference is the other algorithm
// (Radau collocation against the two-derivative Padé rule) at a tighter tolerance, compared between the nodes of both.
const eccentricities = [0, 0.02, 0.3, 0.7, 0.9, 0.95, 0.99, 0.999];
const heatCapacities = Array.from({ length: 10 }, (_, i) => 10 ** (i + 2));
const tolerances = [1e-4, 1e-6, 1e-9];
const positions = Float64Array.from({ length: 997 }, (_, i) => (2 * Math.PI * (i + 0.37)) / 997);
const plain = plainSolver();
const smooth = smoothSolver();

const temperatures = (trajectory: Trajectory): Float64Array => {
  const values = new Float64Array(positions.length);
  curveValuesInto(trajectory.curve, positions, values);
  return values;
};
const largest = (a: Float64Array, b: Float64Array) =>
  a.reduce((most, v, i) => Math.max(most, Math.abs(v / b[i] - 1)), 0);

describe.each(eccentricities)('e = %f', (e) => {
  test.each(heatCapacities.map((c) => [c.toExponential(0), c] as const))('C = %s J/m2/K', (_, heatCapacity) => {
    const of = world({ e, heatCapacity });
    const coefficient = of.surface.emission.quarticCoefficient!;
    const reference = smooth(of, 1e-10);
    expect(reference.converged).toBe(true);
    const exact = temperatures(reference);
    for (const tolerance of tolerances) {
      for (const found of [plain(of, coefficient, tolerance), smooth(of, tolerance)]) {
        const error = largest(temperatures(found), exact);
        expect(found.converged).toBe(true);
        expect(error).toBeLessThan(tolerance);
        // What is printed is an upper bound; the reference itself is good to 1e-10.
        expect(error).toBeLessThan(1.2 * found.errorEstimate + 1e-10);
        expect(found.errorEstimate).toBeLessThan(tolerance + 1e-12);
      }
    }
  });
});

// Short orbits round a bright star and long ones far out: κ from 1e-8 to 1e6.
test.each([
  { e: 0.6, axisAu: 0.05, periodDays: 4, heatCapacity: 1e11 },
  { e: 0.95, axisAu: 0.5, periodDays: 111, heatCapacity: 1e2 },
  { e: 0.97, axisAu: 100, periodDays: 365_250, heatCapacity: 1e7 },
  { e: 0.9999, axisAu: 30, periodDays: 60_000, heatCapacity: 1e8 },
])('far corners: $e, $axisAu au, $heatCapacity', (numbers) => {
  const of = world(numbers);
  const exact = temperatures(smooth(of, 1e-10));
  for (const tolerance of tolerances) {
    const found = plain(of, of.surface.emission.quarticCoefficient!, tolerance);
    expect(largest(temperatures(found), exact)).toBeLessThan(tolerance);
  }
});

// The findings of plain worlds are read off the nodes; the reference reads the curve of the other algorithm.
test.each(tolerances)('maximum, minimum and mean keep the tolerance %f', (tolerance) => {
  const batch = lumpedModel().batch!(
    { ...periodic, tolerance },
    [],
    ['temperatureMax', 'temperatureMin', 'temperatureMean'],
  );
  const row = new Float64Array(3);
  const sheet = emptySheet(lumpedColumns('periodic', []).length);
  const eccentricity = fc.oneof(
    { weight: 3, arbitrary: fc.double({ min: 0, max: 0.95, noNaN: true }) },
    { weight: 1, arbitrary: fc.double({ min: 0.95, max: 0.999, noNaN: true }) },
  );
  fc.assert(
    fc.property(
      eccentricity,
      fc.double({ min: -6, max: 4, noNaN: true }),
      fc.constantFrom(0, 0.1, 50),
      (e, log, heat) => {
        const of = world({ e, kappa: 10 ** log, internalHeat: heat });
        batch.into(of, row);
        lumpedFindingsInto(of, smooth(of, 1e-10), orbitClock(of), [], sheet);
        for (const [i, column] of [at.temperatureMax, at.temperatureMin, at.temperatureMean].entries()) {
          expect(Math.abs(row[i] / sheet.value[column] - 1)).toBeLessThan(tolerance);
        }
      },
    ),
    { numRuns: 100, seed: 20261201 },
  );
});

test('the fastest changes lie within their own ± of those of a finer solution', () => {
  const parameters = [
    fc.double({ min: 0.3, max: 0.97, noNaN: true }),
    fc.double({ min: -2, max: 1, noNaN: true }),
  ] as const;
  const tolerance = fc.double({ min: -6, max: -3, noNaN: true });
  fc.assert(
    fc.property(...parameters, tolerance, (e, logKappa, logTolerance) => {
      const of = world({ e, kappa: 10 ** logKappa });
      const found = state(of, { tolerance: 10 ** logTolerance });
      const exact = state(of, { tolerance: 1e-11 });
      for (const name of ['fastestWarming', 'fastestCooling']) {
        const error = Math.abs(finding(found, name) - finding(exact, name));
        expect(error).toBeLessThan(plusMinus(found, name) + plusMinus(exact, name));
      }
    }),
    {
      numRuns: 300,
      seed: 20261201,
      // Where the slope of the curve is read, which interpolation leaves farther off than the temperatures themselves.
      examples: [
        [0.8386086893081666, Math.log10(0.5635063807343345), Math.log10(3.122437918492176e-5)],
        [0.7843463444709777, Math.log10(0.5114146163886266), Math.log10(1.9565476787157337e-6)],
      ],
    },
  );
});
