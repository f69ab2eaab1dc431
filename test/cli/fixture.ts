/** A RunResult made by hand, with plausible curves, so that outputs are tested apart from the models. */
import type { Dataset, Variable } from '../../sim/dataset/dataset.ts';
import { series } from '../../sim/dataset/dataset.ts';
import type { Finding } from '../../sim/findings/finding.ts';
import type { State } from '../../sim/models/model.ts';
import type { CaseResult, RunResult } from '../../sim/run.ts';
import type { CaseInput } from '../../sim/scenario/types.ts';

const metresPerAu = 149_597_870_700;
const day = 86_400;

export interface CaseShape {
  readonly name: string;
  readonly periodDays?: number;
  readonly eccentricity?: number;
  readonly damping?: number;
  readonly lagOrbits?: number | null;
  readonly states?: readonly { readonly label: string; readonly stable: boolean | null; readonly offset: number }[];
  readonly warnings?: readonly string[];
  readonly passed?: boolean;
  readonly plusMinus?: number;
  readonly samples?: number;
}

export const threeCases: readonly CaseShape[] = [
  { name: 'shallow sea', damping: 0.31, lagOrbits: 0.09 },
  { name: 'bare rock', damping: 0.97, lagOrbits: 0.004 },
  { name: 'thick air', damping: 0.12, lagOrbits: 0.14 },
];

export function fixtureResult(
  shapes: readonly CaseShape[] = threeCases,
  title: string | null = 'Corvane b under three ground assumptions',
): RunResult {
  return {
    program: { name: 'perilag', version: '9.8.7' },
    scenario: { title, notes: null, file: 'corvane.yaml', sha256: 'ab'.repeat(32) },
    cases: shapes.map(fixtureCase),
    notes: [],
  };
}

function fixtureCase(shape: CaseShape): CaseResult {
  const passed = shape.passed ?? true;
  const states = (shape.states ?? [{ label: 'only', stable: true, offset: 0 }]).map((state) =>
    fixtureState(shape, state),
  );
  return {
    name: shape.name,
    model: 'lumped',
    inputs: fixtureInputs(shape),
    derived: [{ key: 'orbit.period', value: (shape.periodDays ?? 132.1) * day, unit: 's', label: 'Orbital period' }],
    windows: [
      { name: 'liquid water at 1 bar', of: 'temperature', from: 273.15, to: 373.15 },
      { name: 'temperate', of: 'instellation', from: 435, to: 1497 },
    ],
    tolerance: 1e-6,
    accountLimit: 1e-5,
    findings: states[0]!.findings,
    states,
    checks: {
      orbitMeanInstellation: { computed: 1000, closedForm: 1000, relativeDifference: 3.1e-14, passed: true },
      energyBalance: { relativeDifference: passed ? 2.4e-11 : 3e-3, passed },
    },
    steadyByFraction: [
      { fraction: 0.25, temperature: 288.14 },
      { fraction: 0.5, temperature: 342.66 },
      { fraction: 2 / 3, temperature: 368.2 },
      { fraction: 1, temperature: 407.5 },
    ],
    plain: { place: null, reason: 'it has more than one temperature' },
    warnings: shape.warnings ?? [],
    passed,
  };
}

function fixtureInputs(shape: CaseShape): readonly CaseInput[] {
  const plain = { distribution: { form: 'exact' }, isDefault: false, used: true } as const;
  return [
    {
      ...plain,
      key: 'orbit.eccentricity',
      value: shape.eccentricity ?? 0.62,
      unit: '1',
      writtenUnit: '1',
      text: '0.62',
      label: 'Eccentricity',
    },
    {
      ...plain,
      key: 'planet.emissivity',
      value: 1,
      unit: '1',
      writtenUnit: '1',
      text: '1',
      label: 'Emissivity',
      isDefault: true,
    },
    {
      ...plain,
      key: 'planet.rotationPeriod',
      value: null,
      unit: '1',
      writtenUnit: '1',
      text: 'synchronous',
      label: 'Rotation',
      used: false,
    },
    {
      ...plain,
      key: 'planet.bondAlbedo',
      value: 0.3,
      unit: '1',
      writtenUnit: '1',
      text: '0.30 ± 0.05',
      label: 'Bond albedo',
      distribution: { form: 'normal', sigma: 0.05 },
    },
  ];
}

type StateShape = NonNullable<CaseShape['states']>[number];

function fixtureState(shape: CaseShape, { label, stable, offset }: StateShape): State {
  const dataset = fixtureDataset(shape, offset);
  return {
    label,
    stable,
    multiplier: 0.41,
    stabilityMargin: stable === null ? null : stable ? 0.9 : -0.2,
    errorEstimate: 2e-7,
    converged: true,
    dataset,
    findings: fixtureFindings(shape, dataset),
    energyBalance: { absorbed: 250, internalHeat: 0, emitted: 250, stored: 0, relativeDifference: 2.4e-11 },
  };
}

