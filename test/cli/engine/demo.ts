/** A job for tests: rows of hashed numbers, some of them undefined or failed, at a price that can be set. */
import { isMainThread } from 'node:worker_threads';
import type { Calculate, Job, Kinds, Settings } from '../../../cli/engine/job.ts';
import { SimError } from '../../../sim/error.ts';

export interface DemoSetup {
  readonly seed: number;
  readonly findings: number;
  /** Microseconds of work that each row takes, about. */
  readonly price: number;
  /** Every so many rows one fails; 0 for none. */
  readonly failEvery: number;
}

const plainSetup: DemoSetup = { seed: 1, findings: 3, price: 0, failEvery: 0 };

export function demoJob(rows: number, setup: Partial<DemoSetup> = {}, settings: Settings = {}): Job {
  const full = { ...plainSetup, ...setup };
  return {
    kind: 'demo',
    setup: full,
    inputs: [{ name: 'planet.bondAlbedo', unit: '1', label: 'Bond albedo' }],
    findings: Array.from({ length: full.findings }, (_, index) => ({
      name: `finding${index}`,
      unit: 'K',
      label: `Finding ${index}`,
    })),
    rows,
    settings: { seed: full.seed, draws: rows, failEvery: full.failEvery, version: '0.1.0', ...settings },
    context: { note: 'kept for gather' },
  };
}

/** A number in [0, 1) from three whole ones. */
export function hashed(seed: number, draw: number, column: number): number {
  let h =
    (Math.imul(seed ^ 0x9e3779b9, 0x85ebca6b) ^ Math.imul(draw + 1, 0xc2b2ae35) ^ Math.imul(column, 0x27d4eb2f)) | 0;
  h = Math.imul(h ^ (h >>> 15), 0x2c1b3c6d);
  h = Math.imul(h ^ (h >>> 12), 0x297a2d39);
  return ((h ^ (h >>> 15)) >>> 0) / 2 ** 32;
}

/** Column 0 is the input; every 97th draw lacks its last finding, and each `failEvery`th lacks all. */
function demo({ seed, findings, price, failEvery }: DemoSetup): Calculate {
  if (seed < 0) throw new SimError('--seed', `${seed} is below zero`, 'Give zero or more');
  return (from, to) => {
    const columns = Array.from({ length: findings + 1 }, () => new Float64Array(to - from));
    const failures = [];
    for (let draw = from; draw < to; draw++) {
      const fails = failEvery > 0 && draw % failEvery === failEvery - 1;
      if (fails) failures.push({ draw, message: `no world, "${draw}"` });
      for (const [index, column] of columns.entries()) {
        const lacks = index > 0 && (fails || (index === findings && draw % 97 === 0));
        column[draw - from] = lacks ? NaN : hashed(seed, draw, index) + 0 * work(price / findings);
      }
    }
    return { columns, failures };
  };
}

/** About a hundred sines a microsecond on a slow day; their sum is not used, but must be computed. */
function work(price: number): number {
  let sum = 0;
  for (let i = 0; i < 60 * price; i++) sum += Math.sin(i);
  return sum;
}

/** One row that is infinite, one whose arithmetic throws. */
function broken(): Calculate {
  return (from, to) => {
    if (to > 7) throw new Error('row 7 broke');
    const column = Float64Array.from({ length: to - from }, (_, row) => (from + row === 3 ? Infinity : 1));
    return { columns: [column], failures: [] };
  };
}

/** Ends the thread it runs in, if that is not the first. */
function dying(): Calculate {
  return (from, to) => {
    if (!isMainThread) process.exit(1);
    work(2000);
    return { columns: [new Float64Array(to - from)], failures: [] };
  };
}

/** Runs out of memory, as Node tells it. */
function hungry(): Calculate {
  return (from, to) => {
    if (from > 0) throw Object.assign(new Error('heap out of memory'), { code: 'ERR_WORKER_OUT_OF_MEMORY' });
    return { columns: [new Float64Array(to - from)], failures: [] };
  };
}

export const demoKinds: Kinds = {
  demo: async () => demo,
  broken: async () => broken,
  dying: async () => dying,
  hungry: async () => hungry,
};
