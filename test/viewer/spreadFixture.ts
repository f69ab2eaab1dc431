/**
 * Spreads of an invented planet, from closed formulas in place of a model: every draw is a function of its number, so that the
 * fixture is the same in every run. Percentiles, indices and rank measures are those of `sim/studies/spread`.
 */
import {
  metresPerAu,
  radiansPerDegree,
  secondsPerDay,
  solarLuminosity,
  solarMassParameter,
  stefanBoltzmann,
} from '../../sim/constants.ts';
import { normalQuantile } from '../../sim/quantity/normalQuantile.ts';
import { type Resamples, resamples } from '../../sim/studies/spread/bootstrap.ts';
import { summariseTurns, unwrapTurn } from '../../sim/studies/spread/circular.ts';
import { designPlace, designRuns, designValues, furtherRuns } from '../../sim/studies/spread/indexDesign.ts';
import { percentileLevels, quantilesInto, type Summary, summarise } from '../../sim/studies/spread/percentiles.ts';
import { rankMeasure, rankOrder } from '../../sim/studies/spread/rankMeasure.ts';
import { sobolDraws } from '../../sim/studies/spread/sobol.ts';
import { sobolIndices } from '../../sim/studies/spread/sobolIndices.ts';
import type {
  Histogram,
  Importance,
  SpreadBand,
  SpreadCase,
  SpreadFinding,
  SpreadInput,
  SpreadReport,
} from '../../sim/studies/spread/spreadReport.ts';

export interface SpreadCaseOptions {
  readonly name?: string;
  /** J m⁻² K⁻¹ from … to, drawn evenly in the logarithm. */
  readonly heatCapacity?: readonly [number, number];
  /** With bands by latitude. */
  readonly zonal?: boolean;
  readonly sampling?: SpreadReport['sampling'];
}

export const fixtureDraws = 512;
const sampleDraws = 256;
const indexRows = 256;

interface Drawn extends Omit<SpreadInput, 'summary' | 'column'> {
  readonly quantile: (share: number) => number;
}

type World = Readonly<Record<'albedo' | 'eccentricity' | 'luminosity' | 'heatCapacity', number>>;

interface Answer {
  readonly findings: Readonly<Record<string, number>>;
  readonly curve: (share: number) => number;
  readonly profile: (latitudeDeg: number) => number;
}

function normal(centre: number, half: number): (share: number) => number {
  return (share) => centre + half * normalQuantile(share);
}

function drawnInputs([from, to]: readonly [number, number]): Drawn[] {
  return [
    {
      key: 'planet.bondAlbedo',
      label: 'Bond albedo',
      unit: '1',
      text: '0.3 ± 0.08',
      centre: 0.3,
      truncatedShare: 0.00009,
      quantile: (share) => Math.max(0, normal(0.3, 0.08)(share)),
    },
    {
      key: 'orbit.eccentricity',
      label: 'Eccentricity',
      unit: '1',
      text: '0.62 ± 0.03',
      centre: 0.62,
      truncatedShare: 0,
      quantile: normal(0.62, 0.03),
    },
    {
      key: 'star.luminosity',
      label: 'Luminosity',
      unit: 'Lsun',
      text: '0.52 ± 0.02 Lsun',
      centre: 0.52,
      truncatedShare: 0,
      quantile: normal(0.52, 0.02),
    },
    {
      key: 'planet.heatStore.heatCapacity',
      label: 'Areal heat capacity',
      unit: 'J/m2/K',
      text: `${from} to ${to} J/m2/K log`,
      centre: Math.sqrt(from * to),
      truncatedShare: 0,
      quantile: (share) => from * (to / from) ** share,
    },
  ];
}

const axis = 0.48 * metresPerAu;
const period = 2 * Math.PI * Math.sqrt(axis ** 3 / (0.85 * solarMassParameter));

/** A sine's answer to a linear store, on the extremes of the steady value: no model, but a planet's numbers. */
function answerOf({ albedo, eccentricity, luminosity, heatCapacity }: World): Answer {
  const power = luminosity * solarLuminosity;
  const equilibrium = ((power * (1 - albedo)) / (16 * Math.PI * stefanBoltzmann * axis ** 2)) ** 0.25;
  const mean = equilibrium * (1 - eccentricity ** 2 / 16);
  const timeConstant = heatCapacity / (4 * stefanBoltzmann * equilibrium ** 3);
  const slowness = (2 * Math.PI * timeConstant) / period;
  const damping = 1 / Math.sqrt(1 + slowness ** 2);
  const lag = Math.atan(slowness) / (2 * Math.PI);
  const temperatureMax = mean + damping * (equilibrium / Math.sqrt(1 - eccentricity) - mean);
  const temperatureMin = mean - damping * (mean - equilibrium / Math.sqrt(1 + eccentricity));
  const curve = (share: number): number =>
    temperatureMin +
    (temperatureMax - temperatureMin) * (0.5 + 0.5 * Math.cos(2 * Math.PI * (share - lag))) ** (1 + 2 * eccentricity);
  const profile = (latitudeDeg: number): number =>
    mean * (1.08 - 0.24 * (1 - damping / 2) * Math.sin(latitudeDeg * radiansPerDegree) ** 2);
  return {
    curve,
    profile,
    findings: {
      period,
      orbitMeanInstellation: power / (4 * Math.PI * axis ** 2 * Math.sqrt(1 - eccentricity ** 2)),
      equilibriumTemperature: equilibrium,
      temperatureMax,
      temperatureMin,
      temperatureMean: mean,
      timeOfMax: lag * period,
      // As a model does: too flat a maximum has no lag worth the name.
      lagOfMax: damping < 0.12 ? Number.NaN : lag * period,
      damping,
      radiativeTimeConstant: timeConstant,
      'fractionInWindow.temperate': Math.min(1, Math.max(0, (320 - mean) / 40)),
    },
  };
}

