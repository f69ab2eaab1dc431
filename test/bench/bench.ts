/**
 * Speed, as ratios measured side by side in one run:
 *
 *   npm run bench            everything (a few minutes: most of it is waiting for spin-up)
 *   npm run bench -- quick   without scipy's slowest cases
 *   npm run bench -- draws   many random draws alone
 *
 * Never a test: absolute times mean nothing on a shared machine.
 */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { lumpedModel } from '../../sim/models/lumped/index.ts';
import { plainSolver } from '../../sim/models/lumped/plain.ts';
import { smoothSolver } from '../../sim/models/lumped/smooth.ts';
import type { Trajectory } from '../../sim/models/lumped/trajectory.ts';
import { settleZonal, zonalGrid } from '../../sim/models/zonal/states.ts';
import { balancedFromMean } from '../../sim/orbit/balanced.ts';
import { curveValuesInto } from '../../sim/solve/curve.ts';
import { rampAlbedo } from '../../sim/surface/albedo/ramp.ts';
import { linearEmission } from '../../sim/surface/emission/linear.ts';
import { world } from '../sim/models/lumped/worlds.ts';
import { degrees, zonalWorld } from '../sim/models/zonal/worlds.ts';
import { toolPath } from '../support/require.ts';
import { manyDraws } from './draws.ts';
import { compiledQuartic, scipySpinUp, scipyZonal } from './outside.ts';
import { plainSpinUp } from './plainSpinUp.ts';
import { geometricMean, median, medianMicroseconds } from './timing.ts';

const eccentricities = [0.02, 0.3, 0.7, 0.95];
const kappas = [472, 47.2, 4.72, 0.472, 0.0472, 0.00472, 5e-5];
const tolerance = 1e-6;
const samples = 1000;
const quick = process.argv.includes('quick');
const plain = plainSolver();
const smooth = smoothSolver();
const positions = Float64Array.from({ length: samples }, (_, i) => (2 * Math.PI * i) / samples);
const temperatures = new Float64Array(samples);
const print = (line: string) => process.stdout.write(`${line}\n`);

if (process.argv.includes('draws')) manyDraws(print);
else everything();

function everything(): void {
  onePeriodicCase();
  costOverHeatCapacity();
  wholeModel();
  manyDraws(print);
  zonal();
  wholeProcess();
}

function sampled(trajectory: Trajectory): void {
  curveValuesInto(trajectory.curve, positions, temperatures);
}

/** Both paths through every kind of case, so that no case pays for the compiler. */
function warmUp(): void {
  for (let round = 0; round < 200; round++) {
    for (const e of eccentricities) {
      for (const kappa of kappas) {
        const of = world({ e, kappa });
        sampled(plain(of, of.surface.emission.quarticCoefficient!, tolerance));
        if (round < 40) sampled(smooth(of, tolerance));
      }
    }
  }
}

/** Largest relative difference from a solve at 1e-11, at equal times. */
function measuredError(of: ReturnType<typeof world>, e: number, found: Trajectory): number {
  const times = Float64Array.from({ length: samples }, (_, i) => balancedFromMean((2 * Math.PI * i) / samples, e));
  const exact = new Float64Array(samples);
  const values = new Float64Array(samples);
  curveValuesInto(smooth(of, 1e-11).curve, times, exact);
  curveValuesInto(found.curve, times, values);
  return values.reduce((largest, value, i) => Math.max(largest, Math.abs(value / exact[i] - 1)), 0);
}

