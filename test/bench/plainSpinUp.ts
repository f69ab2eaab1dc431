/**
 * The always-available comparison: the trapezoidal rule in equal steps of time, Kepler's equation at every step, orbit after
 * orbit until the start repeats to 1e-8. Correct and plain; nobody's best.
 */
import { eccentricFromMean } from '../../sim/orbit/anomaly.ts';

export function plainSpinUp(eccentricity: number, kappa: number, stepsPerOrbit: number, mostOrbits: number) {
  const h = (2 * Math.PI) / stepsPerOrbit;
  const arrival = (i: number) => {
    const big = eccentricFromMean(h * i, eccentricity);
    return 1 / (1 - eccentricity * Math.cos(big)) ** 2;
  };
  const values = new Float64Array(stepsPerOrbit);
  let y = (1 - eccentricity ** 2) ** -0.125;
  let orbits = 0;
  let settled = false;
  while (!settled && orbits < mostOrbits) {
    orbits++;
    const start = y;
    for (let i = 0; i < stepsPerOrbit; i++) {
      values[i] = y;
      y = trapezoid(y, kappa, h, arrival(i), arrival(i + 1));
    }
    settled = Math.abs(y - start) < 1e-8 * start;
  }
  return { orbits, settled, values };
}

/** One implicit step of y′ = κ(p − y⁴) by Newton. */
function trapezoid(y: number, kappa: number, h: number, p0: number, p1: number): number {
  const known = y + 0.5 * h * kappa * (p0 - y ** 4 + p1);
  let next = Math.sqrt(Math.sqrt(p1)); // the steady value: a safe start where steps are stiff
  for (let i = 0; i < 50; i++) {
    const change = (next + 0.5 * h * kappa * next ** 4 - known) / (1 + 2 * h * kappa * next ** 3);
    next -= change;
    if (Math.abs(change) < 1e-13 * next) break;
  }
  return next;
}
