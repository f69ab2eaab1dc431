/** The file of samples that a scenario names: its columns in SI, or what is wrong with it. */
import { createHash } from 'node:crypto';
import { dirname, relative, resolve, sep } from 'node:path';
import { SimError } from '../sim/error.ts';
import { parseUnit } from '../sim/quantity/index.ts';
import { toSi } from '../sim/quantity/units.ts';
import { type Posterior, type PosteriorColumn, sampleFault } from '../sim/scenario/posterior.ts';
import { bytesOf, textOf } from './bytes.ts';
import type { RawColumns } from './samplesColumns.ts';
import { columnsOfCsv } from './samplesCsv.ts';
import type { ScenarioFile } from './scenarioFile.ts';

/** Samples of the inputs of a scenario. */
export interface Samples {
  readonly count: number;
  /** Key → its samples, SI (count,). */
  readonly values: ReadonlyMap<string, Float64Array>;
  /** Not negative, not all zero (count,); null where all samples count the same. */
  readonly weights: Float64Array | null;
  /** Of the file's bytes, hexadecimal. */
  readonly sha256: string;
}

/** Where the samples are. */
export function samplesPath({ file }: Posterior, scenarioFile: string, cwd: string): string {
  return resolve(cwd, dirname(scenarioFile), file);
}

/** The path to the samples of a scenario from a folder (absolute), as a scenario there would name it; null without samples. */
export function samplesFrom(folder: string, { file, scenario }: ScenarioFile, cwd: string): string | null {
  if (!scenario.posterior) return null;
  return relative(folder, samplesPath(scenario.posterior, file, cwd))
    .split(sep)
    .join('/');
}

/**
 * Reads CSV (RFC 4180 with a header; lines that start with # are comments) or Parquet, whichever the file is.
 * Units:  those of the columns → SI.
 * Errors: SimError that names file, row and column: no such file or column, no number, not finite, out of the bounds of its key, weights that are negative
 *         or all zero, no sample.
 */
export async function readSamples(posterior: Posterior, scenarioFile: string, cwd: string): Promise<Samples> {
  const path = samplesPath(posterior, scenarioFile, cwd);
  const named = relative(cwd, path) || posterior.file;
  const bytes = bytesOf(named, path, 'a file of samples');
  const names = [...posterior.columns.map(({ column }) => column), ...(posterior.weights ? [posterior.weights] : [])];
  const raw = await rawColumns(bytes, named, names);
  if (raw.count === 0) throw new SimError(named, 'there are no samples in it', 'Write one sample a row');
  const values = new Map(posterior.columns.map((column) => [column.key, samplesOf(raw, column)] as const));
  const weights = posterior.weights === null ? null : checkWeights(raw, posterior.weights, named);
  return { count: raw.count, values, weights, sha256: createHash('sha256').update(bytes).digest('hex') };
}

async function rawColumns(bytes: Uint8Array, file: string, names: readonly string[]): Promise<RawColumns> {
  if (!isParquet(bytes)) {
    const text = textOf(bytes, file, 'Write the samples as CSV in UTF-8, or as Parquet');
    return columnsOfCsv(text, file, names);
  }
  const { columnsOfParquet } = await import('./samplesParquet.ts'); // loaded only where there is such a file
  return columnsOfParquet(bytes, file, names);
}

/** By its first four bytes, whatever its name. */
function isParquet(bytes: Uint8Array): boolean {
  return String.fromCharCode(...bytes.subarray(0, 4)) === 'PAR1';
}

function checked({ columns, placeOf }: RawColumns, name: string): Float64Array {
  const column = columns.get(name)!;
  const bad = column.findIndex((value) => !Number.isFinite(value));
  if (bad < 0) return column;
  const mend = 'Leave the row out, or correct the number';
  throw new SimError(`${placeOf(bad)}: ${name}`, `${column[bad]} is no finite number`, mend);
}

function checkWeights(raw: RawColumns, name: string, file: string): Float64Array {
  const weights = checked(raw, name);
  const negative = weights.findIndex((value) => value < 0);
  if (negative >= 0) {
    const what = `the weight ${weights[negative]} is negative`;
    throw new SimError(`${raw.placeOf(negative)}: ${name}`, what, 'A weight is zero or more, and not its logarithm');
  }
  if (weights.every((value) => value === 0)) {
    throw new SimError(`${file}: ${name}`, 'all weights are zero', 'Name another column, or delete `weights`');
  }
  return weights;
}

/** SI, each within what its key takes. */
function samplesOf(raw: RawColumns, about: PosteriorColumn): Float64Array {
  const unit = parseUnit(about.unit);
  const column = checked(raw, about.column).map((value) => toSi(value, unit));
  const faults = [...column.keys()].filter((row) => sampleFault(about, column[row]!) !== null);
  const [first] = faults;
  if (first === undefined) return column;
  const { what, mend } = sampleFault(about, column[first]!)!;
  const others = faults.length === 1 ? '' : ` (as are ${faults.length} of ${column.length} samples)`;
  throw new SimError(`${raw.placeOf(first)}: ${about.column}`, `${what}${others}`, mend);
}
