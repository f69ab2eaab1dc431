/**
 * Threads that compute rows. By hand over node:worker_threads: a general pool would start its own script by its path on
 * disk, which a bundle has not; and all that is wanted of it here is a fixed number of equal threads with one job.
 */
import { Worker } from 'node:worker_threads';
import { type Chunk, computeChunk } from './chunk.ts';
import { calculateOf, columnsOf, type Job, type Kinds, type Range } from './job.ts';
import { type Answer, errorOf, type WorkerData } from './serve.ts';

export interface Pool {
  /** Errors: what the arithmetic throws; when a thread dies. */
  compute(range: Range): Promise<Chunk>;
  /** Stops the threads, whatever they do. */
  close(): Promise<void>;
}

/** Computes in this thread: nothing to start. */
export async function inThisThread(job: Job, kinds: Kinds): Promise<Pool> {
  const calculate = await calculateOf(job, kinds);
  const names = columnsOf(job).map(({ name }) => name);
  return { compute: async (range) => computeChunk(calculate, range, names), close: async () => undefined };
}

interface Request {
  readonly range: Range;
  readonly resolve: (chunk: Chunk) => void;
  readonly reject: (error: Error) => void;
}

/** `count` threads that run the script `entry`; what they cannot take at once waits in line. */
export function threads(job: Job, count: number, entry: string): Pool {
  const workerData: WorkerData = { kind: job.kind, setup: job.setup, names: columnsOf(job).map(({ name }) => name) };
  const waiting: Request[] = [];
  const busy = new Map<Worker, Request>();
  const idle: Worker[] = [];
  let broken: Error | null = null;

  const give = () => {
    while (idle.length > 0 && waiting.length > 0) {
      const worker = idle.pop()!;
      const request = waiting.shift()!;
      busy.set(worker, request);
      worker.postMessage(request.range);
    }
  };
  const breakDown = (error: Error) => {
    broken ??= error;
    for (const request of [...busy.values(), ...waiting.splice(0)]) request.reject(broken);
    busy.clear();
  };
  const start = () => {
    const worker = new Worker(entry, { workerData });
    worker.on('message', (answer: Answer) => {
      const request = busy.get(worker);
      busy.delete(worker);
      idle.push(worker);
      if ('chunk' in answer) request?.resolve(answer.chunk);
      else request?.reject(errorOf(answer.fault));
      give();
    });
    worker.on('error', breakDown);
    worker.on('exit', (code) => breakDown(new Error(`a worker thread ended (${code})`)));
    idle.push(worker);
    return worker;
  };
  const workers = Array.from({ length: count }, start);
  return {
    compute: (range) =>
      new Promise((resolve, reject) => {
        if (broken !== null) return reject(broken);
        waiting.push({ range, resolve, reject });
        give();
      }),
    close: async () => {
      await Promise.all(workers.map((worker) => worker.terminate()));
    },
  };
}
