/**
 * A run with latitudes made by plain means, for tests of words and figures: the daily mean of a real orbit's insolation, and
 * a temperature that follows the season late by a known angle. Nothing here is a reference for the solver.
 */
import { type Dataset, series, type Variable } from '../../sim/dataset/dataset.ts';
import type { Finding } from '../../sim/findings/finding.ts';
import { distanceRatioFromBalanced, meanFromBalanced, trueFromBalanced } from '../../sim/orbit/balanced.ts';
import type { RunResult } from '../../sim/run.ts';
import { type PlainCase, plainRun, type RunChoices } from './fixture.ts';

export interface ZonalChoices extends Omit<RunChoices, 'cases'> {
  readonly cases?: readonly ZonalCase[];
  readonly bands?: number;
  readonly samples?: number;
}

export interface ZonalCase {
  readonly name: string;
  readonly eccentricity?: number;
  readonly obliquityDeg?: number;
  /** Angle of the orbit by which the temperature follows the solar longitude. */
  readonly lagDeg?: number;
  /** Seasonal swing at the poles, K, either way. */
  readonly swing?: number;
  /** Mean at the equator, K. */
  readonly equator?: number;
  readonly coldState?: boolean;
}

const degrees = 180 / Math.PI;
export const zonalPeriod = 120 * 86_400;
export const longitudeOfPeriapsisDeg = 250;
const starlight = 1300;

export const twoClimates: readonly ZonalCase[] = [
  { name: 'tilted sea', obliquityDeg: 35, coldState: true },
  { name: 'upright sea', obliquityDeg: 5 },
];

export function zonalRun(choices: ZonalChoices = {}): RunResult {
  const { cases = twoClimates, bands = 30, samples = 240, ...rest } = choices;
  const plain = cases.map(
    ({ name, coldState = false }): PlainCase => ({ name, heatCapacity: 8e7, eccentricity: 0.2, coldState }),
  );
  const run = plainRun({ title: 'Seasons of Orsolo c', ...rest, cases: plain });
  return {
    ...run,
    cases: run.cases.map((one, index) => {
      const states = one.states.map((state, place) => {
        const dataset = zonalDataset(cases[index]!, bands, samples, place * 45);
        return { ...state, dataset, findings: [...state.findings, ...zonalFindings(dataset)] };
      });
      const plain = { place: null, reason: 'it has more than one temperature' } as const;
      return { ...one, model: 'zonal', states, findings: states[0]!.findings, plain };
    }),
  };
}

export function zonalDataset(zonal: ZonalCase, bands: number, samples: number, colder = 0): Dataset {
  const { eccentricity = 0.2, obliquityDeg = 35, lagDeg = 40, swing = 38, equator = 303 } = zonal;
  const balanced = Float64Array.from({ length: samples }, (_, row) => (2 * Math.PI * row) / samples);
  const meanAnomaly = balanced.map((s) => meanFromBalanced(s, eccentricity));
  const trueAnomaly = balanced.map((s) => (trueFromBalanced(s, eccentricity) + 4 * Math.PI) % (2 * Math.PI));
  const ratio = balanced.map((s) => distanceRatioFromBalanced(s, eccentricity));
  const season = trueAnomaly.map((nu) => (nu + longitudeOfPeriapsisDeg / degrees) % (2 * Math.PI));
  const time = meanAnomaly.map((M) => (M / (2 * Math.PI)) * zonalPeriod);
  const flux = ratio.map((r) => starlight / (r * r));
  const sine = Float64Array.from({ length: bands }, (_, band) => -1 + (2 * band + 1) / bands);
  const weight = time.map((_, row) => {
    const before = row === 0 ? time[samples - 1]! - zonalPeriod : time[row - 1]!;
    return ((time[row + 1] ?? zonalPeriod) - before) / (2 * zonalPeriod);
  });
  const temperatureAt = (row: number, x: number): number =>
    equator - colder - 45 * x * x + swing * (obliquityDeg / 35) * x * Math.sin(season[row]! - lagDeg / degrees);
  const field = (unit: string, longName: string, at: (row: number, x: number) => number): Variable => ({
    data: Float64Array.from({ length: samples * bands }, (_, i) => at(Math.floor(i / bands), sine[i % bands]!)),
    dims: ['time', 'latitude'],
    shape: [samples, bands],
    unit,
    longName,
  });
  const ice = (row: number, x: number): number => Math.min(1, Math.max(0, (266 - temperatureAt(row, x)) / 15 + 0.5));
  const temperature = field('K', 'Temperature', temperatureAt);
  const mean = (of: Variable): Float64Array =>
    Float64Array.from({ length: samples }, (_, row) => {
      return of.data.subarray(row * bands, (row + 1) * bands).reduce((sum, value) => sum + value / bands, 0);
    });
  const line = (data: Float64Array, unit: string, longName: string): Variable => series('time', data, unit, longName);
  const insolation = field('W/m2', 'Insolation', (row, x) => flux[row]! * dayFactor(x, season[row]!, obliquityDeg));
  return {
    variables: {
      time: line(time, 's', 'Time after periapsis'),
      weight: line(weight, '1', 'Share of time'),
      meanAnomaly: line(meanAnomaly, 'rad', 'Mean anomaly'),
      trueAnomaly: line(trueAnomaly, 'rad', 'True anomaly'),
      solarLongitude: line(season, 'rad', 'Solar longitude'),
      distance: line(
        ratio.map((r) => r * 7e10),
        'm',
        'Distance',
      ),
      instellation: line(flux, 'W/m2', 'Instellation'),
      absorbed: line(
        flux.map((S) => 0.175 * S),
        'W/m2',
        'Absorbed',
      ),
      emitted: line(
        flux.map((S) => 0.175 * S),
        'W/m2',
        'Emitted',
      ),
      temperature: line(mean(temperature), 'K', 'Temperature, area mean'),
      steadyTemperature: line(
        flux.map((S) => ((0.175 * S) / 5.67e-8) ** 0.25),
        'K',
        'Steady temperature',
      ),
      latitude: series('latitude', sine.map(Math.asin), 'rad', 'Latitude'),
      latitudeBounds: {
        data: Float64Array.from({ length: 2 * bands }, (_, i) => Math.asin(-1 + (2 * ((i >> 1) + (i % 2))) / bands)),
        dims: ['latitude', 'edge'],
        shape: [bands, 2],
        unit: 'rad',
        longName: 'Edges of each band',
      },
      bandTemperature: temperature,
      bandInsolation: insolation,
      bandAlbedo: field('1', 'Albedo', (row, x) => 0.3 + 0.32 * ice(row, x)),
      bandEmitted: field('W/m2', 'Emitted flux', (row, x) => 203 + 2.1 * (temperatureAt(row, x) - 273)),
      bandConvergence: field('W/m2', 'Convergence', (_, x) => 30 * (3 * x * x - 1)),
      bandIceFraction: field('1', 'Ice fraction', ice),
    },
  };
}

