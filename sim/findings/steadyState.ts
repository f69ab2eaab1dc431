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

/**
 * The balance inside the ramp from which a surface at `temperature` is repelled: it lies against the direction of its
 * heating. Where there is none, the one where it would settle.
 */
export function repellingTemperature(surface: Surface, instellation: Flux, temperature: Kelvin): Kelvin {
  const { ramp } = surface.albedo;
  if (ramp === null) return steadyTemperature(surface, instellation, temperature);
  const isHeated = netHeating(surface, instellation, temperature) >= 0;
  const start = Math.min(ramp.to, Math.max(ramp.from, temperature));
  const root = firstBalance(surface, instellation, start, isHeated ? ramp.from : ramp.to, isHeated);
  return root ?? steadyTemperature(surface, instellation, temperature);
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
    const root = firstBalance(surface, instellation, start, to, true);
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
    const root = firstBalance(surface, instellation, start, from, false);
    if (root !== null) return root;
  }
  return steadyAtAlbedo(surface, instellation, surface.albedo.ice);
}

/** Where the heating first loses its sign on the way from `start` to `end`, inside the ramp; null when it never does. */
function firstBalance(
  surface: Surface,
  instellation: Flux,
  start: Kelvin,
  end: Kelvin,
  isHeated: boolean,
): Kelvin | null {
  if (start === end) return null;
  const heating = (t: Kelvin) => netHeating(surface, instellation, t);
  let previous = start;
  for (let i = 1; i <= rampSteps; i++) {
    const next = i === rampSteps ? end : start + ((end - start) * i) / rampSteps;
    const here = heating(next);
    if (isHeated ? here < 0 : here > 0) return rootBetween(heating, previous, next);
    previous = next;
  }
  return null;
}
