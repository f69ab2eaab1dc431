import { expect, test } from 'vitest';
import { orbitOutline } from '../../../viewer/figures/orbitOutline.ts';
import { plainRun } from '../fixture.ts';

const eccentricity = 0.62;
const { dataset } = plainRun().cases[0]!.states[0]!;
const { path, dots } = orbitOutline(dataset, 24);

test('the path is the ellipse with the star in its focus', () => {
  for (const { x, y } of path) {
    const fromCentre = { x: x + eccentricity, y: y / Math.sqrt(1 - eccentricity ** 2) };
    expect(Math.hypot(fromCentre.x, fromCentre.y)).toBeCloseTo(1, 9); // rounding only
  }
});

test('dots sweep equal areas in equal times (Kepler’s second law), from periapsis on', () => {
  expect(dots[0]!.x).toBeCloseTo(1 - eccentricity, 9);
  const eccentricAnomalies = dots.map(({ x, y }) => {
    const E = Math.atan2(y / Math.sqrt(1 - eccentricity ** 2), x + eccentricity);
    return E < -1e-9 ? E + 2 * Math.PI : E;
  });
  eccentricAnomalies.forEach((E, dot) => {
    // 240 rows joined by straight lines: M is right to about (2π/240)²/8 ≈ 1e-4; 5e-4 leaves room for e.
    expect(Math.abs(E - eccentricity * Math.sin(E) - (2 * Math.PI * dot) / 24)).toBeLessThan(5e-4);
  });
});
