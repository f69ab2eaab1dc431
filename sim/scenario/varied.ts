/** One case whose numbers change, many times and fast: the keys are read once, and what builds every World builds these, too. */
import { SimError } from '../error.ts';
import {
  checkBounds,
  formatQuantity,
  isWithin,
  parseUnit,
  type Quantity,
  type QuantitySpec,
} from '../quantity/index.ts';
import type { World } from '../world.ts';
import { strictDesk } from './build/strictDesk.ts';
import { type Built, buildWorld } from './build/world.ts';
import type { KeysAndTree } from './redundant.ts';
import { numbersAt } from './schema/lookup.ts';
import type { CaseKeys } from './schema/scenario.ts';

export interface Varied {
  /**
   * World, options and windows at SI values, in the order of the keys.
   * Errors: SimError where the values are no sound planet, as reading them from a file would give.
   */
  builtAt(values: ArrayLike<number>): Built;
  worldAt(values: ArrayLike<number>): World;
}

/** A key that varies, and the unit in which messages show it. */
export interface Varying {
  readonly key: string;
  readonly unit: string;
}

/** Keys that follow from the values by more than their physics (`--hold`): SI values from those of the varying keys. */
export interface Following {
  readonly keys: readonly Varying[];
  from(values: ArrayLike<number>): readonly number[];
}

/** A number of the scenario that can be set; all else reads it as if it had been typed. */
interface Slot extends Quantity {
  value: number;
}

const exact = { form: 'exact' } as const;
const nothingFollows: Following = { keys: [], from: () => [] };

/** Shape: every key is a quantity of the case. The returned functions share scratch: one call at a time. */
export function varied({ tree, keys }: KeysAndTree, varying: readonly Varying[], following = nothingFollows): Varied {
  const slots = varying.map(slotOf);
  const followers = following.keys.map(slotOf);
  const filled = [...varying, ...following.keys].reduce(
    (rest, { key }, i) => withSlot(rest, key.split('.'), slots[i] ?? followers[i - slots.length]!) as CaseKeys,
    keys,
  );
  const given = strictDesk(tree, filled);
  const set = varying.map(({ key }, i) => setter(key, slots[i]!));
  const setFollower = following.keys.map(({ key }, i) => setter(key, followers[i]!));

  const builtAt = (values: ArrayLike<number>): Built => {
    for (let i = 0; i < set.length; i++) set[i]!(values[i]!);
    const followed = following.from(values);
    for (let i = 0; i < setFollower.length; i++) setFollower[i]!(followed[i]!);
    const built = buildWorld(given);
    if (!built) throw new Error('a building that failed without a word');
    return built;
  };
  return { builtAt, worldAt: (values) => builtAt(values).world };
}

function slotOf({ unit }: Varying): Slot {
  return {
    value: Number.NaN,
    unit,
    distribution: exact,
    get text() {
      return shownIn(this.value, unit);
    },
  };
}

function shownIn(value: number, unit: string): string {
  return Number.isFinite(value) ? formatQuantity(value, unit) : String(value);
}

/** Sets a slot. Errors: SimError outside the bounds of the key. */
function setter(key: string, slot: Slot): (value: number) => void {
  const spec = numbersAt(key.split('.'));
  if (!spec) throw new Error(`${key} takes no number`);
  return (value) => {
    slot.value = value;
    if (!(isWithin(value, spec) && Number.isFinite(value))) throw outOfBounds(key, slot, spec);
  };
}

function outOfBounds(key: string, { value, unit, text }: Slot, spec: QuantitySpec): SimError {
  if (!Number.isFinite(value)) return new SimError(key, `${text} is no finite number`, 'Give numbers of a planet');
  try {
    checkBounds(value, parseUnit(unit), `\`${text}\``, spec);
  } catch (error) {
    if (error instanceof SimError) return new SimError(key, error.what, error.mend, error);
    throw error;
  }
  throw new Error(`${key} ${value} is within its bounds`);
}

/** The keys with a slot at a path; all that does not lead there is shared. */
function withSlot(value: unknown, path: readonly string[], slot: Slot): unknown {
  const [step, ...rest] = path;
  if (step === undefined) return isRotation(value) ? { ...value, period: slot } : slot;
  if (Array.isArray(value)) return value.map((item, i) => (String(i) === step ? withSlot(item, rest, slot) : item));
  const object = value as Record<string, unknown>;
  return { ...object, [step]: withSlot(object[step], rest, slot) };
}

function isRotation(value: unknown): value is object {
  return typeof value === 'object' && value !== null && 'form' in value && value.form === 'period';
}
