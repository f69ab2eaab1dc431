/**
 * Who computes rows: this thread, and threads that are started once and serve every job of a command. By hand over
 * node:worker_threads: a general pool would start its own script by its path on disk, which a bundle has not; and all that is
 * wanted of it here is a fixed number of equal threads.
 */
import { availableParallelism } from 'node:os';
import { Worker } from 'node:worker_threads';
import { type Chunk, computeChunk } from './chunk.ts';
import { calculateOf, columnsOf, type Job, type Kinds, type Range } from './job.ts';
import { type Answer, errorOf, type Order } from './serve.ts';

export interface Pool {
  /** So many compute at once, at most: this thread and others, or others only. */
  readonly workers: number;
  /** Are so many wanted whatever the work? Else the others are started where it pays. */
  readonly atOnce: boolean;
  /** Other threads that are there: none until they are asked for. */
  readonly threads: number;
  /** Starts other threads, no more than can have one of so many rows. `besides`: does this thread compute, too? */
  start(rows: number, besides: boolean): void;
  /** The job's rows in this thread, at once. Errors: what the arithmetic throws. */
  here(job: Job): Promise<(range: Range) => Chunk>;
  /** The same in another thread. Errors: what the arithmetic throws; when a thread dies. */
  there(job: Job, range: Range): Promise<Chunk>;
  /** Stops the threads, whatever they do. */
  close(): Promise<void>;
}

interface Request {
  readonly job: Job;
  readonly range: Range;
  readonly resolve: (chunk: Chunk) => void;
  readonly reject: (error: Error) => void;
}

interface Thread {
  readonly worker: Worker;
  /** By their tickets. */
  readonly running: Map<number, Request>;
  /** Jobs and setups that it has been told of. */
  readonly told: Set<unknown>;
}

/** While the answer to one waits for this thread, which computes, too, the other keeps a thread busy. */
export const requestsAThread = 2;

/** `wanted`: how many workers; null for one a processor, where it pays. `entry` is the script of the threads. */
export function poolOf(wanted: number | null, kinds: Kinds, entry: string): Pool {
  const workers = wanted ?? availableParallelism();
  const waiting: Request[] = [];
  const threads: Thread[] = [];
  const number = numbering();
  let ticket = 0;
  let broken: Error | null = null;

  const give = () => {
    for (let request = waiting[0]; request !== undefined; request = waiting[0]) {
      const thread = threads.reduce((a, b) => (b.running.size < a.running.size ? b : a));
      if (thread.running.size >= requestsAThread) return;
      waiting.shift();
      for (const order of ordersFor(thread, request.job, number)) thread.worker.postMessage(order);
      thread.running.set(++ticket, request);
      thread.worker.postMessage({ ticket, job: number(request.job), range: request.range } satisfies Order);
    }
  };
  const breakDown = (error: Error) => {
    broken ??= error;
    const requests = [...threads.flatMap(({ running }) => [...running.values()]), ...waiting.splice(0)];
    for (const { running } of threads) running.clear();
    for (const request of requests) request.reject(broken);
  };
  const begin = () => {
    const thread: Thread = { worker: new Worker(entry), running: new Map(), told: new Set() };
    thread.worker.on('message', (answer: Answer) => {
      const request = thread.running.get(answer.ticket);
      thread.running.delete(answer.ticket);
      give();
      if ('chunk' in answer) request?.resolve(answer.chunk);
      else request?.reject(errorOf(answer.fault));
    });
    thread.worker.on('error', breakDown);
    thread.worker.on('exit', (code) => breakDown(new Error(`a worker thread ended (${code})`)));
    threads.push(thread);
  };
  return {
    workers,
    atOnce: wanted !== null,
    get threads() {
      return threads.length;
    },
    start: (rows, besides) => {
      while (threads.length < Math.min(workers, rows) - (besides ? 1 : 0)) begin();
    },
    here: async (job) => {
      const calculate = await calculateOf(job, kinds);
      const names = namesOf(job);
      return (range) => computeChunk(calculate, range, names);
    },
    there: (job, range) =>
      new Promise((resolve, reject) => {
        if (broken !== null) return reject(broken);
        waiting.push({ job, range, resolve, reject });
        give();
      }),
    close: async () => {
      await Promise.all(threads.map(({ worker }) => worker.terminate()));
    },
  };
}

/** What a thread must hear before rows of a job: the setup, unless another job has brought it, and the job. */
function ordersFor({ told }: Thread, job: Job, number: (thing: unknown) => number): Order[] {
  if (told.has(job)) return [];
  const { kind, setup } = job;
  const orders: Order[] = [{ job: number(job), kind, names: namesOf(job), setup: number(setup) }];
  if (!told.has(setup)) orders.unshift({ setup: number(setup), data: setup });
  told.add(job).add(setup);
  return orders;
}

function namesOf(job: Job): readonly string[] {
  return columnsOf(job).map(({ name }) => name);
}

/** The same number for the same thing. */
function numbering(): (thing: unknown) => number {
  const numbers = new Map<unknown, number>();
  return (thing) => {
    const known = numbers.get(thing) ?? numbers.size;
    numbers.set(thing, known);
    return known;
  };
}
