/**
 * Lays one tree over another: key by key, lists replaced whole, null removing a key, and alternatives replacing one
 * another whole. Cases use it, and so does everything that varies an input.
 */
import { type Branch, branchAt, type Entry, isNull, nowhere, type Tree } from './tree.ts';

/** Ways to say one thing; each way is the keys that it needs. */
export interface Alternatives {
  /** The section that holds the keys, dotted. */
  readonly section: string;
  readonly ways: readonly (readonly string[])[];
  /** Keys that belong to the first way without being needed for it. */
  readonly companions?: readonly string[];
  /** Several ways may stand together when they agree (checked where the World is built). */
  readonly mayAgree?: boolean;
  /** Keys of an unfinished way have other uses: temperature alone places habitable limits. */
  readonly keepsUnfinished?: boolean;
}

const heatStores = [['heatCapacity'], ['mixedLayer'], ['atmosphere'], ['ground']] as const;

/** The one table of alternatives. */
export const alternatives: readonly Alternatives[] = [
  { section: 'star', ways: [['luminosity'], ['temperature', 'radius']], mayAgree: true, keepsUnfinished: true },
  { section: 'star', ways: [['mass'], ['density']] },
  {
    section: 'orbit',
    ways: [['semiMajorAxis'], ['period'], ['scaledSemiMajorAxis'], ['instellation']],
    mayAgree: true,
  },
  {
    section: 'orbit',
    ways: [['eccentricity'], ['eCosOmega', 'eSinOmega'], ['sqrtECosOmega', 'sqrtESinOmega']],
    companions: ['argumentOfPeriapsis'],
  },
  { section: 'orbit', ways: [['periapsisTime'], ['transitTime'], ['epoch', 'meanAnomaly']] },
  { section: 'planet', ways: [['bondAlbedo'], ['albedo']] },
  { section: 'planet', ways: [['emissivity'], ['emission']] },
  { section: 'planet.emission', ways: [['opticalDepth'], ['linear']] },
  { section: 'planet.heatStore', ways: heatStores },
  { section: 'planet.landHeatStore', ways: heatStores },
  { section: 'planet.frozenHeatStore', ways: heatStores },
];

/** All keys of a way, companions included. */
export function keysOf(group: Alternatives, way: readonly string[]): readonly string[] {
  return way === group.ways[0] ? [...way, ...(group.companions ?? [])] : way;
}

/** `base` with `patch` laid over it. Nothing is copied that does not change. */
export function merge(base: Branch, patch: Branch, section = ''): Branch {
  const entries = new Map<string, Entry>();
  const replaced = replacedKeys(base, patch, section);
  for (const [key, entry] of base.entries) if (!replaced.has(key)) entries.set(key, entry);
  for (const [key, entry] of patch.entries) {
    const below = entries.get(key)?.tree;
    if (isNull(entry.tree)) entries.delete(key);
    else if (below?.kind === 'branch' && entry.tree.kind === 'branch') {
      entries.set(key, { ...entries.get(key)!, tree: merge(below, entry.tree, section ? `${section}.${key}` : key) });
    } else entries.set(key, { keyAt: entry.keyAt, tree: withoutNulls(entry.tree) });
  }
  return { ...base, entries };
}

/** Keys of a section of the base that give way because the patch says the same thing another way, each with the patch's keys that do. */
function replacedKeys(base: Branch, patch: Branch, section: string): ReadonlyMap<string, readonly string[]> {
  const replaced = new Map<string, readonly string[]>();
  for (const group of alternatives) {
    if (group.section !== section) continue;
    const chosen = group.ways.filter((way) => isChosen(way, base, patch));
    if (!chosen.length) continue;
    const kept = new Set(chosen.flatMap((way) => keysOf(group, way)));
    const by = chosen.flat().filter((key) => patch.entries.has(key));
    for (const way of group.ways) {
      if (chosen.includes(way) || (group.keepsUnfinished && !way.every((key) => base.entries.has(key)))) continue;
      for (const key of keysOf(group, way)) if (base.entries.has(key) && !kept.has(key)) replaced.set(key, by);
    }
  }
  return replaced;
}

/** A key of a scenario that others replace. All dotted. */
export interface Replaced {
  readonly key: string;
  readonly by: readonly string[];
}

/** What of the base gives way when the patch is laid over it. */
export function replacedIn(base: Branch, patch: Branch, path: readonly string[] = []): Replaced[] {
  const dotted = (key: string) => [...path, key].join('.');
  const gone = replacedKeys(base, patch, path.join('.'));
  const below = [...patch.entries].flatMap(([key, { tree }]) => {
    const under = base.entries.get(key)?.tree;
    return !gone.has(key) && under?.kind === 'branch' && tree.kind === 'branch'
      ? replacedIn(under, tree, [...path, key])
      : [];
  });
  return [...[...gone].map(([key, by]) => ({ key: dotted(key), by: by.map(dotted) })), ...below];
}

/** The patch gives a key of this way, and with the base it is complete. */
function isChosen(way: readonly string[], base: Branch, patch: Branch): boolean {
  const gives = (key: string) => patch.entries.has(key) && !isNull(patch.entries.get(key)?.tree);
  return way.some(gives) && way.every((key) => gives(key) || (base.entries.has(key) && !patch.entries.has(key)));
}

function withoutNulls(tree: Tree): Tree {
  if (tree.kind !== 'branch') return tree;
  const entries = new Map<string, Entry>();
  for (const [key, entry] of tree.entries) {
    if (!isNull(entry.tree)) entries.set(key, { keyAt: entry.keyAt, tree: withoutNulls(entry.tree) });
  }
  return { ...tree, entries };
}

/** A patch that sets one dotted key, for `merge`: what `--along` and live controls lay over a case. */
export function patchOf(key: string, value: string | number): Branch {
  const path = key.split('.');
  return branchAt(path, {
    kind: 'leaf',
    at: nowhere,
    path,
    value,
    text: String(value),
    quoted: typeof value === 'string',
  });
}
