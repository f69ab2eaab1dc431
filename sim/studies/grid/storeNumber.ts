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

/** Where a case stands, or why it is none of these. */
export type PlainPlace =
  | { readonly place: UniversalPlace; readonly reason: null }
  | { readonly place: null; readonly reason: string };

/** `model` is the case's own. */
export function plainPlace(model: string, world: World, { start }: Pick<SolveOptions, 'start'>): PlainPlace {
  const { surface, orbit } = world;
  const { albedo, absorbingFraction, internalHeat, heatCapacity, emission } = surface;
  const coefficient = emission.quarticCoefficient;
  if (model !== 'lumped') return none('it has more than one temperature');
  if (start !== 'periodic') return none('it runs from a start');
  if (albedo.ramp !== null) return none('its albedo changes with temperature');
  if (coefficient === null) return none('its emission is no fourth power of temperature');
  if (internalHeat !== 0) return none('heat comes from inside');
  const absorbed = absorbingFraction * (1 - albedo.warm) * instellationAtAxis(world);
  const slope = 4 * coefficient * (absorbed / coefficient) ** 0.75; // 4cT₀³
  const heatCapacityPerNumber = (orbit.period * slope) / (2 * Math.PI);
  if (!(heatCapacityPerNumber > 0)) return none('it absorbs no starlight');
  const storeNumber = heatCapacity / heatCapacityPerNumber;
  return { place: { eccentricity: orbit.eccentricity, storeNumber, heatCapacityPerNumber }, reason: null };
}

function none(reason: string): PlainPlace {
  return { place: null, reason };
}

/** Null where the world of a case is none of these. */
export function universalPlace(
  model: string,
  world: World,
  options: Pick<SolveOptions, 'start'>,
): UniversalPlace | null {
  return plainPlace(model, world, options).place;
}
