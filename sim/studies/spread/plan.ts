/**
 * What a spread draws: the uncertain inputs of every case, each with its own dimension of the draws, and the findings of its worlds.
 * An input that stands in several cases has one dimension in all of them: the cases then differ by what is told apart, not by luck.
 */

import { SimError } from '../../error.ts';
import type { FindingColumn } from '../../findings/finding.ts';
import { batchOf } from '../../models/batchOf.ts';
import { models } from '../../models/index.ts';
import type { Batch } from '../../models/model.ts';
import { inUnit, parseUnit, type Support, uncertainNumber } from '../../quantity/index.ts';
import { type CaseDrawn, casesDrawn, type UncertainInput } from '../../scenario/drawn.ts';
import { columnName, findingColumns } from '../columnName.ts';
import { type RowChooser, rowsByWeight, rowsEvenly } from './posteriorRow.ts';
import { pseudoRandomDraws } from './pseudoRandom.ts';
import { sobolDraws } from './sobol.ts';
import type { UniformDraws } from './uniformDraws.ts';

/** What the numbers of a spread depend on. Plain data: it crosses to every worker. */
export interface SpreadSetup {
  readonly text: string;
  readonly file: string;
  /** Names of the cases; null for all. */
  readonly only: readonly string[] | null;
  readonly draws: number;
  readonly seed: number;
  readonly sampling: 'sobol' | 'random';
  /** SI samples by key, where the scenario names some. */
  readonly samples: Samples | null;
}

export interface Samples {
  readonly count: number;
  readonly values: ReadonlyMap<string, Float64Array>;
  readonly weights: Float64Array | null;
}

export interface PlannedInput extends UncertainInput {
  /** Of the draws. A posterior's inputs share the one that chooses the row. */
  readonly dimension: number;
  /** SI value at a number in (0, 1). */
  at(share: number): number;
  readonly truncatedShare: number;
  /** From SI to what tables show: in the unit in which it was typed, an angle of the samples near the centre. */
  shown(value: number): number;
}

export interface PlannedCase {
  readonly drawn: CaseDrawn;
  readonly inputs: readonly PlannedInput[];
  readonly findings: readonly FindingColumn[];
  /** For worlds with the windows of the scenario. */
  readonly batch: Batch;
}

export interface TableColumn {
  readonly name: string;
  readonly unit: string;
  readonly label: string;
}

export interface SpreadPlan {
  readonly setup: SpreadSetup;
  readonly cases: readonly PlannedCase[];
  readonly draws: UniformDraws;
  /** Which of the samples a draw takes; null without samples. */
  readonly rowOf: ((draw: number) => number) | null;
  /** Keys by their dimension; `posterior` for the choice of a row. */
  readonly dimensions: readonly string[];
  /** Columns of the table of draws. Inputs in the unit in which they were typed; each with the cases and inputs that it stands for. */
  readonly inputColumns: readonly (TableColumn & { readonly of: readonly { case: number; input: number }[] })[];
  readonly findingColumns: readonly TableColumn[];
}

/** Dimension of the choice of a row, where there are samples. */
export const rowDimension = 'posterior';

/** Of setups that are in use: the tables of a spread share theirs. */
const known = new WeakMap<SpreadSetup, SpreadPlan>();

/** The same plan for the same setup. Errors: as `casesDrawn`; SimError where nothing is uncertain, or a spread has nothing within its bounds. */
export function planSpread(setup: SpreadSetup): SpreadPlan {
  const plan = known.get(setup) ?? newPlan(setup);
  known.set(setup, plan);
  return plan;
}

function newPlan(setup: SpreadSetup): SpreadPlan {
  const drawn = casesDrawn(setup.text, setup.file, setup.only ?? undefined);
  const keys = [
    ...new Set(drawn.flatMap(({ inputs }) => inputs.filter(({ column }) => column === null).map(({ key }) => key))),
  ];
  const dimensions = setup.samples === null ? keys : [rowDimension, ...keys];
  if (drawn.every(({ inputs }) => inputs.length === 0)) throw nothingUncertain(drawn, setup.file);
  const chooser = setup.samples && rowChooser(setup.samples);
  const cases = drawn.map((one) => planCase(one, dimensions, setup.samples, chooser));
  const draws = setup.sampling === 'sobol' ? sobolDraws(setup.seed) : pseudoRandomDraws(setup.seed);
  return {
    setup,
    cases,
    draws,
    rowOf: chooser && ((draw) => chooser(draws.at(draw, 0))),
    dimensions,
    inputColumns: inputColumns(cases),
    findingColumns: findingColumns(cases.map(({ drawn: { name }, findings }) => ({ name, findings }))),
  };
}

