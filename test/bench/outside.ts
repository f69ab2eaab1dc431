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

/** CPU milliseconds and years of the zonal spin-up. */
export function scipyZonal(bands: number, rtol: number): { milliseconds: number; years: number } | null {
  const python = toolPath('scipy');
  if (python === null) return null;
  const words = [here('zonalSpinup.py'), String(bands), String(rtol)];
  return JSON.parse(execFileSync(python, words, { stdio: ['ignore', 'pipe', 'ignore'] }).toString());
}

/** Compiles quartic.cpp; returns a function that times one case in microseconds. */
export function compiledQuartic(): { time(eccentricity: number, kappa: number): number; remove(): void } | null {
  if (spawnSync('g++', ['--version']).status !== 0) return null;
  const folder = mkdtempSync(join(tmpdir(), 'perilag-bench-'));
  const binary = join(folder, 'quartic');
  execFileSync('g++', ['-O3', '-march=native', '-ffast-math', '-std=c++17', here('quartic.cpp'), '-o', binary]);
  return {
    time(eccentricity, kappa) {
      const printed = execFileSync(binary, [String(eccentricity), String(kappa)]);
      return JSON.parse(printed.toString()).microseconds;
    },
    remove: () => rmSync(folder, { recursive: true }),
  };
}
