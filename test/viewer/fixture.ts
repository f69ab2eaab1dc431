/**
 * A run made by plain means, for tests of words and figures: a real Kepler orbit, fixed steps, spin-up to a periodic
 * state. Its numbers are plausible, not exact: nothing here is a reference for the solver.
 */
import { solarLuminosity, stefanBoltzmann } from '../../sim/constants.ts';
import { type Dataset, series } from '../../sim/dataset/dataset.ts';
import type { Finding } from '../../sim/findings/finding.ts';
import type { State } from '../../sim/models/model.ts';
import type { CaseResult, RunResult } from '../../sim/run.ts';
import type { CaseInput } from '../../sim/scenario/types.ts';
import type { UniversalPlace } from '../../sim/studies/grid/storeNumber.ts';
import type { Window } from '../../sim/world.ts';

export interface PlainCase {
  readonly name: string;
  readonly heatCapacity: number;
  readonly eccentricity?: number;
  readonly semiMajorAxis?: number;
  readonly albedo?: number;
  /** A second, colder state beside the first. */
  readonly coldState?: boolean;
  /** Not periodic: three orbits from a start at periapsis. */
  readonly forward?: boolean;
}

const luminosity = 0.52 * solarLuminosity;
const period = 120 * 86_400;
const samples = 240;

export const temperateWindow: Window = { name: 'liquid water at 1 bar', of: 'temperature', from: 273.15, to: 373.15 };
export const instellationWindow: Window = { name: 'like ours', of: 'instellation', from: 500, to: 1700 };

export const threeCases: readonly PlainCase[] = [
  { name: 'bare rock', heatCapacity: 2e6 },
  { name: 'shallow sea', heatCapacity: 8e7 },
  { name: 'thick air', heatCapacity: 1.2e9 },
];

export interface RunChoices {
  readonly cases?: readonly PlainCase[];
  readonly title?: string;
  readonly notes?: string;
  readonly windows?: readonly Window[];
  readonly periapsisTime?: number | null;
}

export function plainRun(choices: RunChoices = {}): RunResult {
  const { cases = threeCases, title = 'Corvane b under three ground assumptions', notes = null } = choices;
  const windows = choices.windows ?? [temperateWindow, instellationWindow];
  const date = choices.periapsisTime === undefined ? 825_872_400 : choices.periapsisTime;
  return {
    program: { name: 'perilag', version: '0.0.0' },
    scenario: { title, notes, file: 'corvane.yaml', sha256: '0'.repeat(64) },
    cases: cases.map((plain) => caseResult(plain, windows, date)),
    notes: [],
  };
}

/** The run with some findings of every state set to other values; null takes the value away and gives a reason. */
export function withFindings(run: RunResult, changed: Readonly<Record<string, number | null>>): RunResult {
  const change = (found: Finding): Finding => {
    const value = changed[found.name];
    if (value === undefined) return found;
    return value === null ? { ...found, value, reason: 'there is none' } : { ...found, value };
  };
  return {
    ...run,
    cases: run.cases.map((oneCase) => ({
      ...oneCase,
      states: oneCase.states.map((one) => ({ ...one, findings: one.findings.map(change) })),
    })),
  };
}

function caseResult(plain: PlainCase, windows: readonly Window[], date: number | null): CaseResult {
  const dataset = plain.forward ? threeOrbits(periodicDataset(plain)) : periodicDataset(plain);
  const cold = plain.coldState ? [shifted(dataset, 40)] : [];
  const states = [dataset, ...cold].map((data, index) => state(data, plain, windows, index, cold.length > 0));
  const computed = mean(dataset, 'instellation');
  const closedForm = computed * (1 + 3e-12);
  return {
    name: plain.name,
    model: 'lumped',
    inputs: inputs(plain),
    derived: date === null ? [] : [{ key: 'orbit.periapsisTime', value: date, unit: 's', label: 'Time of periapsis' }],
    windows,
    tolerance: 1e-6,
    accountLimit: 1e-5,
    findings: states[0]!.findings,
    states,
    checks: {
      orbitMeanInstellation: { computed, closedForm, relativeDifference: 3e-12, passed: true },
      energyBalance: { relativeDifference: 2e-9, passed: true },
    },
    steadyByFraction: [0.25, 0.5, 2 / 3, 1].map((fraction) => ({
      fraction,
      temperature: (4 * fraction) ** 0.25 * textbook(plain),
    })),
    plain: plain.forward ? { place: null, reason: 'it runs from a start' } : { place: place(plain), reason: null },
    warnings: [],
    passed: true,
  };
}

