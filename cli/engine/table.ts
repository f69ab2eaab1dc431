/** From rows in pieces to the files of a table: the Parquet file, and a list of the draws that failed. */
import { closeSync, existsSync, openSync, writeSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { setImmediate } from 'node:timers/promises';
import { csvField, csvHeader } from '../output/csv.ts';
import type { MadeBefore } from '../output/folder.ts';
import { makeFolder } from '../output/makeFolder.ts';
import {
  type Column,
  columnsOf,
  type Failure,
  fingerprintOf,
  groupRows,
  type JobRecord,
  type Range,
  type Rows,
} from './job.ts';
import { land, removeAbandoned } from './landing.ts';
import { countRows, missing } from './plan.ts';

/** Some rows that are there, and how to get them. */
export interface Piece extends Range {
  read(): Rows;
}

/** Where the rows of a table come from, a row group at a time and in order. */
export interface Source {
  /** Pieces that cover a row group once, as soon as all are there. Errors: when they will never be. */
  group(range: Range): Promise<readonly Piece[]>;
}

/** Of pieces that cover all rows once, none of them over the edge of a row group. */
export function sourceOf(pieces: readonly Piece[]): Source {
  const sorted = pieces.toSorted((a, b) => a.from - b.from);
  let next = 0;
  return {
    group: async ({ to }) => {
      const start = next;
      while (next < sorted.length && sorted[next]!.from < to) next++;
      return sorted.slice(start, next);
    },
  };
}

export interface TableFiles {
  readonly path: string;
  readonly rows: number;
  readonly failed: number;
  /** Where the failed draws are listed; null when none failed. */
  readonly failedPath: string | null;
}

/**
 * Where tables wait that are whole, while others of the same run are not: they go to their places all at once, so that a folder
 * never holds tables of two runs.
 */
export function waitingFolder(folder: string): string {
  return join(folder, 'tables.work');
}

/** The files of finished tables, to be moved to their places in `folder` with the other files of their run. */
export function madeBefore(folder: string, tables: readonly TableFiles[]): MadeBefore {
  const paths = tables.flatMap(({ path, failedPath }) => [path, ...(failedPath === null ? [] : [failedPath])]);
  const clean = tables.filter(({ failedPath }) => failedPath === null);
  return {
    files: paths.filter((path) => dirname(path) !== folder).map((path) => ({ name: basename(path), path })),
    removed: clean.map(({ path }) => basename(tablePaths(folder, basename(path, '.parquet')).failedPath)),
  };
}

/** To be called when the tables stand in their places. */
export async function discardWaiting(folder: string): Promise<void> {
  await rm(waitingFolder(folder), { recursive: true, force: true });
}

/** What a row of a table is called where rows are listed: a draw, or a node of a grid. */
function rowName(table: string): string {
  return table === 'grid' ? 'node' : 'draw';
}

/** `failed.csv` for the draws themselves, `failed-indices.csv` for a table `indices`. */
export function tablePaths(folder: string, table: string): { readonly path: string; readonly failedPath: string } {
  const failed = table === 'draws' ? 'failed.csv' : `failed-${table}.csv`;
  return { path: join(folder, `${table}.parquet`), failedPath: join(folder, failed) };
}

/**
 * Writes the files of a table, a row group as soon as it is there. Holds one group at a time. `checkpoint` is called between
 * groups, and may throw. The Parquet file comes last: where it stands, all is done.
 */
export async function writeTable(
  { folder, table, job }: { readonly folder: string; readonly table: string; readonly job: JobRecord },
  source: Source,
  checkpoint: () => void,
): Promise<TableFiles> {
  const { createParquet } = await import('../output/parquet.ts');
  const { path, failedPath } = tablePaths(folder, table);
  await makeFolder(folder);
  await removeAbandoned(folder);
  return land(path, async (temporary) => {
    const file = createParquet(temporary, columnsOf(job));
    try {
      const failed = await land(failedPath, (list) => fill(file.append, list, { ...job, table }, source, checkpoint));
      if (failed === 0) await rm(failedPath);
      file.finish({ settings: JSON.stringify(job.settings), fingerprint: fingerprintOf(job), failed: String(failed) });
      return { path, rows: job.rows, failed, failedPath: failed === 0 ? null : failedPath };
    } finally {
      file.close();
    }
  });
}

/** The files of this very table, when an earlier run has finished them and all are there; else null. */
export async function finishedTable(folder: string, table: string, job: JobRecord): Promise<TableFiles | null> {
  const { openParquet } = await import('../output/parquetReader.ts');
  const { path, failedPath } = tablePaths(folder, table);
  const file = await openParquet(path).catch(() => null); // none, or none of ours
  if (file === null) return null;
  await file.close();
  if (file.metadata.fingerprint !== fingerprintOf(job)) return null;
  const failed = Number(file.metadata.failed);
  if (failed > 0 && !existsSync(failedPath)) return null;
  return { path, rows: file.rows, failed, failedPath: failed === 0 ? null : failedPath };
}

/** Gives the number of failed rows. */
async function fill(
  append: (from: number, columns: readonly Float64Array[]) => void,
  listPath: string,
  job: JobRecord & { readonly table: string },
  source: Source,
  checkpoint: () => void,
): Promise<number> {
  const list = openSync(listPath, 'w');
  let failed = 0;
  try {
    writeText(list, failedHeader(rowName(job.table), job.inputs));
    for (let from = 0; from < job.rows; from += groupRows) {
      const to = Math.min(from + groupRows, job.rows);
      const pieces = await source.group({ from, to });
      requireOnce({ from, to }, pieces);
      const group = emptyGroup(from, to - from, columnsOf(job).length);
      for (const piece of pieces) copyInto(group, piece);
      append(from, group.columns);
      writeText(list, group.failures.map((failure) => failedLine(failure, group, job.inputs.length)).join(''));
      failed += group.failures.length;
      await setImmediate(); // a signal is heard between groups
      checkpoint();
    }
    return failed;
  } finally {
    closeSync(list);
  }
}

/** A source that breaks its promise would leave rows that nobody computed, or count failures twice. */
function requireOnce(range: Range, pieces: readonly Piece[]): void {
  if (missing(range, pieces).length === 0 && countRows(pieces) === countRows([range])) return;
  throw new Error(`rows ${range.from} to ${range.to - 1} are not all there, or some of them twice`);
}

interface Group {
  readonly from: number;
  readonly columns: readonly Float64Array[];
  readonly failures: Failure[];
}

function emptyGroup(from: number, rows: number, columns: number): Group {
  return { from, columns: Array.from({ length: columns }, () => new Float64Array(rows).fill(NaN)), failures: [] };
}

function copyInto({ from, columns, failures }: Group, piece: Piece): void {
  const rows = piece.read();
  for (const [index, column] of columns.entries()) column.set(rows.columns[index]!, piece.from - from);
  failures.push(...rows.failures);
}

function failedHeader(row: string, inputs: readonly Column[]): string {
  return `${[row, ...inputs.map(({ name, unit }) => csvHeader(name, unit)), 'message'].map(csvField).join(',')}\n`;
}

/** An input that could not even be drawn is empty. */
function failedLine({ draw, message }: Failure, { from, columns }: Group, inputs: number): string {
  const values = columns.slice(0, inputs).map((column) => column[draw - from]!);
  const fields = values.map((value) => (Number.isFinite(value) ? String(value) : ''));
  return `${[draw, ...fields, csvField(message)].join(',')}\n`;
}

function writeText(file: number, text: string): void {
  const bytes = Buffer.from(text);
  for (let at = 0; at < bytes.length; ) at += writeSync(file, bytes, at);
}
