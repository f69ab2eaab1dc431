/** Computes a table: what is missing of it, over all workers, chunk by chunk; then its files. */
import { SimError } from '../../sim/error.ts';
import { Interrupted } from '../exit.ts';
import type { Io } from '../io.ts';
import type { Phase } from '../output/phases.ts';
import { grouped, showProgress } from '../output/progressBar.ts';
import { writingFault } from '../output/writingFault.ts';
import { arrivalsOf } from './arrivals.ts';
import { type Interruption, resumeLine } from './interruption.ts';
import { columnsOf, fingerprintOf, type Job, type Kinds, recordOf } from './job.ts';
import { type LanesWork, runLanes } from './lanes.ts';
import { refuseHeld, whileHeld } from './lock.ts';
import type { Manifest } from './manifest.ts';
import { countRows, missing, type Shard, shardRange } from './plan.ts';
import { type Pool, poolOf } from './pool.ts';
import { requireDisk } from './room.ts';
import { findFitting, findStore, openStore, type Store, workFolder } from './store.ts';
import { finishedTable, type TableFiles, writeTable } from './table.ts';

export interface TableJob {
  /** Name of the table's file without its extension: `draws`. */
  readonly table: string;
  readonly job: Job;
  /** Where the table is one of several. */
  readonly phase?: Phase | undefined;
}

export interface ComputeOptions {
  /** Output folder, absolute. */
  readonly folder: string;
  /** Where finished tables go; the output folder where it is left out. */
  readonly tables?: string;
  readonly shard: Shard | null;
  readonly resume: boolean;
  /** How many workers; null for one a processor, where it pays. */
  readonly workers: number | null;
  readonly quiet: boolean;
  /** With which the program was called: how to go on is told with them. */
  readonly words: readonly string[];
}

export type EngineIo = Pick<Io, 'stderr' | 'stderrIsTTY' | 'stderrColumns' | 'now' | 'signals' | 'worker'>;

export interface Computed {
  /** Null for a shard: its rows stay in the work folder, for `gather`. */
  readonly files: TableFiles | null;
  readonly workFolder: string;
  /** Removes the rows that were kept for going on. To be called when nothing is left to do that may fail. */
  discardWork(): Promise<void>;
}

/** What tables are computed with. */
interface Run {
  readonly options: ComputeOptions;
  readonly io: EngineIo;
  readonly pool: Pool;
  readonly interruption: Interruption;
}

/**
 * Computes of each table the rows that are not there yet, and writes it, one after the other. The bytes depend on the jobs alone.
 * Errors: SimError when the folder cannot be written, holds other rows of any of them, or is in use: before the first is computed;
 * Interrupted after a signal. What is finished stays.
 */
export async function computeTables(
  tables: readonly TableJob[],
  options: ComputeOptions,
  kinds: Kinds,
  io: EngineIo,
  interruption: Interruption,
): Promise<readonly Computed[]> {
  for (const { job } of tables) requireSound(job, options.shard);
  const finished = await foundFinished(tables, options);
  await refuseBefore(
    tables.filter((_, i) => finished[i] === null),
    options,
    io,
  ).catch((error) => {
    throw writingFault(options.folder, error);
  });
  const pool = poolOf(options.workers, kinds, io.worker);
  const computed: Computed[] = [];
  try {
    for (const [i, table] of tables.entries()) {
      const files = finished[i]!;
      computed.push(
        files === null
          ? await computeTable(table, { options, io, pool, interruption })
          : computedOf(files, table, options, leftOver(table, options)),
      );
    }
    return computed;
  } finally {
    await pool.close();
  }
}

/** Of each table its files, when an earlier run has finished them; else null. */
async function foundFinished(tables: readonly TableJob[], options: ComputeOptions) {
  const found: (TableFiles | null)[] = [];
  for (const { table, job } of tables)
    found.push(options.resume && options.shard === null ? await finishedAnywhere(options, table, job) : null);
  return found;
}

/** In its place, or waiting for the other tables of its run. */
async function finishedAnywhere(
  { folder, tables = folder }: ComputeOptions,
  table: string,
  job: Job,
): Promise<TableFiles | null> {
  const record = recordOf(job);
  return (await finishedTable(tables, table, record)) ?? (await finishedTable(folder, table, record));
}

/** What would be refused when its turn comes is refused now: an hour of other tables later is late to hear of it. */
async function refuseBefore(tables: readonly TableJob[], options: ComputeOptions, io: EngineIo): Promise<void> {
  const needs = tables.map((table) => {
    const folder = workFolder(options.folder, table.table);
    const manifest = manifestOf(table, options);
    refuseHeld(folder);
    const store = findFitting(folder, manifest, options.resume);
    const missingRows = countRows(missing(manifest.range, store?.chunks() ?? []));
    return { missingRows, job: table.job, isTable: options.shard === null };
  });
  const warning = await requireDisk(options.folder, needs);
  if (warning !== null) say(`warning: ${warning}`, options, io);
}

