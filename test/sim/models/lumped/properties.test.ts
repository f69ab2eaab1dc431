import fc from 'fast-check';
import { expect, test } from 'vitest';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import { column, finding, largestDifference, plusMinus, state, world } from './worlds.ts';

const eccentricity = fc.double({ min: 0.001, max: 0.99, noNaN: true });
const logKappa = fc.double({ min: -5, max: 5, noNaN: true });
const runs = { numRuns: 150, seed: 20261201 };

test('Jensen order of the means: steady ≤ periodic ≤ flux mean, and within the steady extremes', () => {
  fc.assert(
    fc.property(eccentricity, logKappa, (e, log) => {
      const found = state(world({ e, kappa: 10 ** log }));
      const of = (name: string) => finding(found, name);
      const slack = 1 + 2e-6; // twice the tolerance
      expect(of('temperatureMean')).toBeLessThanOrEqual(of('fluxMeanTemperature') * slack);
      expect(of('steadyTemperatureMean')).toBeLessThanOrEqual(of('temperatureMean') * slack);
      expect(of('temperatureMax')).toBeLessThanOrEqual(of('steadyTemperatureMax') * slack);
      expect(of('temperatureMin') * slack).toBeGreaterThanOrEqual(of('steadyTemperatureMin'));
    }),
    runs,
  );
});

test('a larger heat store damps more and lags more', () => {
  fc.assert(
    fc.property(eccentricity, logKappa, fc.double({ min: 0.2, max: 3, noNaN: true }), (e, log, more) => {
      const shallow = state(world({ e, kappa: 10 ** log }), { tolerance: 1e-9 });
      const deep = state(world({ e, kappa: 10 ** (log - more) }), { tolerance: 1e-9 });
      // Within what each says of its own error: the lag of a nearly constant temperature is known less well.
      const slack = (name: string) => plusMinus(shallow, name) + plusMinus(deep, name);
      expect(finding(deep, 'damping')).toBeLessThan(finding(shallow, 'damping') + slack('damping'));
      const lag = 'lagOfMaxOrbits';
      expect(finding(deep, lag)).toBeGreaterThan(finding(shallow, lag) - slack(lag));
      expect(slack(lag)).toBeLessThan(0.03);
    }),
    runs,
  );
});

test('only e and κ matter: twice the temperature scale at the same κ', () => {
  fc.assert(
    fc.property(eccentricity, logKappa, (e, log) => {
      const cool = state(world({ e, kappa: 10 ** log, axisAu: 1 }), { tolerance: 1e-8 });
      const hot = state(world({ e, kappa: 10 ** log, axisAu: 1 / 4 }), { tolerance: 1e-8 });
      const ratio = column(hot, 'temperature').map((value, i) => value / column(cool, 'temperature')[i]);
      // Equal meshes, rounding only: T ∝ a^−½.
      for (const value of ratio) expect(Math.abs(value / 2 - 1)).toBeLessThan(1e-10);
    }),
    { ...runs, numRuns: 40 },
  );
});

test('the mean of T⁴ follows from the orbit alone', () => {
  fc.assert(
    fc.property(eccentricity, logKappa, (e, log) => {
      const of = world({ e, kappa: 10 ** log });
      const found = state(of, { tolerance: 1e-9 });
      const expected = of.surface.emission.at(finding(found, 'fluxMeanTemperature'));
      // Invariant of the periodic balance: ⟨εσT⁴⟩ = absorbed ⟨S⟩; four times the tolerance in T.
      expect(Math.abs(found.energyBalance.emitted / expected - 1)).toBeLessThan(4e-9);
    }),
    runs,
  );
});

// With linear emission and constant albedo the balance is linear: ⟨T⟩ is the steady value of the orbit-mean flux for every store.
test('linear emission: the mean temperature does not depend on the heat store', () => {
  const emission = linearEmission({ a: 203.3, b: 2.09 });
  fc.assert(
    fc.property(fc.double({ min: 0, max: 0.9, noNaN: true }), fc.double({ min: 3, max: 11, noNaN: true }), (e, log) => {
      const found = state(world({ e, heatCapacity: 10 ** log, emission }), { tolerance: 1e-9 });
      expect(finding(found, 'temperatureMean') / finding(found, 'fluxMeanTemperature')).toBeCloseTo(1, 8);
    }),
    runs,
  );
});

test('samples are the same whatever their number', () => {
  const of = world({ e: 0.62, kappa: 0.5 });
  const few = state(of, { samples: 90 });
  const many = state(of, { samples: 720 });
  for (let i = 0; i < 90; i++) {
    expect(column(few, 'temperature')[i]).toBeCloseTo(column(many, 'temperature')[8 * i], 10);
  }
  expect(largestDifference(many, state(of, { samples: 720 }))).toBe(0);
});