const labels: Readonly<Record<string, readonly [string, string]>> = {
  period: ['Orbital period', 's'],
  orbitMeanInstellation: ['Orbit-mean instellation', 'W/m2'],
  equilibriumTemperature: ['Equilibrium temperature (textbook)', 'K'],
  temperatureMax: ['Maximum temperature', 'K'],
  temperatureMin: ['Minimum temperature', 'K'],
  temperatureMean: ['Mean temperature', 'K'],
  timeOfMax: ['Time of maximum, after periapsis', 's'],
  lagOfMax: ['Lag of the maximum behind the steady maximum', 's'],
  damping: ['Damping (swing over steady swing)', '1'],
  radiativeTimeConstant: ['Radiative time constant', 's'],
  'fractionInWindow.temperate': ['Time in “temperate”', '1'],
};

export function spreadCase(options: SpreadCaseOptions = {}): SpreadCase {
  const { name = 'shallow sea', heatCapacity = [8e6, 2e8], zonal = false, sampling = 'sobol' } = options;
  const inputs = drawnInputs(heatCapacity);
  const columns = drawsOf(inputs);
  const answers = Array.from({ length: fixtureDraws }, (_, draw) => answerAt(columns, draw));
  const centre = answerOf(worldOf(inputs.map((input) => input.centre)));
  const design = sampling === 'posterior' ? null : furtherAnswers(inputs);
  const findings = Object.keys(centre.findings).map((finding): SpreadFinding => {
    const values = Float64Array.from(answers, (answer) => answer.findings[finding]!);
    const circular = finding === 'timeOfMax';
    const atCentre = centre.findings[finding]!;
    const [label, unit] = labels[finding]!;
    const summary = circular ? turnsSummary(values) : summarise(values);
    const importance =
      design === null ? rankImportance(columns, values) : indexImportance(values, design, finding, inputs.length);
    return {
      name: finding,
      label,
      unit,
      atCentre: Number.isNaN(atCentre) ? null : atCentre,
      summary,
      circular,
      histogram: histogramOf(values),
      groups: null,
      missingBecause: null,
      importance,
    };
  });
  return {
    name,
    model: zonal ? 'zonal' : 'lumped',
    inputs: inputs.map(({ quantile: _, ...input }, at) => ({
      ...input,
      summary: summarise(columns[at]!),
      column: sampling === 'posterior' ? input.key.split('.').at(-1)! : null,
    })),
    idle: [],
    findings,
    bands: [orbitBand(answers, centre), ...(zonal ? [latitudeBand(answers, centre)] : [])],
    climates: null,
    bandDraws: fixtureDraws,
    failed: 0,
    sample: {
      inputs: columns.map((column) => column.slice(0, sampleDraws)),
      findings: findings.map(({ name: finding }) =>
        answers.slice(0, sampleDraws).map(({ findings: own }) => (Number.isNaN(own[finding]) ? null : own[finding]!)),
      ),
    },
    warnings: [],
    notes: [],
  };
}

export function spreadOf(cases: readonly SpreadCase[], changes: Partial<SpreadReport> = {}): SpreadReport {
  return {
    program: { name: 'perilag', version: '0.0.0' },
    scenario: {
      title: 'Corvane b: how sure is its peak?',
      notes: 'Corvane and its planet are invented.',
      file: 'corvane.yaml',
      sha256: 'cd'.repeat(32),
    },
    draws: fixtureDraws,
    seed: 1,
    sampling: 'sobol',
    indexRows,
    failed: 0,
    cases,
    ...changes,
  };
}

/** One finding changed, for words that need a case of their own. */
export function withFinding(oneCase: SpreadCase, name: string, changes: Partial<SpreadFinding>): SpreadCase {
  const findings = oneCase.findings.map((finding) => (finding.name === name ? { ...finding, ...changes } : finding));
  return { ...oneCase, findings };
}

function drawsOf(inputs: readonly Drawn[]): Float64Array[] {
  const draws = sobolDraws(1);
  return inputs.map(({ quantile }, input) =>
    Float64Array.from({ length: fixtureDraws }, (_, draw) => quantile(draws.at(draw, input))),
  );
}

