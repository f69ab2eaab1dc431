/** What one case gives, and what its building finds: the desk on which a World is put together. */
import { SimError } from '../../error.ts';
import type { Distribution, Quantity } from '../../quantity/index.ts';
import type { CaseKeys } from '../schema/scenario.ts';
import { type Branch, isNull, subtree } from '../tree.ts';
import type { Derived } from '../types.ts';
import type { Fault } from '../validate.ts';

export interface Given {
  readonly keys: CaseKeys;
  /** Whether the file gives the key, soundly or not; a misspelt key counts as the one that was meant. */
  has(key: string): boolean;
  /** The sound number at `section.key`, marked as used; null when absent or broken. */
  quantity(key: string): Quantity | null;
  /** Marks keys as used. */
  use(...keys: readonly string[]): void;
  /** Takes the mark away: another input says the same and is used. What needs the key for itself later marks it again. */
  passOver(...keys: readonly string[]): void;
  /** An error at the value of a key. */
  wrong(key: string, what: string, mend: string): null;
  /** An error at a section that lacks something, unless one of `keys` is there but broken. */
  missing(section: string, keys: readonly string[], what: string, mend: string): null;
  /** Runs a part's factory; its SimError becomes an error of the file. */
  attempt<T>(make: () => T): T | null;
  /** The words are made only where somebody listens. */
  warn(text: () => string): void;
  /** For `check` only. */
  remark(text: () => string): void;
  derive(key: string, value: number, unit: string, label: string): void;
  /** Work on keys that take no spread, under a name of its own: made once for all draws of a case. */
  once<T>(name: string, make: () => T): T;
}

export interface Desk extends Given {
  readonly faults: readonly Fault[];
  readonly warnings: readonly string[];
  readonly remarks: readonly string[];
  readonly derived: readonly Derived[];
  readonly used: ReadonlySet<string>;
}

export function desk(tree: Branch, keys: CaseKeys, broken: ReadonlySet<string>): Desk {
  const faults: Fault[] = [];
  const warnings: string[] = [];
  const remarks: string[] = [];
  const derived: Derived[] = [];
  const used = new Set<string>();

  const isBroken = (key: string) => broken.has(key) || broken.has(key.split('.', 1)[0]!);
  const fault = (path: readonly string[], atKey: boolean, what: string, mend: string): null => {
    faults.push({ path, atKey, what, mend });
    return null;
  };

  return {
    keys,
    faults,
    warnings,
    remarks,
    derived,
    used,
    has: (key) => {
      const found = subtree(tree, key.split('.'));
      return (found !== undefined && !isNull(found)) || isBroken(key);
    },
    quantity: (key) => {
      used.add(key);
      const [section, name] = key.split('.') as ['star' | 'orbit' | 'planet', string];
      return ((keys[section] as Record<string, unknown> | undefined)?.[name] as Quantity | undefined) ?? null;
    },
    use: (...names) => {
      for (const name of names) used.add(name);
    },
    passOver: (...names) => {
      for (const name of names) used.delete(name);
    },
    wrong: (key, what, mend) => fault(key.split('.'), false, what, mend),
    missing: (section, names, what, mend) => {
      const isExcused = names.some((name) => isBroken(`${section}.${name}`));
      if (isExcused) return null;
      faults.push({ path: [section], atKey: true, what, mend, lacking: names.map((name) => [section, name]) });
      return null;
    },
    attempt: (make) => {
      try {
        return make();
      } catch (error) {
        if (!(error instanceof SimError)) throw error;
        return fault(error.where.split('.'), false, error.what, error.mend);
      }
    },
    warn: (text) => {
      warnings.push(text());
    },
    remark: (text) => {
      remarks.push(text());
    },
    derive: (key, value, unit, label) => {
      derived.push({ key, value, unit, label });
    },
    once: (_name, make) => make(),
  };
}

/** One standard deviation of an uncertain value, SI; 0 when it is exact. */
export function standardDeviation(distribution: Distribution): number {
  switch (distribution.form) {
    case 'exact':
      return 0;
    case 'normal':
      return distribution.sigma;
    case 'splitNormal':
      return Math.max(distribution.up, distribution.down);
    case 'uniform':
    case 'logUniform':
      return (distribution.high - distribution.low) / Math.sqrt(12);
    case 'upperLimit':
      return distribution.limit;
    case 'isotropic':
      return Math.sqrt(Math.PI ** 2 / 4 - 2); // of p(x) ∝ sin x on [0, π]
  }
}

/** Relative standard deviation. */
export function relativeSigma({ value, distribution }: Quantity): number {
  return value === 0 ? 0 : standardDeviation(distribution) / Math.abs(value);
}
