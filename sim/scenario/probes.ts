/** Worlds of a case at a few values of each of its varying numbers: which of them change anything, and whether any are sound. */
import { SimError } from '../error.ts';
import type { Built } from './build/world.ts';
import { fingerprintWithWindows } from './influence.ts';
import type { Varied } from './varied.ts';

/** Values in the order of the varying keys, SI. */
export interface ProbeValues {
  readonly centre: readonly number[];
  readonly low: readonly number[];
  readonly high: readonly number[];
}

export interface Probes {
  /** Whether number `i` changes a World or a window, wherever the others are; where no two values can be compared, it may. */
  matters(i: number): boolean;
  /** Whether any number moves a window. */
  readonly windowsMove: boolean;
  /** Two Worlds that differ in number `i` alone, where such are sound. */
  pairs(i: number): readonly (readonly [Built, Built])[];
  /** What is wrong where number `i` is at neither side sound while the others are at their centres; null where one side is. */
  faultBeside(i: number): SimError | null;
  /** What is wrong at the first probe where nothing is sound at any; null elsewhere. */
  readonly faultEverywhere: SimError | null;
}

export function probe(made: Varied, values: ProbeValues): Probes {
  const seen = new Map<string, Built | SimError>();
  const at = (point: readonly number[]): Built | SimError => {
    const id = point.join();
    const known = seen.get(id);
    if (known) return known;
    const found = attempt(() => made.builtAt(point));
    seen.set(id, found);
    return found;
  };
  const { centre, low, high } = values;
  const pairs = (i: number) =>
    [centre, low, high].flatMap((others) => {
      const [a, b] = [at(others.with(i, low[i]!)), at(others.with(i, high[i]!))];
      return isBuilt(a) && isBuilt(b) ? [[a, b] as const] : [];
    });
  const all = [centre, low, high, ...centre.flatMap((_, i) => [centre.with(i, low[i]!), centre.with(i, high[i]!)])];
  const windows = (built: Built) => JSON.stringify(built.windows);
  return {
    pairs,
    matters: (i) => {
      const found = pairs(i);
      return found.length === 0 || found.some(([a, b]) => fingerprintWithWindows(a) !== fingerprintWithWindows(b));
    },
    get windowsMove() {
      return centre.some((_, i) => pairs(i).some(([a, b]) => windows(a) !== windows(b)));
    },
    faultBeside: (i) => {
      const sides = [low[i]!, high[i]!].filter((value) => value !== centre[i]);
      const faults = sides.map((value) => at(centre.with(i, value))).filter((found) => !isBuilt(found));
      return faults.length === sides.length ? ((faults[0] as SimError | undefined) ?? null) : null;
    },
    get faultEverywhere() {
      const found = all.map(at);
      return found.some(isBuilt) ? null : (found[0] as SimError);
    },
  };
}

function isBuilt(found: Built | SimError): found is Built {
  return !(found instanceof SimError);
}

function attempt(make: () => Built): Built | SimError {
  try {
    return make();
  } catch (error) {
    if (error instanceof SimError) return error;
    throw error;
  }
}
