/**
 * Planetary fact sheets of the NASA Goddard Space Science Data Coordinated Archive (NSSDCA), D. R. Williams:
 * Bond albedo, solar irradiance (S₀/a², not the orbit mean) and "black-body temperature" as listed.
 * Irradiance and albedo seen for Mercury to Jupiter and the Moon, listed temperatures of Mercury, Venus, Jupiter and
 * everything beyond from memory. `computed` is (S(1 − A)/4σ)^¼ by other software, 4 decimals.
 *
 * Three rows contradict themselves: the temperature was listed for an older albedo. `listed` is what the sheet prints,
 * `excess` by how much its own albedo and irradiance give more. Do not mix editions: older ones use other solar constants.
 */
import type { Provenance } from './provenance.ts';

interface FactSheetRow {
  readonly body: string;
  readonly provenance: Provenance;
  readonly bondAlbedo: number;
  readonly irradiance: number;
  readonly listed: number;
  readonly computed: number;
}

// biome-ignore format: a table
export const consistentRows: readonly FactSheetRow[] = [
  { body: 'Mercury', provenance: 'memory', bondAlbedo: 0.068, irradiance: 9082.7, listed: 439.6, computed: 439.5313 },
  { body: 'Venus', provenance: 'memory', bondAlbedo: 0.77, irradiance: 2601.3, listed: 226.6, computed: 226.627 },
  { body: 'Earth, older albedo', provenance: 'seen', bondAlbedo: 0.306, irradiance: 1361, listed: 254, computed: 254.0309 },
  { body: 'Moon', provenance: 'seen', bondAlbedo: 0.11, irradiance: 1361, listed: 270.4, computed: 270.3299 },
  { body: 'Mars', provenance: 'seen', bondAlbedo: 0.25, irradiance: 586.2, listed: 209.8, computed: 209.8258 },
  { body: 'Jupiter', provenance: 'memory', bondAlbedo: 0.343, irradiance: 50.26, listed: 109.9, computed: 109.8447 },
  { body: 'Saturn', provenance: 'memory', bondAlbedo: 0.342, irradiance: 14.82, listed: 81, computed: 80.97493 },
  { body: 'Uranus', provenance: 'memory', bondAlbedo: 0.3, irradiance: 3.69, listed: 58.1, computed: 58.09158 },
  { body: 'Neptune', provenance: 'memory', bondAlbedo: 0.29, irradiance: 1.508, listed: 46.6, computed: 46.61192 },
];

// biome-ignore format: a table
export const contradictoryRows: readonly (FactSheetRow & { readonly excess: number })[] = [
  { body: 'Venus, newer albedo', provenance: 'memory', bondAlbedo: 0.76, irradiance: 2601.3, listed: 226.6, computed: 229.05, excess: 2.45 },
  { body: 'Earth, current albedo', provenance: 'seen', bondAlbedo: 0.294, irradiance: 1361, listed: 254, computed: 255.1219, excess: 1.12 },
  { body: 'Pluto', provenance: 'memory', bondAlbedo: 0.72, irradiance: 0.873, listed: 37.5, computed: 32.21997, excess: -5.28 },
];

/**
 * Irradiance against S₀/a² with S₀ = 1361 W m⁻² and the sheet's own axis: the inner planets agree to their last digit,
 * the outer ones (from memory) do not. `excess` is the listed irradiance over S₀/a², less one.
 */
// biome-ignore format: a table
export const sheetAxes = [
  { body: 'Mercury', axis: 57.909e9, irradiance: 9082.7, excess: 0, within: 2e-5 },
  { body: 'Venus', axis: 108.21e9, irradiance: 2601.3, excess: 0, within: 4e-5 },
  { body: 'Mars', axis: 227.956e9, irradiance: 586.2, excess: 0, within: 1e-4 },
  { body: 'Saturn', axis: 1432.041e9, irradiance: 14.82, excess: -0.002, within: 5e-4 },
  { body: 'Uranus', axis: 2867.043e9, irradiance: 3.69, excess: -0.004, within: 5e-4 },
  { body: 'Neptune', axis: 4514.953e9, irradiance: 1.508, excess: 0.009, within: 5e-4 },
] as const;
