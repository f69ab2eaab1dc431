/** A Dataset as a model with latitude gives it, made by hand: land and sea through a year. */
import type { Dataset, Variable } from '../../../sim/dataset/dataset.ts';

export interface ZonalShape {
  readonly bands: number;
  readonly samples: number;
  readonly periodDays: number;
  /** Mean temperature, K. */
  readonly mean: number;
}

export function zonalDataset({ bands, samples, periodDays, mean }: ZonalShape): Dataset {
  const time = Float64Array.from({ length: samples }, (_, i) => (i * periodDays * 86_400) / samples);
  const angle = Float64Array.from({ length: samples }, (_, i) => (2 * Math.PI * i) / samples);
  const edge = (i: number) => Math.asin(-1 + (2 * i) / bands);
  const latitude = Float64Array.from({ length: bands }, (_, i) => Math.asin(-1 + (2 * i + 1) / bands));
  const bounds = Float64Array.from({ length: 2 * bands }, (_, i) => edge((i >> 1) + (i % 2)));
  const field = (at: (season: number, latitude: number) => number) =>
    Float64Array.from({ length: samples * bands }, (_, i) => at(angle[Math.floor(i / bands)]!, latitude[i % bands]!));
  const temperature = (swing: number) =>
    field((season, north) => mean + 25 * Math.cos(2 * north) + swing * Math.sin(north) * Math.sin(season - 0.5));
  const onTime = (data: Float64Array, unit: string, longName: string): Variable => {
    return { data, dims: ['time'], shape: [samples], unit, longName };
  };
  const onBoth = (data: Float64Array, unit: string, longName: string): Variable => {
    return { data, dims: ['time', 'latitude'], shape: [samples, bands], unit, longName };
  };
  return {
    variables: {
      time: onTime(time, 's', 'Time after periapsis'),
      latitude: { data: latitude, dims: ['latitude'], shape: [bands], unit: 'rad', longName: 'Latitude' },
      latitudeBounds: { data: bounds, dims: ['latitude', 'edge'], shape: [bands, 2], unit: 'rad', longName: 'Edges' },
      solarLongitude: onTime(angle, 'rad', 'Solar longitude'),
      instellation: onTime(
        angle.map((a) => 1000 + 90 * Math.cos(a)),
        'W/m2',
        'Instellation',
      ),
      temperature: onTime(
        angle.map(() => mean + 25 / 3),
        'K',
        'Mean temperature',
      ),
      bandLandTemperature: onBoth(temperature(40), 'K', 'Temperature of the land'),
      bandSeaTemperature: onBoth(temperature(10), 'K', 'Temperature of the sea'),
      bandInsolation: onBoth(
        field((a, north) => Math.max(0, 400 * Math.cos(north - 0.4 * Math.sin(a)))),
        'W/m2',
        'Daily-mean insolation',
      ),
      bandAlbedo: onBoth(
        field(() => 0.3),
        '1',
        'Albedo',
      ),
      landFraction: {
        data: latitude.map((north) => 0.3 + 0.1 * Math.sin(north)),
        dims: ['latitude'],
        shape: [bands],
        unit: '1',
        longName: 'Share of land',
      },
    },
  };
}