function onePeriodicCase(): void {
  print(`One periodic case, ${samples} samples equal in the balanced anomaly, tolerance ${tolerance}`);
  print(
    '   e     kappa   error   ours µs  general µs | C++ µs  ours/C++ general/C++ | spin-up: orbits  plain/ours  scipy/ours',
  );
  const compiled = compiledQuartic();
  warmUp();
  const ratios = { cpp: [] as number[], general: [] as number[], scipy: [] as number[], plain: [] as number[] };
  for (const e of eccentricities) {
    for (const kappa of kappas) {
      const of = world({ e, kappa });
      const coefficient = of.surface.emission.quarticCoefficient!;
      const ours = medianMicroseconds(() => sampled(plain(of, coefficient, tolerance)), 300);
      const cpp = compiled?.time(e, kappa) ?? Number.NaN;
      const general = medianMicroseconds(() => sampled(smooth(of, tolerance)), 150);
      const error = measuredError(of, e, plain(of, coefficient, tolerance));
      const mostOrbits = kappa < 1e-3 ? 20 : 2000;
      let spun = { orbits: 0, settled: false };
      const slow = medianMicroseconds(
        () => {
          spun = plainSpinUp(e, kappa, 4000, mostOrbits);
        },
        1,
        1,
      );
      const scipy = quick && kappa < 0.01 ? null : scipySpinUp(e, kappa);
      if (compiled !== null) {
        ratios.cpp.push(ours / cpp);
        ratios.general.push(general / cpp);
      }
      const counted = scipy !== null && scipy.orbits >= 2;
      if (counted) ratios.scipy.push((scipy.milliseconds * 1e3) / ours);
      if (spun.settled) ratios.plain.push(slow / ours);
      const scipyText =
        scipy === null ? '-' : `${((scipy.milliseconds * 1e3) / ours).toFixed(0)}${scipy.settled ? '' : ' (gave up)'}`;
      print(
        [
          e.toFixed(2).padStart(5),
          kappa.toPrecision(3).padStart(9),
          error.toExponential(0).padStart(7),
          ours.toFixed(1).padStart(9),
          general.toFixed(1).padStart(11),
          '|',
          cpp.toFixed(1).padStart(6),
          (ours / cpp).toFixed(2).padStart(8),
          (general / cpp).toFixed(1).padStart(10),
          '|',
          `${scipy?.orbits ?? spun.orbits}`.padStart(14),
          `${(slow / ours).toFixed(0)}${spun.settled ? '' : ' (gave up)'}`.padStart(12),
          scipyText.padStart(12),
        ].join(' '),
      );
    }
  }
  compiled?.remove();
  report('ours / C++ by hand', ratios.cpp, 1);
  report('general path / C++ by hand', ratios.general, 1);
  report('scipy LSODA spin-up (2 orbits or more) / ours', ratios.scipy, -1);
  report('plain fixed-step spin-up / ours', ratios.plain, -1);
}

function report(name: string, ratios: readonly number[], worst: 1 | -1): void {
  if (ratios.length === 0) {
    print(`  ${name}: not measured on this machine`);
    return;
  }
  const extreme = worst === 1 ? Math.max(...ratios) : Math.min(...ratios);
  print(
    `  ${name}: geometric mean ${geometricMean(ratios).toPrecision(3)}, median ${median(ratios).toPrecision(3)}, ` +
      `${worst === 1 ? 'largest' : 'smallest'} ${extreme.toPrecision(3)} (${ratios.length} cases)`,
  );
}

function costOverHeatCapacity(): void {
  print('\nCost over eight decades of heat capacity, 1e4 … 1e11 J/m2/K at 1 au and 1 yr: dearest / cheapest');
  for (const e of [...eccentricities, 0.99, 0.999]) {
    const times = Array.from({ length: 8 }, (_, i) => 10 ** (4 + i)).map((heatCapacity) => {
      const of = world({ e, heatCapacity });
      const coefficient = of.surface.emission.quarticCoefficient!;
      return medianMicroseconds(() => sampled(plain(of, coefficient, tolerance)), 200);
    });
    const spread = Math.max(...times) / Math.min(...times);
    print(`  e = ${e}: ${times.map((time) => time.toFixed(1)).join(' ')} µs, ratio ${spread.toFixed(1)}`);
  }
}

function wholeModel(): void {
  const model = lumpedModel();
  const of = world({ e: 0.6, kappa: 0.5 });
  const options = { tolerance, start: 'periodic', samples: 720, spacing: 'balancedAnomaly' } as const;
  const all = medianMicroseconds(() => void model.solve(of, options, []), 50);
  const solveOnly = medianMicroseconds(
    () => sampled(plain(of, of.surface.emission.quarticCoefficient!, tolerance)),
    300,
  );
  print(
    `\nWhole model (findings, accounts, 720 rows of ten columns) / bare solve: ${(all / solveOnly).toFixed(0)}, ${all.toFixed(0)} µs`,
  );
}

