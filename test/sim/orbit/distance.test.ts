import fc from 'fast-check';
import { expect, test } from 'vitest';
import { gravitationalConstant, metresPerAu, radiansPerDegree, solarMass } from '../../../sim/constants.ts';
import { SimError } from '../../../sim/error.ts';
import { trueFromEccentric } from '../../../sim/orbit/anomaly.ts';
import { distanceFromEccentric, orbitalSpeed, starDistance } from '../../../sim/orbit/distance.ts';
import { relativeError } from '../relative.ts';
import { eccentricity, halfTurn } from './arbitrary.ts';

// Meeus (1998) Astronomical Algorithms 2nd ed., example 25.a, Sun on 1992 Oct 13.0 TD: prints R = 0.99766 au (from memory).
test('starDistance: Meeus example 25.a', () => {
  const distance = starDistance(1.000001018 * metresPerAu, 0.016711668, 277.09665 * radiansPerDegree);
  expect(distance / metresPerAu).toBeCloseTo(0.99766, 5); // half of the last printed digit
});

/**
 * Speeds at perihelion and aphelion, km/s. Earth and Mars: NASA NSSDCA Mars fact sheet (seen), to 0.01 km/s, hence 0.005;
 * `computed` from the axis and eccentricity that the same sheet lists, as Mercury (calculated, 6 decimals, hence 1e-6).
 */
const speeds = [
  { body: 'Earth', axis: 149.598e9, e: 0.0167, published: [30.29, 29.29], computed: [30.286307, 29.29136] },
  { body: 'Mars', axis: 227.956e9, e: 0.0935, published: [26.5, 21.97], computed: [26.500605, 21.968723] },
] as const;

for (const { body, axis, e, published, computed } of speeds) {
  test(`orbitalSpeed: ${body} at perihelion and aphelion`, () => {
    [0, Math.PI].forEach((anomaly, which) => {
      const speed = orbitalSpeed(axis, starDistance(axis, e, anomaly), solarMass) / 1000;
      expect(Math.abs(speed - published[which]!)).toBeLessThanOrEqual(0.005);
      expect(Math.abs(speed - computed[which]!)).toBeLessThan(1e-6);
    });
  });
}

// Circular speed of a massless body at 1 au: 29 784.69183 m/s, calculated from the nominal constants; 10 digits.
test('orbitalSpeed: circle at 1 au', () => {
  expect(relativeError(orbitalSpeed(metresPerAu, metresPerAu, solarMass), 29784.69183)).toBeLessThan(1e-9);
});

test('no point of an orbit is nearer than periapsis or farther than apoapsis', () => {
  fc.assert(
    fc.property(eccentricity, fc.double({ min: -9, max: 9, noNaN: true }), (e, nu) => {
      const distance = starDistance(1, e, nu);
      return distance >= starDistance(1, e, 0) && distance <= starDistance(1, e, Math.PI);
    }),
  );
  expect(starDistance(1, 0.75, 0)).toBe(0.25);
  expect(starDistance(1, 0.75, Math.PI)).toBe(1.75);
});

test('the distance is the same from either anomaly', () => {
  fc.assert(
    fc.property(halfTurn, eccentricity, (eccentric, e) => {
      const nu = trueFromEccentric(eccentric, e);
      // ν places the planet to an ulp of ν, times d ln r/dν = e sin ν/(1 + e cos ν) ≤ e/√(1−e²).
      const tolerance = 2e-15 + (1e-15 * nu * e) / Math.sqrt(1 - e * e);
      expect(relativeError(starDistance(1, e, nu), distanceFromEccentric(1, e, eccentric))).toBeLessThan(tolerance);
    }),
  );
});

test('speed and distance keep the energy and, at the apsides, the angular momentum', () => {
  const gm = gravitationalConstant * solarMass;
  fc.assert(
    fc.property(halfTurn, eccentricity, (eccentric, e) => {
      const distance = distanceFromEccentric(metresPerAu, e, eccentric);
      const energy = orbitalSpeed(metresPerAu, distance, solarMass) ** 2 / 2 - gm / distance;
      expect(Math.abs(energy + gm / (2 * metresPerAu))).toBeLessThan((2e-15 * gm) / distance);
      const momentumAt = (r: number) => r * orbitalSpeed(1, r, solarMass);
      expect(relativeError(momentumAt(1 - e), momentumAt(1 + e))).toBeLessThan(1e-12 / (1 - e) / 1e3 + 1e-15);
    }),
  );
});

test('errors', () => {
  expect(() => starDistance(1, 1, 0)).toThrow(SimError);
  expect(() => distanceFromEccentric(1, -0.1, 0)).toThrow(SimError);
});
