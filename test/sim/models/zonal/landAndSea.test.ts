import { expect, test } from 'vitest';
import { stefanBoltzmann } from '../../../../sim/constants.ts';
import { equalAreaBands } from '../../../../sim/models/zonal/bands.ts';
import { zonalModel } from '../../../../sim/models/zonal/index.ts';
import { yearMesh } from '../../../../sim/models/zonal/mesh.ts';
import { zonalPhysics } from '../../../../sim/models/zonal/physics.ts';
import { zonalSystem } from '../../../../sim/models/zonal/system.ts';
import { banded } from '../../../../sim/solve/banded.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { greyBody } from '../../../../sim/surface/emission/greyBody.ts';
import type { Land, SolveOptions } from '../../../../sim/world.ts';
import { finding } from '../lumped/worlds.ts';
import { zonalWorld } from './worlds.ts';

const model = zonalModel();
const options: SolveOptions = { tolerance: 1e-7, start: 'periodic', samples: 90, spacing: 'balancedAnomaly' };
const solve = (world: ReturnType<typeof zonalWorld>) => model.solve(world, options, []).states;

function land(share: number, heatCapacity: number, exchange: number): Land {
  return { fraction: { sineLatitude: [-1, 1], value: [share, share] }, heatCapacity, exchange };
}

const temperature = (state: ReturnType<typeof solve>[number], name = 'bandTemperature') =>
  state.dataset.variables[name].data;

function largestDifference(a: Float64Array, b: Float64Array): number {
  return a.reduce((most, value, i) => Math.max(most, Math.abs(value - b[i])), 0);
}

test('the Jacobian is the derivative of the rate', () => {
  const albedo = rampAlbedo({ warm: 0.3, ice: 0.6, from: 255, to: 270 });
  const hemispheres: Land = {
    fraction: { sineLatitude: [-0.5, 0.5], value: [0, 0.8] },
    heatCapacity: 1e7,
    exchange: 3,
  };
  const globe = { bands: 18, land: hemispheres, frozenHeatCapacity: 5e7 };
  const world = zonalWorld({ e: 0.2, albedo, emission: greyBody(1), globe });
  const bands = equalAreaBands(18);
  const system = zonalSystem(zonalPhysics(world, world.globe, bands), yearMesh(world, world.globe, bands, 8));
  const { size, width } = system;
  const y = Float64Array.from({ length: size }, (_, i) => 262 + 9 * Math.sin(i / 3) + (i % 2));
  const matrix = banded(size, width);
  system.jacobianInto(3, y, matrix);
  const h = 1e-4;
  const [low, high] = [new Float64Array(size), new Float64Array(size)];
  for (let j = 0; j < size; j++) {
    const nudged = (by: number) => y.map((value, i) => (i === j ? value + by : value));
    system.rateInto(3, 0, nudged(-h), low);
    system.rateInto(3, 0, nudged(h), high);
    for (let i = 0; i < size; i++) {
      const expected = (high[i] - low[i]) / (2 * h);
      const found = Math.abs(j - i) <= width ? matrix.diagonals[width + j - i][i] : 0;
      // Central differences of rates of 1e-6 K/s: 1e-6 of the largest entry.
      expect(Math.abs(found - expected)).toBeLessThan(1e-6 * 1e-5);
    }
  }
});

test('land of the same store, without exchange, is one more sea', () => {
  const alone = solve(zonalWorld({ e: 0.2, heatCapacity: 5e7 }))[0];
  const both = solve(zonalWorld({ e: 0.2, heatCapacity: 5e7, globe: { land: land(0.4, 5e7, 0) } }))[0];
  expect(largestDifference(temperature(alone), temperature(both))).toBeLessThan(1e-4);
  expect(
    largestDifference(temperature(both, 'bandSeaTemperature'), temperature(both, 'bandLandTemperature')),
  ).toBeLessThan(1e-6);
});

test('endless exchange is one surface with the mean store', () => {
  const mean = solve(zonalWorld({ e: 0.2, heatCapacity: 0.6 * 2e8 + 0.4 * 1e7 }))[0];
  const both = solve(zonalWorld({ e: 0.2, heatCapacity: 2e8, globe: { land: land(0.4, 1e7, 1e5) } }))[0];
  // What exchange leaves between them is of order Q/ν = 3e-3 K.
  expect(largestDifference(temperature(mean), temperature(both))).toBeLessThan(5e-3);
});

test('land is warmer in summer and colder in winter than the sea beside it', () => {
  const [found] = solve(zonalWorld({ heatCapacity: 2e8, globe: { land: land(0.4, 1e7, 2) } }));
  const range = (name: string, band: number) => {
    const { data, shape } = found.dataset.variables[name];
    const values = Array.from({ length: shape[0] }, (_, row) => data[row * shape[1] + band]);
    return Math.max(...values) - Math.min(...values);
  };
  expect(range('bandLandTemperature', 80)).toBeGreaterThan(3 * range('bandSeaTemperature', 80));
  expect(found.energyBalance.relativeDifference).toBeLessThan(1e-6);
});

