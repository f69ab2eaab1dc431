/**
 * Where a plain lumped world stands among all of them. Plain: constant albedo, emission cT⁴, no heat from inside, periodic.
 * With T₀ the textbook temperature at distance a under the world's own laws, cT₀⁴ = f(1−A)S_a, and y = T/T₀,
 *
 *   4n dy/dM = (a/r)² − y⁴,   n = 2πτ/P,   τ = C / (4cT₀³):
 *
 * eccentricity and the heat-store number n settle y through the orbit. n is the radiative time over the orbit's pace (the ωτ
 * of a first-order response): 0 follows the star at once, above 1 the store outlasts the orbit. With κ = cT₀³P/(2πC) of the
 * solver, n = 1/(4κ). The ratio grows with the store, as the thermal parameter of bodies without air does (Spencer, Lebofsky
 * & Sykes 1989, Icarus 78, 337; from memory).
 */
import { instellationAtAxis } from '../../models/lumped/problem.ts';
import type { ArealHeatCapacity } from '../../si.ts';
import type { SolveOptions, World } from '../../world.ts';

/** A world's place on the chart of plain lumped worlds. */
export interface UniversalPlace {
  readonly eccentricity: number;
  /** n = 2πτ/P. */
  readonly storeNumber: number;
  /** C = n times this: P · 4cT₀³ / (2π), of the world's orbit, star and surface. */
  readonly heatCapacityPerNumber: ArealHeatCapacity;
}

/** Null where the world of a case is none of these. `model` is the case's own. */
export function universalPlace(
  model: string,
  world: World,
  { start }: Pick<SolveOptions, 'start'>,
): UniversalPlace | null {
  const { surface, orbit } = world;
  const { albedo, absorbingFraction, internalHeat, heatCapacity, emission } = surface;
  const coefficient = emission.quarticCoefficient;
  const isPlain = model === 'lumped' && albedo.ramp === null && internalHeat === 0 && start === 'periodic';
  if (!isPlain || coefficient === null) return null;
  const absorbed = absorbingFraction * (1 - albedo.warm) * instellationAtAxis(world);
  const slope = 4 * coefficient * (absorbed / coefficient) ** 0.75; // 4cT₀³
  const heatCapacityPerNumber = (orbit.period * slope) / (2 * Math.PI);
  if (!(heatCapacityPerNumber > 0)) return null;
  return {
    eccentricity: orbit.eccentricity,
    storeNumber: heatCapacity / heatCapacityPerNumber,
    heatCapacityPerNumber,
  };
}
