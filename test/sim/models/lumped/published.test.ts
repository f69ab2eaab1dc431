import { expect, test } from 'vitest';
import { lumpedPeriodic } from '../../../published/lumpedPeriodic.ts';
import { finding, state, world } from './worlds.ts';

const toDegrees = 360;

test.each(lumpedPeriodic)('periodic temperature at e = $e, K = $k', ({ e, k, mean, max, maxAtDeg, min, minAtDeg }) => {
  const of = world({ e, kappa: 1 / (4 * k) });
  const found = state(of, { tolerance: 1e-8 });
  const unit = finding(found, 'circularTemperature');
  const phase = (name: string) => (finding(found, name) / of.orbit.period) * toDegrees;
  const folded = (degrees: number) => degrees - 360 * Math.round(degrees / 360);
  expect(Math.abs(finding(found, 'temperatureMean') / unit - mean)).toBeLessThan(2e-6);
  expect(Math.abs(finding(found, 'temperatureMax') / unit - max)).toBeLessThan(2e-6);
  expect(Math.abs(finding(found, 'temperatureMin') / unit - min)).toBeLessThan(2e-6);
  expect(Math.abs(folded(phase('timeOfMax') - maxAtDeg))).toBeLessThan(0.01);
  expect(Math.abs(folded(phase('timeOfMin') - minAtDeg))).toBeLessThan(0.01);
  expect(finding(found, 'lagOfMaxOrbits')).toBeCloseTo(maxAtDeg / 360, 4);
});

// Linear response of a lumped store to F = F₀(1 + f cos ωt), f = 2e at small e: swing 2T₀ (f/4)/√(1+K²), lag atan K behind the flux.
// Textbook result (e.g. North, Cahalan & Coakley 1981, Rev. Geophys. 19, 91); next order in e is left out: 0.2 % of amplitude
// and a tenth of a degree at e = 0.001.
test.each([0.1, 0.5, 1, 2, 10])('small eccentricity gives the linear response, K = %f', (k) => {
  const e = 1e-3;
  const of = world({ e, kappa: 1 / (4 * k) });
  const found = state(of, { tolerance: 1e-10 });
  const amplitude = (finding(found, 'temperatureMax') - finding(found, 'temperatureMin')) / 2;
  expect(amplitude / finding(found, 'circularTemperature') / (e / 2 / Math.hypot(1, k))).toBeCloseTo(1, 2);
  const lagDeg = (finding(found, 'lagOfFirstHarmonic') / of.orbit.period) * toDegrees;
  expect(lagDeg).toBeCloseTo((Math.atan(k) * 180) / Math.PI, 1);
  expect(finding(found, 'damping')).toBeCloseTo(1 / Math.hypot(1, k), 2);
});

// Second order in e (own derivation): ⟨T⟩/T₀ = 1 + e²/8 − (3/16) e²/(1+K²); the next term is O(e⁴), relative 2 % of e² at e = 0.05.
test.each([0.1, Math.SQRT1_2, 3])('mean temperature to second order, K = %f', (k) => {
  const e = 0.05;
  const found = state(world({ e, kappa: 1 / (4 * k) }), { tolerance: 1e-9 });
  const excess = finding(found, 'temperatureMean') / finding(found, 'circularTemperature') - 1;
  const expected = e * e * (1 / 8 - 3 / (16 * (1 + k * k)));
  expect(Math.abs(excess - expected)).toBeLessThan(0.02 * e * e);
});