function periodicDataset(plain: PlainCase): Dataset {
  const { eccentricity = 0.62, semiMajorAxis = 0.48 * 1.495978707e11, albedo = 0.3, heatCapacity } = plain;
  const meanAnomaly = Float64Array.from({ length: samples }, (_, i) => {
    const balanced = (2 * Math.PI * i) / samples;
    return balanced - eccentricity * Math.sin(balanced);
  });
  const eccentric = meanAnomaly.map((_, i) => (2 * Math.PI * i) / samples);
  const distance = eccentric.map((E) => semiMajorAxis * (1 - eccentricity * Math.cos(E)));
  const instellation = distance.map((r) => luminosity / (4 * Math.PI * r * r));
  const absorbed = instellation.map((flux) => (flux * (1 - albedo)) / 4);
  const steadyTemperature = absorbed.map((flux) => (flux / stefanBoltzmann) ** 0.25);
  const time = meanAnomaly.map((M) => (M / (2 * Math.PI)) * period);
  const weight = time.map((t, i) => ((time[i + 1] ?? period) - t) / period);
  const temperature = spinUp(absorbed, time, heatCapacity, plain);
  const trueAnomaly = eccentric.map((E) => {
    const nu =
      2 * Math.atan2(Math.sqrt(1 + eccentricity) * Math.sin(E / 2), Math.sqrt(1 - eccentricity) * Math.cos(E / 2));
    return nu < 0 ? nu + 2 * Math.PI : nu;
  });
  const emitted = temperature.map((T) => stefanBoltzmann * T ** 4);
  return {
    variables: {
      time: series('time', time, 's', 'Time after periapsis'),
      weight: series('time', weight, '1', 'Share of the orbit’s time'),
      meanAnomaly: series('time', meanAnomaly, 'rad', 'Mean anomaly'),
      trueAnomaly: series('time', trueAnomaly, 'rad', 'True anomaly'),
      distance: series('time', distance, 'm', 'Distance'),
      instellation: series('time', instellation, 'W/m2', 'Instellation'),
      absorbed: series('time', absorbed, 'W/m2', 'Absorbed'),
      emitted: series('time', emitted, 'W/m2', 'Emitted'),
      temperature: series('time', temperature, 'K', 'Temperature'),
      steadyTemperature: series('time', steadyTemperature, 'K', 'Steady temperature'),
    },
  };
}

/** Implicit Euler, each step by Newton, round and round until the year repeats. */
function spinUp(absorbed: Float64Array, time: Float64Array, heatCapacity: number, plain: PlainCase): Float64Array {
  const temperature = new Float64Array(samples).fill(textbook(plain));
  for (let orbit = 0; orbit < 4000; orbit++) {
    const before = temperature[samples - 1]!;
    for (let i = 0; i < samples; i++) {
      const last = temperature[(i + samples - 1) % samples]!;
      const step = i === 0 ? period - time[samples - 1]! : time[i]! - time[i - 1]!;
      temperature[i] = implicitStep(last, absorbed[i]!, step / heatCapacity);
    }
    if (Math.abs(temperature[samples - 1]! - before) < 1e-6) break;
  }
  return temperature;
}

