/** Worlds for tests, given by the numbers that the physics depends on. */
import { metresPerAu, solarLuminosity, stefanBoltzmann } from '../../../../sim/constants.ts';
import { lumpedModel } from '../../../../sim/models/lumped/index.ts';
import type { Solution, State } from '../../../../sim/models/model.ts';
import { constantAlbedo } from '../../../../sim/surface/albedo/constant.ts';
import { greyBody } from '../../../../sim/surface/emission/greyBody.ts';
import type { Albedo, Emission, SolveOptions, Window, World } from '../../../../sim/world.ts';

export interface WorldNumbers {
  readonly e: number;
  readonly axisAu?: number;
  readonly periodDays?: number;
  readonly heatCapacity?: number;
  /** κ = c T₀³ P/(2πC) instead of a heat capacity; for quartic emission without internal heat. */
  readonly kappa?: number;
  readonly albedo?: Albedo;
  readonly emission?: Emission;
  readonly internalHeat?: number;
}

const days = 86_400;

export function world(numbers: WorldNumbers): World {
  const { e, axisAu = 1, periodDays = 365.25, albedo = constantAlbedo(0.3), emission = greyBody(1) } = numbers;
  const semiMajorAxis = axisAu * metresPerAu;
  const absorbed = (0.25 * (1 - albedo.warm) * solarLuminosity) / (4 * Math.PI * semiMajorAxis ** 2);
  const coefficient = emission.quarticCoefficient ?? stefanBoltzmann;
  const temperature = (absorbed / coefficient) ** 0.25;
  const period = periodDays * days;
  const fromKappa = (coefficient * temperature ** 3 * period) / (2 * Math.PI * (numbers.kappa ?? 1));
  return {
    star: { luminosity: solarLuminosity, temperature: 5772, radius: 6.957e8, mass: 1.988e30 },
    orbit: {
      semiMajorAxis,
      eccentricity: e,
      period,
      argumentOfPeriapsis: null,
      inclination: null,
      periapsisTime: null,
    },
    surface: {
      albedo,
      emission,
      absorbingFraction: 0.25,
      internalHeat: numbers.internalHeat ?? 0,
      heatCapacity: numbers.heatCapacity ?? fromKappa,
    },
  };
}

export const periodic: SolveOptions = {
  tolerance: 1e-6,
  start: 'periodic',
  samples: 720,
  spacing: 'balancedAnomaly',
};

const model = lumpedModel();

export function solve(of: World, options: Partial<SolveOptions> = {}, windows: readonly Window[] = []): Solution {
  return model.solve(of, { ...periodic, ...options }, windows);
}

/** The only (or warm) state. */
export function state(of: World, options: Partial<SolveOptions> = {}, windows: readonly Window[] = []): State {
  return solve(of, options, windows).states[0];
}

/** A finding's value; NaN when it is null, which fails every comparison. */
export function finding(of: State, name: string): number {
  const found = of.findings.find((candidate) => candidate.name === name);
  if (found === undefined) throw new Error(`no finding ${name}`);
  return found.value ?? Number.NaN;
}

/** A finding's own error. */
export function plusMinus(of: State, name: string): number {
  return of.findings.find((candidate) => candidate.name === name)?.plusMinus ?? Number.NaN;
}

export function column(of: State, name: string): Float64Array {
  return of.dataset.variables[name].data;
}

/** Largest relative difference of two states' temperatures, row by row. */
export function largestDifference(a: State, b: State): number {
  const first = column(a, 'temperature');
  const second = column(b, 'temperature');
  return first.reduce((largest, value, i) => Math.max(largest, Math.abs(value / second[i] - 1)), 0);
}
