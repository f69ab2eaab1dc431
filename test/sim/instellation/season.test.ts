import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { radiansPerDegree } from '../../../sim/constants.ts';
import { SimError } from '../../../sim/error.ts';
import {
  declinationRate,
  orbitsBetween,
  seasonLengths,
  sinDeclination,
  solarLongitude,
  trueAnomalyAt,
} from '../../../sim/instellation/season.ts';
import { meanFromTrue } from '../../../sim/orbit/anomaly.ts';
import { marsCalendar, seasonLengthCases } from '../../published/seasons.ts';
import { integrate } from './integrate.ts';
import { angle, obliquity } from './support.ts';

describe('lengths of the seasons', () => {
  for (const { planet, eccentricity, solarLongitudeOfPeriapsisDeg, year, expected, within } of seasonLengthCases) {
    test(planet, () => {
      const lengths = seasonLengths(eccentricity, solarLongitudeOfPeriapsisDeg * radiansPerDegree);
      lengths.forEach((length, i) => {
        expect(Math.abs(length * year - expected[i]!)).toBeLessThan(within);
      });
    });
  }
});

test('calendar of Mars', () => {
  const { eccentricity, solarLongitudeOfPeriapsisDeg, yearSols, sols } = marsCalendar;
  const periapsis = solarLongitudeOfPeriapsisDeg * radiansPerDegree;
  sols.forEach((expected, i) => {
    const orbits = orbitsBetween(0, 30 * (i + 1) * radiansPerDegree, eccentricity, periapsis);
    expect(Math.abs(orbits * yearSols - expected)).toBeLessThanOrEqual(0.05); // half a unit of the last digit
  });
});

test('a circle has equal seasons; a whole turn is one orbit; backwards is below 0', () => {
  for (const length of seasonLengths(0, 1.3)) expect(length).toBeCloseTo(0.25, 15);
  expect(orbitsBetween(0.4, 0.4 + 2 * Math.PI, 0.7, 2)).toBeCloseTo(1, 14);
  expect(orbitsBetween(1, 0.2, 0.7, 2)).toBe(-orbitsBetween(0.2, 1, 0.7, 2));
});

test('the four seasons make an orbit, each longer than none', () => {
  fc.assert(
    fc.property(fc.double({ min: 0, max: 0.99, noNaN: true }), angle, (e, periapsis) => {
      const lengths = seasonLengths(e, periapsis);
      expect(Math.min(...lengths)).toBeGreaterThan(0);
      // a rounding of Ls is up to r²/(a²√(1−e²)) = 28 of them in mean anomaly
      expect(lengths.reduce((sum, length) => sum + length, 0)).toBeCloseTo(1, 13);
    }),
  );
});

test('Ls and true anomaly from one another: Ls at periapsis is where it is said to be', () => {
  expect(solarLongitude(0, 4.2)).toBe(4.2);
  expect(trueAnomalyAt(4.2, 4.2)).toBe(0);
  expect(trueAnomalyAt(solarLongitude(0.75, 0.5), 0.5)).toBe(0.75);
  expect(orbitsBetween(4.2, 5.2, 0.3, 4.2)).toBeCloseTo(meanFromTrue(1, 0.3) / (2 * Math.PI), 14);
});

test('declination: 0 at the equinoxes, the obliquity at the solstices, north in northern summer', () => {
  const tilt = 23.44 * radiansPerDegree;
  expect(sinDeclination(0, tilt)).toBe(0);
  expect(sinDeclination(Math.PI / 2, tilt)).toBe(Math.sin(tilt));
  expect(sinDeclination(-Math.PI / 2, tilt)).toBe(-Math.sin(tilt));
  expect(sinDeclination(0.1, tilt)).toBeGreaterThan(0);
});

test('retrograde: obliquity 180° − ε has the same declination at each Ls, and ε seen with north and south exchanged', () => {
  fc.assert(
    fc.property(angle, obliquity, (longitude, tilt) => {
      const sine = sinDeclination(longitude, tilt);
      // the sums with π round angles by up to 4e-16
      expect(sinDeclination(longitude, Math.PI - tilt)).toBeCloseTo(sine, 14);
      expect(sinDeclination(longitude + Math.PI, Math.PI - tilt)).toBeCloseTo(-sine, 14);
      expect(Math.abs(sine)).toBeLessThanOrEqual(1);
    }),
  );
});

test('declinationRate is the derivative', () => {
  // At obliquity 90° the rate is a step at the solstices; 1° from there asin still keeps 1e-14.
  const tilt = fc.double({ min: 0, max: 89 * radiansPerDegree, noNaN: true });
  fc.assert(
    fc.property(
      angle,
      fc.double({ min: 0, max: 0.5, noNaN: true }),
      tilt,
      fc.boolean(),
      (from, step, above, retrograde) => {
        const eps = retrograde ? Math.PI - above : above;
        const change = integrate((longitude) => declinationRate(longitude, eps), from, from + step, [
          -Math.PI / 2,
          Math.PI / 2,
        ]);
        const declinationAt = (longitude: number) => Math.asin(sinDeclination(longitude, eps));
        expect(Math.abs(declinationAt(from + step) - declinationAt(from) - change)).toBeLessThan(1e-12);
      },
    ),
  );
});

test('declinationRate never exceeds 1; at obliquity 90° it is 1 with the sign of cos λ', () => {
  fc.assert(
    fc.property(angle, obliquity, (longitude, tilt) => Math.abs(declinationRate(longitude, tilt)) <= 1 + 1e-15),
  );
  expect(declinationRate(1, Math.PI / 2)).toBeCloseTo(1, 15);
  expect(declinationRate(2, Math.PI / 2)).toBeCloseTo(-1, 15);
  expect(declinationRate(0.3, 0)).toBe(0);
});

test('errors', () => {
  expect(() => orbitsBetween(0, 1, 1, 0)).toThrow(SimError);
  expect(() => seasonLengths(-0.1, 0)).toThrow(SimError);
});
