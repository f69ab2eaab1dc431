/** The desk for draws: the first fault is thrown, and nothing is told of what is sound. */
import { SimError } from '../../error.ts';
import type { Quantity } from '../../quantity/index.ts';
import type { CaseKeys } from '../schema/scenario.ts';
import { type Branch, isNull, subtree } from '../tree.ts';
import type { Desk } from './given.ts';

const nothing: readonly never[] = [];
const none: ReadonlySet<string> = new Set<string>();
const ignore = () => {};

/**
 * A desk that serves any number of buildings of one case whose numbers change between them.
 * Shape:  keys that are sound one by one; `tree` tells only which are there.
 * Errors: SimError from the building where `desk` would write a fault.
 */
export function strictDesk(tree: Branch, keys: CaseKeys): Desk {
  const made = new Map<string, unknown>();
  const quantities = quantitiesOf(keys);
  const fail = (where: string, what: string, mend: string): never => {
    throw new SimError(where, what, mend);
  };
  return {
    keys,
    faults: nothing,
    warnings: nothing,
    remarks: nothing,
    derived: nothing,
    used: none,
    has: (key) => {
      const found = subtree(tree, key.split('.'));
      return found !== undefined && !isNull(found);
    },
    quantity: (key) => quantities.get(key) ?? null,
    use: ignore,
    passOver: ignore,
    wrong: fail,
    missing: (section, _keys, what, mend) => fail(section, what, mend),
    attempt: (make) => make(),
    warn: ignore,
    remark: ignore,
    derive: (key, value) => {
      if (!Number.isFinite(value)) fail(key, `the inputs together give ${value}, which is no usable number`, unusable);
    },
    once: <T>(name: string, make: () => T): T => {
      if (!made.has(name)) made.set(name, make());
      return made.get(name) as T;
    },
  };
}

/** Every single value of the sections, by its dotted key. */
function quantitiesOf(keys: CaseKeys): ReadonlyMap<string, Quantity> {
  const { star = {}, orbit = {}, planet = {} } = keys;
  return new Map(
    Object.entries({ star, orbit, planet }).flatMap(([section, values]) =>
      Object.entries(values as Record<string, Quantity>).map(([name, value]) => [`${section}.${name}`, value] as const),
    ),
  );
}

/** What mends inputs whose numbers are each in bounds and overflow, or vanish, together. */
export const unusable = 'Use the numbers of a planet';
