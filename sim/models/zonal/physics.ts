/**
 * The zonal heat balance, per unit area of each surface (sea, and land where there is any), x = sin(latitude):
 *
 *   C(T) ∂T/∂t = S(x, t)(1 − A(x, T)) + H − E(T) + ∂/∂x[D(1 − x²) ∂⟨T⟩/∂x] + (ν/f)(T′ − T),
 *
 * ⟨T⟩ the mean of a band over its surfaces, f the share of this one, T′ the temperature of the other. Transport moves the air
 * of a band, which both surfaces share; ν is what they exchange beside it.
 * Source: North, Cahalan & Coakley (1981) Rev. Geophys. 19, 91; land and sea: North & Coakley (1979) J. Atmos. Sci. 36, 1189.
 */

import type { Kelvin } from '../../si.ts';
import { meridionalConductance } from '../../transport/diffusion.ts';
import type { Globe, Law, World } from '../../world.ts';
import type { Bands } from './bands.ts';
import { rampWeight, type WarmShare, warmShare } from './warmShare.ts';

export interface LandPhysics {
  /** Share of each band that is land. */
  readonly fraction: Float64Array;
  readonly heatCapacity: number;
  /** W m⁻² K⁻¹ per unit area of the band. */
  readonly exchange: number;
}

export interface ZonalPhysics {
  readonly world: World;
  readonly bands: Bands;
  readonly conductance: Float64Array;
  readonly warm: WarmShare;
  /** Albedo of ice, and of each band when ice-free. */
  readonly iceAlbedo: number;
  readonly warmAlbedo: Float64Array;
  /** Of the sea, open and frozen. */
  readonly heatCapacity: number;
  readonly frozenHeatCapacity: number;
  /** 0 at the foot of the albedo's ramp, 1 at its head; 1 everywhere without one. */
  readonly rampWeight: Law;
  readonly land: LandPhysics | null;
}

/** Land below this share of a band is none: its temperature would only follow the sea. */
export const leastLand = 1e-3;

export function zonalPhysics(world: World, globe: Globe, bands: Bands): ZonalPhysics {
  const { albedo, heatCapacity } = world.surface;
  return {
    world,
    bands,
    conductance: meridionalConductance(globe.heatTransport, bands.count),
    warm: warmShare(albedo.ramp),
    iceAlbedo: albedo.ice,
    warmAlbedo: bands.sine.map((x) => albedo.warm + (globe.albedoP2 * (3 * x * x - 1)) / 2),
    heatCapacity,
    frozenHeatCapacity: globe.frozenHeatCapacity ?? heatCapacity,
    rampWeight: rampWeight(albedo.ramp),
    land: landPhysics(globe, bands),
  };
}

function landPhysics({ land }: Globe, bands: Bands): LandPhysics | null {
  if (land === null) return null;
  const fraction = bands.sine.map((x) => {
    const share = interpolate(land.fraction.sineLatitude, land.fraction.value, x);
    return share < leastLand ? 0 : share > 1 - leastLand ? 1 : share;
  });
  if (fraction.every((share) => share === 0)) return null;
  return { fraction, heatCapacity: land.heatCapacity, exchange: land.exchange };
}

/** Linear between the table's points, constant beyond its ends. */
function interpolate(points: readonly number[], values: readonly number[], x: number): number {
  let k = 0;
  while (k < points.length - 1 && points[k + 1] < x) k++;
  if (k === points.length - 1 || x <= points[0]) return values[k];
  return values[k] + ((values[k + 1] - values[k]) * (x - points[k])) / (points[k + 1] - points[k]);
}

/** Albedo of a band at a warm share. */
export function bandAlbedo(physics: ZonalPhysics, band: number, share: number): number {
  return physics.iceAlbedo + (physics.warmAlbedo[band] - physics.iceAlbedo) * share;
}

/**
 * Heat capacity of the sea: the frozen sea's at the ramp's foot, the open sea's above it. A function of the band's own
 * temperature alone, so that the heat it holds is one too and a year's account closes.
 */
export function seaHeatCapacity(
  { heatCapacity, frozenHeatCapacity, rampWeight }: ZonalPhysics,
  temperature: Kelvin,
): number {
  return frozenHeatCapacity + (heatCapacity - frozenHeatCapacity) * rampWeight.at(temperature);
}
