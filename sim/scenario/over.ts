/** A scenario over one or two ranges (`perilag grid`, `perilag trace`): the World of each case at any values of them. */
import { SimError } from '../error.ts';
import { formatQuantity } from '../quantity/index.ts';
import type { SolveOptions, Window, World } from '../world.ts';
import type { Along } from './along.ts';
import type { Built } from './build/world.ts';
import { conflicts } from './cases.ts';
import { withDefaults } from './defaults.ts';
import { following, type Hold, holdNote } from './hold.ts';
import { listed, redundantNote } from './leftOut.ts';
import { merge, patchOf, type Replaced, replacedIn } from './merge.ts';
import { nodesOf } from './nodes.ts';
import { type Probes, probe } from './probes.ts';
import { readWithTrees } from './read.ts';
import { withoutRedundant } from './redundant.ts';
import { type Branch, subtree, without } from './tree.ts';
import type { ScenarioCase } from './types.ts';
import { validateCase } from './validate.ts';
import { varied } from './varied.ts';

export interface OverOptions {
  readonly only?: readonly string[];
  readonly hold?: Hold | null;
  /** Leave windows out: they measure a climate and do not change it. */
  readonly withoutWindows?: boolean;
}

/** A case over its ranges. */
export interface CaseOver {
  readonly name: string;
  readonly model: string;
  readonly options: SolveOptions;
  /** Of the case as it stands. */
  readonly windows: readonly Window[];
  /** `builtAt` has each node's own. */
  readonly windowsVary: boolean;
  /** SI values of the ranges' keys in the case as it stands; null where it says nothing that gives them. */
  readonly own: readonly (number | null)[];
  /** As it stands. */
  readonly world: World;
  /** Keys that give way to the ranges'. */
  readonly replaced: readonly Replaced[];
  /** Keys of the case that no node reads: those of the ranges, those that give way to them, and those that follow from others. */
  readonly unread: readonly string[];
  readonly warnings: readonly string[];
  /** What follows from other keys, and what is held. */
  readonly notes: readonly string[];
  /**
   * SI values in the order of the ranges. Equal to the last bit to a scenario that says them.
   * Errors: SimError where the case is not sound there.
   */
  worldAt(values: ArrayLike<number>): World;
  builtAt(values: ArrayLike<number>): Built;
  /** What `hold` changes at a node, as a scenario would say it: `orbit.semiMajorAxis` → `0.61 au`. */
  heldAt(values: ArrayLike<number>): ReadonlyMap<string, string>;
}

const where = '--along';

/**
 * The cases of a scenario (those that `only` names) over one or two ranges, in the order of the file.
 * Shape:  the text of a file that `readScenario` takes. Alternatives replace one another whole, as in a case.
 * Errors: ScenarioError where it does not; SimError at `--along` where a case cannot take the keys, is sound at no probe of
 *         the ranges, or does not depend on one of them.
 */
export function casesOver(
  text: string,
  file: string,
  alongs: readonly Along[],
  options: OverOptions = {},
): readonly CaseOver[] {
  const [first, second] = alongs;
  if (first && second && first.key === second.key) {
    throw new SimError(where, `${first.key} is given twice`, 'Name two different keys, or one range');
  }
  const { scenario, trees } = readWithTrees(text, file);
  return scenario.cases.flatMap((one, i) =>
    (options.only?.includes(one.name) ?? true) ? [caseOver(one, trees[i]!.tree, alongs, options)] : [],
  );
}

