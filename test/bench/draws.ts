/**
 * Many random plain worlds straight to findings, one thread: e in [0, 0.8), log₁₀ C in [4, 9), A in [0, 0.6), one year, 1361 W/m2 at
 * distance a, tolerance 1e-6. Beside them the same in scalar C++ and, from 40 draws, scipy's spin-up.
 */
import { metresPerAu } from '../../sim/constants.ts';
import { lumpedModel } from '../../sim/models/lumped/index.ts';
import type { Batch } from '../../sim/models/model.ts';
import { constantAlbedo } from '../../sim/surface/albedo/constant.ts';
import { greyBody } from '../../sim/surface/emission/greyBody.ts';
import type { Window, World } from '../../sim/world.ts';
import { compiledDraws, scipySpinUps } from './outside.ts';
import { median } from './timing.ts';

const draws = 100_000;
const tolerance = 1e-6;
/** Worlds are made a thousand at a time, outside the clock, as a spread makes them before it solves them. */
const chunk = 1000;
const rounds = 5;
const scipyDraws = 40;
const four = ['temperatureMax', 'temperatureMin', 'temperatureMean', 'lagOfMaxOrbits'];
const windows: Window[] = [
  { name: 'liquid', of: 'temperature', from: 273.15, to: 373.15 },
  { name: 'temperate', of: 'instellation', from: 400, to: 1500 },
];
const options = { tolerance, start: 'periodic', samples: 720, spacing: 'balancedAnomaly' } as const;

export function manyDraws(print: (line: string) => void): void {
  const model = lumpedModel();
  const batches = [
    ['four findings', model.batch!(options, [], four)],
    ['all findings', model.batch!(options, [])],
    ['all, and two windows', model.batch!(options, windows)],
  ] as const;
  const spent = batches.map(() => [] as number[]);
  const cpp: { 8: number[]; 16: number[] } = { 8: [], 16: [] };
  const compiled = compiledDraws();
  let theirs: readonly number[] = [];
  // In turns, so that a busy machine is busy for all of them; the first round warms up.
  for (let round = 0; round <= rounds; round++) {
    for (const [i, [, batch]] of batches.entries()) {
      const microseconds = timeOf(batch);
      if (round > 0) spent[i].push(microseconds);
    }
    for (const mesh of [8, 16] as const) {
      const found = compiled?.run(draws, tolerance, mesh);
      if (found === undefined) continue;
      cpp[mesh].push(found.microseconds);
      theirs = found.findings;
    }
  }
  compiled?.remove();
  const [fourTime, ...others] = spent.map(median);
  print(`\n${draws} random draws, tolerance ${tolerance}, one thread, CPU time a draw`);
  print(
    `  ${batches[0][0]}: ${fourTime.toFixed(2)} µs; largest difference from C++ ${largestDifference(batches[0][1], theirs)}`,
  );
  for (const [i, time] of others.entries()) {
    print(`  ${batches[i + 1][0]}: ${time.toFixed(2)} µs, / four findings: ${(time / fourTime).toFixed(2)}`);
  }
  for (const mesh of [16, 8] as const) {
    if (cpp[mesh].length === 0) continue;
    const time = median(cpp[mesh]);
    print(
      `  scalar C++, first mesh ${mesh}: ${time.toFixed(2)} µs; ours, four findings / C++: ${(fourTime / time).toFixed(2)}`,
    );
  }
  print(scipyLine(fourTime));
}

/** Microseconds of CPU a draw. */
function timeOf(batch: Batch): number {
  const row = new Float64Array(batch.columns.length);
  const random = numbers(1);
  let spent = 0;
  for (let done = 0; done < draws; done += chunk) {
    const worlds = Array.from({ length: chunk }, () => drawn(random));
    const began = process.cpuUsage();
    for (let i = 0; i < chunk; i++) batch.into(worlds[i], row);
    const { user, system } = process.cpuUsage(began);
    spent += user + system;
  }
  return spent / draws;
}

/** Over the first 100 draws: relative, and for the lag in orbits. */
function largestDifference(batch: Batch, theirs: readonly number[]): string {
  if (theirs.length === 0) return 'not measured on this machine';
  const row = new Float64Array(four.length);
  const random = numbers(1);
  let largest = 0;
  for (let i = 0; i < 100; i++) {
    batch.into(drawn(random), row);
    for (let k = 0; k < 4; k++) {
      const other = theirs[4 * i + k];
      largest = Math.max(largest, Math.abs(row[k] - other) / (k < 3 ? other : 1));
    }
  }
  return largest.toExponential(1);
}

function scipyLine(fourTime: number): string {
  const random = numbers(1);
  const cases = Array.from({ length: scipyDraws }, () => {
    const { orbit, surface } = drawn(random);
    const absorbed =
      (surface.absorbingFraction * (1 - surface.albedo.warm) * 1361) / surface.emission.quarticCoefficient!;
    const kappa =
      (surface.emission.quarticCoefficient! * absorbed ** 0.75 * orbit.period) / (2 * Math.PI * surface.heatCapacity);
    return [orbit.eccentricity, kappa] as const;
  });
  const found = scipySpinUps(cases);
  if (found === null) return '  scipy: not measured on this machine';
  const mean = found.reduce((sum, { milliseconds }) => sum + milliseconds, 0) / found.length;
  const unsettled = found.filter(({ settled }) => !settled).length;
  return (
    `  scipy LSODA spin-up / ours, four findings, extrapolated from ${scipyDraws} draws: ${((mean * 1e3) / fourTime).toFixed(0)} ` +
    `(${mean.toFixed(1)} ms a draw, ${unsettled} given up)`
  );
}

function drawn(random: () => number): World {
  const eccentricity = 0.8 * random();
  const heatCapacity = 10 ** (4 + 5 * random());
  return {
    star: { luminosity: 1361 * 4 * Math.PI * metresPerAu ** 2, temperature: null, radius: null, mass: null },
    orbit: {
      semiMajorAxis: metresPerAu,
      eccentricity,
      period: 365 * 86_400,
      argumentOfPeriapsis: null,
      inclination: null,
      periapsisTime: null,
    },
    surface: {
      albedo: constantAlbedo(0.6 * random()),
      emission: greyBody(1),
      absorbingFraction: 0.25,
      internalHeat: 0,
      heatCapacity,
    },
  };
}

/** The generator of draws.cpp, number for number (mulberry32). */
function numbers(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}