function nothingUncertain(drawn: readonly CaseDrawn[], file: string): SimError {
  const idle = drawn.flatMap((one) => one.idle.map(({ key, reason }) => `${key}: ${reason}`));
  const what =
    idle.length > 0
      ? `no uncertain input changes a finding (${[...new Set(idle)].join('; ')})`
      : 'no input has a spread';
  return new SimError(
    file,
    what,
    'Write one as `0.62 ± 0.03`, `0.1 to 0.5` or `< 0.12 (95%)`, or name posterior samples',
  );
}

function rowChooser({ count, weights }: Samples): RowChooser {
  return weights === null ? rowsEvenly('posterior', count) : rowsByWeight('posterior.weights', weights);
}

function planCase(
  drawn: CaseDrawn,
  dimensions: readonly string[],
  samples: Samples | null,
  chooser: RowChooser | null,
): PlannedCase {
  const inputs = drawn.inputs.map((input) => planInput(input, dimensions, samples, chooser));
  const centre = drawn.worldAt(drawn.inputs.map((input) => input.centre));
  const batch = batchOf(models[drawn.model], drawn.options, drawn.windows, centre);
  return { drawn, inputs, findings: batch.columns, batch };
}

function planInput(
  input: UncertainInput,
  dimensions: readonly string[],
  samples: Samples | null,
  chooser: RowChooser | null,
): PlannedInput {
  const unit = parseUnit(input.unit);
  const shown = (value: number) => inUnit(value, unit);
  if (input.column !== null) {
    const column = samples?.values.get(input.key);
    if (!column || !chooser) throw new Error(`samples of ${input.key} are missing`);
    const near = (value: number) => shown(nearCentre(value, input));
    return { ...input, dimension: 0, at: (share) => column[chooser(share)], truncatedShare: 0, shown: near };
  }
  const { quantile, truncatedShare } = uncertainNumber(
    input.key,
    { value: input.centre, distribution: input.distribution },
    supportOf(input),
  );
  return { ...input, dimension: dimensions.indexOf(input.key), at: quantile, truncatedShare, shown };
}

/** Samples of an angle that comes round, within half a turn of the centre: 359° and 1° are neighbours, and their median is not 180°. */
function nearCentre(value: number, { period, centre }: UncertainInput): number {
  return period === null ? value : value - period * Math.floor((value - centre) / period + 0.5);
}

/** Angles come round: those with a whole turn wrap, those between two directions are mirrored at 0° and 180°. */
function supportOf({ bounds, period, centre }: UncertainInput): Support {
  if (period !== null) return { kind: 'wrapped', from: centre - period / 2, period };
  const { low, high } = bounds ?? { low: Number.NEGATIVE_INFINITY, high: Number.POSITIVE_INFINITY };
  return { kind: low === 0 && high === Math.PI ? 'folded' : 'bounded', low, high };
}

function inputColumns(cases: readonly PlannedCase[]): SpreadPlan['inputColumns'] {
  const columns: { name: string; unit: string; label: string; of: { case: number; input: number }[] }[] = [];
  const all = cases.flatMap(({ inputs }, c) => inputs.map((input, i) => ({ input, case: c, i })));
  for (const { input, case: c, i } of all) {
    const alike = all.filter((other) => other.input.key === input.key);
    const isShared = alike.every((other) => sameDraws(other.input, input));
    const name = isShared ? input.key : columnName(cases.length, cases[c].drawn.name, input.key);
    const there = columns.find((column) => column.name === name);
    if (there) there.of.push({ case: c, input: i });
    else columns.push({ name, unit: input.unit, label: input.label, of: [{ case: c, input: i }] });
  }
  return columns;
}

function sameDraws(a: UncertainInput, b: UncertainInput): boolean {
  return (
    a.unit === b.unit &&
    a.centre === b.centre &&
    a.column === b.column &&
    JSON.stringify(a.distribution) === JSON.stringify(b.distribution)
  );
}
