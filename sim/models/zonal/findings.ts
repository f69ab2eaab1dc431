/** What people quote of a zonal year: the common findings as area means, and where and when the extremes are. */
import { stefanBoltzmann } from '../../constants.ts';
import type { Dataset } from '../../dataset/dataset.ts';
import type { Finding } from '../../findings/finding.ts';
import { instellationWindowFindings } from '../../findings/instellationWindow.ts';
import { wholeShare } from '../../findings/wholeShare.ts';
import { worldFindings } from '../../findings/world.ts';
import type { Kelvin } from '../../si.ts';
import type { Curve } from '../../solve/curve.ts';
import { crossings, extremes, integrate, shareBetween } from '../../solve/features.ts';
import type { Window } from '../../world.ts';
import { iceFindings } from './iceFindings.ts';
import { lagFindings, localLags } from './lags.ts';
import type { ZonalYear } from './year.ts';

export interface ZonalStability {
  /** Null where the steps of a year are too long for the linearised year of so small a store. */
  readonly margin: number | null;
  readonly errorEstimate: number;
  /** What the bands leave of error: Richardson's estimate for the area mean, and that of local extremes. */
  readonly bandError: Kelvin;
  readonly localError: Kelvin;
  /** How many stable states the starts ended in; null where one of them ended in none. */
  readonly climates: number | null;
}

export function zonalFindings(
  year: ZonalYear,
  dataset: Dataset,
  windows: readonly Window[],
  stability: ZonalStability,
): Finding[] {
  const { mean } = year.curves;
  const period = year.world.orbit.period;
  const average = integrate(mean, (_, value) => value) / period;
  const { highest, lowest } = extremes(mean);
  const steady = dataset.variables.steadyTemperature.data;
  const weight = dataset.variables.weight.data;
  const error = (value: Kelvin) => stability.errorEstimate * value + stability.bandError;
  const kelvin = (name: string, label: string, value: Kelvin, plusMinus = error(value)): Finding => {
    return { name, value, unit: 'K', label, plusMinus };
  };
  const steadyMax = steady.reduce((a, b) => Math.max(a, b));
  const steadyMin = steady.reduce((a, b) => Math.min(a, b));
  const swing = steadyMax - steadyMin;
  return [
    ...worldFindings(year.world, average),
    kelvin('steadyTemperatureMax', 'Maximum steady temperature', steadyMax),
    kelvin('steadyTemperatureMin', 'Minimum steady temperature', steadyMin),
    kelvin(
      'steadyTemperatureMean',
      'Mean steady temperature',
      steady.reduce((sum, value, i) => sum + value * weight[i], 0),
    ),
    kelvin('temperatureMax', 'Maximum temperature (area mean)', highest.value),
    kelvin('temperatureMin', 'Minimum temperature (area mean)', lowest.value),
    kelvin('temperatureMean', 'Mean temperature', average),
    ...lagFindings(year, dataset, stability.errorEstimate),
    swing > 1e-9 * steadyMax
      ? {
          name: 'damping',
          value: (highest.value - lowest.value) / swing,
          unit: '1',
          label: 'Damping (swing over steady swing)',
        }
      : {
          name: 'damping',
          value: null,
          unit: '1',
          label: 'Damping (swing over steady swing)',
          reason: 'the absorbed starlight does not vary over the year',
        },
    emissionTemperature(dataset, kelvin),
    ...localExtremes(year, (value) => stability.errorEstimate * value + stability.localError),
    ...profileFindings(year),
    ...iceFindings(year, dataset),
    ...localLags(year),
    marginFinding(stability.margin),
    climatesFinding(stability.climates),
    ...windows.flatMap((window) => windowFindings(year, window)),
  ];
}

function emissionTemperature(
  { variables }: Dataset,
  kelvin: (name: string, label: string, value: Kelvin) => Finding,
): Finding {
  const weight = variables.weight.data;
  const found = kelvin(
    'emissionTemperatureMean',
    'Mean emission temperature',
    variables.emitted.data.reduce((sum, value, i) => sum + weight[i] * (value / stefanBoltzmann) ** 0.25, 0),
  );
  if (Number.isFinite(found.value)) return found;
  const { name, unit, label } = found;
  return { name, unit, label, value: null, reason: 'the emission law falls below zero at the lowest temperatures' };
}

function marginFinding(margin: number | null): Finding {
  const base = { name: 'stabilityMargin', unit: '1', label: 'Stability margin' };
  if (margin !== null) return { ...base, value: margin };
  return {
    ...base,
    value: null,
    reason: 'the store forgets within a step of the year: its multiplier is not resolved',
  };
}

function climatesFinding(climates: number | null): Finding {
  const base = { name: 'climates', unit: '1', label: 'Number of stable climates found' };
  if (climates !== null) return { ...base, value: climates };
  return { ...base, value: null, reason: 'one of the two starts reached no climate' };
}

const degrees = 180 / Math.PI;

function latitudeDeg(year: ZonalYear, band: number): number {
  return year.physics.bands.latitude[band] * degrees;
}