function fixtureDataset(shape: CaseShape, offset: number): Dataset {
  const { periodDays = 132.1, eccentricity = 0.62, damping = 1, samples = 720 } = shape;
  const period = periodDays * day;
  const lag = 2 * Math.PI * (shape.lagOrbits ?? 0);
  const steadyAt = (meanAnomaly: number) =>
    288 / Math.sqrt(1 - eccentricity * Math.cos(eccentric(meanAnomaly, eccentricity)));
  const rows = Array.from({ length: samples }, (_, index) => (2 * Math.PI * index) / samples);
  const column = (at: (meanAnomaly: number) => number) => Float64Array.from(rows, at);
  const distance = (m: number) => 0.48 * metresPerAu * (1 - eccentricity * Math.cos(eccentric(m, eccentricity)));
  const variables: Record<string, Variable> = {
    time: series(
      'time',
      column((m) => (m / (2 * Math.PI)) * period),
      's',
      'Time after periapsis',
    ),
    weight: series(
      'time',
      column(() => 1 / samples),
      '1',
      'Share of the orbit’s time',
    ),
    meanAnomaly: series(
      'time',
      column((m) => m),
      'rad',
      'Mean anomaly',
    ),
    trueAnomaly: series(
      'time',
      column((m) => trueAnomaly(eccentric(m, eccentricity), eccentricity)),
      'rad',
      'True anomaly',
    ),
    distance: series('time', column(distance), 'm', 'Distance'),
    instellation: series(
      'time',
      column((m) => 5e24 / distance(m) ** 2),
      'W/m2',
      'Instellation',
    ),
    absorbed: series(
      'time',
      column((m) => 5.67e-8 * steadyAt(m) ** 4),
      'W/m2',
      'Absorbed',
    ),
    emitted: series(
      'time',
      column((m) => 5.67e-8 * steadyAt(m) ** 4),
      'W/m2',
      'Emitted',
    ),
    temperature: series(
      'time',
      column((m) => offset + 288 + damping * (steadyAt(m - lag) - 288)),
      'K',
      'Temperature',
    ),
    steadyTemperature: series('time', column(steadyAt), 'K', 'Steady temperature'),
  };
  return { variables };
}

function eccentric(meanAnomaly: number, eccentricity: number): number {
  let anomaly = meanAnomaly;
  for (let sweep = 0; sweep < 100; sweep++) {
    anomaly -= (anomaly - eccentricity * Math.sin(anomaly) - meanAnomaly) / (1 - eccentricity * Math.cos(anomaly));
  }
  return anomaly;
}

function trueAnomaly(eccentricAnomaly: number, eccentricity: number): number {
  const half = Math.sqrt((1 + eccentricity) / (1 - eccentricity)) * Math.tan(eccentricAnomaly / 2);
  return (2 * Math.atan(half) + 2 * Math.PI) % (2 * Math.PI);
}

function fixtureFindings(shape: CaseShape, { variables }: Dataset): readonly Finding[] {
  const temperature = variables.temperature!.data;
  const steady = variables.steadyTemperature!.data;
  const period = (shape.periodDays ?? 132.1) * day;
  const mean = (data: Float64Array) => data.reduce((sum, value) => sum + value, 0) / data.length;
  const hottest = temperature.indexOf(Math.max(...temperature));
  const kelvin = (name: string, value: number): Finding => ({ name, value, unit: 'K', label: name });
  const lag = shape.lagOrbits === null ? null : (shape.lagOrbits ?? 0) * period;
  return [
    { name: 'period', value: period, unit: 's', label: 'Orbital period' },
    { name: 'orbitMeanInstellation', value: 1021.7345, unit: 'W/m2', label: 'Orbit-mean instellation' },
    kelvin('equilibriumTemperature', 288.1437),
    kelvin('temperatureMean', mean(temperature)),
    {
      ...kelvin('temperatureMax', Math.max(...temperature)),
      ...(shape.plusMinus ? { plusMinus: shape.plusMinus } : {}),
    },
    kelvin('temperatureMin', Math.min(...temperature)),
    kelvin('steadyTemperatureMean', mean(steady)),
    kelvin('steadyTemperatureMax', Math.max(...steady)),
    kelvin('steadyTemperatureMin', Math.min(...steady)),
    { name: 'timeOfMax', value: variables.time!.data[hottest]!, unit: 's', label: 'Time of maximum' },
    {
      name: 'lagOfMax',
      value: lag,
      unit: 's',
      label: 'Lag of maximum',
      ...(lag === null ? { reason: 'the lag’s own error exceeds 0.02 orbit' } : {}),
    },
    { name: 'damping', value: shape.damping ?? 1, unit: '1', label: 'Damping' },
    { name: 'radiativeTimeConstant', value: 0.123456 * period, unit: 's', label: 'Radiative time constant' },
    {
      name: 'fractionInWindow.liquid water at 1 bar',
      value: 0.3421,
      unit: '1',
      label: 'Share of time in liquid water at 1 bar',
    },
    { name: 'fractionInWindow.temperate', value: 0.0001, unit: '1', label: 'Share of time in temperate' },
    { name: 'orbitMeanInWindow.liquid water at 1 bar', value: 1, unit: '1', label: 'Orbit mean inside' },
    { name: 'orbitMeanInWindow.temperate', value: 0, unit: '1', label: 'Orbit mean inside' },
  ];
}
