/** A zonal year as rows: area means by time, and fields by time and latitude (names in `dataset/names.ts`). */
import { type Dataset, series, type Variable } from '../../dataset/dataset.ts';
import { solarLongitude } from '../../instellation/season.ts';
import {
  balancedFromMean,
  distanceRatioFromBalanced,
  meanFromBalanced,
  trueFromBalanced,
} from '../../orbit/balanced.ts';
import { forcingAt } from '../../orbit/forcing.ts';
import { forcingPoint } from '../../solve/separable.ts';
import type { SolveOptions } from '../../world.ts';
import { globalMean } from './bands.ts';
import type { ZonalPhysics } from './physics.ts';
import { placeAt } from './place.ts';
import type { ZonalYear } from './year.ts';

export function zonalDataset(year: ZonalYear, sampling: Pick<SolveOptions, 'samples' | 'spacing'>): Dataset {
  const { world, globe, physics } = year;
  const { orbit } = world;
  const { samples } = sampling;
  const bands = physics.bands.count;
  const places = rowPlaces(orbit.eccentricity, sampling);
  const column = () => new Float64Array(samples);
  const field = () => new Float64Array(samples * bands);
  const mean = {
    instellation: column(),
    absorbed: column(),
    emitted: column(),
    temperature: column(),
    steady: column(),
  };
  const withLand = year.curves.land !== null;
  const surfaces = withLand ? { sea: field(), land: field() } : null;
  const fields = {
    temperature: field(),
    insolation: field(),
    albedo: field(),
    emitted: field(),
    convergence: field(),
    ice: field(),
  };
  const time = places.position.map((s) => (meanFromBalanced(s, orbit.eccentricity) * orbit.period) / (2 * Math.PI));
  for (let row = 0; row < samples; row++) {
    const moment = year.at(time[row]);
    const offset = row * bands;
    fields.temperature.set(moment.temperature, offset);
    surfaces?.sea.set(moment.seaTemperature, offset);
    surfaces?.land.set(moment.landTemperature, offset);
    fields.insolation.set(moment.insolation, offset);
    fields.albedo.set(moment.albedo, offset);
    fields.emitted.set(moment.emitted, offset);
    fields.convergence.set(moment.convergence, offset);
    for (let i = 0; i < bands; i++) fields.ice[offset + i] = 1 - moment.warmShare[i];
    mean.instellation[row] = placeAt(world, time[row]).instellation;
    mean.absorbed[row] = globalMean(moment.absorbed);
    mean.emitted[row] = globalMean(moment.emitted);
    mean.temperature[row] = globalMean(moment.temperature);
    mean.steady[row] = world.surface.emission.inverse(mean.absorbed[row] + world.surface.internalHeat);
  }
  const onCircle = (angle: number) => angle - 2 * Math.PI * Math.floor(angle / (2 * Math.PI));
  const along = (f: (s: number) => number) => places.position.map(f);
  const trueAnomaly = along((s) => onCircle(trueFromBalanced(s, orbit.eccentricity)));
  const line = (data: Float64Array, unit: string, longName: string) => series('time', data, unit, longName);
  const map = (data: Float64Array, unit: string, longName: string): Variable => {
    return { data, dims: ['time', 'latitude'], shape: [samples, bands], unit, longName };
  };
  return {
    variables: {
      time: line(time, 's', 'Time after periapsis'),
      weight: line(places.weight, '1', 'Share of the time that the row stands for'),
      meanAnomaly: line(
        along((s) => onCircle(meanFromBalanced(s, orbit.eccentricity))),
        'rad',
        'Mean anomaly',
      ),
      trueAnomaly: line(trueAnomaly, 'rad', 'True anomaly'),
      solarLongitude: line(
        trueAnomaly.map((anomaly) => onCircle(solarLongitude(anomaly, globe.solarLongitudeOfPeriapsis))),
        'rad',
        'Solar longitude',
      ),
      distance: line(
        along((s) => orbit.semiMajorAxis * distanceRatioFromBalanced(s, orbit.eccentricity)),
        'm',
        'Distance from the star',
      ),
      instellation: line(mean.instellation, 'W/m2', 'Instellation'),
      absorbed: line(mean.absorbed, 'W/m2', 'Absorbed starlight, area mean'),
      emitted: line(mean.emitted, 'W/m2', 'Emitted flux, area mean'),
      temperature: line(mean.temperature, 'K', 'Temperature, area mean'),
      steadyTemperature: line(mean.steady, 'K', 'Steady temperature of the area mean'),
      latitude: series('latitude', physics.bands.latitude, 'rad', 'Latitude'),
      latitudeBounds: {
        data: latitudeBounds(physics.bands.edges),
        dims: ['latitude', 'edge'],
        shape: [bands, 2],
        unit: 'rad',
        longName: 'Edges of each band',
      },
      bandTemperature: map(fields.temperature, 'K', 'Temperature'),
      ...(surfaces === null ? {} : surfaceFields(surfaces, map, physics)),
      bandInsolation: map(fields.insolation, 'W/m2', 'Insolation'),
      bandAlbedo: map(fields.albedo, '1', 'Albedo'),
      bandEmitted: map(fields.emitted, 'W/m2', 'Emitted flux'),
      bandConvergence: map(fields.convergence, 'W/m2', 'Convergence of transported heat'),
      bandIceFraction: map(fields.ice, '1', 'Ice fraction'),
    },
  };
}

/** Temperature of sea and land where both are, and how much of each band is land. */
function surfaceFields(
  { sea, land }: { readonly sea: Float64Array; readonly land: Float64Array },
  map: (data: Float64Array, unit: string, longName: string) => Variable,
  { land: ground, bands }: ZonalPhysics,
): Record<string, Variable> {
  const fraction = ground?.fraction ?? new Float64Array(bands.count);
  return {
    bandSeaTemperature: map(sea, 'K', 'Temperature of the sea (where there is none, of a vanishing piece of it)'),
    bandLandTemperature: map(land, 'K', 'Temperature of the land (where there is none, of a vanishing piece of it)'),
    landFraction: series('latitude', fraction, '1', 'Land fraction'),
  };
}

/** Rows over one orbit, and the share of time of each. */
function rowPlaces(eccentricity: number, { samples, spacing }: Pick<SolveOptions, 'samples' | 'spacing'>) {
  const position = new Float64Array(samples);
  const weight = new Float64Array(samples);
  const forcing = forcingAt(eccentricity);
  const point = forcingPoint();
  for (let row = 0; row < samples; row++) {
    const turn = (2 * Math.PI * row) / samples;
    position[row] = spacing === 'time' ? balancedFromMean(turn, eccentricity) : turn;
    forcing(turn, point);
    weight[row] = spacing === 'time' ? 1 : point.clock;
  }
  const total = weight.reduce((sum, value) => sum + value, 0);
  return { position, weight: weight.map((value) => value / total) };
}

function latitudeBounds(edges: Float64Array): Float64Array {
  const bounds = new Float64Array(2 * (edges.length - 1));
  for (let i = 0; i + 1 < edges.length; i++) {
    bounds[2 * i] = Math.asin(edges[i]);
    bounds[2 * i + 1] = Math.asin(edges[i + 1]);
  }
  return bounds;
}