function localExtremes(year: ZonalYear, error: (value: Kelvin) => Kelvin): Finding[] {
  const found = year.curves.bands.map(extremes);
  const of = year.physics.land === null ? '' : ', mean of land and sea';
  let hot = 0;
  let cold = 0;
  for (let i = 1; i < found.length; i++) {
    if (found[i].highest.value > found[hot].highest.value) hot = i;
    if (found[i].lowest.value < found[cold].lowest.value) cold = i;
  }
  const words = (kind: string, band: number, point: { value: Kelvin; position: number }): Finding[] => {
    const title = kind === 'hottest' ? 'Hottest' : 'Coldest';
    return [
      {
        name: `${kind}Temperature`,
        value: point.value,
        unit: 'K',
        label: `${title} local temperature${of}`,
        plusMinus: error(point.value),
      },
      { name: `${kind}Latitude`, value: latitudeDeg(year, band), unit: 'deg', label: `${title} latitude` },
      { name: `${kind}Time`, value: point.position, unit: 's', label: `${title} moment, after periapsis` },
    ];
  };
  return [...words('hottest', hot, found[hot].highest), ...words('coldest', cold, found[cold].lowest)];
}

function profileFindings(year: ZonalYear): Finding[] {
  const { bands } = year.curves;
  const period = year.world.orbit.period;
  const mean = bands.map((curve) => integrate(curve, (_, value) => value) / period);
  const ranges = bands.map((curve) => {
    const { highest, lowest } = extremes(curve);
    return highest.value - lowest.value;
  });
  const widest = ranges.reduce((best, range, i) => (range > ranges[best] ? i : best), 0);
  const count = mean.length;
  const equator = (mean[Math.floor((count - 1) / 2)] + mean[Math.ceil((count - 1) / 2)]) / 2;
  const poles = (mean[0] + mean[count - 1]) / 2;
  return [
    { name: 'contrast', value: equator - poles, unit: 'K', label: 'Equator less poles, annual mean' },
    { name: 'seasonalRangeMax', value: ranges[widest], unit: 'K', label: 'Largest seasonal range' },
    {
      name: 'seasonalRangeLatitude',
      value: latitudeDeg(year, widest),
      unit: 'deg',
      label: 'Latitude of the largest range',
    },
  ];
}

function windowFindings(year: ZonalYear, window: Window): Finding[] {
  return window.of === 'temperature'
    ? temperatureWindow(year, window)
    : instellationWindowFindings(year.world, window, 0, 2 * Math.PI);
}

function temperatureWindow(year: ZonalYear, { name, from, to }: Window): Finding[] {
  const identity = (time: number) => time;
  const surfaces = surfacesOf(year);
  const shares = surfaces.map(({ curve }) => shareBetween(curve, from, to, identity));
  const area = (of: (share: number) => number) =>
    wholeShare(surfaces.reduce((sum, surface, i) => sum + surface.area * of(shares[i]), 0));
  const seasons = year.curves.bands.map((curve) => longestSeason(curve, from, to));
  const longest = seasons.reduce((best, season, i) => (season > seasons[best] ? i : best), 0);
  const none = { value: null, reason: 'no latitude is ever inside' };
  const allYear = seasons.filter((season) => season >= year.world.orbit.period * (1 - 1e-9)).length;
  const several = { value: null, reason: 'all year at several latitudes' };
  return [
    {
      name: `fractionInWindow.${name}`,
      value: shareBetween(year.curves.mean, from, to, identity),
      unit: '1',
      label: `Time of the area mean in “${name}”`,
    },
    {
      name: `habitableFraction.${name}`,
      value: area((share) => share),
      unit: '1',
      label: `Area and time in “${name}”`,
    },
    {
      name: `alwaysFraction.${name}`,
      value: area((share) => (share >= 1 ? 1 : 0)),
      unit: '1',
      label: `Area in “${name}” all year`,
    },
    {
      name: `longestSeason.${name}`,
      unit: 's',
      label: `Longest season in “${name}”`,
      ...(seasons[longest] > 0 ? { value: seasons[longest] } : none),
    },
    {
      name: `longestSeasonLatitude.${name}`,
      unit: 'deg',
      label: `Latitude of the longest season in “${name}”`,
      ...(seasons[longest] > 0 ? (allYear > 1 ? several : { value: latitudeDeg(year, longest) }) : none),
    },
  ];
}

/** Sea and land of every band, each with its share of the globe: their temperatures differ. */
function surfacesOf({ curves: { sea, land }, physics }: ZonalYear): { readonly curve: Curve; readonly area: number }[] {
  const landShare = (i: number) => physics.land?.fraction[i] ?? 0;
  const parts = sea.flatMap((curve, i) => [
    { curve, area: (1 - landShare(i)) / sea.length },
    ...(land === null ? [] : [{ curve: land[i], area: landShare(i) / sea.length }]),
  ]);
  return parts.filter(({ area }) => area > 0);
}

/** Longest unbroken stay between two temperatures, going round the year. */
function longestSeason(curve: Curve, from: Kelvin, to: Kelvin): number {
  const period = curve.position[curve.position.length - 1];
  const { highest, lowest } = extremes(curve);
  if (lowest.value >= from && highest.value <= to) return period;
  const cuts = [...new Set([0, ...crossings(curve, from), ...crossings(curve, to), period])].sort((a, b) => a - b);
  const stays = cuts.slice(1).map((end, i) => {
    const inside = shareBetween(curve, from, to, (time) => Math.min(Math.max(time, cuts[i]), end)) > 0.5;
    return { length: end - cuts[i], inside };
  });
  let best = 0;
  let run = 0;
  // Twice round, so that a stay over the turn of the year counts whole.
  for (const stay of [...stays, ...stays]) {
    run = stay.inside ? run + stay.length : 0;
    best = Math.max(best, run);
  }
  return Math.min(best, period);
}