async function computeTable(table: TableJob, run: Run): Promise<Computed> {
  const { options, io, interruption } = run;
  const folder = workFolder(options.folder, table.table);
  const warn = (text: string) => say(`warning: ${text}`, options, io);
  return attempt(folder, run, () =>
    whileHeld(folder, warn, async (isShared) => {
      const store = await openStore(folder, manifestOf(table, options), { resume: options.resume, isShared });
      const found = countRows(store.chunks());
      if (found > 0) say(`${table.table}: going on with ${grouped(found)} finished rows`, options, io);
      requireGoing(interruption, store, options);
      const files = await fillAndWrite(table, store, run);
      return computedOf(files, table, options, files === null ? null : store);
    }),
  );
}

function say(text: string, { quiet }: ComputeOptions, { stderr }: EngineIo): void {
  if (!quiet) stderr.write(`${text}\n`);
}

function computedOf(
  files: TableFiles | null,
  { table }: TableJob,
  { folder }: ComputeOptions,
  store: Store | null,
): Computed {
  return { files, workFolder: workFolder(folder, table), discardWork: async () => store?.remove() };
}

/** The store of this job, when a run that finished its table had no time to remove it. */
function leftOver({ table, job }: TableJob, { folder }: ComputeOptions): Store | null {
  const store = findStore(workFolder(folder, table));
  return store?.manifest.fingerprint === fingerprintOf(recordOf(job)) ? store : null;
}

function requireSound(job: Job, shard: Shard | null): void {
  const names = ['draw', ...columnsOf(job).map(({ name }) => name)];
  if (new Set(names).size !== names.length) throw new Error('two columns of the table have the same name');
  if (!(Number.isSafeInteger(job.rows) && job.rows > 0)) throw new Error(`a table cannot have ${job.rows} rows`);
  if (shard !== null && !(shard.index >= 1 && shard.index <= shard.count))
    throw new SimError(
      '--shard',
      `there is no shard ${shard.index} of ${shard.count}`,
      'Count from 1, e.g. --shard 3/64',
    );
}

function manifestOf({ table, job }: TableJob, { shard }: ComputeOptions): Manifest {
  const range = shard === null ? { from: 0, to: job.rows } : shardRange(job.rows, shard);
  return { table, job: recordOf(job), fingerprint: fingerprintOf(recordOf(job)), range, shard };
}

/** Computes what is missing, and writes the table meanwhile; null for a shard. */
async function fillAndWrite({ table, job, phase }: TableJob, store: Store, run: Run): Promise<TableFiles | null> {
  const { options, interruption } = run;
  const arrivals = arrivalsOf(store);
  const target = { folder: options.tables ?? options.folder, table, job: recordOf(job) };
  let stopped = false;
  const writing =
    options.shard === null ? writeTable(target, arrivals, () => requireGoing(interruption, store, options)) : null;
  writing?.catch(() => {
    stopped = true; // told below
  });
  try {
    await fillStore({ table, job, phase }, store, run, { landed: arrivals.landed, stopped: () => stopped });
  } catch (error) {
    arrivals.fail(error);
    await writing?.catch(() => undefined); // it leaves nothing of its own
    throw error;
  }
  return writing;
}

async function fillStore(
  { table, job, phase }: TableJob,
  store: Store,
  { options, io, pool, interruption }: Run,
  others: Pick<LanesWork, 'landed' | 'stopped'>,
): Promise<void> {
  const whole = store.manifest.range;
  const gaps = missing(whole, store.chunks());
  if (gaps.length === 0) return;
  const total = countRows([whole]);
  const already = total - countRows(gaps);
  const progress = showProgress({ label: table, total, already, quiet: options.quiet, phase }, io);
  try {
    await runLanes({ job, gaps, store, pool, progress, interruption, ...others });
  } finally {
    progress.clear();
  }
  requireGoing(interruption, store, options);
}

/** Errors: Interrupted, saying what is kept and how to go on, when a signal has come and something is left to do. */
function requireGoing({ requested }: Interruption, store: Store, options: ComputeOptions): void {
  if (!requested) return;
  const kept = `${grouped(countRows(store.chunks()))} of ${grouped(countRows([store.manifest.range]))} rows`;
  throw new Interrupted(`Interrupted: ${kept} are kept in ${store.folder}. To go on:\n  ${resumeLine(options.words)}`);
}

/** Says that something is kept only where something is, and then whatever has happened. */
async function attempt<T>(folder: string, { options, io }: Run, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (!hasRows(folder)) throw readable(folder, error, []);
    const fault = readable(folder, error, [
      `What is finished stays there. When this is mended, go on: ${resumeLine(options.words)}`,
    ]);
    const isTold = fault instanceof SimError || fault instanceof Interrupted;
    if (!isTold) io.stderr.write(`What is finished stays in ${folder}. To go on: ${resumeLine(options.words)}\n`);
    throw fault;
  }
}

/** A SimError for what the user can mend; anything else as it is. `kept` is what is said of the rows. */
function readable(folder: string, error: unknown, kept: readonly [string] | readonly []): unknown {
  if ((error as NodeJS.ErrnoException).code !== 'ERR_WORKER_OUT_OF_MEMORY') return writingFault(folder, error, ...kept);
  const mend = 'Allow Node more, e.g. NODE_OPTIONS=--max-old-space-size=8192 (in MB)';
  return new SimError(folder, 'a thread that computed its rows ran out of memory', [mend, ...kept].join('. '), error);
}

function hasRows(folder: string): boolean {
  try {
    return (findStore(folder)?.chunks().length ?? 0) > 0;
  } catch {
    return false; // it cannot even be read
  }
}
