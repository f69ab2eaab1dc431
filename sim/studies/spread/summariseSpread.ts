/** From the tables of a spread to what is told of it: a column at a time, so that ten million draws need the room of a few columns. */
import { SimError } from '../../error.ts';
import type { Origin } from '../../origin.ts';
import { columnName } from '../columnName.ts';
import { isTimeInOrbit } from '../isTimeInOrbit.ts';
import { type BandPlace, bandSampler } from './bandSampler.ts';
import { resamples } from './bootstrap.ts';
import { summariseTurns, unwrapTurn } from './circular.ts';
import { type DrawnClimates, drawnClimates } from './climates.ts';
import { type Group, goesInSteps, twoArcs, twoGroups } from './groups.ts';
import { histogramOf } from './histogram.ts';
import { importanceByDesign, importanceByRanks, noImportance } from './importance.ts';
import { percentileLevels, quantilesInto, type Summary, summarise } from './percentiles.ts';
import type { PlannedCase, SpreadPlan } from './plan.ts';
import { type RankOrder, rankOrder } from './rankMeasure.ts';
import { reasonsOf } from './reasons.ts';
import type { Importance, SpreadBand, SpreadCase, SpreadFinding, SpreadInput, SpreadReport } from './spreadReport.ts';
import {
  circleNote,
  climateWarnings,
  cutWarnings,
  fewSamplesWarnings,
  groupWarnings,
  leftOutWarnings,
  periodNote,
  warmestNote,
} from './spreadWarnings.ts';

/** A column of a table by its name, (rows,), NaN where undefined. */
export type ReadColumn = (name: string) => Promise<Float64Array>;

export interface SpreadTables {
  readonly draws: ReadColumn;
  /** Null where there are none. */
  readonly bands: ReadColumn | null;
  readonly indices: ReadColumn | null;
  /** Draws that failed in at least one case. */
  readonly failed: number;
  readonly bandDraws: number;
  readonly indexRows: number;
}

/** Draws in a scatter, and draws by which ranks are compared. */
const scattered = 1000;
const ranked = 16_384;

export async function summariseSpread(plan: SpreadPlan, origin: Origin, tables: SpreadTables): Promise<SpreadReport> {
  const { setup } = plan;
  const scratch = new Float64Array(setup.draws);
  const cases: SpreadCase[] = [];
  for (const index of plan.cases.keys()) cases.push(await summariseCase(plan, index, tables, scratch));
  return {
    ...origin,
    draws: setup.draws,
    seed: setup.seed,
    sampling: setup.samples === null ? setup.sampling : 'posterior',
    indexRows: tables.indices === null ? 0 : tables.indexRows,
    failed: tables.failed,
    cases,
  };
}

async function summariseCase(
  plan: SpreadPlan,
  index: number,
  tables: SpreadTables,
  scratch: Float64Array,
): Promise<SpreadCase> {
  const { drawn } = plan.cases[index];
  const periods = await tables.draws(findingColumn(plan, index, 'period'));
  const inputs = await summariseInputs(plan, index, tables.draws, scratch);
  const findings = await summariseFindings(plan, index, tables, { periods, scratch, ranks: inputs.ranks });
  const climates = await climatesOf(plan, index, tables.draws);
  return {
    name: drawn.name,
    model: drawn.model,
    inputs: inputs.told,
    idle: drawn.idle,
    findings: findings.told,
    bands: tables.bands === null ? [] : await bandsOf(plan, index, tables.bands),
    climates,
    bandDraws: tables.bandDraws,
    failed: periods.reduce((count, value) => count + Number(Number.isNaN(value)), 0),
    sample: { inputs: inputs.sample, findings: findings.sample },
    warnings: [
      ...drawn.warnings,
      ...(plan.setup.samples === null ? [] : fewSamplesWarnings(plan.setup.samples)),
      ...cutWarnings(inputs.told),
      ...climateWarnings(climates),
      ...groupWarnings(findings.told),
      ...leftOutWarnings(findings.told),
    ],
    notes: [...drawn.notes, ...worldNotes(plan.cases[index]), ...[periodNote(periods)].filter((note) => note !== null)],
  };
}

async function summariseInputs(plan: SpreadPlan, index: number, read: ReadColumn, scratch: Float64Array) {
  const told: SpreadInput[] = [];
  const sample: Float64Array[] = [];
  const ranks: RankOrder[] = [];
  for (const [i, input] of plan.cases[index].inputs.entries()) {
    const isThis = (place: { case: number; input: number }) => place.case === index && place.input === i;
    const values = await read(plan.inputColumns.find(({ of }) => of.some(isThis))!.name);
    const { key, label, unit, text, truncatedShare, column } = input;
    const centre = input.shown(input.centre);
    told.push({ key, label, unit, text, centre, summary: summarise(values, scratch), truncatedShare, column });
    sample.push(values.slice(0, scattered));
    if (plan.rowOf !== null) ranks.push(rankOrder(values.slice(0, ranked)));
  }
  return { told, sample, ranks };
}