function zonal(): void {
  print('\nZonal year, ice–albedo ramp, time error within 1e-3 K, meshes and stability included');
  for (const bands of [90, 360]) {
    const of = zonalWorld({
      q: 340,
      e: 0.3,
      heatCapacity: 2.1e8,
      emission: linearEmission({ a: 203.3, b: 2.09 }),
      albedo: rampAlbedo({ warm: 0.32, ice: 0.62, from: 258, to: 268 }),
      globe: { bands, obliquity: 23.4 * degrees, solarLongitudeOfPeriapsis: 250 * degrees, heatTransport: 0.65 },
    });
    const grid = () => zonalGrid(of, of.globe, bands);
    const start = Float64Array.from(grid().physics.bands.sine, (x) => 303 - 45 * x * x);
    const ours = medianMicroseconds(() => void settleZonal(grid(), start, 3.4e-6), 3);
    const scipy = scipyZonal(bands, 1e-6);
    const ratio = scipy === null ? '-' : ((scipy.milliseconds * 1e3) / ours).toFixed(0);
    print(
      `  ${bands} bands: ours ${(ours / 1e3).toFixed(1)} ms, scipy LSODA spin-up / ours: ${ratio} (${scipy?.years ?? '-'} years)`,
    );
  }
}

function wholeProcess(): void {
  const python = toolPath('scipy');
  const wall = (command: string, words: readonly string[]): number => {
    const began = performance.now();
    const { status } = spawnSync(command, words, { stdio: 'ignore' });
    if (status !== 0) throw new Error(`${command} ${words.join(' ')} ended with ${status}`);
    return performance.now() - began;
  };
  const run = () =>
    wall('node', ['dist/perilag.mjs', 'run', 'configs/three-inertias.yaml', '-o', 'out/bench', '--quiet']);
  const fields = () =>
    wall('node', [
      ...['dist/perilag.mjs', 'run', 'configs/tipped-over.yaml', '-o', 'out/bench-zonal', '--quiet'],
      ...['--only', 'upright', '--only', 'on its side'],
    ]);
  const load = () => (python === null ? Number.NaN : wall(python, ['-c', 'import scipy.integrate']));
  const node = () => wall('node', ['-e', '0']);
  for (const start of [run, load, node, fields]) start();
  const pairs = Array.from({ length: 21 }, () => ({ run: run(), load: load(), node: node(), fields: fields() }));
  print('\nWhole process, three cases, all files (wall time, 21 rounds in turn)');
  print(
    `  perilag run / python3 -c "import scipy.integrate": ${median(pairs.map((pair) => pair.run / pair.load)).toFixed(2)}`,
  );
  print(
    `  two zonal cases with fields.nc / the same import: ${median(pairs.map((pair) => pair.fields / pair.load)).toFixed(2)}`,
  );
  print(`  perilag run / node -e 0: ${median(pairs.map((pair) => pair.run / pair.node)).toFixed(2)}`);
  manyWorlds(wall);
}

/** Whole processes of many worlds, against one run of the same scenario. */
function manyWorlds(wall: (command: string, words: readonly string[]) => number): void {
  const perilag = (...words: string[]) => {
    const folder = mkdtempSync(join(tmpdir(), 'perilag-bench-'));
    const time = wall('node', ['dist/perilag.mjs', ...words, '--only', 'some store', '--quiet', '-o', folder]);
    rmSync(folder, { recursive: true });
    return time;
  };
  const file = 'configs/six-unknowns.yaml';
  const run = () => perilag('run', file);
  const spread = (...words: string[]) => perilag('spread', file, ...words);
  const grid = () => {
    const ranges = ['orbit.eccentricity=0 to 0.9', 'planet.heatStore.heatCapacity=1e4 to 1e9 J/m2/K log'];
    return perilag('grid', file, ...ranges.flatMap((range) => ['--along', range]));
  };
  const draws = (workers: number) => spread('--draws', '300000', '--no-indices', '--workers', String(workers));
  const rounds = Array.from({ length: 5 }, () => ({
    run: run(),
    spread: spread('--draws', '100000'),
    grid: grid(),
    one: draws(1),
    two: draws(2),
  }));
  print('\nMany worlds, whole processes with all files (wall time, 5 rounds in turn)');
  print(`  spread of 100,000 draws with indices / run: ${median(rounds.map((r) => r.spread / r.run)).toFixed(1)}`);
  print(`  grid of 40 × 40 / run: ${median(rounds.map((r) => r.grid / r.run)).toFixed(1)}`);
  print(`  300,000 draws, one worker / two: ${median(rounds.map((r) => r.one / r.two)).toFixed(2)}`);
}