function worldOf([albedo, eccentricity, luminosity, heatCapacity]: readonly number[]): World {
  return { albedo: albedo!, eccentricity: eccentricity!, luminosity: luminosity!, heatCapacity: heatCapacity! };
}

function answerAt(columns: readonly Float64Array[], draw: number): Answer {
  return answerOf(worldOf(columns.map((column) => column[draw]!)));
}

interface Design {
  readonly answers: readonly Answer[];
  readonly again: Resamples;
}

function furtherAnswers(inputs: readonly Drawn[]): Design {
  const draws = sobolDraws(1);
  const runs = furtherRuns(indexRows, inputs.length);
  const valuesAt = designRuns(
    draws,
    inputs.length,
    inputs.map(({ quantile }, dimension) => ({ dimension, at: quantile })),
  );
  const columns = inputs.map(() => new Float64Array(runs));
  for (let run = 0; run < runs; run++)
    for (const [input, value] of valuesAt(designPlace(run, inputs.length)).entries()) columns[input]![run] = value;
  const answers = Array.from(columns[0]!, (_, run) => answerAt(columns, run));
  return { answers, again: resamples(indexRows, 1, 100) };
}

function indexImportance(
  values: Float64Array,
  { answers, again }: Design,
  finding: string,
  inputs: number,
): Importance {
  const further = Float64Array.from(answers, (answer) => answer.findings[finding]!);
  const { first, total, leftOut, reason } = sobolIndices(designValues(values, further, inputs), again);
  return { first, total, ranks: null, leftOut, ...(reason === undefined ? {} : { reason }) };
}

function rankImportance(columns: readonly Float64Array[], values: Float64Array): Importance {
  const order = rankOrder(values);
  const measures = columns.map((column) => rankMeasure(rankOrder(column), order));
  const ranks = measures.map(({ value, chanceLevel }) => ({ value: value!, chanceLevel: chanceLevel! }));
  const none = measures.find(({ value }) => value === null);
  return none === undefined
    ? { first: null, total: null, ranks, leftOut: 0 }
    : { first: null, total: null, ranks: null, leftOut: 0, reason: none.reason ?? 'none' };
}

function turnsSummary(values: Float64Array): Summary {
  const { mean, percentiles, defined } = summariseTurns(values.map((time) => time / period));
  const inSeconds = Object.fromEntries(percentileLevels.map((level) => [level, percentiles![level] * period]));
  return { mean: mean! * period, percentiles: inSeconds as unknown as NonNullable<Summary['percentiles']>, defined };
}

/** The same time within half a period of the centre. */
export function turnedTo(time: number, centre: number): number {
  return period * unwrapTurn(time / period, centre / period);
}

function histogramOf(values: Float64Array): Histogram | null {
  const defined = values.filter((value) => !Number.isNaN(value));
  const [from, to] = [defined.reduce((a, b) => Math.min(a, b)), defined.reduce((a, b) => Math.max(a, b))];
  if (!(to > from)) return { from: from - 1, to: from + 1, counts: [defined.length], beyond: 0 };
  const bins = 36;
  const counts = new Array<number>(bins).fill(0);
  for (const value of defined) {
    const bin = Math.min(bins - 1, Math.floor(((value - from) / (to - from)) * bins));
    counts[bin] = counts[bin]! + 1;
  }
  return { from, to, counts, beyond: 0 };
}

function orbitBand(answers: readonly Answer[], centre: Answer): SpreadBand {
  const positions = Float64Array.from({ length: 180 }, (_, step) => step / 180);
  const curves = answers.map(({ curve }) => curve);
  return { label: 'Temperature', along: 'orbit', unit: 'K', ...bandAlong(positions, curves, centre.curve) };
}

function latitudeBand(answers: readonly Answer[], centre: Answer): SpreadBand {
  const positions = Float64Array.from(
    { length: 46 },
    (_, band) => Math.asin((2 * band + 1) / 46 - 1) / radiansPerDegree,
  );
  const profiles = answers.map(({ profile }) => profile);
  const label = 'Annual mean temperature';
  return { label, along: 'latitude', unit: 'K', ...bandAlong(positions, profiles, centre.profile) };
}

function bandAlong(
  positions: Float64Array,
  curves: readonly ((position: number) => number)[],
  centre: (position: number) => number,
): Pick<SpreadBand, 'positions' | 'levels' | 'atCentre'> {
  const shares = percentileLevels.map((level) => Number(level) / 100);
  const found = Array.from(positions, (position) =>
    quantilesInto(
      Float64Array.from(curves, (curve) => curve(position)),
      shares,
    ),
  );
  return {
    positions,
    levels: shares.map((_, level) => Float64Array.from(found, (levels) => levels[level]!)),
    atCentre: positions.map(centre),
  };
}

export const daysPerPeriod = period / secondsPerDay;
