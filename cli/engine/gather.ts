/** Joins the rows of shards, computed anywhere, to the table that one run would have written. */
import { existsSync } from 'node:fs';
import { SimError } from '../../sim/error.ts';
import { writingFault } from '../output/writingFault.ts';
import type { JobRecord, Range } from './job.ts';
import { differences, shardWords } from './manifest.ts';
import { missing } from './plan.ts';
import { findStore, type Store, workFolder } from './store.ts';
import { type Piece, sourceOf, type TableFiles, writeTable } from './table.ts';

export interface Gathered {
  readonly files: TableFiles;
  /** What the shards were told to compute, with the context for going on. */
  readonly job: JobRecord;
}

/**
 * Reads the work folders of `table` in `folders` and writes its files to `out`. The bytes are those of a single run.
 * Errors: SimError that names the folders when rows are missing, stand in two folders, or are of different runs.
 */
export async function gatherTable(
  folders: readonly string[],
  table: string,
  out: string,
  checkpoint: () => void = () => undefined,
): Promise<Gathered> {
  const stores = folders.map((folder) => requireStore(folder, table));
  const [first, ...others] = stores as [Store, ...Store[]];
  for (const store of others) refuseMixture(first, store);
  refuseDivisions(stores);
  refuseOverlaps(stores);
  refuseGaps(stores);
  const { job } = first.manifest;
  try {
    return {
      files: await writeTable({ folder: out, table, job }, sourceOf(piecesOf(stores)), checkpoint),
      job,
    };
  } catch (error) {
    throw writingFault(out, error);
  }
}

/** Errors: SimError where no manifest is. */
export function requireStore(folder: string, table: string): Store {
  const path = workFolder(folder, table);
  const store = findStore(path);
  if (store !== null) return store;
  if (existsSync(path))
    throw new SimError(path, 'manifest.json is missing: of which run it is cannot be told', 'Compute its rows again');
  throw new SimError(folder, `no rows of ${table} are kept there`, 'Name the output folders of the shards');
}

function refuseMixture(first: Store, other: Store): void {
  const found = differences(first.manifest.job, other.manifest.job, ['in the first', 'in the second']);
  if (found.length === 0) return;
  const both = `${first.folder} and ${other.folder}`;
  throw new SimError(both, `these are parts of different runs (${found.join('; ')})`, 'Gather the shards of one run');
}

/** Shards of 3/64 and of 5/32 overlap in some rows and miss others: what is wrong is the division. */
function refuseDivisions(stores: readonly Store[]): void {
  const [first, ...others] = stores as [Store, ...Store[]];
  const countOf = ({ manifest }: Store) => manifest.shard?.count ?? null;
  const other = others.find((store) => countOf(store) !== countOf(first));
  if (other === undefined) return;
  const words = ({ manifest, folder }: Store) => `${shardWords(manifest.shard)} is in ${folder}`;
  throw new SimError(
    `${first.folder} and ${other.folder}`,
    `these are parts of different divisions (${words(first)}, ${words(other)})`,
    'Gather the shards of one division, e.g. 1/64 to 64/64',
  );
}

function piecesOf(stores: readonly Store[]): readonly Piece[] {
  return stores.flatMap((store) => store.chunks().map((range) => ({ ...range, read: () => store.read(range) })));
}

function refuseOverlaps(stores: readonly Store[]): void {
  const owned = stores.flatMap((store) => store.chunks().map((range) => ({ ...range, store })));
  const sorted = owned.toSorted((a, b) => a.from - b.from);
  for (const [index, later] of sorted.slice(1).entries()) {
    const earlier = sorted[index]!;
    if (later.from >= earlier.to) continue;
    throw new SimError(
      `${earlier.store.folder} and ${later.store.folder}`,
      `both hold rows ${rowsWords({ from: later.from, to: Math.min(earlier.to, later.to) })}`,
      'Name each shard once, and shards of one division',
    );
  }
}

function refuseGaps(stores: readonly Store[]): void {
  const whole = { from: 0, to: stores[0]!.manifest.job.rows };
  const unfinished = stores.filter(({ manifest, chunks }) => missing(manifest.range, chunks()).length > 0);
  if (unfinished.length > 0) {
    const names = unfinished.map(({ folder, manifest }) => `${shardWords(manifest.shard)} in ${folder}`);
    throw new SimError(
      unfinished[0]!.folder,
      `not finished: ${names.join(', ')}`,
      'Run it there again with --resume, then gather',
    );
  }
  const gaps = missing(
    whole,
    stores.map(({ manifest }) => manifest.range),
  );
  if (gaps.length === 0) return;
  throw new SimError(
    stores.map(({ folder }) => folder).join(', '),
    `rows ${gaps.map(rowsWords).join(', ')} are in none of them${absentShards(stores)}`,
    'Name the folders of all shards',
  );
}

/** `: shards 3, 7 of 64`, where all are of one division. */
function absentShards(stores: readonly Store[]): string {
  const shards = stores.map(({ manifest }) => manifest.shard);
  const count = shards[0]?.count;
  if (count === undefined || shards.some((shard) => shard?.count !== count)) return '';
  const there = new Set(shards.map((shard) => shard!.index));
  const absent = Array.from({ length: count }, (_, index) => index + 1).filter((index) => !there.has(index));
  return `: shard ${absent.join(', ')} of ${count}`;
}

function rowsWords({ from, to }: Range): string {
  return to - from === 1 ? `${from}` : `${from} to ${to - 1}`;
}
