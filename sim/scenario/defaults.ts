/** The one place where defaults stand. Star, orbit, albedo and heat store have none. */
import { type Branch, type Entry, isNull, type Leaf, subtree } from './tree.ts';

interface Default {
  readonly section: 'planet' | 'solve' | null;
  readonly key: string;
  readonly value: string | number;
  readonly text: string;
  /** Another way to say it, which leaves the default out. */
  readonly unless?: string;
}

const defaults: readonly Default[] = [
  { section: null, key: 'model', value: 'lumped', text: 'lumped' },
  { section: 'planet', key: 'mass', value: '0 kg', text: '0 kg' },
  { section: 'planet', key: 'emissivity', value: 1, text: '1', unless: 'emission' },
  { section: 'planet', key: 'absorbingFraction', value: 0.25, text: '0.25' },
  { section: 'planet', key: 'internalHeat', value: '0 W/m2', text: '0 W/m2' },
  { section: 'solve', key: 'tolerance', value: 1e-6, text: '1e-6' },
  { section: 'solve', key: 'start', value: 'periodic', text: 'periodic' },
  { section: 'solve', key: 'samples', value: 720, text: '720' },
  { section: 'solve', key: 'spacing', value: 'balancedAnomaly', text: 'balancedAnomaly' },
  { section: 'solve', key: 'seed', value: 1, text: '1' },
];
const startPath = ['solve', 'start'];
const startAt: Default = { section: 'solve', key: 'at', value: '0 deg', text: '0 deg' };

/** The tree with every default that it leaves open; `isDefault` marks what was added. */
export function withDefaults(tree: Branch): Branch {
  let filled = tree;
  for (const one of defaults) {
    const path = one.section ? [one.section] : [];
    const section = subtree(filled, path);
    if (section && section.kind !== 'branch') continue; // wrong, and told elsewhere
    if (has(section, one.key) || (one.unless !== undefined && has(section, one.unless))) continue;
    filled = put(filled, path, one);
  }
  return hasOpenStart(filled) ? put(filled, startPath, startAt) : filled;
}

/** A case that runs forward, with the default that its start leaves open in the whole (`filled`) case. */
export function withStartDefault(tree: Branch, filled: Branch): Branch {
  const at = subtree(filled, [...startPath, startAt.key]);
  return hasOpenStart(tree) && at?.kind === 'leaf' && at.isDefault ? put(tree, startPath, startAt) : tree;
}

function hasOpenStart(tree: Branch): boolean {
  const start = subtree(tree, startPath);
  return start?.kind === 'branch' && !has(start, startAt.key);
}

function has(section: Branch | undefined, key: string): boolean {
  const found = section?.entries.get(key)?.tree;
  return found !== undefined && !isNull(found);
}

function put(tree: Branch, path: readonly string[], { key, value, text }: Default): Branch {
  const [step, ...rest] = path;
  const entries = new Map<string, Entry>(tree.entries);
  if (step === undefined) {
    const leaf: Leaf = {
      kind: 'leaf',
      at: tree.at,
      path: [...tree.path, key],
      value,
      text,
      quoted: false,
      isDefault: true,
    };
    entries.set(key, { keyAt: tree.at, tree: leaf });
  } else {
    const below = entries.get(step);
    const empty: Branch = { kind: 'branch', at: tree.at, path: [...tree.path, step], entries: new Map() };
    const section = below?.tree.kind === 'branch' ? below.tree : empty;
    entries.set(step, {
      keyAt: below?.keyAt ?? tree.at,
      tree: put(section, rest, { section: null, key, value, text }),
    });
  }
  return { ...tree, entries };
}