/** Daily mean over the flux at the planet, at one sine of latitude: Berger (1978) J. Atmos. Sci. 35, 2362, eq. 10. */
function dayFactor(sine: number, season: number, obliquityDeg: number): number {
  const sinDeclination = Math.sin(obliquityDeg / degrees) * Math.sin(season);
  const cosines = Math.sqrt((1 - sine ** 2) * (1 - sinDeclination ** 2));
  const half = Math.acos(Math.min(1, Math.max(-1, (-sine * sinDeclination) / cosines)));
  return Math.max(0, half * sine * sinDeclination + cosines * Math.sin(half)) / Math.PI;
}

function zonalFindings(dataset: Dataset): Finding[] {
  const { bandTemperature, latitude, time } = dataset.variables;
  const bands = latitude!.data.length;
  const of = (name: string, value: number | null, unit: string): Finding => ({
    name,
    value,
    unit,
    label: name,
    ...(value === null ? { reason: 'no ice at this pole in any part of the year' } : {}),
  });
  const place = (kind: string, index: number): Finding[] => [
    of(`${kind}Temperature`, bandTemperature!.data[index]!, 'K'),
    of(`${kind}Latitude`, latitude!.data[index % bands]! * degrees, 'deg'),
    of(`${kind}Time`, time!.data[Math.floor(index / bands)]!, 's'),
  ];
  const data = bandTemperature!.data;
  const best = (sign: number): number => data.reduce((at, T, i) => (sign * (T - data[at]!) > 0 ? i : at), 0);
  return [
    ...place('hottest', best(1)),
    ...place('coldest', best(-1)),
    of('contrast', 45, 'K'),
    of('seasonalRangeMax', 76, 'K'),
    of('seasonalRangeLatitude', 75.2, 'deg'),
    of('iceEdgeNorthMin', 51.2, 'deg'),
    of('iceEdgeNorthMax', 68.7, 'deg'),
    of('iceEdgeSouthMin', null, 'deg'),
    of('iceEdgeSouthMax', null, 'deg'),
    of('iceCapNorthFraction', 0.625, '1'),
    of('iceCapSouthFraction', 0, '1'),
    of('iceFractionMean', 0.21, '1'),
    of('habitableFraction.liquid water at 1 bar', 0.73, '1'),
    of('alwaysFraction.liquid water at 1 bar', 0.51, '1'),
    of('longestSeason.liquid water at 1 bar', zonalPeriod, 's'),
    of('longestSeasonLatitude.liquid water at 1 bar', -1.9, 'deg'),
    of('lagAtEquator', 5.2 * 86_400, 's'),
    of('lagAt45North', 13.4 * 86_400, 's'),
    of('lagAt45South', 13.3 * 86_400, 's'),
    of('lagAtNorthPole', 14.1 * 86_400, 's'),
    of('lagAtSouthPole', null, 's'),
  ];
}
