/** Computes a table: what is missing of it, over all workers, chunk by chunk; then its files. */
import { SimError } from '../../sim/error.ts';
import { Interrupted } from '../exit.ts';
import type { Io } from '../io.ts';
import { commandLine } from '../output/history.ts';
import type { Phase } from '../output/phases.ts';
import { grouped, type RowProgress, showProgress } from '../output/progressBar.ts';
import { writingFault } from '../output/writingFault.ts';
import { type Interruption, listen } from './interruption.ts';
import { columnsOf, fingerprintOf, type Job, type Kinds, type Range, recordOf } from './job.ts';
import { countRows, missing, planChunks, type Shard, shardRange } from './plan.ts';
import { inThisThread, type Pool, threads } from './pool.ts';
import { findStore, openStore, type Store, workFolder } from './store.ts';
import { finishedTable, type TableFiles, writeTable } from './table.ts';

export interface ComputeOptions {
  /** Name of the table's file without its extension: `draws`. */
  readonly table: string;
  /** Output folder, absolute. */
  readonly folder: string;
  readonly shard: Shard | null;
  readonly resume: boolean;
  readonly workers: number;
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

/** How many chunks are under way: while one is written, a worker computes another; alone, a thread can do but one thing. */
function lanesFor(workers: number): number {
  return workers === 1 ? 1 : 2 * workers;
}

/**
 * Computes the rows of `job` that are not there yet, and writes the table. The bytes depend on the job alone.
 * Errors: SimError when the folder cannot be written, or holds other rows; Interrupted after a signal. What is finished stays.
 */
export async function computeTable(job: Job, options: ComputeOptions, kinds: Kinds, io: EngineIo): Promise<Computed> {
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
    const store = await openStore(folder, manifestOf(job, options), options.resume);
    const found = countRows(store.chunks());
    if (found > 0) say(`${options.table}: going on with ${grouped(found)} finished rows`);
    const interruption = listen(io.signals, () =>
      say(`${io.stderrIsTTY ? '\n' : ''}Stopping: what is running is finished first. Another signal stops it at once.`),
    );
    try {
      await fillStore(job, store, options, kinds, io, interruption);
      if (options.shard !== null) return computed(null, folder, null);
      const pieces = store.chunks().map((range) => ({ ...range, read: () => store.read(range) }));
      const target = { folder: options.folder, table: options.table, job: recordOf(job) };
      const files = await writeTable(target, pieces, () => requireGoing(interruption, store, options));
      return computed(files, folder, store);
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

async function fillStore(
  job: Job,
  store: Store,
  options: ComputeOptions,
  kinds: Kinds,
  io: EngineIo,
  interruption: Interruption,
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
  const workers = Math.min(options.workers, countRows(gaps));
  const pool = workers === 1 ? await inThisThread(job, kinds) : threads(job, workers, io.worker);
  try {
    await runLanes(pool, store, gaps, workers, progress, interruption);
  } finally {
    progress.clear();
    await pool.close();
  }
  requireGoing(interruption, store, options);
}

/** Each lane takes a chunk, has it computed, writes it; all end when nothing is left, one fails, or a signal came. */
async function runLanes(
  pool: Pool,
  store: Store,
  gaps: readonly Range[],
  workers: number,
  progress: RowProgress,
  interruption: Interruption,
): Promise<void> {
  const plan = planChunks(gaps, workers);
  let failed = false;
  const lane = async () => {
    while (!interruption.requested && !failed) {
      const range = plan.next();
      if (range === null) return;
      try {
        const chunk = await pool.compute(range);
        plan.took(range, chunk.seconds);
        await store.land(chunk);
        progress.landed(range.to - range.from);
      } catch (error) {
        failed = true;
        throw error;
      }
    }
  };
  const ends = await Promise.allSettled(Array.from({ length: lanesFor(workers) }, lane));
  const broken = ends.find((end) => end.status === 'rejected');
  if (broken !== undefined) throw broken.reason;
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

async function attempt<T>(folder: string, { words }: ComputeOptions, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    throw writingFault(folder, error, `What is finished stays there. When this is mended, go on: ${resumeLine(words)}`);
  }
}
