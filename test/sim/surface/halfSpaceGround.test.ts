/**
 * How far ground as one lumped store is from ground that conducts, for the rock of the tour: the numbers that README.md warns
 * with. The half-space is solved here by plain finite differences, implicit in time, with σT⁴ leaving its surface.
 */
import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { metresPerAu, secondsPerDay, solarLuminosity, stefanBoltzmann } from '../../../sim/constants.ts';

const thermalInertia = 2200;
const period = 184.13 * secondsPerDay;
const eccentricity = 0.6;
const steps = 2400; // an orbit
const orbits = 12;
const layers = 120;

test('README: peaks of the half-space under the sky of the tour', () => {
  const { highest, lowest, timeOfHighest } = halfSpaceExtremes();
  const readme = readFileSync(new URL('../../../README.md', import.meta.url), 'utf8').replace(/\s+/g, ' ');
  const said = /reach (\d+) K and fall to (\d+) K.*?come ([\d.]+) d after periapsis/.exec(readme)!.slice(1).map(Number);
  // Rounded to 1 K and 0.1 d as README has them; halving steps and layers moves them by less than 0.3 K.
  expect(Math.abs(highest - said[0]!)).toBeLessThan(1);
  expect(Math.abs(lowest - said[1]!)).toBeLessThan(1);
  expect(Math.abs(timeOfHighest / secondsPerDay - said[2]!)).toBeLessThan(0.1);
});

function halfSpaceExtremes(): { highest: number; lowest: number; timeOfHighest: number } {
  const depth = depths();
  let state = new Float64Array(layers).fill(278);
  const surface = new Float64Array(steps);
  for (let step = 0; step < orbits * steps; step++) {
    const phase = (step + 1) % steps;
    state = advanced(state, depth, absorbed((2 * Math.PI * phase) / steps));
    surface[phase] = state[0]!;
  }
  const highest = Math.max(...surface);
  return { highest, lowest: Math.min(...surface), timeOfHighest: (surface.indexOf(highest) * period) / steps };
}

/** Depth in units of √diffusivity, s^½: a geometric mesh, down to eight times the depth that a yearly wave reaches. */
function depths(): Float64Array {
  const bottom = 8 * Math.sqrt(period / Math.PI);
  const growth = 1.06;
  const first = (bottom * (growth - 1)) / (growth ** (layers - 1) - 1);
  return Float64Array.from({ length: layers }, (_, layer) => (first * (growth ** layer - 1)) / (growth - 1));
}

function absorbed(meanAnomaly: number): number {
  let anomaly = meanAnomaly;
  for (let sweep = 0; sweep < 40; sweep++) {
    anomaly -= (anomaly - eccentricity * Math.sin(anomaly) - meanAnomaly) / (1 - eccentricity * Math.cos(anomaly));
  }
  const distance = 0.6 * metresPerAu * (1 - eccentricity * Math.cos(anomaly));
  return (0.7 * 0.52 * solarLuminosity) / (16 * Math.PI * distance * distance);
}

/** One implicit step; the surface's emission by Newton, the chain of layers by elimination. */
function advanced(old: Float64Array, depth: Float64Array, flux: number): Float64Array<ArrayBuffer> {
  const inertia = thermalInertia / (period / steps);
  const next = Float64Array.from(old);
  for (let round = 0; round < 4; round++) {
    const above = new Float64Array(layers);
    const right = new Float64Array(layers);
    const surface = next[0]!;
    for (let layer = 0; layer < layers; layer++) {
      const up = layer === 0 ? 0 : 1 / (depth[layer]! - depth[layer - 1]!);
      const down = layer === layers - 1 ? 0 : 1 / (depth[layer + 1]! - depth[layer]!);
      const thickness = ((up && 1 / up) + (down && 1 / down)) / 2;
      const emission = layer === 0 ? 4 * stefanBoltzmann * surface ** 3 : 0;
      const source = layer === 0 ? flux + 3 * stefanBoltzmann * surface ** 4 : 0;
      const pivot =
        inertia * thickness + thermalInertia * (up + down) + emission - thermalInertia * up * (above[layer - 1] ?? 0);
      above[layer] = (thermalInertia * down) / pivot;
      right[layer] =
        (inertia * thickness * old[layer]! + source + thermalInertia * up * (right[layer - 1] ?? 0)) / pivot;
    }
    for (let layer = layers - 1; layer >= 0; layer--)
      next[layer] = right[layer]! + above[layer]! * (next[layer + 1] ?? 0);
  }
  return next;
}
