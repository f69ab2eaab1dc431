/** The rows that are missing, computed by this thread and, where it pays, by others; each chunk lands as a whole file. */
import { setImmediate } from 'node:timers/promises';
import type { RowProgress } from '../output/progressBar.ts';
import type { Chunk } from './chunk.ts';
import type { Interruption } from './interruption.ts';
import type { Job, Range } from './job.ts';
import { countRows, planChunks } from './plan.ts';
import { type Pool, requestsAThread } from './pool.ts';
import type { Store } from './store.ts';

export interface LanesWork {
  readonly job: Job;
  readonly gaps: readonly Range[];
  readonly store: Store;
  readonly pool: Pool;
  readonly progress: RowProgress;
  readonly interruption: Interruption;
  /** Has something failed elsewhere, so that going on is in vain? */
  readonly stopped: () => boolean;
  /** A chunk stands in the store. */
  readonly landed: (chunk: Chunk) => void;
}

/** A thread takes some tenths of a second to start and to become quick: for less work than this it is not worth it. */
const worthThreads = 1;
/** The first rows are slow, and say little of the others. */
const leastSeen = 0.03;
/** This thread takes shorter chunks than others: meanwhile it neither writes nor hears. */
const ownShare = 0.5;

/**
 * While this thread computes it does not hear of a signal, nor does the system end the process at a second one: rows that take
 * longer than these seconds are left to other threads, all of them.
 */
const deafAtMost = 0.3;

/** Chunks under way to the disk: where it is slow, this thread waits for it rather than pile them up in memory. */
function landingAtMost({ workers }: Pool): number {
  return workers + 2;
}

/** All ends when nothing is left, something fails, or a signal came; what runs is finished first. Errors: the first of them. */
export async function runLanes(work: LanesWork): Promise<void> {
  const { job, pool, store, progress, interruption } = work;
  const plan = planChunks(work.gaps, pool.workers);
  const landing = new Set<Promise<void>>();
  const failures: unknown[] = [];
  const goesOn = () => !interruption.requested && failures.length === 0 && !work.stopped();

  const land = (chunk: Chunk): Promise<void> => {
    const ended = store
      .land(chunk)
      .then(() => {
        progress.landed(chunk.to - chunk.from);
        work.landed(chunk);
      })
      .finally(() => landing.delete(ended));
    landing.add(ended);
    return ended;
  };
  const threadLane = async () => {
    for (let range = next(); range !== null; range = next()) {
      const chunk = await pool.there(job, range);
      plan.took(range, chunk.seconds);
      await land(chunk);
    }
  };
  const next = (share = 1) => (goesOn() ? plan.next(share) : null);
  const lanes: Promise<void>[] = [];
  const begin = (lane: () => Promise<void>) => {
    lanes.push(lane().catch((error) => void failures.push(error)));
  };
  let served = 0;
  const beginThreads = (besides: boolean) => {
    pool.start(countRows(work.gaps), besides);
    for (; served < pool.threads; served++) for (let i = 0; i < requestsAThread; i++) begin(threadLane);
  };
  const ownLane = async () => {
    const compute = await pool.here(job);
    let spent = 0;
    let alone = !pool.atOnce && pool.threads === 0;
    for (let range = next(ownShare); range !== null; range = next(ownShare)) {
      const chunk = compute(range);
      plan.took(range, chunk.seconds);
      spent += chunk.seconds;
      land(chunk).catch((error) => void failures.push(error));
      if (alone && pool.workers > 1 && spent >= leastSeen && plan.secondsLeft() >= worthThreads) {
        alone = false;
        beginThreads(true);
      }
      if (chunk.seconds > deafAtMost * (range.to - range.from)) {
        if (plan.secondsLeft() > 0) beginThreads(false);
        return;
      }
      // Signals are heard, files land, and threads get new work before this thread computes again.
      await setImmediate();
      while (landing.size > landingAtMost(pool) && goesOn()) await Promise.race(landing).catch(() => undefined);
    }
  };
  if (pool.threads > 0 || pool.atOnce) beginThreads(true);
  if (pool.threads < pool.workers) begin(ownLane); // else threads have taken its place, in a table before this
  for (let i = 0; i < lanes.length; i++) await lanes[i]; // more may begin meanwhile
  await Promise.allSettled(landing);
  if (failures.length > 0) throw failures[0];
}
