/**
 * A World: one case of a scenario with every number in SI and every choice made. Types only, no behaviour.
 * It is what a model integrates; it knows nothing of files, units as typed, or uncertainty.
 */
import type { ArealHeatCapacity, Flux, Kelvin, Kilograms, Metres, Radians, Seconds, TdbSeconds, Watts } from './si.ts';

export interface Star {
  readonly luminosity: Watts;
  /** Effective temperature; null when the scenario does not say. */
  readonly temperature: Kelvin | null;
  readonly radius: Metres | null;
  readonly mass: Kilograms | null;
}

export interface Orbit {
  readonly semiMajorAxis: Metres;
  readonly eccentricity: number;
  readonly period: Seconds;
  /** Radial-velocity convention (the star's orbit; transit at true anomaly 90° − ω). */
  readonly argumentOfPeriapsis: Radians | null;
  readonly inclination: Radians | null;
  readonly periapsisTime: TdbSeconds | null;
}

/** A smooth or stepped function of temperature, with its slope. */
export interface Law {
  at(temperature: Kelvin): number;
  slopeAt(temperature: Kelvin): number;
}

/** Bond albedo as a function of temperature. */
export interface Albedo extends Law {
  /** Ice-free value: the one that the textbook equilibrium temperature uses. */
  readonly warm: number;
  /** Value at and below the ramp; equal to `warm` when constant. */
  readonly ice: number;
  /** The ramp's ends, K; null when the albedo is constant. `from` = `to` is a step at that temperature. */
  readonly ramp: { readonly from: Kelvin; readonly to: Kelvin } | null;
  /** Temperatures where one smooth piece ends and the next begins, increasing; piece i lies below breaks[i]. */
  readonly breaks: readonly Kelvin[];
  /** The smooth pieces, one more than breaks; each continues smoothly beyond its ends, for solvers that find a break from within. */
  readonly pieces: readonly Law[];
}

/** Emitted flux, W m⁻², as a function of temperature. */
export interface Emission extends Law {
  /** W m⁻² K⁻⁴ when the law is exactly `coefficient · T⁴`; null otherwise. */
  readonly quarticCoefficient: number | null;
  /** Temperature that emits `flux`; the law is strictly increasing. */
  inverse(flux: Flux): Kelvin;
  /** Temperatures where the published law is meant to hold; outside it the run warns. */
  readonly validity: { readonly from: Kelvin; readonly to: Kelvin } | null;
}

export interface Surface {
  readonly albedo: Albedo;
  readonly emission: Emission;
  /** Share of the star's flux that one square metre of surface receives on average: ¼ for a whole sphere. */
  readonly absorbingFraction: number;
  readonly internalHeat: Flux;
  readonly heatCapacity: ArealHeatCapacity;
}

/** Land beside sea in every band: two temperatures that exchange heat. */
export interface Land {
  /** Share of each band's area that is land, as a table over sin(latitude), −1 … 1; linear between, constant beyond. */
  readonly fraction: { readonly sineLatitude: readonly number[]; readonly value: readonly number[] };
  readonly heatCapacity: ArealHeatCapacity;
  /** W m⁻² K⁻¹ between land and sea, per unit area of the band. */
  readonly exchange: number;
}

/** What models with latitude need beyond the surface, whose heat capacity is then that of the sea. */
export interface Globe {
  /** Equal-area bands from pole to pole. */
  readonly bands: number;
  readonly obliquity: Radians;
  /** Solar longitude at periapsis: 0 is the northern spring equinox. */
  readonly solarLongitudeOfPeriapsis: Radians;
  readonly insolation: 'daily' | 'annualMean' | { readonly legendre: readonly number[] };
  /** D of the diffusive transport, W m⁻² K⁻¹. */
  readonly heatTransport: number;
  /** Coefficient of P₂(sin latitude) added to the warm albedo. */
  readonly albedoP2: number;
  /** Heat capacity of a frozen sea; null when freezing does not change it. */
  readonly frozenHeatCapacity: ArealHeatCapacity | null;
  readonly land: Land | null;
  /** Solar day; null when the rotation is not given. */
  readonly solarDay: Seconds | null;
}

export interface World {
  readonly star: Star;
  readonly orbit: Orbit;
  readonly surface: Surface;
  /** Null for models without latitude. */
  readonly globe?: Globe | null;
}

/** A temperature, instellation or published-limit window whose share of time is reported. SI bounds. */
export interface Window {
  readonly name: string;
  readonly of: 'temperature' | 'instellation';
  readonly from: number;
  readonly to: number;
  /** Set when the window cannot be evaluated (e.g. star temperature outside the published range): findings are null with this reason. */
  readonly unavailable?: string;
}

/** Run forward from a start instead of finding the periodic state. */
export interface ForwardStart {
  readonly temperature: Kelvin;
  readonly orbits: number;
  /** True anomaly of the start. */
  readonly at: Radians;
}

export interface SolveOptions {
  readonly tolerance: number;
  readonly start: 'periodic' | ForwardStart;
  readonly samples: number;
  readonly spacing: 'balancedAnomaly' | 'time';
}
