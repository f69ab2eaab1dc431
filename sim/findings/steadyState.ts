/**
 * The instantaneous balance of one surface: emitted(T) = absorbed(T) + internal heat, at a given instellation.
 * With an ice–albedo ramp several temperatures balance; which one is meant follows from the present temperature.
 */
import type { Flux, Kelvin } from '../si.ts';
import { rootBetween } from '../solve/roots.ts';
import type { Surface } from '../world.ts';

/** Net heating of the surface, W m⁻²: absorbed + internal − emitted. */
export function netHeating(surface: Surface, instellation: Flux, temperature: Kelvin): Flux {
  const absorbed = surface.absorbingFraction * instellation * (1 - surface.albedo.at(temperature));
  return absorbed + surface.internalHeat - surface.emission.at(temperature);
}

/** The balance with the albedo held at `albedo`. */
export function steadyAtAlbedo(surface: Surface, instellation: Flux, albedo: number): Kelvin {
  return surface.emission.inverse(surface.absorbingFraction * instellation * (1 - albedo) + surface.internalHeat);
}

/**
 * Where a surface at `temperature` would settle if the instellation stood still: the nearest balance in the direction of
 * its heating.
 */
export function steadyTemperature(surface: Surface, instellation: Flux, temperature: Kelvin): Kelvin {
  const { albedo } = surface;
  if (albedo.ramp === null) return steadyAtAlbedo(surface, instellation, albedo.warm);
  return netHeating(surface, instellation, temperature) >= 0
    ? settleUpwards(surface, instellation, temperature)
    : settleDownwards(surface, instellation, temperature);
}

/** Subdivisions of the ramp in which a sign change of the heating is looked for. */
const rampSteps = 24;

function settleUpwards(surface: Surface, instellation: Flux, temperature: Kelvin): Kelvin {
  const { from, to } = surface.albedo.ramp!;
  if (temperature < from) {
    const icy = steadyAtAlbedo(surface, instellation, surface.albedo.ice);
    if (icy < from) return Math.max(icy, temperature);
  }
  if (temperature < to) {
    const start = Math.max(from, temperature);
    const root = firstBalance(surface, instellation, start, to);
    if (root !== null) return root;
  }
  return steadyAtAlbedo(surface, instellation, surface.albedo.warm);
}

function settleDownwards(surface: Surface, instellation: Flux, temperature: Kelvin): Kelvin {
  const { from, to } = surface.albedo.ramp!;
  if (temperature > to) {
    const warm = steadyAtAlbedo(surface, instellation, surface.albedo.warm);
    if (warm > to) return Math.min(warm, temperature);
  }
  if (temperature > from) {
    const start = Math.min(to, temperature);
    const root = firstBalance(surface, instellation, start, from);
    if (root !== null) return root;
  }
  return steadyAtAlbedo(surface, instellation, surface.albedo.ice);
}

/** First sign change of the heating on the way from `start` to `end`, strictly inside the ramp; null when there is none. */
function firstBalance(surface: Surface, instellation: Flux, start: Kelvin, end: Kelvin): Kelvin | null {
  if (start === end) return null;
  const heating = (t: Kelvin) => netHeating(surface, instellation, t);
  const rising = end > start;
  let previous = start;
  for (let i = 1; i <= rampSteps; i++) {
    const next = i === rampSteps ? end : start + ((end - start) * i) / rampSteps;
    const here = heating(next);
    if (rising ? here < 0 : here > 0) return rootBetween(heating, previous, next);
    previous = next;
  }
  return null;
}
