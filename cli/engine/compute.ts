/** Computes a table: what is missing of it, over all workers, chunk by chunk; then its files. */
import { SimError } from '../../sim/error.ts';
import { Interrupted } from '../exit.ts';
import type { Io } from '../io.ts';
import { commandLine } from '../output/history.ts';
import type { Phase } from '../output/phases.ts';
import { grouped, showProgress } from '../output/progressBar.ts';
import { writingFault } from '../output/writingFault.ts';
import { arrivalsOf } from './arrivals.ts';
import { type Interruption, listen } from './interruption.ts';
import { columnsOf, fingerprintOf, type Job, type Kinds, recordOf } from './job.ts';
import { type LanesWork, runLanes } from './lanes.ts';
import { countRows, missing, type Shard, shardRange } from './plan.ts';
import { type Pool, poolOf } from './pool.ts';
import { requireDisk } from './room.ts';
import { findStore, openStore, type Store, workFolder } from './store.ts';
import { finishedTable, type TableFiles, writeTable } from './table.ts';

export interface ComputeOptions {
  /** Name of the table's file without its extension: `draws`. */
  readonly table: string;
  /** Output folder, absolute. */
  readonly folder: string;
  readonly shard: Shard | null;
  readonly resume: boolean;
  readonly quiet: boolean;
  /** Where the table is one of several. */
  readonly phase?: Phase | undefined;
  /** With which the program was called: how to go on is told with them. */
  readonly words: readonly string[];
}

type EngineIo = Pick<Io, 'stderr' | 'stderrIsTTY' | 'stderrColumns' | 'now' | 'signals' | 'worker'>;

export interface Computed {
  /** Null for a shard: its rows stay in the work folder, for `gather`. */
  readonly files: TableFiles | null;
  readonly workFolder: string;
  /** Removes the rows that were kept for going on. To be called when nothing is left to do that may fail. */
  discardWork(): Promise<void>;
}

/** What a table is computed with. */
interface Run {
  readonly options: ComputeOptions;
  readonly io: EngineIo;
  readonly pool: Pool;
  readonly interruption: Interruption;
}

/** Calls `work` with a pool for all the tables of a command (`poolOf`), and lets the threads go when it has ended. */
export async function withPool<T>(
  workers: number | null,
  kinds: Kinds,
  io: Pick<Io, 'worker'>,
  work: (pool: Pool) => Promise<T>,
): Promise<T> {
  const pool = poolOf(workers, kinds, io.worker);
  try {
    return await work(pool);
  } finally {
    await pool.close();
  }
}

/** `computeInPool` for a command with one table. */
export async function computeTable(
  job: Job,
  options: ComputeOptions & { readonly workers: number | null },
  kinds: Kinds,
  io: EngineIo,
): Promise<Computed> {
  return withPool(options.workers, kinds, io, (pool) => computeInPool(job, options, pool, io));
}

/**
 * Computes the rows of `job` that are not there yet, and writes the table. The bytes depend on the job alone.
 * Errors: SimError when the folder cannot be written, or holds other rows; Interrupted after a signal. What is finished stays.
 */
export async function computeInPool(job: Job, options: ComputeOptions, pool: Pool, io: EngineIo): Promise<Computed> {
  requireSound(job, options.shard);
  const folder = workFolder(options.folder, options.table);
  const say = (text: string) => {
    if (!options.quiet) io.stderr.write(`${text}\n`);
  };
  return attempt(folder, options, async () => {
    if (options.resume && options.shard === null) {
      const files = await finishedTable(options.folder, options.table, recordOf(job));
      if (files !== null) return computed(files, folder, leftOver(folder, job));
    }
    const manifest = manifestOf(job, options);
    const missingRows = countRows([manifest.range]) - countRows(findStore(folder)?.chunks() ?? []);
    const warning = await requireDisk(options.folder, { missingRows, job, isTable: options.shard === null });
    if (warning !== null) say(`warning: ${warning}`);
    const store = await openStore(folder, manifest, options.resume);
    const found = countRows(store.chunks());
    if (found > 0) say(`${options.table}: going on with ${grouped(found)} finished rows`);
    const interruption = listen(io.signals, () =>
      say(`${io.stderrIsTTY ? '\n' : ''}Stopping: what is running is finished first. Another signal stops it at once.`),
    );
    try {
      const files = await fillAndWrite(job, store, { options, io, pool, interruption });
      return computed(files, folder, files === null ? null : store);
    } finally {
      interruption.off();
    }
  });
}

function computed(files: TableFiles | null, folder: string, store: Store | null): Computed {
  return { files, workFolder: folder, discardWork: async () => store?.remove() };
}

/** The store of this job, when a run that finished its table had no time to remove it. */
function leftOver(folder: string, job: Job): Store | null {
  const store = findStore(folder);
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

function manifestOf(job: Job, { table, shard }: ComputeOptions) {
  const range = shard === null ? { from: 0, to: job.rows } : shardRange(job.rows, shard);
  return { table, job: recordOf(job), fingerprint: fingerprintOf(recordOf(job)), range, shard };
}

/** Computes what is missing, and writes the table meanwhile; null for a shard. */
async function fillAndWrite(job: Job, store: Store, run: Run): Promise<TableFiles | null> {
  const { options, interruption } = run;
  const arrivals = arrivalsOf(store);
  const target = { folder: options.folder, table: options.table, job: recordOf(job) };
  let stopped = false;
  const writing =
    options.shard === null ? writeTable(target, arrivals, () => requireGoing(interruption, store, options)) : null;
  writing?.catch(() => {
    stopped = true; // told below
  });
  try {
    await fillStore(job, store, run, { landed: arrivals.landed, stopped: () => stopped });
  } catch (error) {
    arrivals.fail(error);
    await writing?.catch(() => undefined); // it leaves nothing of its own
    throw error;
  }
  return writing;
}

async function fillStore(
  job: Job,
  store: Store,
  { options, io, pool, interruption }: Run,
  others: Pick<LanesWork, 'landed' | 'stopped'>,
): Promise<void> {
  const whole = store.manifest.range;
  const gaps = missing(whole, store.chunks());
  if (gaps.length === 0) return;
  const total = countRows([whole]);
  const already = total - countRows(gaps);
  const progress = showProgress(
    { label: options.table, total, already, quiet: options.quiet, phase: options.phase },
    io,
  );
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

function resumeLine(words: readonly string[]): string {
  return commandLine(words.includes('--resume') ? words : [...words, '--resume']);
}

/** Says that something is kept only where something is. */
async function attempt<T>(folder: string, { words }: ComputeOptions, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (!hasRows(folder)) throw writingFault(folder, error);
    throw writingFault(folder, error, `What is finished stays there. When this is mended, go on: ${resumeLine(words)}`);
  }
}

function hasRows(folder: string): boolean {
  try {
    return (findStore(folder)?.chunks().length ?? 0) > 0;
  } catch {
    return false; // it cannot even be read
  }
}