test('a hemisphere of land swings more than one of sea', () => {
  const fraction = { sineLatitude: [-0.01, 0.01], value: [0, 1] };
  const globe = { heatTransport: 0.3, land: { fraction, heatCapacity: 1e7, exchange: 2 } };
  const [found] = solve(zonalWorld({ heatCapacity: 2e8, globe }));
  expect(finding(found, 'seasonalRangeLatitude')).toBeGreaterThan(0);
  expect(finding(found, 'lagAt45North')).toBeLessThan(finding(found, 'lagAt45South'));
});

test('a frozen sea that stores less swings more', () => {
  const albedo = rampAlbedo({ warm: 0.6, ice: 0.6, from: 265, to: 275 }); // no feedback: only the store changes
  const range = (frozenHeatCapacity: number | null) =>
    finding(
      solve(zonalWorld({ e: 0.1, heatCapacity: 2e8, albedo, globe: { frozenHeatCapacity } }))[0],
      'seasonalRangeMax',
    );
  expect(range(2e7)).toBeGreaterThan(2 * range(null));
});

test('the account closes for a sea whose store changes with its ice', () => {
  const albedo = rampAlbedo({ warm: 0.3, ice: 0.6, from: 262, to: 272 });
  for (const share of [0, 0.3]) {
    const globe = { bands: 45, frozenHeatCapacity: 2e7, land: share === 0 ? null : land(share, 1e7, 2) };
    const world = zonalWorld({ q: 340, e: 0.1, heatCapacity: 2e8, albedo, emission: greyBody(0.62), globe });
    for (const state of model.solve(world, { ...options, tolerance: 1e-6 }, []).states) {
      // dE/E = 4 dT/T, and the kinks of the ramp cost the quadrature as much again.
      expect(state.energyBalance.relativeDifference).toBeLessThan(1e-5);
    }
  }
});

test('what fills no part of a band has no climate of its own, also without exchange', () => {
  // A hemisphere each, no band with both: the exchange between them says nothing.
  const world = (exchange: number) => {
    const halves: Land = { fraction: { sineLatitude: [-0.01, 0.01], value: [0, 1] }, heatCapacity: 4e7, exchange };
    const albedo = rampAlbedo({ warm: 0.3, ice: 0.62, from: 258, to: 273 });
    return zonalWorld({ q: 390, heatCapacity: 1.2e8, albedo, globe: { bands: 18, heatTransport: 3, land: halves } });
  };
  const [apart, together] = [0, 100].map((exchange) => solve(world(exchange)));
  expect(apart.length).toBe(together.length);
  for (const [i, state] of apart.entries()) {
    // followers lag by C/(ν/leastLand) s, some 1e5 s at 1 W/m2/K, and their ice edge reaches half a band over the coast
    expect(largestDifference(temperature(state), temperature(together[i]))).toBeLessThan(0.05);
    expect(Math.log(state.multiplier!)).toBeCloseTo(Math.log(together[i].multiplier!), 2);
  }
});

// A quarter of every band is land that follows the light at once, three quarters are sea that feels its mean; nothing passes
// between latitudes. So each surface's time above a temperature is Kepler's: land is above it while r/a < √(its flux over that of
// the threshold at distance a), for the share (E − e sin E)/π of the year with cos E = (1 − r/a)/e; sea always or never.
test('area and time in a window count land and sea by their own areas: closed form', () => {
  const [e, q, bands, threshold, share] = [0.3, 340, 18, 275, 0.25];
  const globe = { bands, obliquity: 0, heatTransport: 0, land: land(share, 1e3, 0) };
  const world = zonalWorld({ q, e, heatCapacity: 1e11, emission: greyBody(1), globe });
  const windows = [{ name: 'mild', of: 'temperature', from: threshold, to: 1e4 } as const];
  const [only] = model.solve(world, { ...options, tolerance: 1e-6 }, windows).states;
  const integral = (x: number) => (x * Math.sqrt(1 - x * x) + Math.asin(x)) / 2; // of cos(latitude) by x = sin(latitude)
  const emitted = stefanBoltzmann * threshold ** 4;
  let habitable = 0;
  let always = 0;
  for (let i = 0; i < bands; i++) {
    const cosine = (bands / 2) * (integral(-1 + (2 * i + 2) / bands) - integral(-1 + (2 * i) / bands));
    const atAxis = 0.7 * (4 / Math.PI) * q * cosine;
    const eccentric = Math.acos(Math.min(1, Math.max(-1, (1 - Math.sqrt(atAxis / emitted)) / e)));
    const landTime = (eccentric - e * Math.sin(eccentric)) / Math.PI;
    const seaTime = atAxis / Math.sqrt(1 - e * e) > emitted ? 1 : 0;
    habitable += (share * landTime + (1 - share) * seaTime) / bands;
    always += (share * (landTime === 1 ? 1 : 0) + (1 - share) * seaTime) / bands;
  }
  // Land lags by its time constant, 1e3 J/m2/K over some 4 W/m2/K: 1e-5 of the year.
  expect(Math.abs(finding(only, 'habitableFraction.mild') - habitable)).toBeLessThan(2e-5);
  expect(finding(only, 'alwaysFraction.mild')).toBeCloseTo(always, 9);
  expect(habitable - always).toBeGreaterThan(0.01); // some land is in it for a part of the year
});
