import { describe, expect, test } from 'vitest';
import { zeroCelsius } from '../../../../sim/constants.ts';
import { annualMeanLegendre } from '../../../../sim/instellation/annualMean.ts';
import { legendre } from '../../../../sim/instellation/legendre.ts';
import { constantAlbedo } from '../../../../sim/surface/albedo/constant.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import { degrees, firstRow, settled, zonalWorld } from './worlds.ts';

// North (1975) J. Atmos. Sci. 32, 1301: with constant co-albedo a each Legendre mode is T_n = Q a S_n/(B + n(n+1)D). Numbers of one
// set (A 210, B 2, D 0.6, Q 340, a 0.7, obliquity 23.44°) evaluated to ten digits elsewhere: calculated.
describe('annual mean with constant albedo: analytic modes', () => {
  const modes = [14.0, -20.2577964629, -0.7610915924];

  test('the modes themselves', () => {
    const s = annualMeanLegendre(23.44 * degrees, 4);
    for (const [k, n] of [0, 2, 4].entries()) {
      const mode = (340 * 0.7 * s[n]) / (2 + n * (n + 1) * 0.6) - (n === 0 ? 210 / 2 : 0);
      expect(mode).toBeCloseTo(modes[k], 9);
    }
  });

  const exact = (x: number) => zeroCelsius + modes[0] + modes[1] * legendre(2, x) + modes[2] * legendre(4, x);
  const error = (bands: number): number => {
    const s = annualMeanLegendre(23.44 * degrees, 4);
    const insolation = { legendre: s };
    const found = firstRow(settled(zonalWorld({ globe: { bands, insolation } }), 300, 1e-9));
    // Compared with the exact mean over each band (three-point Gauss: exact for degree 5).
    const gauss = [-Math.sqrt(0.6), 0, Math.sqrt(0.6)];
    const weights = [5 / 18, 8 / 18, 5 / 18];
    return found.reduce((largest, value, i) => {
      const middle = -1 + (2 * i + 1) / bands;
      const mean = gauss.reduce((sum, g, k) => sum + weights[k] * exact(middle + g / bands), 0);
      return Math.max(largest, Math.abs(value - mean));
    }, 0);
  };

  test('second order in the bands', () => {
    const errors = [45, 90, 180].map(error);
    for (let i = 0; i < 2; i++) expect(Math.abs(Math.log2(errors[i] / errors[i + 1]) - 2)).toBeLessThan(0.1);
    expect(errors[2]).toBeLessThan(2e-3); // K, at 180 bands
  });
});

test('no transport: every band stands in its own balance', () => {
  const world = zonalWorld({ globe: { heatTransport: 0, insolation: 'annualMean' } });
  const state = settled(world);
  const row = firstRow(state);
  const insolation = state.system.mesh.insolation.subarray(0, 90);
  for (let i = 0; i < 90; i++) {
    expect(row[i] - zeroCelsius).toBeCloseTo((0.7 * insolation[i] - 210) / 2, 8);
  }
});

test('endless transport: the globe has one temperature, that of the global mean', () => {
  const row = firstRow(settled(zonalWorld({ globe: { heatTransport: 1e7, insolation: 'annualMean' } })));
  for (const value of row) expect(value - zeroCelsius).toBeCloseTo((0.7 * 340 - 210) / 2, 4);
});

// North & Coakley (1979) J. Atmos. Sci. 36, 1189 (from memory): the P₁ mode of a uniform globe answers the season with amplitude
// Q a 2 sin ε/√((B + 2D)² + (ωC)²), lag atan(ωC/(B + 2D)). Circular orbit; the daily mean's projection on P₁ is exactly
// −2 sin ε cos(season), so agreement is limited by the bands: 1e-3 at 180 of them.
test.each([
  ['ocean', 4.65, 3.00984, 88.09],
  ['land', 0.16, 46.1726, 32.27],
])('seasonal P₁ amplitude and lag: %s', (_, years, amplitude, lagDays) => {
  const year = 365.2422 * 86_400; // C/B in years and lags in days of the same year, as the values were made
  const b = 2.09;
  const world = zonalWorld({
    q: 340.25,
    periodDays: 365.2422,
    heatCapacity: b * years * year,
    albedo: constantAlbedo(0.32),
    emission: {
      ...zonalWorld().surface.emission,
      at: (t) => 203.3 + b * (t - zeroCelsius),
      slopeAt: () => b,
      inverse: (f) => zeroCelsius + (f - 203.3) / b,
    },
    globe: { bands: 180, heatTransport: 0.649 },
  });
  const state = settled(world, 300, 1e-7);
  const { history, system } = state;
  const steps = system.mesh.steps;
  // First harmonic in time of the projection on x.
  let cosine = 0;
  let sine = 0;
  for (let step = 0; step < steps; step++) {
    const row = history.value.subarray(step * 180, (step + 1) * 180);
    const projection = row.reduce((sum, value, i) => sum + value * system.physics.bands.sine[i], 0) * (3 / 180);
    const phase = (2 * Math.PI * step) / steps; // circular: equal steps of time from Ls = 0
    cosine += (2 / steps) * projection * Math.cos(phase);
    sine += (2 / steps) * projection * Math.sin(phase);
  }
  expect(Math.hypot(cosine, sine) / amplitude).toBeCloseTo(1, 3);
  // Insolation on P₁ goes as sin Ls: the lag is the phase of the response behind it.
  const lag = (Math.atan2(-cosine, sine) / (2 * Math.PI)) * 365.2422;
  expect(Math.abs(lag - lagDays)).toBeLessThan(0.05);
});

// Budyko's form, Q = 343, A = 202, B = 1.9, s = 1 − 0.241(3x² − 1), albedos 0.32 and 0.62 with ice below −10 °C: a published university
// problem set gives ≈ 45 °C at the equator and ≈ −71 °C at the pole without transport, read off its graph; calculated 46.027 and
// −70.781. Its transport, towards the mean of the globe, is not diffusion: what it does beyond this is no check of ours.
test('Budyko’s set without transport: equator and pole', () => {
  const world = zonalWorld({
    q: 343,
    emission: linearEmission({ a: 202, b: 1.9 }),
    albedo: rampAlbedo({ warm: 0.32, ice: 0.62, from: 263.1, to: 263.2 }),
    globe: { bands: 360, heatTransport: 0, insolation: { legendre: [1, 0, -0.482] } },
  });
  const celsius = firstRow(settled(world, 300)).map((kelvin) => kelvin - 273.15);
  // Half of the last digit, and what the mean over the band adds: 0.723 x² Q (1 − A)/B.
  const [atEquator, atPole] = [(1 / 180) ** 2 / 3, 1 - (1 - (179 / 180) ** 3) / (3 * (1 / 180))];
  expect(Math.abs(celsius[180]! - (46.027 - (0.723 * atEquator * 343 * 0.68) / 1.9))).toBeLessThan(6e-4);
  expect(Math.abs(celsius[359]! - (-70.781 + (0.723 * atPole * 343 * 0.38) / 1.9))).toBeLessThan(6e-4);
});