function worldNotes({ drawn, inputs, findings }: PlannedCase): string[] {
  const isDrawn = inputs.some(({ key }) => /^orbit\.(ecc|e[CS]|sqrtE)/.test(key));
  const world = orNull(() => drawn.worldAt(inputs.map(({ centre }) => centre)));
  if (world === null) return [];
  const isCounted = findings.some(({ name }) => name === 'climates');
  const notes = [circleNote(world, isDrawn), isCounted ? null : warmestNote(world, drawn.options.start)];
  return notes.filter((note) => note !== null);
}

async function climatesOf(plan: SpreadPlan, index: number, read: ReadColumn): Promise<DrawnClimates | null> {
  const names = plan.cases[index].findings.map(({ name }) => name);
  if (!names.includes('climates') || !names.includes('iceFractionMean')) return null;
  const column = (name: string) => read(findingColumn(plan, index, name));
  return drawnClimates(await column('climates'), await column('iceFractionMean'));
}

interface FindingContext {
  /** Of each draw, s. */
  readonly periods: Float64Array;
  readonly scratch: Float64Array;
  /** Of the inputs, where samples give them. */
  readonly ranks: readonly RankOrder[];
}

async function summariseFindings(plan: SpreadPlan, index: number, tables: SpreadTables, context: FindingContext) {
  const { findings, drawn } = plan.cases[index];
  const centre = atCentre(plan.cases[index]);
  const periodAt = findings.findIndex(({ name }) => name === 'period');
  const missingBecause = reasonsOf(plan, index, context.periods);
  const importanceOf = await importanceReader(plan, index, tables, context.ranks);
  const told: SpreadFinding[] = [];
  const sample: (number | null)[][] = [];
  for (const [f, finding] of findings.entries()) {
    const values = await tables.draws(findingColumn(plan, index, finding.name));
    const circular = isTimeInOrbit(finding.name) && drawn.options.start === 'periodic';
    const line = circular ? circularLine(values, context) : straightLine(values, context);
    const middle = centre === null || Number.isNaN(centre[f]) ? null : centre[f];
    told.push({
      ...finding,
      atCentre: middle === null ? null : line.beside(middle, centre![periodAt]),
      summary: line.summary,
      missingBecause: line.summary.defined < 1 ? missingBecause(finding.name, values) : null,
      circular,
      histogram: histogramOf(line.values, context.scratch),
      groups: goesInSteps(finding.name) ? null : line.groups,
      importance: await importanceOf(finding.name, line),
    });
    sample.push(Array.from(values.subarray(0, scattered), (value) => (Number.isNaN(value) ? null : value)));
  }
  return { told, sample };
}

/** A finding's draws as numbers on a line, and what brings other runs of it onto the same line. */
interface Line {
  readonly summary: Summary;
  readonly values: Float64Array;
  readonly groups: readonly [Group, Group] | null;
  bring(values: Float64Array, periods: Float64Array): Float64Array;
  /** A single run's value, where it stands beside the summary. */
  beside(value: number, period: number): number;
}

function straightLine(values: Float64Array, { scratch }: FindingContext): Line {
  return {
    summary: summarise(values, scratch),
    values,
    groups: twoGroups(values, scratch),
    bring: (others) => others,
    beside: (value) => value,
  };
}

/**
 * Turns are unwrapped around their mean, and told in seconds of an orbit of the median period; groups each as a
 * whole (see `twoArcs`). A single run keeps its own seconds, in the turn that is nearest to the median.
 */
function circularLine(times: Float64Array, { periods, scratch }: FindingContext): Line {
  const period = summarise(periods, scratch).percentiles?.['50'] ?? 1;
  const values = overPeriod(times, periods);
  const turns = summariseTurns(values, scratch);
  const groups = twoArcs(values, turns.mean, scratch);
  const unwrap = (column: Float64Array) => {
    for (let i = 0; i < column.length; i++) column[i] = period * unwrapTurn(column[i], turns.mean ?? 0.5); // NaN stays
    return column;
  };
  const median = turns.percentiles?.['50'];
  return {
    summary: inSeconds(turns, period),
    values: unwrap(values), // in place: ten million draws take 80 MB a column
    groups: groups && [overTime(groups[0], period), overTime(groups[1], period)],
    bring: (others, own) => unwrap(overPeriod(others, own)),
    beside: (time, own) => (median === undefined ? time : time - own * Math.round(time / own - median)),
  };
}

