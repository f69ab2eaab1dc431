/** What of a World its results depend on, as text that can be compared. */
import type { Window, World } from '../world.ts';

/** Temperatures at which two laws are compared, K. */
const probes = [60, 150, 240, 260, 280, 330, 600, 1500];

/** All of a World that its climates depend on: where the orbit lies in space and when, and the length of the day, change none. */
export function fingerprint({ star, orbit, surface, globe }: World): string {
  const { albedo, emission, absorbingFraction, internalHeat, heatCapacity } = surface;
  return JSON.stringify([
    [star.luminosity, orbit.semiMajorAxis, orbit.eccentricity, orbit.period],
    [albedo.warm, albedo.ice, albedo.ramp, probes.map((temperature) => emission.at(temperature))],
    [absorbingFraction, internalHeat, heatCapacity],
    globe ? { ...globe, solarDay: null } : null,
  ]);
}

/** The same with the windows, which measure a climate and do not change it. */
export function fingerprintWithWindows({ world, windows }: { world: World; windows: readonly Window[] }): string {
  return `${fingerprint(world)}${JSON.stringify(windows)}`;
}
