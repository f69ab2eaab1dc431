/** What is computed: a table of many rows, each from its number alone, so that any worker may compute any of them. */
import { createHash } from 'node:crypto';

export interface Column {
  readonly name: string;
  readonly unit: string;
  readonly label: string;
}

/** What the rows depend on, under the names by which a user knows it. */
export type Settings = Readonly<Record<string, string | number | boolean | null>>;

export type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json };

export interface Job {
  /** Which arithmetic: a name in `kinds.ts`. */
  readonly kind: string;
  /** Plain data for it; crosses to each worker once. */
  readonly setup: unknown;
  /** Float64 columns; those of what was drawn come before those of what was found. */
  readonly inputs: readonly Column[];
  readonly findings: readonly Column[];
  readonly rows: number;
  /** All that the numbers depend on (scenario's sha256, seed, draws, version …): two jobs with the same settings give the same bytes. */
  readonly settings: Settings;
  /** What a command needs to go on once the rows are there; kept beside them for `gather`. */
  readonly context: Json;
}

/** The part of a job that is kept with its rows. */
export type JobRecord = Omit<Job, 'setup'>;

/** A row whose inputs gave no world, or whose world gave no findings. */
export interface Failure {
  readonly draw: number;
  readonly message: string;
}

/** Rows [from, to): a column each, NaN where a finding is undefined. Failures in the order of their draws. */
export interface Rows {
  readonly columns: readonly Float64Array[];
  readonly failures: readonly Failure[];
}

/** Rows [from, to) of the table; the same bits for a row whatever the range around it. */
export type Calculate = (from: number, to: number) => Rows;

/** From a job's setup to its arithmetic. */
export type Calculator = (setup: never) => Calculate;

/** Each loads its code only when asked. */
export type Kinds = Readonly<Record<string, () => Promise<Calculator>>>;

/** Rows [from, to). */
export interface Range {
  readonly from: number;
  readonly to: number;
}

/** Rows of a group of the Parquet file; no chunk reaches over the edge of one. */
export const groupRows = 16384;

export function columnsOf({ inputs, findings }: Pick<Job, 'inputs' | 'findings'>): readonly Column[] {
  return [...inputs, ...findings];
}

export function recordOf({ kind, inputs, findings, rows, settings, context }: Job): JobRecord {
  return { kind, inputs, findings, rows, settings, context };
}

/** sha256 of what the bytes depend on, hexadecimal. */
export function fingerprintOf({ kind, inputs, findings, rows, settings }: JobRecord): string {
  const sorted = Object.entries(settings).toSorted(([a], [b]) => (a < b ? -1 : 1));
  return createHash('sha256')
    .update(JSON.stringify([kind, inputs.map(columnParts), findings.map(columnParts), rows, sorted]))
    .digest('hex');
}

function columnParts({ name, unit, label }: Column): readonly string[] {
  return [name, unit, label];
}

/** Arithmetic of a job. Errors: what its calculator throws when the setup is wrong. */
export async function calculateOf({ kind, setup }: Pick<Job, 'kind' | 'setup'>, kinds: Kinds): Promise<Calculate> {
  const load = kinds[kind];
  if (load === undefined) throw new Error(`no arithmetic is called "${kind}": see cli/engine/kinds.ts`);
  return (await load())(setup as never);
}
