/** Keys of a case that say what others say already: a spread or a grid draws the others and derives these. */
import { desk } from './build/given.ts';
import { buildWorld } from './build/world.ts';
import type { CaseKeys } from './schema/scenario.ts';
import { type Branch, without } from './tree.ts';

export interface KeysAndTree {
  readonly tree: Branch;
  readonly keys: CaseKeys;
}

export interface Redundant {
  readonly key: string;
  /** What gives the value instead; those of them that the case has. */
  readonly instead: readonly string[];
}

const masses = ['star.mass', 'star.density', 'planet.mass'];
const light = ['star.luminosity', 'star.temperature', 'star.radius'];

/** What each way to give the axis rests on, the one to use first as where the axis is built. */
const axisWays: Readonly<Record<string, readonly string[]>> = {
  'orbit.period': ['orbit.period', ...masses],
  'orbit.semiMajorAxis': ['orbit.semiMajorAxis'],
  'orbit.scaledSemiMajorAxis': ['orbit.scaledSemiMajorAxis', ...light],
  'orbit.instellation': ['orbit.instellation', ...light],
};

/**
 * Takes out of a case what would have to agree with other keys, and in a draw could not. The World stays as it is, but for
 * the temperature of a star whose luminosity and radius are given, too, and one of the three varies: it follows from them.
 * Shape:  sound keys with their tree; `varying` holds dotted keys.
 */
export function withoutRedundant(
  given: KeysAndTree,
  varying: ReadonlySet<string>,
): KeysAndTree & { readonly axisKey: string; readonly redundant: readonly Redundant[] } {
  const axis = spareAxes(given);
  const star = spareTemperature(given, varying);
  const gone = [...axis.spare, ...star];
  return {
    ...gone.reduce((rest, { key }) => withoutKey(rest, key.split('.')), given),
    axisKey: axis.chosen,
    redundant: gone.filter(({ key, instead }) =>
      [...(axisWays[key] ?? [key]), ...instead].some((one) => varying.has(one)),
    ),
  };
}

/** The axis comes from one way; building it leaves the others unused, and says so by their mark. */
function spareAxes({ tree, keys }: KeysAndTree): { chosen: string; spare: readonly Redundant[] } {
  const trial = desk(tree, keys, new Set());
  trial.attempt(() => buildWorld(trial)); // faults of the centre are told where the case is read, or node by node
  const orbit = keys.orbit as Record<string, unknown> | undefined;
  const present = Object.keys(axisWays).filter((key) => orbit?.[key.slice('orbit.'.length)] !== undefined);
  const spare = present.filter((key) => key !== 'orbit.period' && !trial.used.has(key));
  const [first = 'orbit.period', second] = present.filter((key) => !spare.includes(key));
  const chosen = second ?? first; // a period without a mass leaves the axis to the other way
  const instead = axisWays[chosen]!.filter((key) => has(keys, key));
  return { chosen, spare: spare.map((key) => ({ key, instead })) };
}

function spareTemperature({ keys }: KeysAndTree, varying: ReadonlySet<string>): readonly Redundant[] {
  if (!light.every((key) => has(keys, key)) || !light.some((key) => varying.has(key))) return [];
  return [{ key: 'star.temperature', instead: ['star.luminosity', 'star.radius'] }];
}

function has(keys: CaseKeys, key: string): boolean {
  const [section, name] = key.split('.') as ['star' | 'orbit' | 'planet', string];
  return (keys[section] as Record<string, unknown> | undefined)?.[name] !== undefined;
}

function withoutKey({ tree, keys }: KeysAndTree, path: readonly string[]): KeysAndTree {
  const [section, name] = path as ['star' | 'orbit', string];
  return { tree: without(tree, path), keys: { ...keys, [section]: { ...keys[section], [name]: undefined } } };
}
