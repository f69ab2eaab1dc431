/** Measuring sticks outside this program: scipy, and the same algorithm by hand in C++. Null where the machine lacks them. */
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { toolPath } from '../support/require.ts';

const here = (name: string) => fileURLToPath(new URL(name, import.meta.url));

export interface SpinUp {
  readonly orbits: number;
  readonly settled: boolean;
  readonly milliseconds: number;
  /** Every twentieth of 1000 equal times. */
  readonly temperature: readonly number[];
}

export function scipySpinUp(eccentricity: number, kappa: number): SpinUp | null {
  const python = toolPath('scipy');
  if (python === null) return null;
  const printed = execFileSync(python, [here('spinup.py'), String(eccentricity), String(kappa)], {
    stdio: ['ignore', 'pipe', 'ignore'],
  });
  return JSON.parse(printed.toString());
}

/** One process for all cases, so that loading scipy is not counted. */
export function scipySpinUps(cases: readonly (readonly [eccentricity: number, kappa: number])[]): SpinUp[] | null {
  const python = toolPath('scipy');
  if (python === null) return null;
  const words = [here('spinup.py'), ...cases.flat().map(String)];
  const printed = execFileSync(python, words, { stdio: ['ignore', 'pipe', 'ignore'], maxBuffer: 1 << 26 });
  return printed
    .toString()
    .trim()
    .split('\n')
    .map((line) => JSON.parse(line));
}

/** CPU milliseconds and years of the zonal spin-up. */
export function scipyZonal(bands: number, rtol: number): { milliseconds: number; years: number } | null {
  const python = toolPath('scipy');
  if (python === null) return null;
  const words = [here('zonalSpinup.py'), String(bands), String(rtol)];
  return JSON.parse(execFileSync(python, words, { stdio: ['ignore', 'pipe', 'ignore'] }).toString());
}

/** Compiles quartic.cpp; returns a function that times one case in microseconds. */
export function compiledQuartic(): { time(eccentricity: number, kappa: number): number; remove(): void } | null {
  const compiled = compile('quartic.cpp');
  return compiled === null
    ? null
    : {
        time: (eccentricity, kappa) => JSON.parse(compiled.run([eccentricity, kappa])).microseconds,
        remove: compiled.remove,
      };
}

export interface CompiledDraws {
  /** CPU microseconds a draw, and maximum, minimum, mean and lag (orbits) of the first 100 draws, row by row. */
  run(
    draws: number,
    tolerance: number,
    firstMesh: number,
  ): { readonly microseconds: number; readonly findings: readonly number[] };
  remove(): void;
}

export function compiledDraws(): CompiledDraws | null {
  const compiled = compile('draws.cpp');
  return compiled === null ? null : { run: (...numbers) => JSON.parse(compiled.run(numbers)), remove: compiled.remove };
}

function compile(source: string): { run(numbers: readonly number[]): string; remove(): void } | null {
  if (spawnSync('g++', ['--version']).status !== 0) return null;
  const folder = mkdtempSync(join(tmpdir(), 'perilag-bench-'));
  const binary = join(folder, 'compiled');
  execFileSync('g++', ['-O3', '-march=native', '-ffast-math', '-std=c++17', here(source), '-o', binary]);
  return {
    run: (numbers) => execFileSync(binary, numbers.map(String)).toString(),
    remove: () => rmSync(folder, { recursive: true }),
  };
}
