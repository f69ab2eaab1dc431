/** `model: zonal`: temperature by latitude through the year. */

import { SimError } from '../../error.ts';
import { steadyAtAlbedo } from '../../findings/steadyState.ts';
import { instellation } from '../../instellation/instellation.ts';
import type { Kelvin } from '../../si.ts';
import type { Globe, SolveOptions, Window, World } from '../../world.ts';
import type { Model, Solution, State } from '../model.ts';
import { bandMeansOf } from './areaMeans.ts';
import { type Climate, climatesOf, yearMean } from './climates.ts';
import { zonalDataset } from './dataset.ts';
import { zonalEnergyBalance } from './energy.ts';
import { zonalFindings } from './findings.ts';
import { settleZonal, type ZonalState, zonalGrid } from './states.ts';
import { zonalWarnings } from './warnings.ts';
import { zonalYear } from './year.ts';

/** Two starts that end closer than this everywhere are one state. */
const sameState: Kelvin = 0.02;

export function zonalModel(): Model {
  return {
    name: 'zonal',
    asks: { absorbingFraction: false, globe: true, start: false },
    keys: {},
    solve(world, options, windows) {
      const globe = world.globe ?? null;
      if (globe === null)
        throw new SimError('planet', 'the zonal model needs a globe', 'Give obliquity, rotationPeriod and bands');
      if (options.start !== 'periodic') {
        throw new SimError(
          'solve.start',
          'the zonal model finds periodic states only',
          'Remove solve.start or use model: lumped',
        );
      }
      return solvePeriodic(world, globe, options, windows);
    },
  };
}

function solvePeriodic(world: World, globe: Globe, options: SolveOptions, windows: readonly Window[]): Solution {
  const starts = periodicStates(world, globe, globe.bands, options.tolerance);
  const { found, failures } = climatesOf(starts, options.tolerance);
  const half = Math.max(9, Math.floor(globe.bands / 2));
  const { found: halved } = climatesOf(periodicStates(world, globe, half, options.tolerance), options.tolerance);
  const years = found.map(({ state }) => zonalYear(world, globe, state));
  const hasIceFeedback = world.surface.albedo.ramp !== null || globe.frozenHeatCapacity !== null;
  const states = found.map(({ label, state }, index): State => {
    const year = years[index];
    const dataset = zonalDataset(year, options);
    const margin = marginOf(state, hasIceFeedback);
    const coarse = (halved.find((one) => one.label === label) ?? halved[0]).state;
    const stability = {
      margin,
      errorEstimate: state.errorEstimate,
      bandError: bandErrorOf(state, coarse),
      localError: localErrorOf(state, coarse),
      climates: failures.length > 0 ? null : found.length,
    };
    return {
      label,
      stable: state.logMultiplier < 0,
      multiplier: Math.exp(state.logMultiplier),
      stabilityMargin: margin,
      errorEstimate: state.errorEstimate,
      converged: state.converged,
      dataset,
      findings: zonalFindings(year, dataset, windows, stability),
      energyBalance: zonalEnergyBalance(year),
    };
  });
  return {
    states,
    warnings: [
      ...zonalWarnings(world, globe, years),
      ...(failures.length > 0 ? [] : spatialWarnings(found, halved)),
      ...(found.length > 1
        ? [
            'This orbit allows a warm and a cold climate; the findings are those of the warm one. Which of them a planet is in depends on its past.',
          ]
        : []),
    ],
    failures,
    iterations: starts.reduce((sum, { yearEquivalents }) => sum + yearEquivalents, 0),
  };
}

/**
 * From a hot and a cold start; one state where both end alike, or where nothing depends on ice. Either may be no climate
 * (`climatesOf`).
 */
export function periodicStates(world: World, globe: Globe, bands: number, tolerance: number): ZonalState[] {
  const grid = zonalGrid(world, globe, bands);
  const start = (temperature: Kelvin) => new Float64Array(bands).fill(temperature);
  const { surface } = world;
  const flux = instellation(world.star.luminosity, world.orbit.semiMajorAxis);
  const quarter = { ...surface, absorbingFraction: 0.25 };
  const mean = 1 / Math.sqrt(1 - world.orbit.eccentricity ** 2);
  const hot = steadyAtAlbedo(quarter, flux * mean, Math.min(surface.albedo.warm, surface.albedo.ice)) + 50;
  const warm = settleZonal(grid, start(hot), tolerance);
  if (surface.albedo.ramp === null && globe.frozenHeatCapacity === null) return [warm];
  const icy = steadyAtAlbedo(quarter, flux * mean, Math.max(surface.albedo.warm, surface.albedo.ice));
  const cold = settleZonal(
    grid,
    start(Math.max(30, Math.min(icy, (surface.albedo.ramp?.from ?? icy) - 10) - 20)),
    tolerance,
  );
  return apart(warm, cold) > sameState ? [warm, cold] : [warm];
}

/** The linearised year is second order in λh: beyond |λ|h ≈ ½ its ln μ is no measure, though its sign is. */
function marginOf({ logMultiplier, frozenLogMultiplier, system }: ZonalState, hasIceFeedback: boolean): number | null {
  const isResolved = !hasIceFeedback || Math.abs(frozenLogMultiplier) / system.mesh.steps < 0.5;
  return isResolved ? logMultiplier / frozenLogMultiplier : null;
}

function apart(a: ZonalState, b: ZonalState): Kelvin {
  const size = a.system.size;
  let largest = 0;
  for (let i = 0; i < size; i++) largest = Math.max(largest, Math.abs(a.history.value[i] - b.history.value[i]));
  return Number.isNaN(largest) ? Number.POSITIVE_INFINITY : largest; // one that failed is like no other
}

/** Richardson: half the bands are off by three times what the whole number is, at second order. Year means of the area mean. */
function bandErrorOf(fine: ZonalState, coarse: ZonalState): Kelvin {
  return Math.abs(yearMean(fine) - yearMean(coarse)) / 3;
}

/** Of the extremes in place and time: a wider band hides more of the pole in it, so that these gain by the first order only. */
function localErrorOf(fine: ZonalState, coarse: ZonalState): Kelvin {
  const [a, b] = [localRange(fine), localRange(coarse)];
  return Math.max(Math.abs(a.highest - b.highest), Math.abs(a.lowest - b.lowest));
}

function localRange({ history, system }: ZonalState): { readonly highest: Kelvin; readonly lowest: Kelvin } {
  let highest = Number.NEGATIVE_INFINITY;
  let lowest = Number.POSITIVE_INFINITY;
  for (let start = 0; start < history.value.length; start += system.size) {
    for (const value of bandMeansOf(system.physics, history.value.subarray(start, start + system.size))) {
      highest = Math.max(highest, value);
      lowest = Math.min(lowest, value);
    }
  }
  return { highest, lowest };
}

function spatialWarnings(found: readonly Climate[], halved: readonly Climate[]): string[] {
  if (found.length === halved.length) return [];
  return [
    `With half the bands ${halved.length} periodic state${halved.length > 1 ? 's are' : ' is'} found instead of ${found.length}: the number of climates is not settled at this resolution; raise planet.bands.`,
  ];
}
