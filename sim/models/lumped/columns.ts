/** The findings of the lumped model in their order: what stands where in a sheet. */
import type { FindingColumn } from '../../findings/finding.ts';
import { instellationWindowColumns } from '../../findings/instellationWindow.ts';
import { worldColumns } from '../../findings/world.ts';
import type { SolveOptions, Window } from '../../world.ts';

/** Column numbers; those that follow from the world alone come first, the windows last. */
export const at = {
  steadyTemperatureMax: 6,
  steadyTemperatureMin: 7,
  steadyTemperatureMean: 8,
  temperatureMax: 9,
  temperatureMin: 10,
  temperatureMean: 11,
  timeOfMax: 12,
  timeOfMin: 13,
  lagOfMax: 14,
  lagOfMaxOrbits: 15,
  lagOfFirstHarmonic: 16,
  damping: 17,
  emissionTemperatureMean: 18,
  fastestWarming: 19,
  timeOfFastestWarming: 20,
  fastestCooling: 21,
  timeOfFastestCooling: 22,
  windows: 23,
} as const;

const kelvin = (name: string, label: string): FindingColumn => ({ name, unit: 'K', label });
const seconds = (name: string, label: string): FindingColumn => ({ name, unit: 's', label });
const pure = (name: string, label: string): FindingColumn => ({ name, unit: '1', label });
const pace = (name: string, label: string): FindingColumn => ({ name, unit: 'K/s', label });

export function lumpedColumns(start: SolveOptions['start'], windows: readonly Window[]): FindingColumn[] {
  const since = start === 'periodic' ? 'after periapsis' : 'after the start';
  return [
    ...worldColumns,
    kelvin('steadyTemperatureMax', 'Maximum steady temperature'),
    kelvin('steadyTemperatureMin', 'Minimum steady temperature'),
    kelvin('steadyTemperatureMean', 'Mean steady temperature'),
    kelvin('temperatureMax', 'Maximum temperature'),
    kelvin('temperatureMin', 'Minimum temperature'),
    kelvin('temperatureMean', 'Mean temperature'),
    seconds('timeOfMax', `Time of maximum, ${since}`),
    seconds('timeOfMin', `Time of minimum, ${since}`),
    seconds('lagOfMax', 'Lag of the maximum behind the steady maximum'),
    pure('lagOfMaxOrbits', 'Lag of the maximum, in orbits'),
    seconds('lagOfFirstHarmonic', 'Lag of the first harmonic'),
    pure('damping', 'Damping (swing over steady swing)'),
    kelvin('emissionTemperatureMean', 'Mean emission temperature'),
    pace('fastestWarming', 'Fastest warming'),
    seconds('timeOfFastestWarming', 'Time of fastest warming'),
    pace('fastestCooling', 'Fastest cooling'),
    seconds('timeOfFastestCooling', 'Time of fastest cooling'),
    ...windows.flatMap(windowColumns),
  ];
}

function windowColumns(window: Window): readonly FindingColumn[] {
  if (window.of === 'instellation') return instellationWindowColumns(window);
  return [pure(`fractionInWindow.${window.name}`, `Time in “${window.name}”`)];
}

/** What a reader of a sheet will look at: the rest need not be computed. A number is the same whatever else is wanted. */
export interface Wanted {
  readonly world: boolean;
  readonly steady: boolean;
  readonly steadyMean: boolean;
  /** With the lags behind it. */
  readonly timeOfMax: boolean;
  readonly timeOfMin: boolean;
  readonly harmonic: boolean;
  readonly fastest: boolean;
  readonly windows: boolean;
}

export const everything: Wanted = {
  world: true,
  steady: true,
  steadyMean: true,
  timeOfMax: true,
  timeOfMin: true,
  harmonic: true,
  fastest: true,
  windows: true,
};

export function wantedOf(columns: readonly number[]): Wanted {
  const has = (...wanted: readonly number[]) => columns.some((column) => wanted.includes(column));
  return {
    world: columns.some((column) => column < worldColumns.length),
    steady: has(at.steadyTemperatureMax, at.steadyTemperatureMin, at.damping),
    steadyMean: has(at.steadyTemperatureMean),
    timeOfMax: has(at.timeOfMax, at.lagOfMax, at.lagOfMaxOrbits),
    timeOfMin: has(at.timeOfMin),
    harmonic: has(at.lagOfFirstHarmonic),
    fastest: has(at.fastestWarming, at.timeOfFastestWarming, at.fastestCooling, at.timeOfFastestCooling),
    windows: columns.some((column) => column >= at.windows),
  };
}
