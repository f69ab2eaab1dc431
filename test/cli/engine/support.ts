/** Computes tables of the demonstration job in folders of their own. */
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type Computed, type ComputeOptions, computeTables, type EngineIo } from '../../../cli/engine/compute.ts';
import { whileListening } from '../../../cli/engine/interruption.ts';
import type { Job, Kinds } from '../../../cli/engine/job.ts';
import { undisturbed } from '../support.ts';
import { demoKinds } from './demo.ts';

export const demoWorker = fileURLToPath(new URL('demoWorker.mjs', import.meta.url));

type EngineOptions = ComputeOptions & { readonly table: string };

/** One table of a command. */
export function computeTable(
  job: Job,
  { table, ...options }: EngineOptions,
  kinds: Kinds,
  io: EngineIo,
): Promise<Computed> {
  return whileListening(io, options, async (interruption) => {
    const [computed] = await computeTables([{ table, job }], options, kinds, io, interruption);
    return computed!;
  });
}

export interface Bench {
  readonly home: string;
  path(...names: string[]): string;
  /** What was told on standard error since the last time. */
  told(): string;
  /** A signal comes when so many more chunks have landed. */
  stopAfter(chunks: number): void;
  /** It comes now. */
  signal(): void;
  readonly signals: EngineIo['signals'];
  listeners(): number;
  compute(job: Job, folder: string, options?: Partial<EngineOptions>): Promise<Computed>;
  /** `draws.parquet` and `failed.csv`, as one text. */
  bytes(folder: string): string;
  remove(): void;
}

export function bench(): Bench {
  const home = mkdtempSync(join(tmpdir(), 'perilag-engine-'));
  const path = (...names: string[]) => join(home, ...names);
  const state = { told: '', stopAfter: Infinity };
  const listeners = new Set<() => void>();
  const signal = () => {
    for (const listener of [...listeners]) listener();
  };
  const signals = {
    on: (listener: () => void) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
  const io = {
    ...undisturbed,
    worker: demoWorker,
    stderr: { write: (text: string) => (state.told += text) },
    signals,
    // The clock is read once for each chunk that has landed.
    now: () => {
      if (state.stopAfter-- <= 0) signal();
      return 0;
    },
  };
  return {
    home,
    path,
    told: () => {
      const { told } = state;
      state.told = '';
      return told;
    },
    stopAfter: (chunks) => {
      state.stopAfter = chunks;
    },
    signal,
    signals,
    listeners: () => listeners.size,
    compute: (job, folder, options = {}) => {
      const words = ['spread', 'a planet.yaml', '-o', folder];
      const plain = {
        table: 'draws',
        folder: path(folder),
        shard: null,
        resume: false,
        workers: 1,
        quiet: false,
        words,
      };
      return computeTable(job, { ...plain, ...options }, demoKinds, io);
    },
    bytes: (folder) => {
      const names = readdirSync(path(folder)).filter((name) => /^(draws\.parquet|failed\.csv)$/.test(name));
      return names.map((name) => `${name}:${readFileSync(path(folder, name), 'latin1')}`).join('\n');
    },
    remove: () => rmSync(home, { recursive: true, force: true }),
  };
}