function implicitStep(last: number, absorbed: number, stepOverCapacity: number): number {
  let next = last;
  for (let newton = 0; newton < 60; newton++) {
    const miss = next - last - stepOverCapacity * (absorbed - stefanBoltzmann * next ** 4);
    const change = miss / (1 + 4 * stepOverCapacity * stefanBoltzmann * next ** 3);
    next -= change;
    if (Math.abs(change) < 1e-9) break;
  }
  return next;
}

function textbook({ semiMajorAxis = 0.48 * 1.495978707e11, albedo = 0.3 }: PlainCase): number {
  return ((luminosity * (1 - albedo)) / (16 * Math.PI * stefanBoltzmann * semiMajorAxis ** 2)) ** 0.25;
}

/** n = 2πC/(4σT³P) of a world whose laws are those of `textbook`. */
function place(plain: PlainCase): UniversalPlace {
  const heatCapacityPerNumber = (4 * stefanBoltzmann * textbook(plain) ** 3 * period) / (2 * Math.PI);
  const storeNumber = plain.heatCapacity / heatCapacityPerNumber;
  return { eccentricity: plain.eccentricity ?? 0.62, storeNumber, heatCapacityPerNumber };
}

function shifted(dataset: Dataset, kelvin: number): Dataset {
  const { temperature } = dataset.variables;
  const cold = { ...temperature!, data: temperature!.data.map((T) => T - kelvin) };
  return { variables: { ...dataset.variables, temperature: cold } };
}

/** The periodic orbit three times, 100 K hotter at first, fading within an orbit. */
function threeOrbits(dataset: Dataset): Dataset {
  const entries = Object.entries(dataset.variables).map(([name, variable]) => {
    const data = Float64Array.from({ length: 3 * samples }, (_, row) => {
      const value = variable.data[row % samples]!;
      if (name === 'time') return value + Math.floor(row / samples) * period;
      if (name === 'weight') return value / 3;
      return name === 'temperature' ? value + 100 * Math.exp((-6 * row) / samples) : value;
    });
    return [name, series('time', data, variable.unit, variable.longName)] as const;
  });
  return { variables: Object.fromEntries(entries) };
}

function state(dataset: Dataset, plain: PlainCase, windows: readonly Window[], index: number, several: boolean): State {
  return {
    label: plain.forward ? 'forward' : several ? ['warm', 'cold'][index]! : 'only',
    stable: plain.forward ? null : true,
    multiplier: plain.forward ? null : 0.4,
    stabilityMargin: plain.forward ? null : several ? 0.8 - 0.3 * index : 1,
    errorEstimate: 4e-8,
    converged: true,
    dataset,
    findings: findings(dataset, plain, windows),
    energyBalance: {
      absorbed: mean(dataset, 'absorbed'),
      internalHeat: 0,
      emitted: mean(dataset, 'absorbed'),
      stored: 0,
      relativeDifference: 2e-9,
    },
  };
}