function caseOver(one: ScenarioCase, tree: Branch, alongs: readonly Along[], options: OverOptions): CaseOver {
  for (const along of alongs) refuseList(one.name, tree, along);
  const patch = patchFor(alongs);
  const laid = patch ? merge(tree, patch) : tree;
  const replaced = patch ? replacedIn(tree, patch) : [];
  const filled = withDefaults(options.withoutWindows ? without(laid, ['windows']) : laid);
  const { keys, faults } = validateCase(filled);
  const [fault] = [...faults, ...conflicts(filled)];
  if (fault) throw new SimError(where, `case \`${one.name}\`: ${fault.path.join('.')}: ${fault.what}`, fault.mend);
  const { redundant, axisKey, ...rest } = withoutRedundant(
    { tree: filled, keys },
    new Set(alongs.map(({ key }) => key)),
  );
  for (const { key, instead } of redundant) {
    if (!alongs.some((along) => along.key === key)) continue;
    const what = `${key} of case \`${one.name}\` follows from ${listed(instead)}`;
    throw new SimError(where, what, 'Follow one of those');
  }
  const eccentricityAt = alongs.findIndex(({ key }) => key === 'orbit.eccentricity');
  const held = options.hold ? following(rest, axisKey, one.world.orbit, eccentricityAt) : null;
  const made = varied(rest, alongs, held ?? undefined);
  const probes = probe(made, {
    centre: alongs.map((along) => nodesOf(along, 3)[1]!.value),
    low: alongs.map(({ from }) => from),
    high: alongs.map(({ to }) => to),
  });
  checkProbes(one.name, alongs, probes);
  return {
    name: one.name,
    model: one.model,
    options: one.options,
    windows: options.withoutWindows ? [] : one.windows,
    windowsVary: probes.windowsMove,
    own: alongs.map(({ key }) => ownValue(one, key)),
    world: one.world,
    replaced,
    unread: [...alongs, ...replaced, ...redundant].map(({ key }) => key),
    warnings: alongs.flatMap((along, i) => movedPlanet(along, probes.pairs(i))),
    notes: [...redundant.map(redundantNote), ...(held ? [holdNote(held)] : [])],
    ...made,
    heldAt: (values) => {
      const found = held?.from(values) ?? [];
      return new Map(held?.keys.map(({ key, unit }, i) => [key, formatQuantity(found[i]!, unit, 15)]));
    },
  };
}

function refuseList(name: string, tree: Branch, { key }: Along): void {
  const path = key.split('.');
  const listAt = path.findIndex((_, depth) => subtree(tree, path.slice(0, depth))?.kind === 'list');
  if (listAt < 0) return;
  const what = `${path.slice(0, listAt).join('.')} of case \`${name}\` is a list, and ${key} would replace all of it`;
  throw new SimError(where, what, 'Write a single form in the scenario, or name another key');
}

/** No section of a scenario: in one patch, nothing replaces anything. */
const apart = '--along';

/** A value within each range: no end of it, which may mean something of its own (a circle). Null without ranges. */
function patchFor(alongs: readonly Along[]): Branch | null {
  const [first, ...others] = alongs.map((along) => patchOf(along.key, nodesOf(along, 3)[1]!.text));
  return first ? others.reduce((patch, other) => merge(patch, other, apart), first) : null;
}

function checkProbes(name: string, alongs: readonly Along[], probes: Probes): void {
  const fault = probes.faultEverywhere;
  const keys = alongs.map(({ key }) => key).join(' and ');
  if (fault) {
    const found = `case \`${name}\` is not sound at the ends and in the middle of ${keys}: ${fault.where}: ${fault.what}`;
    throw new SimError(where, found, fault.mend);
  }
  for (const [i, { key }] of alongs.entries()) {
    if (probes.matters(i)) continue;
    const what = `nothing that is computed for case \`${name}\` depends on ${key}`;
    throw new SimError(where, what, 'Name another key, or leave the case out with --only');
  }
}

/** A total heat capacity is that of any form. */
const totals: Readonly<Record<string, string>> = {
  'planet.heatStore.heatCapacity': 'planet.heatCapacity',
  'planet.landHeatStore.heatCapacity': 'planet.landHeatCapacity',
  'planet.frozenHeatStore.heatCapacity': 'planet.frozenHeatCapacity',
};

function ownValue({ inputs, derived }: ScenarioCase, key: string): number | null {
  const given = inputs.find((input) => input.key === key)?.value;
  return given ?? derived.find((one) => one.key === (totals[key] ?? key))?.value ?? null;
}

/** A star that brightens while the flux at the planet is given moves the planet. */
function movedPlanet({ key }: Along, pairs: readonly (readonly [Built, Built])[]): string[] {
  const flux = ({ star, orbit }: World) => star.luminosity / orbit.semiMajorAxis ** 2;
  const moves = pairs.some(([{ world: first }, { world: last }]) => {
    const isKept = Math.abs(flux(first) / flux(last) - 1) < 1e-9;
    return isKept && first.star.luminosity !== last.star.luminosity;
  });
  if (!moves) return [];
  return [
    `orbit.instellation is given: ${key} then moves the planet and leaves its light as it is. Follow orbit.instellation.`,
  ];
}
