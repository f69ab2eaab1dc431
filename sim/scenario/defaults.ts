/** The one place where defaults stand. Star, orbit, albedo and heat store have none. */
import { models } from '../models/index.ts';
import type { ModelAsks } from '../models/model.ts';
import { type Branch, type Entry, isNull, type Leaf, subtree, type Tree } from './tree.ts';

interface Default {
  readonly section: 'planet' | 'solve' | null;
  readonly key: string;
  readonly value: string | number;
  readonly text: string;
  /** Another way to say it, which leaves the default out. */
  readonly unless?: string;
  /** Only for models that ask for it. */
  readonly asks?: keyof ModelAsks;
  /** Only where nothing else can be meant. */
  readonly when?: (tree: Branch) => boolean;
}

const model: Default = { section: null, key: 'model', value: 'lumped', text: 'lumped' };
const defaults: readonly Default[] = [
  model,
  { section: 'planet', key: 'emissivity', value: 1, text: '1', unless: 'emission' },
  { section: 'planet', key: 'absorbingFraction', value: 0.25, text: '0.25', asks: 'absorbingFraction' },
  { section: 'planet', key: 'internalHeat', value: '0 W/m2', text: '0 W/m2' },
  { section: 'planet', key: 'bands', value: 90, text: '90', asks: 'globe' },
  { section: 'planet', key: 'insolation', value: 'daily', text: 'daily', asks: 'globe' },
  {
    section: 'planet',
    key: 'solarLongitudeOfPeriapsis',
    value: '0 deg',
    text: '0 deg',
    asks: 'globe',
    when: isCircle,
  },
  { section: 'solve', key: 'tolerance', value: 1e-6, text: '1e-6' },
  { section: 'solve', key: 'start', value: 'periodic', text: 'periodic' },
  { section: 'solve', key: 'samples', value: 720, text: '720' },
  { section: 'solve', key: 'spacing', value: 'balancedAnomaly', text: 'balancedAnomaly' },
];
const startPath = ['solve', 'start'];
const startAt: Default = { section: 'solve', key: 'at', value: '0 deg', text: '0 deg' };

/** The tree with every default that it leaves open to one of `names`, models; `isDefault` marks what was added. */
export function withDefaults(tree: Branch, names: readonly string[] = [modelOf(tree)]): Branch {
  let filled = tree;
  for (const one of defaults) {
    const { asks } = one;
    if (asks !== undefined && !names.some((name) => Object.hasOwn(models, name) && models[name].asks[asks])) continue;
    if (one.when && !one.when(tree)) continue;
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

function modelOf(tree: Branch): string {
  const named = subtree(tree, [model.key]);
  return named?.kind === 'leaf' && named.value !== null ? named.text : String(model.value);
}

const shapes = [['eccentricity'], ['eCosOmega', 'eSinOmega'], ['sqrtECosOmega', 'sqrtESinOmega']];

/** A circle has no periapsis: its year begins where the light is said to. */
function isCircle(tree: Branch): boolean {
  return shapes.some((keys) => keys.every((key) => isZero(subtree(tree, ['orbit', key]))));
}

function isZero(tree: Tree | undefined): boolean {
  return tree?.kind === 'leaf' && tree.text.trim() !== '' && Number(tree.text) === 0;
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