function findings(dataset: Dataset, plain: PlainCase, windows: readonly Window[]): Finding[] {
  const time = data(dataset, 'time');
  const temperature = data(dataset, 'temperature');
  const steady = data(dataset, 'steadyTemperature');
  const peak = temperature.indexOf(Math.max(...temperature));
  const swing = Math.max(...temperature) - Math.min(...temperature);
  const steadySwing = Math.max(...steady) - Math.min(...steady);
  const slope = 4 * stefanBoltzmann * textbook(plain) ** 3;
  const of = (
    name: string,
    value: number | null,
    unit: string,
    label: string,
    more: Partial<Finding> = {},
  ): Finding => ({
    name,
    value,
    unit,
    label,
    ...more,
  });
  const round = steadySwing === 0;
  return [
    of('period', period, 's', 'Orbital period'),
    of('equilibriumTemperature', textbook(plain), 'K', 'Textbook equilibrium temperature'),
    of('temperatureMax', Math.max(...temperature), 'K', 'Maximum temperature', { plusMinus: 1e-5 }),
    of('temperatureMin', Math.min(...temperature), 'K', 'Minimum temperature', { plusMinus: 1e-5 }),
    of('temperatureMean', mean(dataset, 'temperature'), 'K', 'Mean temperature', { plusMinus: 1e-5 }),
    of('steadyTemperatureMax', Math.max(...steady), 'K', 'Maximum steady temperature'),
    of('steadyTemperatureMin', Math.min(...steady), 'K', 'Minimum steady temperature'),
    of('steadyTemperatureMean', mean(dataset, 'steadyTemperature'), 'K', 'Mean steady temperature'),
    of(
      'timeOfMax',
      round ? null : time[peak]!,
      's',
      'Time of maximum',
      round ? { reason: 'the temperature is constant' } : {},
    ),
    of('lagOfMax', round ? null : time[peak]!, 's', 'Lag', round ? { reason: 'the steady value has no peak' } : {}),
    of(
      'damping',
      round ? null : swing / steadySwing,
      '1',
      'Damping',
      round ? { reason: 'the steady value has no swing' } : {},
    ),
    of('radiativeTimeConstant', plain.heatCapacity / slope, 's', 'Radiative time constant'),
    ...windows.flatMap((window) => windowFindings(dataset, window)),
  ];
}

function windowFindings(dataset: Dataset, window: Window): Finding[] {
  const { name, unavailable } = window;
  const label = `Share of time within “${name}”`;
  if (unavailable !== undefined) {
    return [{ name: `fractionInWindow.${name}`, value: null, unit: '1', label, reason: unavailable }];
  }
  const values = data(dataset, window.of === 'temperature' ? 'temperature' : 'instellation');
  const weight = data(dataset, 'weight');
  const inside = values.reduce((sum, v, row) => sum + (v >= window.from && v <= window.to ? weight[row]! : 0), 0);
  return [{ name: `fractionInWindow.${name}`, value: inside, unit: '1', label }];
}

function inputs({ eccentricity = 0.62, albedo = 0.3, heatCapacity }: PlainCase): CaseInput[] {
  const exact = { distribution: { form: 'exact' }, isDefault: false, used: true } as const;
  return [
    {
      key: 'star.luminosity',
      value: luminosity,
      unit: 'W',
      writtenUnit: 'W',
      text: '0.52 Lsun',
      label: 'Luminosity',
      ...exact,
    },
    {
      key: 'orbit.eccentricity',
      value: eccentricity,
      unit: '1',
      writtenUnit: '1',
      text: String(eccentricity),
      label: 'Eccentricity',
      ...exact,
    },
    {
      key: 'orbit.period',
      value: period,
      unit: 's',
      writtenUnit: 's',
      text: '120 d',
      label: 'Orbital period',
      ...exact,
    },
    {
      key: 'planet.bondAlbedo',
      value: albedo,
      unit: '1',
      writtenUnit: '1',
      text: String(albedo),
      label: 'Bond albedo',
      ...exact,
    },
    {
      key: 'planet.emissivity',
      value: 1,
      unit: '1',
      writtenUnit: '1',
      text: '1',
      label: 'Emissivity',
      ...exact,
      isDefault: true,
    },
    {
      key: 'planet.obliquity',
      value: 0.4,
      unit: 'rad',
      writtenUnit: 'rad',
      text: '23 deg',
      label: 'Obliquity',
      ...exact,
      used: false,
    },
    {
      key: 'planet.heatStore.heatCapacity',
      value: heatCapacity,
      unit: 'J/m2/K',
      writtenUnit: 'J/m2/K',
      text: `${heatCapacity} J/m2/K`,
      label: 'Heat capacity',
      ...exact,
    },
  ];
}

function mean(dataset: Dataset, name: string): number {
  const weight = data(dataset, 'weight');
  return data(dataset, name).reduce((sum, value, row) => sum + value * weight[row]!, 0);
}

function data(dataset: Dataset, name: string): Float64Array {
  return dataset.variables[name]!.data;
}