function overTime({ share, from, to }: Group, period: number): Group {
  return { share, from: from * period, to: to * period };
}

/** From a finding to which inputs matter to it. */
async function importanceReader(
  plan: SpreadPlan,
  index: number,
  { indices, indexRows }: SpreadTables,
  ranks: readonly RankOrder[],
): Promise<(name: string, line: Line) => Promise<Importance>> {
  const { rowOf, dimensions } = plan;
  if (rowOf !== null) {
    const rows = Uint32Array.from({ length: Math.min(ranked, plan.setup.draws) }, (_, draw) => rowOf(draw));
    return async (_, { values }) => importanceByRanks(ranks, rankOrder(values.slice(0, ranked)), rows);
  }
  if (indices === null) return async () => noImportance('indices were not asked for');
  const again = resamples(indexRows, plan.setup.seed);
  const own = plan.cases[index].inputs.map(({ dimension }) => dimension);
  const periods = await indices(findingColumn(plan, index, 'period'));
  return async (name, line) => {
    if (line.summary.mean === null) return noImportance(line.summary.reason ?? 'no draw has a value');
    const runs = await indices(findingColumn(plan, index, name));
    const columns = { draws: line.values, further: line.bring(runs, periods), dimensions: dimensions.length, own };
    return importanceByDesign(columns, again);
  };
}

/** Name of the column of a case's finding. */
function findingColumn({ cases, findingColumns }: SpreadPlan, index: number, name: string): string {
  const before = cases.slice(0, index).reduce((sum, { findings }) => sum + findings.length, 0);
  return findingColumns[before + cases[index].findings.findIndex((finding) => finding.name === name)].name;
}

function overPeriod(times: Float64Array, periods: Float64Array): Float64Array {
  return times.map((time, i) => time / periods[i]);
}

function inSeconds(turns: Summary, period: number): Summary {
  const { mean, percentiles } = turns;
  if (mean === null || percentiles === null) return turns;
  const scaled = Object.fromEntries(percentileLevels.map((level) => [level, percentiles[level] * period]));
  return { ...turns, mean: mean * period, percentiles: scaled as typeof percentiles };
}

/** Findings with every input at its centre; null where they are not known to the tolerance. */
function atCentre({ drawn, batch }: PlannedCase): Float64Array | null {
  const row = new Float64Array(batch.columns.length);
  return orNull(() => batch.into(drawn.worldAt(drawn.inputs.map(({ centre }) => centre)), row)) ? row : null;
}

/** Null where the centre is no planet that can be computed: the draws are there all the same. */
function orNull<T>(work: () => T): T | null {
  try {
    return work();
  } catch (error) {
    if (error instanceof SimError) return null;
    throw error;
  }
}

/** None where no draw has a curve, or the centre has none to stand beside them. */
async function bandsOf(plan: SpreadPlan, index: number, read: ReadColumn): Promise<SpreadBand[]> {
  const { drawn } = plan.cases[index];
  const centres = drawn.inputs.map(({ centre }) => centre);
  const sampler = bandSampler(drawn, centres);
  if (sampler.bands.length === 0) return [];
  const middle = orNull(() => sampler.at(centres));
  if (middle === null) return [];
  const bands: SpreadBand[] = [];
  let offset = 0;
  for (const place of sampler.bands) {
    const band = await bandOf(plan, index, place, read, middle.subarray(offset, offset + place.positions.length));
    if (band === null) return [];
    bands.push(band);
    offset += place.positions.length;
  }
  return bands;
}

async function bandOf(
  plan: SpreadPlan,
  index: number,
  place: BandPlace,
  read: ReadColumn,
  atCentre: Float64Array,
): Promise<SpreadBand | null> {
  const { name, label, along, positions } = place;
  const shares = percentileLevels.map((level) => Number(level) / 100);
  const levels = shares.map(() => new Float64Array(positions.length));
  for (let i = 0; i < positions.length; i++) {
    const values = (await read(bandColumnName(plan, index, `${name}.${i}`))).filter((value) => !Number.isNaN(value));
    if (values.length === 0) return null;
    const quantiles = quantilesInto(values, shares);
    for (const [k, value] of quantiles.entries()) levels[k][i] = value;
  }
  return { label, along, positions, unit: 'K', levels, atCentre: atCentre.slice() };
}

/** Name of the column of a place on a case's curve: `orbit.17`. */
export function bandColumnName({ cases }: SpreadPlan, index: number, name: string): string {
  return columnName(cases.length, cases[index].drawn.name, name);
}
