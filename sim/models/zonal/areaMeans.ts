/** Area means of a row of unknowns: one temperature a band, or sea and land by turns. */
import type { Kelvin } from '../../si.ts';
import { globalMean } from './bands.ts';
import type { ZonalPhysics } from './physics.ts';

export function areaMeanOf(physics: ZonalPhysics, row: Float64Array): Kelvin {
  return globalMean(bandMeansOf(physics, row));
}

/** Over the surfaces of each band. */
export function bandMeansOf({ land, bands }: ZonalPhysics, row: Float64Array): Float64Array {
  if (land === null) return row;
  return bands.sine.map((_, i) => (1 - land.fraction[i]) * row[2 * i] + land.fraction[i] * row[2 * i + 1]);
}

export function iceFractionOf({ land, bands, warm }: ZonalPhysics, row: Float64Array): number {
  const share = new Float64Array(bands.count);
  const iceOn = (surface: number, weight: (i: number) => number): number => {
    warm.into(land === null ? row : Float64Array.from(share, (_, i) => row[2 * i + surface]), share);
    return globalMean(share.map((value, i) => weight(i) * (1 - value)));
  };
  if (land === null) return iceOn(0, () => 1);
  return iceOn(0, (i) => 1 - land.fraction[i]) + iceOn(1, (i) => land.fraction[i]);
}
